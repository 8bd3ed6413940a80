import type { SymmetricCsc } from '../sparse/SymmetricCsc.ts';

/**
 * Backward error of one mode in scaled unknowns:
 *   η = ‖D(Kφ − λMφ)‖₂ / ((‖DKD‖ + λ‖DMD‖) ‖D⁻¹φ‖₂)   [–],   D = diag(K_ii)^(−1/2)
 * D makes units equal: D⁻¹φ is √J for translations and rotations alike, DKD has none. An unknown
 * without stiffness of its own takes (λM_ii)^(−1/2), one with neither takes 1.
 *   K, M     n×n (the 1-norm is used: for symmetric matrices it bounds the 2-norm)
 *   phi      n, mode shape             lambda   ω² [rad²/s²], ≥ 0
 *   scratch  4n, overwritten
 * Returns 0 for φ = 0.
 * Source: Higham, Accuracy and Stability of Numerical Algorithms, 2nd ed., section 7.1 (normwise
 * backward error); Tisseur 2000, Linear Algebra Appl. 309, 339–361 (eigenpairs).
 */
export function backwardError(
  K: SymmetricCsc,
  M: SymmetricCsc,
  phi: Float64Array,
  lambda: number,
  scratch: Float64Array,
): number {
  const n = K.n;
  const d = scratch.subarray(0, n);
  const residual = scratch.subarray(n, 2 * n);
  const sumK = scratch.subarray(2 * n, 3 * n);
  const sumM = scratch.subarray(3 * n, 4 * n);
  for (let i = 0; i < n; i++) {
    const k = K.values[K.colPtr[i]!]!;
    const m = Math.abs(lambda) * M.values[M.colPtr[i]!]!;
    d[i] = k > 0 ? 1 / Math.sqrt(k) : m > 0 ? 1 / Math.sqrt(m) : 1;
  }
  residual.fill(0);
  const normK = accumulate(K, 1, phi, d, residual, sumK);
  const normM = accumulate(M, -lambda, phi, d, residual, sumM);
  let above = 0;
  let size = 0;
  for (let i = 0; i < n; i++) {
    above += (d[i]! * residual[i]!) ** 2;
    size += (phi[i]! / d[i]!) ** 2;
  }
  const below = (normK + normM) * Math.sqrt(size);
  return below > 0 ? Math.sqrt(above) / below : 0;
}

/** residual += factor A φ; returns |factor| ‖DAD‖₁. */
function accumulate(
  A: SymmetricCsc,
  factor: number,
  phi: Float64Array,
  d: Float64Array,
  residual: Float64Array,
  sum: Float64Array,
): number {
  const { n, colPtr, rowIdx, values } = A;
  sum.fill(0);
  for (let j = 0; j < n; j++) {
    for (let p = colPtr[j]!; p < colPtr[j + 1]!; p++) {
      const i = rowIdx[p]!;
      const a = factor * values[p]!;
      const size = Math.abs(a) * d[i]! * d[j]!;
      residual[i]! += a * phi[j]!;
      sum[j]! += size;
      if (i !== j) {
        residual[j]! += a * phi[i]!;
        sum[i]! += size;
      }
    }
  }
  let norm = 0;
  for (let j = 0; j < n; j++) if (sum[j]! > norm) norm = sum[j]!;
  return norm;
}
