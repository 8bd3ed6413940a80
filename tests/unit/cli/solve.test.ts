import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { AppError } from '#shared/errors/AppError.ts';
import { solve } from '#scripts/cli/solve.ts';
import { aLine } from '#tests/builders/aLine.ts';

let folder: string;
let file: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'frame-'));
  file = join(folder, 'line.json');
  writeFileSync(file, JSON.stringify(aLine({ ends: ['clamped', 'free'], divisions: 2 })));
});
afterAll(() => {
  rmSync(folder, { recursive: true });
});

/** What a solve prints, and its exit code. */
async function run(args: string[], input = ''): Promise<{ code: number; out: string }> {
  let out = '';
  const code = await solve(args, {
    input: Readable.from([Buffer.from(input)]),
    out: (text) => (out += text),
    err: () => undefined,
  });
  return { code, out };
}

async function issuesOf(args: string[], input = ''): Promise<string[]> {
  const error: unknown = await run(args, input).catch((reason: unknown) => reason);
  if (!(error instanceof AppError)) throw new Error('It was not refused.');
  return (error.details.issues ?? []).map(({ message }) => message);
}

const report = z.strictObject({
  frequenciesHz: z.array(z.number()),
  rigidBodyModes: z.int(),
  backwardErrors: z.array(z.number()),
  freeDof: z.int(),
  totalMassKg: z.number(),
  warnings: z.array(z.object({ path: z.string(), message: z.string() })),
  count: z.strictObject({
    shiftHz: z.number(),
    below: z.int(),
    found: z.int(),
    returned: z.int(),
    complete: z.boolean(),
  }),
  timing: z.strictObject({
    read: z.number(),
    assemble: z.number(),
    order: z.number(),
    symbolic: z.number(),
    factor: z.number(),
    iterate: z.number(),
    finish: z.number(),
    certify: z.number(),
    total: z.number(),
  }),
});

/** Starting a process on a busy machine; the solve itself takes milliseconds. */
const PROCESS_TIME_LIMIT = 60_000;

/** Runs the command as people do, in a process of its own. */
function command(args: string[], input = '') {
  return spawnSync(process.execPath, ['--import', 'tsx', 'scripts/cli.ts', ...args], {
    input,
    encoding: 'utf8',
  });
}

describe('solve on the command line', () => {
  it('prints one JSON object with --json', async () => {
    const { code, out } = await run([file, '--method', 'consistent', '--modes', '3', '--json']);
    expect(code).toBe(0);
    const result = report.parse(JSON.parse(out));
    // Cantilever of two consistent elements, ω √(mL⁴/EI), computed with general-purpose numerical libraries.
    const omega = result.frequenciesHz.map((hz) => (2 * Math.PI * hz).toFixed(5));
    expect(omega).toEqual(['3.51772', '22.22147', '75.15708']);
    expect(result).toMatchObject({ rigidBodyModes: 0, freeDof: 4, totalMassKg: 1 });
    expect(result.count).toMatchObject({ below: 3, found: 3, returned: 3, complete: true });
    expect(result.timing.total).toBeGreaterThan(0);
  });

  it('prints a table for people, from standard input too', async () => {
    const input = JSON.stringify(aLine({ ends: ['free', 'free'], divisions: 2 }));
    const { out } = await run(['-', '--method', 'lumped', '--modes', '3'], input);
    expect(out).toContain('lumped mass, 6 free unknowns, 1 kg');
    expect(out).toContain('rigid: moves along Z');
    expect(out).toContain('none is missed');
  });

  it('lets --divisions override every beam, and --up-to bound the frequency', async () => {
    const args = [file, '--method', 'consistent', '--up-to', '4', '--divisions', '10', '--json'];
    const result = report.parse(JSON.parse((await run([...args, '--repeat', '3'])).out));
    expect(result.freeDof).toBe(20);
    expect((2 * Math.PI * result.frequenciesHz[1]!).toFixed(5)).toBe('22.03522');
    expect(result.frequenciesHz).toHaveLength(2);
  });

  it.each([
    [['--method', 'consistent', '--modes', '1'], 'Name the file'],
    [['x', '--modes', '1'], '--method takes one of'],
    [['x', '--method', 'consistent'], 'either --modes or --up-to'],
    [['x', '--method', 'consistent', '--modes', '1', '--up-to', '5'], 'either --modes or --up-to'],
    [['x', '--method', 'consistent', '--modes', '0'], '--modes takes at least 1'],
    [['x', '--method', 'consistent', '--up-to', 'abc'], '--up-to takes a frequency'],
    [['x', '--method', 'consistent', '--modes', '1', '--colour'], '--colour'],
  ])('refuses %j', async (args, sentence) => {
    expect((await issuesOf(args)).join(' ')).toContain(sentence);
  });

  it(
    'says every reason why a document is refused, and exits with 1',
    { timeout: PROCESS_TIME_LIMIT },
    () => {
      const broken = aLine({ ends: ['clamped', 'free'], divisions: 2 });
      broken.members[0]!.material = 'none';
      broken.members[0]!.section = 'none';
      const args = ['solve', '-', '--method', 'consistent', '--modes', '1'];
      const json = command([...args, '--json'], JSON.stringify(broken));
      expect(json.status).toBe(1);
      const { errors } = JSON.parse(json.stdout) as { errors: { path: string; message: string }[] };
      expect(errors.map(({ path }) => path).sort()).toEqual([
        'members.0.material',
        'members.0.section',
      ]);
      const text = command(args, 'not JSON');
      expect(text.status).toBe(1);
      expect(text.stdout).toBe('');
      expect(text.stderr).toContain('not JSON');
      expect(text.stderr).not.toMatch(/^\s+at /m);
    },
  );

  it('says so when its answer cannot be written', { timeout: PROCESS_TIME_LIMIT }, () => {
    const into = (target: string) =>
      spawnSync(
        'sh',
        [
          '-c',
          `"$0" --import tsx scripts/cli.ts solve "$1" --method lumped --modes 1 ${target}`,
          process.execPath,
          file,
        ],
        { encoding: 'utf8' },
      );
    // A pipe whose reader is gone ends the command quietly.
    expect(into('| true').stderr).toBe('');
    const full = into('> /dev/full');
    expect(full.status).toBe(1);
    expect(full.stderr).toMatch(/^The answer cannot be written: [^\n]*\n$/);
  });

  it('refuses more than 100 MB, and reads no further', async () => {
    const megabyte = Buffer.alloc(2 ** 20, ' ');
    let sent = 0;
    const input = Readable.from(
      (function* () {
        while (sent < 1000) {
          sent += 1;
          yield megabyte;
        }
      })(),
    );
    const error: unknown = await solve(['-', '--method', 'lumped', '--modes', '1'], {
      input,
      out: () => undefined,
      err: () => undefined,
    }).catch((reason: unknown) => reason);
    expect(error).toMatchObject({ code: 'too-large' });
    expect(sent).toBeLessThan(200);
  });

  it('gives with --repeat one of its runs, the one of median time', async () => {
    const args = [file, '--method', 'consistent', '--modes', '2', '--json'];
    const once = report.parse(JSON.parse((await run(args)).out));
    const often = report.parse(JSON.parse((await run([...args, '--repeat', '5'])).out));
    expect(often.frequenciesHz).toEqual(once.frequenciesHz);
    // `total` runs from `assemble` to `certify`, `read` apart.
    const { read, total, ...steps } = often.timing;
    expect(read).toBeGreaterThan(0);
    const sum = Object.values(steps).reduce((a, b) => a + b, 0);
    expect(sum).toBeLessThanOrEqual(total * (1 + 1e-9));
    expect(sum).toBeGreaterThan(0);
  });

  it('takes the operating state by its id', async () => {
    const laden = aLine({ ends: ['clamped', 'free'], divisions: 2, tipMass: 1 });
    laden.states = [{ id: 'empty', name: 'Empty', masses: { tip: { present: false } } }];
    const args = ['-', '--method', 'consistent', '--modes', '1', '--state', 'empty', '--json'];
    const result = report.parse(JSON.parse((await run(args, JSON.stringify(laden))).out));
    expect((2 * Math.PI * result.frequenciesHz[0]!).toFixed(5)).toBe('3.51772');
    expect(result.totalMassKg).toBe(1);
  });

  it('names a mechanism without a stack trace', { timeout: PROCESS_TIME_LIMIT }, () => {
    const loose = aLine({ ends: ['clamped', 'free'], divisions: 1, unknowns: ['u', 'w', 'ry'] });
    loose.members[0]!.kind = 'bar';
    loose.supports = [{ node: 'a', fixed: ['u', 'w', 'ry'] }];
    const args = ['solve', '-', '--method', 'lumped', '--modes', '1'];
    const mechanism = command(args, JSON.stringify(loose));
    expect(mechanism.status).toBe(1);
    expect(mechanism.stderr).toContain('“b” moves along Z');
    expect(mechanism.stderr).not.toMatch(/^\s+at /m);
    const state = command(
      [...args, '--state', 'full', '--json'],
      JSON.stringify(aLine({ ends: ['clamped', 'free'], divisions: 1 })),
    );
    expect(state.status).toBe(1);
    expect(state.stdout).toContain('Operating state “full” does not exist');
  });
});
