import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { closestApproach } from '#shared/frame/checks/closestApproach.ts';
import { visitClosePairs } from '#shared/frame/checks/closePairs.ts';

const SEED = { seed: 1852, numRuns: 60 };

/** Distance of two lines by two nested searches: it is a convex function of the places on both. */
function searchedDistance(lines: Float64Array, i: number, j: number): number {
  const at = (line: number, share: number) =>
    [0, 1, 2].map(
      (axis) =>
        lines[6 * line + axis]! + share * (lines[6 * line + 3 + axis]! - lines[6 * line + axis]!),
    );
  const least = (f: (x: number) => number): number => {
    let [low, high] = [0, 1];
    for (let step = 0; step < 60; step++) {
      const [a, b] = [low + (high - low) / 3, high - (high - low) / 3];
      if (f(a) < f(b)) high = b;
      else low = a;
    }
    return f((low + high) / 2);
  };
  return least((s) =>
    least((t) => {
      const [p, q] = [at(i, s), at(j, t)];
      return Math.hypot(p[0]! - q[0]!, p[1]! - q[1]!, p[2]! - q[2]!);
    }),
  );
}

const coordinate = (size: number) => fc.double({ min: -size, max: size, noNaN: true });
const line = (size: number, reach: number) =>
  fc
    .tuple(
      fc.tuple(...Array.from({ length: 3 }, () => coordinate(size))),
      fc.tuple(...Array.from({ length: 3 }, () => coordinate(reach))),
    )
    .filter(([, along]) => Math.hypot(...along) > 1e-3)
    .map(([start, along]) => [...start, ...start.map((value, axis) => value + along[axis]!)]);

describe('the closest approach of two lines', () => {
  it('is that of a search over both', () => {
    fc.assert(
      fc.property(line(1, 1), line(1, 1), (a, b) => {
        const lines = Float64Array.from([...a, ...b]);
        const out = new Float64Array(3);
        closestApproach(lines, 0, 1, out);
        expect(out[0]).toBeCloseTo(searchedDistance(lines, 0, 1), 6);
      }),
      SEED,
    );
  });

  it('says where skew lines pass: 0.3 m apart, at a quarter and at half', () => {
    const out = new Float64Array(3);
    closestApproach(Float64Array.of(0, 0, 0, 4, 0, 0, 1, -1, 0.3, 1, 1, 0.3), 0, 1, out);
    expect([...out].map((value) => Number(value.toFixed(12)))).toEqual([0.3, 0.25, 0.5]);
  });
});

describe('the grid of lines', () => {
  it.each([
    ['alike', 1, 0.5],
    ['long ones through each other', 1, 3],
    ['short ones far apart', 20, 0.3],
  ])('misses no close pair: %s', (_, size, reach) => {
    fc.assert(
      fc.property(fc.array(line(size, reach), { minLength: 2, maxLength: 30 }), (all) => {
        const lines = Float64Array.from(all.flat());
        const margin = 0.05;
        const visited = new Map<string, number>();
        const whole = visitClosePairs(lines, margin, (i, j) => {
          visited.set(`${i} ${j}`, (visited.get(`${i} ${j}`) ?? 0) + 1);
        });
        expect(whole).toBe(true);
        const out = new Float64Array(3);
        for (let j = 0; j < all.length; j++) {
          for (let i = 0; i < j; i++) {
            closestApproach(lines, i, j, out);
            if (out[0]! <= margin) expect(visited.get(`${i} ${j}`)).toBe(1);
          }
        }
      }),
      SEED,
    );
  });

  it('leaves out nearly all pairs of a long row, and gives up on a heap', () => {
    const row = Float64Array.from({ length: 6 * 2000 }, (_, k) =>
      k % 3 === 0 ? Math.floor(k / 6) + (k % 6 === 3 ? 1 : 0) : 0,
    );
    let visits = 0;
    expect(visitClosePairs(row, 1e-3, () => (visits += 1))).toBe(true);
    expect(visits).toBeLessThan(3 * 2000);
    const heap = Float64Array.from({ length: 6 * 4000 }, (_, k) => (k % 6 === 3 ? 1 : 0));
    expect(visitClosePairs(heap, 1e-3, () => undefined)).toBe(false);
  });
});
