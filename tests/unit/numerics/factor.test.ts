import fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { analyse } from '#shared/numerics/factor/analyse.ts';
import { factorise } from '#shared/numerics/factor/factorise.ts';
import { solveLdlt } from '#shared/numerics/factor/solve.ts';
import { ZeroPivotError } from '#shared/numerics/factor/ZeroPivotError.ts';
import { multiplySymmetric } from '#shared/numerics/sparse/SymmetricCsc.ts';
import {
  arbitraryPencil,
  dense,
  denseSpectrum,
  diagonal,
  PROPERTY,
  sparse,
  spring,
  type Triplet,
} from './pencils.ts';
import { rackPair } from './rackPair.ts';

// Properties run a hundred cases each; a busy machine takes its time.
vi.setConfig({ testTimeout: 60_000 });

function zeroPivotOf(run: () => unknown): ZeroPivotError {
  try {
    run();
  } catch (error) {
    if (error instanceof ZeroPivotError) return error;
    throw error;
  }
  throw new Error('No zero pivot was met.');
}

describe('factorise and solveLdlt', () => {
  it('solve (K − σM) x = b for random pencils and shifts', () => {
    fc.assert(
      fc.property(
        arbitraryPencil(true),
        fc.double({ min: -50, max: 0, noNaN: true }),
        (p, sigma) => {
          const ldlt = factorise(analyse(p.K, p.M), p.K, p.M, sigma);
          const x = Float64Array.from({ length: p.n }, (_, i) => Math.cos(3 * i + 1));
          const b = new Float64Array(p.n);
          const Mx = new Float64Array(p.n);
          multiplySymmetric(p.K, x, b);
          multiplySymmetric(p.M, x, Mx);
          for (let i = 0; i < p.n; i++) b[i]! -= sigma * Mx[i]!;
          solveLdlt(ldlt, b);
          // Condition numbers stay below 1e6 here, so 1e-9 leaves rounding a factor of ten.
          b.forEach((value, i) => expect(Math.abs(value - x[i]!)).toBeLessThan(1e-9));
        },
      ),
      PROPERTY,
    );
  });

  it('count the eigenvalues below σ by negative pivots (Sylvester)', () => {
    fc.assert(
      fc.property(
        arbitraryPencil(true),
        fc.double({ min: 0.01, max: 0.99, noNaN: true }),
        (p, at) => {
          const spectrum = denseSpectrum(dense(p.K), p.mass);
          const symbolic = analyse(p.K, p.M);
          for (let k = 0; k <= spectrum.length; k++) {
            const low = k > 0 ? spectrum[k - 1]! : 0;
            const high = k < spectrum.length ? spectrum[k]! : 3 * low;
            // Shifts that rounding cannot tell from an eigenvalue prove nothing.
            if (high - low < 1e-6 * high) continue;
            const ldlt = factorise(symbolic, p.K, p.M, low + at * (high - low));
            expect(ldlt.negativePivots).toBe(k);
          }
        },
      ),
      PROPERTY,
    );
  });

  it('give the same for every numbering of the unknowns', () => {
    const { K } = rackPair({ bays: [2, 1], storeys: 2, divisions: 2 });
    const n = K.n;
    const number = Int32Array.from({ length: n }, (_, i) => (i * 7919 + 13) % n); // 7919 is prime
    const triplets: Triplet[] = [];
    for (let j = 0; j < n; j++) {
      for (let p = K.colPtr[j]!; p < K.colPtr[j + 1]!; p++) {
        triplets.push([number[K.rowIdx[p]!]!, number[j]!, K.values[p]!]);
      }
    }
    const turned = sparse(n, triplets);
    const x = Float64Array.from({ length: n }, (_, i) => Math.sin(i));
    const y = new Float64Array(n);
    x.forEach((value, i) => (y[number[i]!] = value));
    solveLdlt(factorise(analyse(K), K, null, 0), x);
    solveLdlt(factorise(analyse(turned), turned, null, 0), y);
    const largest = Math.max(...x.map(Math.abs));
    x.forEach((value, i) => {
      expect(Math.abs(value - y[number[i]!]!)).toBeLessThan(1e-9 * largest);
    });
  });

  it('reuse symbolic factor and storage without a trace of the last shift', () => {
    const { K, M } = rackPair({ bays: [2, 1], storeys: 2, divisions: 2 });
    const symbolic = analyse(K, M);
    const fresh = factorise(symbolic, K, M, 5e4);
    const again = factorise(symbolic, K, M, 5e4, factorise(symbolic, K, M, 1e3));
    expect(again.negativePivots).toBe(fresh.negativePivots);
    const x = Float64Array.from({ length: K.n }, (_, i) => Math.cos(i));
    const y = x.slice();
    solveLdlt(fresh, x);
    solveLdlt(again, y);
    expect(y).toEqual(x);
  });

  it('take a mass where the stiffness has no entry', () => {
    const K = sparse(3, [...spring(0, -1, 2), ...spring(1, -1, 3), ...spring(2, -1, 4)]);
    const M = sparse(3, [
      [0, 0, 1],
      [1, 1, 1],
      [2, 2, 1],
      [2, 0, 0.5],
    ]);
    // 2×2 block of unknowns 0 and 2 at σ = 1: [1 −0.5; −0.5 3], determinant 2.75.
    const x = Float64Array.of(1, 4, 0);
    solveLdlt(factorise(analyse(K, M), K, M, 1), x);
    expect(x[0]).toBeCloseTo(3 / 2.75, 14);
    expect(x[1]).toBeCloseTo(2, 14);
    expect(x[2]).toBeCloseTo(0.5 / 2.75, 14);
    expect(() => factorise(analyse(K), K, M, 1)).toThrow(RangeError);
  });
});

describe('ZeroPivotError', () => {
  it('names a free unknown and the motion of a chain that nothing holds', () => {
    const triplets = [0, 1, 2, 3].flatMap((i) => spring(i, i + 1, 10 + i));
    const K = sparse(6, [...triplets, ...spring(5, -1, 1)]);
    const error = zeroPivotOf(() => factorise(analyse(K), K, null, 0));
    expect(error.unknown).toBeLessThan(5);
    expect(Math.abs(error.relativePivot)).toBeLessThan(1e-13);
    // Moving all five masses alike is the only motion without stiffness; the sixth stays.
    error.motion.forEach((value, i) => expect(value).toBeCloseTo(i < 5 ? 1 : 0, 12));
  });

  it('is met at every shift by an unknown with neither stiffness nor mass', () => {
    const K = diagonal([1, 0, 2]);
    const M = diagonal([1, 0, 1]);
    for (const sigma of [0, -1, 0.5]) {
      const error = zeroPivotOf(() => factorise(analyse(K, M), K, M, sigma));
      expect(error.unknown).toBe(1);
      expect(Array.from(error.motion)).toEqual([0, 1, 0]);
    }
  });

  it('is met when the shift is an eigenvalue', () => {
    const K = diagonal([4, 9]);
    expect(zeroPivotOf(() => factorise(analyse(K), K, diagonal([1, 1]), 9)).unknown).toBe(1);
  });

  it('is met by a free frame at σ = 0 and not a little below', () => {
    const { K, M } = rackPair({ bays: [1, 1], storeys: 2, divisions: 2, clamped: false });
    const symbolic = analyse(K, M);
    expect(() => factorise(symbolic, K, M, 0)).toThrow(ZeroPivotError);
    expect(factorise(symbolic, K, M, -10).negativePivots).toBe(0);
  });
});
