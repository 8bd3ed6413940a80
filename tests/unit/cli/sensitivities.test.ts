import { Readable } from 'node:stream';
import { describe, expect, it } from 'vitest';
import { AppError } from '#shared/errors/AppError.ts';
import { sensitivities } from '#scripts/cli/sensitivities.ts';
import { aStand } from '#tests/builders/aFrame.ts';
import { aLine } from '#tests/builders/aLine.ts';

const CANTILEVER = JSON.stringify(aLine({ ends: ['clamped', 'free'], divisions: 4 }));

async function run(args: string[], input = CANTILEVER): Promise<{ code: number; out: string }> {
  let out = '';
  const code = await sensitivities(args, {
    input: Readable.from([Buffer.from(input)]),
    out: (text) => (out += text),
    err: () => undefined,
  });
  return { code, out };
}

describe('sensitivities on the command line', () => {
  it('rank what moves a mode', async () => {
    const { code, out } = await run(['-', '--mode', '1']);
    expect(code).toBe(0);
    const rows = out.split('\n').map((line) => line.trim().split(/ {2,}/));
    // f ∝ √E / L²: one per cent of E is half a per cent of 0.559589 Hz, 10 mm of 1 m two per cent.
    expect(rows.find(([what]) => what === 'materials unit E')?.at(-1)).toBe('+0.0028');
    expect(rows.find(([what]) => what === 'nodes b x')?.at(-1)).toBe('-0.0112');
    const first = rows.findIndex(([what]) => what === 'what') + 1;
    expect(rows[first]![0]).toMatch(/^nodes [ab] x$/);
  });

  it('print one JSON object with --json, and say where a frequency is shared', async () => {
    const stand = { ...aStand({ divisions: 1 }), supports: [] };
    const { out } = await run(['-', '--mode', '7', '--json'], JSON.stringify(stand));
    const answer = JSON.parse(out) as { repeated: boolean; parameters: { field: string }[] };
    expect(answer).toMatchObject({ mode: 7, repeated: false, complete: true });
    expect(answer.parameters.map(({ field }) => field)).toContain('offset.2');
  });

  it.each([
    [['-'], 'Say which mode'],
    [['-', '--mode', '0'], '--mode takes at least 1.'],
    [['-', '--mode', '1', '--method', 'mesh-free'], '--method takes consistent or lumped.'],
  ])('refuse %j', async (args, message) => {
    const error: unknown = await run(args).catch((reason: unknown) => reason);
    if (!(error instanceof AppError)) throw new Error('It was not refused.');
    const messages = (error.details.issues ?? []).map((issue) => issue.message).join('\n');
    expect(messages).toContain(message);
  });

  it('refuse a rigid-body mode', async () => {
    const free = JSON.stringify({ ...aStand({ divisions: 1 }), supports: [] });
    await expect(run(['-', '--mode', '3'], free)).rejects.toThrow('rigid-body mode');
  });
});
