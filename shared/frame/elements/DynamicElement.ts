/** What one wave does at a point of a member piece that vibrates at ω. */
export interface WavePoint {
  /** Displacement [m] and rotation [rad]; the one that the wave does not have is 0. */
  displacement: number;
  rotation: number;
  /** Twice the strain energy per length [J/m]. */
  strain: number;
}

/** The motion between two ends whose displacements are given: exact within the theory. */
export interface Wave {
  /** Phase of its shortest component over the piece [rad]. */
  readonly phase: number;
  /** ξ from −½ at the start to ½ at the end; `point` is overwritten. */
  at(xi: number, point: WavePoint): void;
}

/**
 * One uncoupled kind of vibration of a uniform member piece: stretching, twisting, or bending in one principal
 * plane. `rows` end displacements, those of the start first.
 */
export interface DynamicElement {
  readonly rows: 2 | 4;
  /** Mass per length of the displacement [kg/m] and of the rotation [kg·m]. */
  readonly massPerLength: number;
  readonly inertiaPerLength: number;
  /**
   * Dynamic stiffness at ω [rad/s], rows × rows, row by row; k is overwritten. Returns J₀, the number of
   * natural frequencies below ω with both ends clamped.
   */
  stiffness(omega: number, k: Float64Array): number;
  /** −∂k/∂ω²: the mass that goes with the motion at ω, rows × rows; m is overwritten. */
  mass(omega: number, m: Float64Array): void;
  /** The motion at ω between ends displaced by d (`rows`). */
  wave(omega: number, d: Float64Array): Wave;
}

/** Number of whole n ≥ 1 with nπ below `phase`. */
export function halfWavesBelow(phase: number): number {
  return Math.max(0, Math.ceil(phase / Math.PI) - 1);
}
