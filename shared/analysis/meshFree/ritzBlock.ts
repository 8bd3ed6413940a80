import { CholeskyDecomposition, Matrix } from 'ml-matrix';
import { denseEigen } from '../../numerics/eigen/denseEigen.ts';
import { fillRandom } from '../../numerics/eigen/fillRandom.ts';
import { solveLdlt } from '../../numerics/factor/solve.ts';
import { multiplySymmetric } from '../../numerics/sparse/SymmetricCsc.ts';
import type { SymmetricCsc } from '../../numerics/sparse/SymmetricCsc.ts';
import type { DynamicSystem, Evaluation } from './DynamicSystem.ts';

/**
 * Block inverse iterations: each shrinks what is left of other modes by (distance to the cluster) / (distance to
 * them), at most 0.1 in the brackets that are tried.
 */
const STEPS = 3;
const SEED = 20_002;

export interface RitzBlock {
  /** Estimates of ω [rad/s], ascending. */
  readonly omega: number[];
  /** Their vectors over the unknowns, orthonormal in the mass at `evaluation.omega`. */
  readonly x: Float64Array[];
}

/**
 * The `count` modes nearest a frequency by block inverse iteration on K_D(ω) with M = −∂K_D/∂ω², then
 * Rayleigh-Ritz in their span: θ from (XᵀK_DX, XᵀMX), ω_i² = ω² + θ_i, which is Newton's step of each. Its error is
 * of second order in ω_i² − ω². Returns null where the block loses its rank.
 *   start  vectors to begin from, of an earlier block for the same modes
 */
export function ritzBlock(
  system: DynamicSystem,
  evaluation: Evaluation,
  count: number,
  start: readonly Float64Array[] | undefined,
): RitzBlock | null {
  const { ldlt, omega } = evaluation;
  if (ldlt === null || count > system.n) return null;
  const { n } = system;
  const M = system.mass(omega);
  const { K } = system.stiffness(omega);
  const random = Uint32Array.of(SEED);
  const X = Array.from({ length: count }, (_, j) => {
    const x = start?.[j]?.slice() ?? new Float64Array(n);
    if (!start?.[j]) fillRandom(x, random);
    return x;
  });
  const image = new Float64Array(n);
  for (let step = 0; step < STEPS; step++) {
    for (const x of X) {
      multiplySymmetric(M, x, image);
      x.set(image);
      solveLdlt(ldlt, x);
      // K_D⁻¹ M has units of s²: kept near 1 so that no step overflows.
      const largest = x.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
      if (!(largest > 0 && largest < Infinity)) return null;
      for (let i = 0; i < n; i++) x[i]! /= largest;
    }
    if (!orthonormalise(M, X)) return null;
  }
  const projected = gram(K, X);
  const { values, vectors } = denseEigen(projected, count, count);
  // denseEigen is descending: the lowest θ comes last.
  const order = Array.from(values, (_, j) => count - 1 - j);
  return {
    omega: order.map((j) => Math.sqrt(Math.max(omega * omega + values[j]!, 0))),
    x: order.map((j) => {
      const x = new Float64Array(n);
      X.forEach((from, i) => {
        const share = vectors[j * count + i]!;
        for (let p = 0; p < n; p++) x[p]! += share * from[p]!;
      });
      return x;
    }),
  };
}

/** X ← X R⁻¹ with RᵀR = XᵀMX, twice for rounding; false where X has lost its rank. */
function orthonormalise(M: SymmetricCsc, X: Float64Array[]): boolean {
  const m = X.length;
  for (let pass = 0; pass < 2; pass++) {
    const B = gram(M, X);
    const cholesky = new CholeskyDecomposition(
      new Matrix(Array.from({ length: m }, (_, i) => Array.from(B.subarray(i * m, (i + 1) * m)))),
    );
    if (!cholesky.isPositiveDefinite()) return false;
    const L = cholesky.lowerTriangularMatrix;
    for (let j = 0; j < m; j++) {
      const x = X[j]!;
      for (let i = 0; i < j; i++) {
        const share = L.get(j, i);
        const other = X[i]!;
        for (let p = 0; p < x.length; p++) x[p]! -= share * other[p]!;
      }
      const size = L.get(j, j);
      if (!(size > 0)) return false;
      for (let p = 0; p < x.length; p++) x[p]! /= size;
    }
  }
  return true;
}

/** XᵀAX, row by row. */
function gram(A: SymmetricCsc, X: readonly Float64Array[]): Float64Array {
  const m = X.length;
  const result = new Float64Array(m * m);
  const image = new Float64Array(A.n);
  for (let j = 0; j < m; j++) {
    multiplySymmetric(A, X[j]!, image);
    for (let i = 0; i <= j; i++) {
      let sum = 0;
      for (let p = 0; p < A.n; p++) sum += X[i]![p]! * image[p]!;
      result[i * m + j] = result[j * m + i] = sum;
    }
  }
  return result;
}
