import { CholeskyDecomposition, Matrix } from 'ml-matrix';
import { denseEigen } from '../../numerics/eigen/denseEigen.ts';
import { fillRandom } from '../../numerics/eigen/fillRandom.ts';
import { solveLdlt } from '../../numerics/factor/solve.ts';
import { multiplySymmetric } from '../../numerics/sparse/SymmetricCsc.ts';
import type { SymmetricCsc } from '../../numerics/sparse/SymmetricCsc.ts';
import type { DynamicSystem, Evaluation } from './DynamicSystem.ts';

/**
 * Block inverse iterations from random vectors: each shrinks what is left of other modes by (distance to the cluster) /
 * (distance to them), at most 0.1 in the brackets that are tried.
 */
const STEPS = 3;
const SEED = 20_002;

export interface RitzBlock {
  /** Estimates of ω [rad/s], ascending. */
  readonly omega: number[];
  /** Their vectors over the unknowns, orthonormal in the mass at `evaluation.omega`. */
  readonly x: Float64Array[];
  /**
   * ‖K_D x − θ M x‖ in M⁻¹ [rad²/s²], of each: within it lies an eigenvalue θ of K_D(ω) in M (Parlett, The Symmetric
   * Eigenvalue Problem, §4.5 and, for the block, §11.5).
   */
  readonly residual: number[];
}

/**
 * The `count` modes nearest a frequency by block inverse iteration on K_D(ω) with M = −∂K_D/∂ω², then
 * Rayleigh-Ritz in their span: θ from (XᵀK_DX, XᵀMX), ω_i² = ω² + θ_i, which is Newton's step of each. Its error is
 * of second order in ω_i² − ω². Returns null where the block loses its rank.
 *   start  vectors to begin from, of an earlier block for the same modes
 *   steps  inverse iterations
 */
export function ritzBlock(
  system: DynamicSystem,
  evaluation: Evaluation,
  count: number,
  start?: readonly Float64Array[],
  steps = STEPS,
): RitzBlock | null {
  const { ldlt, omega } = evaluation;
  if (ldlt === null || count > system.n) return null;
  const { n } = system;
  const M = system.mass(omega);
  const random = Uint32Array.of(SEED);
  const X = Array.from({ length: count }, (_, j) => {
    const x = start?.[j]?.slice() ?? new Float64Array(n);
    if (!start?.[j]) fillRandom(x, random);
    return x;
  });
  // K_D X = M Z in every step, whatever is done to the columns of both.
  let Z: Float64Array[] = [];
  for (let step = 0; step < steps; step++) {
    Z = X.map((x) => x.slice());
    for (let j = 0; j < count; j++) {
      const x = X[j]!;
      multiplySymmetric(M, Z[j]!, x);
      solveLdlt(ldlt, x);
      // K_D⁻¹ M has units of s²: kept near 1 so that no step overflows.
      let largest = 0;
      for (let i = 0; i < n; i++) largest = Math.max(largest, Math.abs(x[i]!));
      if (!(largest > 0 && largest < Infinity)) return null;
      for (let i = 0; i < n; i++) {
        x[i]! /= largest;
        Z[j]![i]! /= largest;
      }
    }
    if (!orthonormalise(M, X, Z)) return null;
  }
  const { values, vectors } = denseEigen(gram(M, Z, X), count, count);
  // denseEigen is descending: the lowest θ comes last.
  const order = Array.from(values, (_, j) => count - 1 - j);
  const mixOf = (columns: readonly Float64Array[], j: number) => {
    const mix = new Float64Array(n);
    columns.forEach((from, i) => {
      const share = vectors[j * count + i]!;
      for (let p = 0; p < n; p++) mix[p]! += share * from[p]!;
    });
    return mix;
  };
  const x = order.map((j) => mixOf(X, j));
  const residual = order.map((j, i) => {
    const rest = mixOf(Z, j);
    for (let p = 0; p < n; p++) rest[p]! -= values[j]! * x[i]![p]!;
    return Math.sqrt(Math.max(gram(M, [rest], [rest])[0]!, 0));
  });
  return {
    omega: order.map((j) => Math.sqrt(Math.max(omega * omega + values[j]!, 0))),
    x,
    residual,
  };
}

/** X ← X R⁻¹ and Z ← Z R⁻¹ with RᵀR = XᵀMX, twice for rounding; false where X has lost its rank. */
function orthonormalise(M: SymmetricCsc, X: Float64Array[], Z: Float64Array[]): boolean {
  const m = X.length;
  for (let pass = 0; pass < 2; pass++) {
    const B = gram(M, X, X);
    if (m === 1) {
      const size = Math.sqrt(B[0]!);
      if (!(size > 0)) return false;
      for (const [x] of [X, Z]) for (let p = 0; p < x!.length; p++) x![p]! /= size;
      return true;
    }
    const cholesky = new CholeskyDecomposition(
      new Matrix(Array.from({ length: m }, (_, i) => Array.from(B.subarray(i * m, (i + 1) * m)))),
    );
    if (!cholesky.isPositiveDefinite()) return false;
    const L = cholesky.lowerTriangularMatrix;
    for (let j = 0; j < m; j++) {
      const size = L.get(j, j);
      if (!(size > 0)) return false;
      for (const columns of [X, Z]) {
        const x = columns[j]!;
        for (let i = 0; i < j; i++) {
          const share = L.get(j, i);
          const other = columns[i]!;
          for (let p = 0; p < x.length; p++) x[p]! -= share * other[p]!;
        }
        for (let p = 0; p < x.length; p++) x[p]! /= size;
      }
    }
  }
  return true;
}

/** XᵀAY, which is symmetric, row by row; from its lower half. */
function gram(
  A: SymmetricCsc,
  Y: readonly Float64Array[],
  X: readonly Float64Array[],
): Float64Array {
  const m = X.length;
  const result = new Float64Array(m * m);
  const image = new Float64Array(A.n);
  for (let j = 0; j < m; j++) {
    multiplySymmetric(A, Y[j]!, image);
    for (let i = 0; i <= j; i++) {
      let sum = 0;
      for (let p = 0; p < A.n; p++) sum += X[i]![p]! * image[p]!;
      result[i * m + j] = result[j * m + i] = sum;
    }
  }
  return result;
}
