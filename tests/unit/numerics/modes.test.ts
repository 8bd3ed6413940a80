import fc from 'fast-check';
import * as math from 'mathjs';
import { describe, expect, it, vi } from 'vitest';
import { backwardError } from '#shared/numerics/eigen/backwardError.ts';
import { lowestModes } from '#shared/numerics/eigen/lowestModes.ts';
import type { ModesResult } from '#shared/numerics/eigen/ModesResult.ts';
import { ZeroPivotError } from '#shared/numerics/factor/ZeroPivotError.ts';
import { multiplySymmetric } from '#shared/numerics/sparse/SymmetricCsc.ts';
import {
  arbitraryPencil,
  dense,
  denseSpectrum,
  diagonal,
  type Pencil,
  PROPERTY,
  sparse,
  spring,
  type Triplet,
} from './pencils.ts';
import { rackPair, rigidMotions } from './rackPair.ts';

// Properties run a hundred cases each; a busy machine takes its time.
vi.setConfig({ testTimeout: 60_000 });

function expectSpectrum(result: ModesResult, expected: readonly number[], tolerance = 1e-10): void {
  expect(result.complete).toBe(true);
  expect(result.status).toBe('complete');
  expect(result.found).toBe(result.below);
  expect(result.lambda.length).toBe(expected.length);
  result.lambda.forEach((lambda, k) => {
    expect(Math.abs(lambda - expected[k]!)).toBeLessThanOrEqual(tolerance * expected[k]!);
  });
}

function errorOf(K: Pencil['K'], M: Pencil['M'], phi: Float64Array, lambda: number): number {
  const Kphi = new Float64Array(K.n);
  const Mphi = new Float64Array(K.n);
  multiplySymmetric(K, phi, Kphi);
  multiplySymmetric(M, phi, Mphi);
  const diagonalOf = (A: Pencil['K']) => phi.map((_, j) => A.values[A.colPtr[j]!]!);
  return backwardError({ phi, Kphi, Mphi, lambda }, { K: diagonalOf(K), M: diagonalOf(M) });
}

/**
 * Residuals are let stand at 1e-10 of θ (and shrink in the step of purification); the norms that they are held
 * against are least ones, some times smaller than those of the matrices.
 */
const BACKWARD_TOL = 3e-11;

/** φᵀMφ = I and backward errors at rounding. */
function expectModes({ K, M }: Pencil, result: ModesResult): void {
  const image = new Float64Array(K.n);
  result.phi.forEach((phi, k) => {
    expect(errorOf(K, M, phi, result.lambda[k]!)).toBeLessThan(BACKWARD_TOL);
    multiplySymmetric(M, phi, image);
    for (let j = 0; j <= k; j++) {
      const product = image.reduce((sum, value, i) => sum + value * result.phi[j]![i]!, 0);
      expect(Math.abs(product - (j === k ? 1 : 0))).toBeLessThan(1e-11);
    }
  });
}

/** n masses m in a row, springs k between them; held by a spring at the start or not at all. */
function chain(n: number, k: number, m: number, held: boolean): Pencil {
  const triplets = held ? spring(0, -1, k) : [];
  for (let i = 1; i < n; i++) triplets.push(...spring(i - 1, i, k));
  return { K: sparse(n, triplets), M: diagonal(Array<number>(n).fill(m)) };
}

/** Separate copies of a pencil in one. */
function copies({ K, M }: Pencil, count: number): Pencil {
  const repeat = (A: Pencil['K']) => {
    const triplets: Triplet[] = [];
    for (let c = 0; c < count; c++) {
      for (let j = 0; j < A.n; j++) {
        for (let p = A.colPtr[j]!; p < A.colPtr[j + 1]!; p++) {
          triplets.push([c * A.n + A.rowIdx[p]!, c * A.n + j, A.values[p]!]);
        }
      }
    }
    return sparse(count * A.n, triplets);
  };
  return { K: repeat(K), M: repeat(M) };
}

describe('lowestModes against closed forms', () => {
  it('second difference matrix: λ_k = 2 − 2 cos(kπ/(n+1))', () => {
    // Golub and Van Loan, Matrix Computations, section 4.8.6 (discrete Poisson problem).
    const n = 400;
    const triplets: Triplet[] = [];
    for (let i = 0; i < n; i++) triplets.push([i, i, 2]);
    for (let i = 1; i < n; i++) triplets.push([i, i - 1, -1]);
    const pencil = { K: sparse(n, triplets), M: diagonal(Array<number>(n).fill(1)) };
    const result = lowestModes(pencil.K, pencil.M, { count: 20, seed: 1 });
    const expected = Array.from(
      { length: 20 },
      (_, k) => 4 * Math.sin(((k + 1) * Math.PI) / (2 * (n + 1))) ** 2,
    );
    expectSpectrum(result, expected);
    expectModes(pencil, result);
  });

  it('chain held at one end: ω = 2√(k/m) sin((2j − 1)π / (2(2n + 1)))', () => {
    // Dispersion of the uniform chain (Brillouin, Wave Propagation in Periodic Structures, ch. III)
    // with a fixed and a free end.
    const n = 150;
    const pencil = chain(n, 3e6, 12, true);
    const result = lowestModes(pencil.K, pencil.M, { count: 12, seed: 2 });
    const expected = Array.from(
      { length: 12 },
      (_, j) => ((4 * 3e6) / 12) * Math.sin(((2 * j + 1) * Math.PI) / (2 * (2 * n + 1))) ** 2,
    );
    expectSpectrum(result, expected);
    expectModes(pencil, result);
  });

  it('free chain: the rigid-body motion at exactly 0, then ω = 2√(k/m) sin(jπ/2n)', () => {
    const n = 120;
    const pencil = chain(n, 5e5, 2, false);
    const nullVectors = [new Float64Array(n).fill(1)];
    const result = lowestModes(pencil.K, pencil.M, { count: 10, seed: 3, nullVectors });
    const expected = Array.from(
      { length: 10 },
      (_, j) => ((4 * 5e5) / 2) * Math.sin((j * Math.PI) / (2 * n)) ** 2,
    );
    expect(result.lambda[0]).toBe(0);
    expectSpectrum(result, expected);
    expectModes(pencil, result);
  });

  it('two free chains in one model: both rigid-body motions, pairs above', () => {
    const pencil = copies(chain(40, 1e4, 1, false), 2);
    const half = (first: boolean) =>
      Float64Array.from({ length: 80 }, (_, i) => (i < 40 === first ? 1 : 0));
    const nullVectors = [half(true), half(false)];
    const result = lowestModes(pencil.K, pencil.M, { count: 6, seed: 4, nullVectors });
    const expected = [0, 0, 1, 1, 2, 2].map((j) => 4e4 * Math.sin((j * Math.PI) / 80) ** 2);
    expectSpectrum(result, expected);
    expectModes(pencil, result);
  });
});

describe('lowestModes against dense references', () => {
  it('agrees with ml-matrix on random pencils with a singular mass matrix', () => {
    fc.assert(
      fc.property(arbitraryPencil(true), fc.integer({ min: 1, max: 24 }), (p, count) => {
        const expected = denseSpectrum(dense(p.K), p.mass);
        const result = lowestModes(p.K, p.M, { count, seed: 5 });
        expectSpectrum(result, expected.slice(0, count), 1e-8);
        expectModes(p, result);
      }),
      PROPERTY,
    );
  });

  it('agrees with mathjs on random pencils', () => {
    fc.assert(
      fc.property(arbitraryPencil(false), (p) => {
        const scaled = dense(p.K)
          .to2DArray()
          .map((row, i) => row.map((value, j) => value / Math.sqrt(p.mass[i]! * p.mass[j]!)));
        const { values } = math.eigs(scaled, { eigenvectors: false, precision: 1e-14 });
        const expected = (values as number[]).slice().sort((a, b) => a - b);
        const result = lowestModes(p.K, p.M, { count: 3, seed: 6 });
        expectSpectrum(result, expected.slice(0, 3), 1e-7);
      }),
      { ...PROPERTY, numRuns: 40 },
    );
  });

  it('returns every mode up to a limit and no other', () => {
    fc.assert(
      fc.property(
        arbitraryPencil(true),
        fc.double({ min: 0.01, max: 1.2, noNaN: true }),
        (p, at) => {
          const spectrum = denseSpectrum(dense(p.K), p.mass);
          const upToLambda = at * spectrum[spectrum.length - 1]!;
          fc.pre(spectrum.every((lambda) => Math.abs(lambda - upToLambda) > 1e-6 * lambda));
          const result = lowestModes(p.K, p.M, { upToLambda, seed: 7 });
          expectSpectrum(
            result,
            spectrum.filter((lambda) => lambda <= upToLambda),
            1e-8,
          );
          expect(result.sigma).toBeGreaterThanOrEqual(upToLambda);
        },
      ),
      PROPERTY,
    );
  });

  it('returns those that exist when more are asked for', () => {
    const K = sparse(
      5,
      [0, 1, 2, 3, 4].flatMap((i) => spring(i, i - 1, 100)),
    );
    const M = diagonal([0, 2, 0, 0, 3]);
    const result = lowestModes(K, M, { count: 4, seed: 8 });
    expectSpectrum(result, denseSpectrum(dense(K), [0, 2, 0, 0, 3]));
    expect(result.lambda.length).toBe(2);
  });
});

describe('lowestModes with multiple eigenvalues', () => {
  it.each([1, 2, 3, 4, 5, 6, 7, 8])('finds all modes of %i equal separate chains', (count) => {
    const single = chain(30, 2e5, 1.5, true);
    const pencil = copies(single, count);
    const result = lowestModes(pencil.K, pencil.M, { count: 12, seed: 9 });
    const expected = Array.from({ length: 12 }, (_, k) => {
      const j = Math.floor(k / count);
      return ((4 * 2e5) / 1.5) * Math.sin(((2 * j + 1) * Math.PI) / 122) ** 2;
    });
    expectSpectrum(result, expected);
    expectModes(pencil, result);
    expect(result.below % count).toBe(0);
  });

  it('finds twenty equal oscillators where two modes are asked for', () => {
    const K = diagonal(Array<number>(20).fill(50));
    const M = diagonal(Array<number>(20).fill(2));
    const result = lowestModes(K, M, { count: 2, seed: 10 });
    expectSpectrum(result, [25, 25]);
    expect(result.below).toBe(20);
  });

  it('finds the six equal free racks of one model, 36 rigid-body motions first', () => {
    const single = rackPair({ bays: [1, 1], storeys: 1, divisions: 1, clamped: false });
    const pencil = copies(single, 6);
    const n = single.K.n;
    const nullVectors = rigidMotions(single).flatMap((motion) =>
      Array.from({ length: 6 }, (_, c) => {
        const whole = new Float64Array(6 * n);
        whole.set(motion, c * n);
        return whole;
      }),
    );
    const result = lowestModes(pencil.K, pencil.M, { count: 42, seed: 11, nullVectors });
    const one = lowestModes(single.K, single.M, {
      count: 7,
      seed: 11,
      nullVectors: rigidMotions(single),
    });
    const expected = [...Array<number>(36).fill(0), ...Array<number>(6).fill(one.lambda[6]!)];
    expectSpectrum(result, expected, 1e-9);
  });
});

describe('lowestModes of frames', () => {
  it.each([
    { clamped: true, lumped: false },
    { clamped: true, lumped: true },
    { clamped: false, lumped: false },
    { clamped: false, lumped: true },
  ])('counts and orthogonality of a rack, %o', ({ clamped, lumped }) => {
    const pair = rackPair({ bays: [2, 1], storeys: 2, divisions: 3, clamped, lumped });
    const result = lowestModes(pair.K, pair.M, {
      count: 12,
      seed: 12,
      ...(clamped ? {} : { nullVectors: rigidMotions(pair) }),
    });
    expect(result.complete).toBe(true);
    expect(result.lambda.length).toBe(12);
    expect(result.below).toBeGreaterThanOrEqual(12);
    expect(Array.from(result.lambda.subarray(0, 6)).every((lambda) => lambda === 0)).toBe(!clamped);
    expectModes(pair, result);
  });

  it('gives √E times the frequencies for E times the stiffness', () => {
    const pair = rackPair({ bays: [1, 1], storeys: 2, divisions: 2 });
    const stiff = { ...pair.K, values: pair.K.values.map((value) => 9 * value) };
    const one = lowestModes(pair.K, pair.M, { count: 8, seed: 13 });
    const nine = lowestModes(stiff, pair.M, { count: 8, seed: 13 });
    expectSpectrum(
      nine,
      Array.from(one.lambda, (lambda) => 9 * lambda),
      1e-9,
    );
  });

  it('finds a hundred modes in a crowded spectrum', () => {
    const pair = rackPair({ bays: [2, 1], storeys: 3, divisions: 3 });
    const result = lowestModes(pair.K, pair.M, { count: 100, seed: 22 });
    expect(result.complete).toBe(true);
    expect(result.lambda.length).toBe(100);
    expectModes(pair, result);
  });

  it('counts every mode of 3 000 unknowns', () => {
    const pair = rackPair({ bays: [4, 3], storeys: 4, divisions: 3 });
    expect(pair.K.n).toBeGreaterThan(2900);
    expect(lowestModes(pair.K, pair.M, { count: 12, seed: 14 }).complete).toBe(true);
  });
});

describe('lowestModes and its caller', () => {
  const pair = rackPair({ bays: [1, 1], storeys: 2, divisions: 2 });

  it('gives the same bits for the same seed', () => {
    const one = lowestModes(pair.K, pair.M, { count: 6, seed: 15 });
    const two = lowestModes(pair.K, pair.M, { count: 6, seed: 15 });
    expect(two.lambda).toEqual(one.lambda);
    expect(two.phi).toEqual(one.phi);
    const other = lowestModes(pair.K, pair.M, { count: 6, seed: 16 });
    expectSpectrum(other, Array.from(one.lambda), 1e-9);
  });

  it('stops when asked and says that the result is partial', () => {
    let asked = 0;
    const shouldStop = () => (asked += 1) > 5;
    const result = lowestModes(pair.K, pair.M, { count: 12, seed: 17, shouldStop });
    expect(asked).toBe(6);
    expect(result.status).toBe('partial');
    expect(result.complete).toBe(false);
    expect(result.lambda.length).toBeLessThan(12);
  });

  it('reports progress that never falls and ends at 1', () => {
    const seen: number[] = [];
    const onProgress = (fraction: number) => seen.push(fraction);
    lowestModes(pair.K, pair.M, { count: 12, seed: 18, onProgress });
    expect(seen.at(-1)).toBe(1);
    expect(seen).toEqual(seen.slice().sort((a, b) => a - b));
  });

  it('takes the Rayleigh quotients of the caller', () => {
    const single = { K: diagonal([1, 4, 9]), M: diagonal([1, 1, 1]) };
    const asked: number[] = [];
    const refineLambda = (phi: number) => asked.push(phi);
    const result = lowestModes(single.K, single.M, { count: 2, seed: 19, refineLambda });
    expect(Array.from(result.lambda)).toEqual([1, 2]);
    expect(new Set(asked).size).toBe(asked.length);
  });

  it('measures its phases by the clock of the caller', () => {
    let tick = 0;
    const { timing } = lowestModes(pair.K, pair.M, { count: 3, seed: 20, clock: () => tick++ });
    for (const spent of Object.values(timing)) expect(spent).toBeGreaterThan(0);
  });

  it('names the motion of a mechanism', () => {
    const K = sparse(4, [...spring(0, -1, 5), ...spring(1, 0, 5), ...spring(2, 3, 7)]);
    try {
      lowestModes(K, diagonal([1, 1, 1, 1]), { count: 2, seed: 21 });
      expect.unreachable('a mechanism was solved');
    } catch (error) {
      expect(error).toBeInstanceOf(ZeroPivotError);
      const { motion } = error as ZeroPivotError;
      expect(Array.from(motion, (value) => Math.round(value))).toEqual([0, 0, 1, 1]);
    }
  });

  it.each([
    { seed: 1 },
    { seed: 1, count: 3, upToLambda: 5 },
    { seed: 1, count: 0 },
    { seed: 1, count: 1.5 },
    { seed: 1, upToLambda: -1 },
    { seed: 1, upToLambda: Infinity },
  ])('refuses impossible options %o', (options) => {
    expect(() => lowestModes(pair.K, pair.M, options)).toThrow(RangeError);
  });
});

describe('backwardError', () => {
  it('of a two-mass chain by hand', () => {
    // K = [3 −1; −1 2], M = diag(1, 2); φ = (1, 1), λ = 1: r = (3−1−1, −1+2−2) = (1, −1).
    // D = diag(1/√3, 1/√2): ‖Dr‖ = √(1/3 + 1/2), ‖D⁻¹φ‖ = √5; the largest diagonal entries of DKD and
    // DMD are 1 and max(1/3, 1) = 1.
    const K = sparse(2, [
      [0, 0, 3],
      [1, 1, 2],
      [1, 0, -1],
    ]);
    const eta = errorOf(K, diagonal([1, 2]), Float64Array.of(1, 1), 1);
    expect(eta).toBeCloseTo(Math.sqrt(5 / 6) / (2 * Math.sqrt(5)), 14);
  });

  it('is the same in metres and in millimetres', () => {
    // Rotations keep their unit: K' = SKS, M' = SMS, φ' = S⁻¹φ with S = 1e-3 for translations.
    const pair = rackPair({ bays: [1, 1], storeys: 1, divisions: 2 });
    const s = (i: number) => (pair.unknowns[i]!.displacement < 3 ? 1e-3 : 1);
    const scale = (A: Pencil['K']) => {
      const values = A.values.slice();
      for (let j = 0; j < A.n; j++) {
        for (let p = A.colPtr[j]!; p < A.colPtr[j + 1]!; p++) values[p]! *= s(A.rowIdx[p]!) * s(j);
      }
      return { ...A, values };
    };
    const phi = Float64Array.from({ length: pair.K.n }, (_, i) => Math.sin(i));
    const metres = errorOf(pair.K, pair.M, phi, 900);
    const inMillimetres = phi.map((value, i) => value / s(i));
    const millimetres = errorOf(scale(pair.K), scale(pair.M), inMillimetres, 900);
    expect(millimetres / metres).toBeCloseTo(1, 10);
  });
});
