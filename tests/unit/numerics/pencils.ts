import fc from 'fast-check';
import { EigenvalueDecomposition, Matrix, solve } from 'ml-matrix';
import { assembleSymmetric, type SymmetricCsc } from '#shared/numerics/sparse/SymmetricCsc.ts';

export interface Pencil {
  K: SymmetricCsc;
  M: SymmetricCsc;
}

export type Triplet = [row: number, col: number, value: number];

export function sparse(n: number, triplets: readonly Triplet[]): SymmetricCsc {
  return assembleSymmetric(
    n,
    Int32Array.from(triplets, (t) => t[0]),
    Int32Array.from(triplets, (t) => t[1]),
    Float64Array.from(triplets, (t) => t[2]),
    triplets.length,
  );
}

export function diagonal(values: readonly number[]): SymmetricCsc {
  return sparse(
    values.length,
    values.map((value, i): Triplet => [i, i, value]),
  );
}

export function dense(A: SymmetricCsc): Matrix {
  const result = Matrix.zeros(A.n, A.n);
  for (let j = 0; j < A.n; j++) {
    for (let p = A.colPtr[j]!; p < A.colPtr[j + 1]!; p++) {
      result.set(A.rowIdx[p]!, j, A.values[p]!);
      result.set(j, A.rowIdx[p]!, A.values[p]!);
    }
  }
  return result;
}

/** A spring of stiffness k between i and j, or from i to the ground for j = −1. */
export function spring(i: number, j: number, k: number): Triplet[] {
  return j < 0
    ? [[i, i, k]]
    : [
        [i, i, k],
        [j, j, k],
        [i, j, -k],
      ];
}

/**
 * Dense spectrum of K φ = λ M φ for a diagonal M that may have zeros, by ml-matrix alone: massless
 * unknowns condensed out, K_c = K_mm − K_ms K_ss⁻¹ K_sm, then M^(−1/2) K_c M^(−1/2).
 */
export function denseSpectrum(K: Matrix, mass: readonly number[]): number[] {
  const heavy = mass.flatMap((m, i) => (m > 0 ? [i] : []));
  const light = mass.flatMap((m, i) => (m > 0 ? [] : [i]));
  if (heavy.length === 0) return [];
  let condensed = K.selection(heavy, heavy);
  if (light.length > 0) {
    const coupling = K.selection(light, heavy);
    condensed = condensed.sub(
      coupling.transpose().mmul(solve(K.selection(light, light), coupling)),
    );
  }
  const scaled = Matrix.zeros(heavy.length, heavy.length);
  heavy.forEach((a, i) => {
    heavy.forEach((b, j) => {
      const value = (condensed.get(i, j) + condensed.get(j, i)) / 2;
      scaled.set(i, j, value / Math.sqrt(mass[a]! * mass[b]!));
    });
  });
  return new EigenvalueDecomposition(scaled, { assumeSymmetric: true }).realEigenvalues
    .slice()
    .sort((a, b) => a - b);
}

export interface RandomPencil extends Pencil {
  n: number;
  mass: number[];
  triplets: Triplet[];
}

/**
 * Masses joined by springs at random, each tied to one before it or to the ground and the first to
 * the ground, so K is positive definite. With `massless` some masses are zero, never all.
 */
export function arbitraryPencil(massless: boolean): fc.Arbitrary<RandomPencil> {
  const stiffness = fc.integer({ min: 1, max: 1000 });
  return fc.integer({ min: 2, max: 24 }).chain((n) =>
    fc
      .record({
        ground: stiffness,
        ties: fc.array(fc.tuple(fc.nat(), stiffness), { minLength: n - 1, maxLength: n - 1 }),
        extra: fc.array(fc.tuple(fc.nat(n - 1), fc.nat(n - 1), stiffness), { maxLength: n }),
        mass: fc.array(fc.integer({ min: massless ? -3 : 1, max: 20 }), {
          minLength: n,
          maxLength: n,
        }),
      })
      .map(({ ground, ties, extra, mass: drawn }) => {
        const triplets = spring(0, -1, ground);
        ties.forEach(([to, k], i) => triplets.push(...spring(i + 1, (to % (i + 2)) - 1, k)));
        for (const [i, j, k] of extra) if (i !== j) triplets.push(...spring(i, j, k));
        const mass = drawn.map((m) => Math.max(m, 0) / 10);
        if (!mass.some((m) => m > 0)) mass[0] = 1;
        return { n, mass, triplets, K: sparse(n, triplets), M: diagonal(mass) };
      }),
  );
}

/** Fixed seed of every property here. */
export const PROPERTY = { seed: 1852, numRuns: 100 };
