import { performance } from 'node:perf_hooks';
import { z } from 'zod';
import { solveFrame } from '#shared/analysis/solveFrame.ts';
import { METHODS, solveSettings } from '#shared/schemas/solveResult.ts';
import type { Method, SolveSettings, SolveSummary } from '#shared/schemas/solveResult.ts';
import { parseDocument, readText } from './readDocument.ts';
import { readOptions, wholeNumber } from './readOptions.ts';
import { solveJson, solveTable } from './solveReport.ts';
import type { Streams } from './Streams.ts';

const USAGE =
  'solve FILE --method consistent|lumped|mesh-free (--modes N | --up-to HZ) [--divisions N] [--state ID] ' +
  '[--repeat R] [--json]';

/** Exit codes of a solve that gave a result. */
const COMPLETE = 0;
const INCOMPLETE = 2;
const MOST_REPEATS = 1000;

interface SolveArguments {
  readonly file: string;
  readonly method: Method;
  readonly settings: SolveSettings;
  readonly stateId: string | null;
  readonly repeat: number;
  readonly json: boolean;
}

/** Solves the frame document in FILE (`-` = standard input) and prints its modes; needs no database. */
export async function solve(args: string[], streams: Streams): Promise<number> {
  const given = readArguments(args);
  const text = await readText(given.file, streams.input);
  const first = solveText(text, given);
  const runs = [first];
  while (runs.length < given.repeat) runs.push(solveText(text, given));
  runs.sort((a, b) => a.timing.total - b.timing.total);
  // The lower median of an even number: a run that was measured, not a mean of two.
  const summary = runs[(runs.length - 1) >> 1] ?? first;
  streams.out(given.json ? solveJson(summary) : solveTable(summary));
  return summary.complete ? COMPLETE : INCOMPLETE;
}

function solveText(text: string, { method, stateId, settings }: SolveArguments): SolveSummary {
  const began = performance.now();
  const { document, warnings } = parseDocument(text);
  const read = performance.now() - began;
  const { summary } = solveFrame(
    { document, method, stateId, settings },
    { warnings, now: () => performance.now() },
  );
  return { ...summary, timing: { ...summary.timing, read } };
}

const optionValues = z.object({
  method: z.enum(METHODS, { error: `takes one of ${METHODS.join(', ')}.` }),
  modes: wholeNumber(200).optional(),
  'up-to': z
    .string()
    .transform(Number)
    .pipe(
      z
        .number({ error: 'takes a frequency in Hz.' })
        .positive('takes a frequency above 0 Hz.')
        .max(1e6, 'takes at most 1000000 Hz.'),
    )
    .optional(),
  divisions: wholeNumber(200).optional(),
  state: z.string().optional(),
  repeat: wholeNumber(MOST_REPEATS).optional(),
  json: z.boolean().optional(),
});

function readArguments(args: string[]): SolveArguments {
  const { file, options } = readOptions(args, {
    usage: USAGE,
    types: {
      method: { type: 'string' },
      modes: { type: 'string' },
      'up-to': { type: 'string' },
      divisions: { type: 'string' },
      state: { type: 'string' },
      repeat: { type: 'string' },
      json: { type: 'boolean' },
    },
    values: optionValues,
    together: (given) =>
      (given['modes'] === undefined) === (given['up-to'] === undefined)
        ? 'Give either --modes or --up-to.'
        : null,
  });
  const { method, modes, 'up-to': upToHz, divisions, state, repeat, json } = options;
  return {
    file,
    method,
    settings: solveSettings.parse({ modes, upToHz, divisions }),
    stateId: state ?? null,
    repeat: repeat ?? 1,
    json: json ?? false,
  };
}
