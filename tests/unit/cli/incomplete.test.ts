import { Readable } from 'node:stream';
import { expect, it, vi } from 'vitest';
import { solve } from '#scripts/cli/solve.ts';
import type * as solver from '#shared/analysis/solveFrame.ts';
import { aLine } from '#tests/builders/aLine.ts';

// No known frame leaves the solver incomplete, so its answer is made to say that one mode is missing.
vi.mock('#shared/analysis/solveFrame.ts', async (load) => {
  const real = await load<typeof solver>();
  return {
    ...real,
    solveFrame: (...given: Parameters<typeof real.solveFrame>) => {
      const { summary, shapes } = real.solveFrame(...given);
      const count = { ...summary.count, below: summary.count.found + 1, complete: false };
      return { shapes, summary: { ...summary, count, complete: false } };
    },
  };
});

const INPUT = JSON.stringify(aLine({ ends: ['clamped', 'free'], divisions: 2 }));

it.each([true, false])(
  'an incomplete solve is printed all the same and exits with 2 (--json %s)',
  async (json) => {
    let out = '';
    const code = await solve(
      ['-', '--method', 'consistent', '--modes', '2', ...(json ? ['--json'] : [])],
      {
        input: Readable.from([Buffer.from(INPUT)]),
        out: (text) => (out += text),
        err: () => undefined,
      },
    );
    expect(code).toBe(2);
    if (json) {
      const report = JSON.parse(out) as { frequenciesHz: number[]; count: object };
      expect(report.frequenciesHz).toHaveLength(2);
      expect(report.count).toMatchObject({ below: 3, found: 2, complete: false });
    } else {
      expect(out).toContain('INCOMPLETE: 3 modes lie below');
      expect(out).not.toContain('none is missed');
    }
  },
);
