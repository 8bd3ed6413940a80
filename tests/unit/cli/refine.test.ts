import { Readable } from 'node:stream';
import { describe, expect, it } from 'vitest';
import { AppError } from '#shared/errors/AppError.ts';
import { refine } from '#scripts/cli/refine.ts';
import { aLine } from '#tests/builders/aLine.ts';

const CANTILEVER = JSON.stringify(aLine({ ends: ['clamped', 'free'], divisions: 1 }));

async function run(args: string[], input = CANTILEVER): Promise<{ code: number; out: string }> {
  let out = '';
  const code = await refine(args, {
    input: Readable.from([Buffer.from(input)]),
    out: (text) => (out += text),
    err: () => undefined,
  });
  return { code, out };
}

describe('refine on the command line', () => {
  it('prints one JSON object with --json', async () => {
    const { code, out } = await run(['-', '--modes', '2', '--json']);
    expect(code).toBe(0);
    const report = JSON.parse(out) as { meshFreeHz: number[] };
    expect(report).toMatchObject({ divisions: [1, 2, 4, 8, 16], complete: true });
    // Thomson, Theory of Vibration, App. D: (1.87510407)² = 3.51602.
    expect(2 * Math.PI * report.meshFreeHz[0]!).toBeCloseTo(3.51602, 5);
  });

  it('prints a table of each mass kind, and what may be said of their agreement', async () => {
    const { code, out } = await run(['-', '--modes', '1']);
    expect(code).toBe(0);
    const row = (title: string) => {
      const lines = out.split('\n');
      const at = lines.findIndex((text) => text.startsWith(title));
      return lines[at + 2]!.trim().split(/ {2,}/);
    };
    // ω = 3.53273, 2.44949 in one element, 3.51602 exact [computed independently]; five decimals.
    const consistent = row('consistent mass');
    expect(2 * Math.PI * Number(consistent[1])).toBeCloseTo(3.53273, 4);
    expect(2 * Math.PI * Number(consistent[6])).toBeCloseTo(3.51602, 4);
    expect(consistent.at(-1)).toBe('4.0');
    expect(2 * Math.PI * Number(row('lumped mass')[1])).toBeCloseTo(2.44949, 4);
    expect(row('lumped mass').at(-1)).toBe('2.0');
    expect(out).toContain('agree within 1 % from 8 elements of each beam');
  });

  it.each([
    [[], 'Name the file of a frame document'],
    [['-', '--modes', '0'], '--modes takes at least 1.'],
    [['-', '--method', 'lumped'], 'Usage: refine FILE'],
  ])('refuses %j', async (args, message) => {
    const error: unknown = await run(args).catch((reason: unknown) => reason);
    if (!(error instanceof AppError)) throw new Error('It was not refused.');
    const messages = (error.details.issues ?? []).map((issue) => issue.message).join('\n');
    expect(messages).toContain(message);
  });
});
