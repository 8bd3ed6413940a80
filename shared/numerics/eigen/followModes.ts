import { CholeskyDecomposition, Matrix } from 'ml-matrix';
import type { ChainedPencil } from '../chains/ChainedPencil.ts';
import { combineVectors } from './combineVectors.ts';
import { denseEigen } from './denseEigen.ts';

export interface FollowedModes {
  /** Ascending [rad²/s²]. */
  readonly lambda: Float64Array;
  /**
   * Per mode, how far the nearest eigenvalue is away at most: ‖K y − λ M y‖ in the norm of M⁻¹, for yᵀMy = 1
   * (Parlett, The Symmetric Eigenvalue Problem, §15.9).
   */
  readonly residual: Float64Array;
  /** Estimated error of each λ: the residual, or its square over the gap to the neighbours (Kato–Temple). */
  readonly error: Float64Array;
  /** Address of the vectors, one after the other, yᵀMy = 1. */
  readonly vectors: number;
  readonly sweeps: number;
}

export interface FollowOptions {
  /** Modes that are judged; the vectors beyond them only help. */
  readonly wanted: number;
  /** Estimated relative error of λ at which it ends. */
  readonly tolerance: number;
  readonly mostSweeps: number;
}

/**
 * Modes of a changed pair from those before the change: inverse iteration of all of them at once with a
 * Rayleigh-Ritz step (Bathe, Finite Element Procedures, §11.6, subspace iteration) until the error estimate is small.
 *   pencil  factored at σ, below every eigenvalue      start  address of `count` independent vectors
 * Not certified: it follows modes and does not look for others. From Y = (K − σM)⁻¹ M X everything needed is in the
 * three products XᵀMX, XᵀMY = Yᵀ(K − σM)Y and YᵀMY: a Ritz vector y = Y s, x = X s has K y − λ M y = M (x − (λ − σ) y).
 * Null when the vectors are not independent.
 */
export function followModes(
  pencil: ChainedPencil,
  start: number,
  count: number,
  { wanted, tolerance, mostSweeps }: FollowOptions,
): FollowedModes | null {
  const { arena, size } = pencil;
  const stride = 8 * size;
  const X = start;
  const Y = arena.numbers(count * size);
  const MX = arena.numbers(count * size);
  const MY = arena.numbers(count * size);
  for (let i = 0; i < count; i++) pencil.multiplyMass(X + i * stride, MX + i * stride);
  for (let sweep = 1; ; sweep++) {
    for (let i = 0; i < count; i++) {
      pencil.solve(MX + i * stride, Y + i * stride);
      pencil.multiplyMass(Y + i * stride, MY + i * stride);
    }
    const ritz = ritzStep(
      grams(pencil, X, MX, count),
      grams(pencil, Y, MX, count),
      grams(pencil, Y, MY, count),
      pencil.sigma,
    );
    if (ritz === null) return null;
    const error = errorsOf(ritz.lambda, ritz.residual);
    let worst = 0;
    for (let i = 0; i < wanted; i++) {
      worst = Math.max(worst, error[i]! / Math.max(ritz.lambda[i]!, -pencil.sigma));
    }
    const { coordinates } = ritz;
    combineVectors(arena, size, Y, coordinates, X);
    if (worst <= tolerance || sweep === mostSweeps) {
      return { lambda: ritz.lambda, residual: ritz.residual, error, vectors: X, sweeps: sweep };
    }
    combineVectors(arena, size, MY, coordinates, MX);
  }
}

/** AᵀB, symmetric, `count` square, row by row. */
function grams({ arena, size }: ChainedPencil, A: number, B: number, count: number): Float64Array {
  const { kernels } = arena;
  const stride = 8 * size;
  const used = arena.used;
  const rows = arena.numbers((count + 2) * count);
  const row = (i: number) => rows + 8 * i * count;
  for (let i = 0; i < count; i += 2) {
    const b = B + i * stride;
    if (i + 1 === count) kernels.dots(size, A, stride, count, b, row(i));
    else kernels.dotsOfTwo(size, A, stride, i + 2, b, b + stride, row(i), row(i + 1));
  }
  const products = arena.view(rows, count * count);
  const result = new Float64Array(count * count);
  for (let i = 0; i < count; i++) {
    for (let j = 0; j <= i; j++)
      result[i * count + j] = result[j * count + i] = products[i * count + j]!;
  }
  arena.rewind(used);
  return result;
}

/** Ritz pairs from XᵀMX, Yᵀ(K − σM)Y and YᵀMY, with the coordinates of each over the vectors. */
function ritzStep(
  A: Float64Array,
  B: Float64Array,
  C: Float64Array,
  sigma: number,
): { lambda: Float64Array; residual: Float64Array; coordinates: Float64Array[] } | null {
  const m = Math.sqrt(A.length);
  const cholesky = new CholeskyDecomposition(matrixOf(B, m));
  if (!cholesky.isPositiveDefinite()) return null;
  // C s = ν B s with B = L Lᵀ: an ordinary problem for L⁻¹ C L⁻ᵀ, and μ = λ − σ = 1 / ν.
  const L = cholesky.lowerTriangularMatrix;
  const half = forward(L, matrixOf(C, m));
  const inner = forward(L, half.transpose());
  const { values, vectors } = denseEigen(Float64Array.from(inner.to1DArray()), m, m);
  const lambda = new Float64Array(m);
  const residual = new Float64Array(m);
  const coordinates = Array.from({ length: m }, () => new Float64Array(m));
  for (let k = 0; k < m; k++) {
    const nu = values[k]!;
    if (!(nu > 0)) return null;
    const s = backward(L, vectors.subarray(k * m, (k + 1) * m));
    // sᵀ B s = 1, so yᵀMy = sᵀ C s = ν.
    const norm = 1 / Math.sqrt(nu);
    const mu = 1 / nu;
    let square = 0;
    for (let i = 0; i < m; i++) {
      coordinates[k]![i] = s[i]! * norm;
      for (let j = 0; j < m; j++) {
        const at = i * m + j;
        square += s[i]! * s[j]! * (A[at]! - 2 * mu * B[at]! + mu * mu * C[at]!);
      }
    }
    lambda[k] = sigma + mu;
    residual[k] = Math.sqrt(Math.max(square, 0)) * norm;
  }
  return { lambda, residual, coordinates };
}

const matrixOf = (values: Float64Array, m: number): Matrix =>
  Matrix.from1DArray(m, m, Array.from(values));

/** L⁻¹ A. */
function forward(L: Matrix, A: Matrix): Matrix {
  const result = A.clone();
  for (let i = 0; i < L.rows; i++) {
    for (let c = 0; c < A.columns; c++) {
      let sum = result.get(i, c);
      for (let k = 0; k < i; k++) sum -= L.get(i, k) * result.get(k, c);
      result.set(i, c, sum / L.get(i, i));
    }
  }
  return result;
}

/** L⁻ᵀ b. */
function backward(L: Matrix, b: Float64Array): Float64Array {
  const x = b.slice();
  for (let i = x.length - 1; i >= 0; i--) {
    for (let k = i + 1; k < x.length; k++) x[i]! -= L.get(k, i) * x[k]!;
    x[i]! /= L.get(i, i);
  }
  return x;
}

/** Kato–Temple where a mode's neighbours are farther off than its residual, else the residual. */
function errorsOf(lambda: Float64Array, residual: Float64Array): Float64Array {
  return residual.map((bound, i) => {
    const below = i > 0 ? lambda[i]! - lambda[i - 1]! : Infinity;
    const above = i + 1 < lambda.length ? lambda[i + 1]! - lambda[i]! : below;
    const gap = Math.min(below, above);
    return bound < gap ? (bound * bound) / gap : bound;
  });
}
