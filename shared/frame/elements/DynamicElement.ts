/** Integrals over a member piece of its motions at one ω, for displacements d of its ends. */
export interface MotionIntegrals {
  /** rows × rows, row by row: −∂k/∂ω², with which 2 × kinetic energy over ω² is dᵀ m d [kg]. */
  readonly mass: Float64Array;
  /** rows × rows: 2 × strain energy is |R d|², a sum of squares, so none of it cancels [√(N/m)]. */
  readonly strain: Float64Array;
  /**
   * 3 × rows: ∫ m̄ w, ∫ m̄ w s with s from the piece's middle, ∫ ρI ψ, by d: what the motion carries of momentum,
   * of its first moment and of spin, over ω [kg, kg·m].
   */
  readonly momenta: Float64Array;
}

/**
 * One uncoupled kind of vibration of a uniform member piece: stretching, twisting, or bending in one principal
 * plane. `rows` end displacements, those of the start first. Pieces alike share one element.
 */
export interface DynamicElement {
  readonly rows: 2 | 4;
  /** Whether its two displacements are rotations about its axis. */
  readonly twists: boolean;
  /**
   * Dynamic stiffness at ω [rad/s], rows × rows, row by row; k is overwritten. Returns J₀, the number of
   * natural frequencies below ω with both ends clamped.
   */
  stiffness(omega: number, k: Float64Array): number;
  /** −∂k/∂ω²: the mass that goes with the motion at ω, rows × rows; m is overwritten. */
  mass(omega: number, m: Float64Array): void;
  /** The motions at ω integrated by Gauss panels, each to about 1e-13 of itself. */
  integrals(omega: number): MotionIntegrals;
  /**
   * The motion at ω, exact within the theory: 2 × rows, displacement [m] then rotation [rad] at ξ for unit
   * displacements of the ends; N is overwritten.
   *   xi  −½ at the start to ½ at the end
   */
  shape(omega: number, xi: number, N: Float64Array): void;
}

/** Number of whole n ≥ 1 with nπ below `phase`. */
export function halfWavesBelow(phase: number): number {
  return Math.max(0, Math.ceil(phase / Math.PI) - 1);
}
