/** One mode and its images, over the same unknowns. */
export interface ModeImages {
  /** n, mode shape. */
  readonly phi: Float64Array;
  /** n each: K φ and M φ. */
  readonly Kphi: Float64Array;
  readonly Mphi: Float64Array;
  /** ω² [rad²/s²] */
  readonly lambda: number;
}

/** Sizes of the diagonal entries of K and M, n each. */
export interface Diagonals {
  readonly K: Float64Array;
  readonly M: Float64Array;
}

/**
 * Backward error of one mode in scaled unknowns:
 *   η = ‖D(Kφ − λMφ)‖₂ / ((‖DKD‖ + |λ| ‖DMD‖) ‖D⁻¹φ‖₂)   [–],   D = diag(K_ii)^(−1/2)
 * D makes units equal: D⁻¹φ is √J for translations and rotations alike, DKD has none. An unknown
 * without stiffness of its own takes (|λ|M_ii)^(−1/2), one with neither takes 1. ‖·‖ is the largest
 * diagonal entry, the least that the 2-norm of a semidefinite matrix can be: η errs on the high side.
 * Returns 0 for φ = 0.
 * Source: Higham, Accuracy and Stability of Numerical Algorithms, 2nd ed., section 7.1 (normwise
 * backward error); Tisseur 2000, Linear Algebra Appl. 309, 339–361 (eigenpairs).
 */
export function backwardError(mode: ModeImages, { K, M }: Diagonals): number {
  const { phi, Kphi, Mphi, lambda } = mode;
  let above = 0;
  let size = 0;
  let normK = 0;
  let normM = 0;
  for (let i = 0; i < phi.length; i++) {
    const k = K[i]!;
    const m = Math.abs(lambda) * M[i]!;
    const square = k > 0 ? 1 / k : m > 0 ? 1 / m : 1;
    const residual = Kphi[i]! - lambda * Mphi[i]!;
    above += square * residual * residual;
    size += (phi[i]! * phi[i]!) / square;
    normK = Math.max(normK, square * k);
    normM = Math.max(normM, square * m);
  }
  const below = (normK + normM) * Math.sqrt(size);
  return below > 0 ? Math.sqrt(above) / below : 0;
}
