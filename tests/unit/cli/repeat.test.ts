import { Readable } from 'node:stream';
import { expect, it, vi } from 'vitest';
import { solve } from '#scripts/cli/solve.ts';
import type * as solver from '#shared/analysis/solveFrame.ts';
import { aLine } from '#tests/builders/aLine.ts';

const totals = vi.hoisted((): number[] => []);

// Times are handed in, so that the median is known.
vi.mock('#shared/analysis/solveFrame.ts', async (load) => {
  const real = await load<typeof solver>();
  return {
    ...real,
    solveFrame: (...given: Parameters<typeof real.solveFrame>) => {
      const { summary, shapes } = real.solveFrame(...given);
      const total = totals.shift();
      if (total === undefined) throw new Error('One run too many.');
      return { shapes, summary: { ...summary, timing: { ...summary.timing, total } } };
    },
  };
});

it.each([
  [[7], 7],
  [[9, 1, 5], 5],
  [[9, 1, 5, 2, 30], 5],
])('of runs of %j ms prints the one of median total', async (times, median) => {
  totals.push(...times);
  let out = '';
  const text = JSON.stringify(aLine({ ends: ['clamped', 'free'], divisions: 1 }));
  const repeat = String(times.length);
  const args = ['-', '--method', 'lumped', '--modes', '1', '--repeat', repeat, '--json'];
  await solve(args, {
    input: Readable.from([Buffer.from(text)]),
    out: (part) => (out += part),
    err: () => undefined,
  });
  expect(totals).toEqual([]);
  expect(JSON.parse(out)).toMatchObject({ timing: { total: median } });
});
