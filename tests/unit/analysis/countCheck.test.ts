import { expect, it, vi } from 'vitest';
import { digitsOf } from '#shared/analysis/summariseModes.ts';
import { solveFrame } from '#shared/analysis/solveFrame.ts';
import type * as eigen from '#shared/numerics/eigen/lowestModes.ts';
import { accepted, aLine } from '#tests/builders/aLine.ts';

// No known frame makes the solver miss a mode, so its count is made to lie one above what was found.
vi.mock('#shared/numerics/eigen/lowestModes.ts', async (load) => {
  const real = await load<typeof eigen>();
  return {
    ...real,
    findModes: (...given: Parameters<typeof real.findModes>) => {
      const found = real.findModes(...given);
      return { ...found, below: found.found + 1, complete: false };
    },
  };
});

it('a count above what was found is said, and the result is not complete', () => {
  const document = accepted(aLine({ ends: ['clamped', 'free'], divisions: 2 }));
  const { summary } = solveFrame({
    document,
    method: 'consistent',
    stateId: null,
    settings: { modes: 2 },
  });
  expect(summary.complete).toBe(false);
  expect(summary.count).toMatchObject({ found: 2, below: 3, returned: 2, complete: false });
});

it('claims fewer digits the larger the backward error and the frame', () => {
  // One digit for the factor 10, half a digit per tenfold unknowns.
  expect(digitsOf(1e-8, 100)).toBeCloseTo(6, 12);
  expect(digitsOf(1e-6, 100)).toBeCloseTo(4, 12);
  expect(digitsOf(1e-8, 10_000)).toBeCloseTo(5, 12);
});
