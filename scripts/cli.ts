import { AppError } from '#shared/errors/AppError.ts';
import { refine } from './cli/refine.ts';
import { reportFailure } from './cli/reportFailure.ts';
import { sensitivities } from './cli/sensitivities.ts';
import { solve } from './cli/solve.ts';
import type { Streams } from './cli/Streams.ts';

/** Every verb of the command line; each returns the exit code. */
const VERBS = new Map<string, (args: string[], streams: Streams) => Promise<number>>([
  ['solve', solve],
  ['refine', refine],
  ['sensitivities', sensitivities],
]);

async function run(args: string[], streams: Streams): Promise<number> {
  const [verb, ...rest] = args;
  try {
    const command = VERBS.get(verb ?? '');
    if (!command) {
      const wrong = verb === undefined ? 'Say what to do' : `There is no command “${verb}”`;
      throw new AppError('invalid-request', `${wrong}. Commands: ${[...VERBS.keys()].join(', ')}.`);
    }
    return await command(rest, streams);
  } catch (error) {
    return reportFailure(error, args.includes('--json'), streams);
  }
}

// A reader that has seen enough (`| head`) closes the pipe: no failure of the solve. Unheard, the error would print a
// stack trace.
process.stdout.on('error', (error: NodeJS.ErrnoException) => {
  if (error.code === 'EPIPE') return;
  process.stderr.write(`The answer cannot be written: ${error.message}.\n`);
  process.exit(1);
});

process.exitCode = await run(process.argv.slice(2), {
  input: process.stdin,
  out: (text) => process.stdout.write(text),
  err: (text) => process.stderr.write(text),
});
