/**
 * K − σM has a pivot that is zero within rounding: it is singular (a motion without stiffness, or
 * σ on an eigenvalue), so it has no LDLᵀ factors and no certain inertia.
 */
export class ZeroPivotError extends Error {
  /** Index of the unknown (the caller's numbering) at which elimination stopped. */
  readonly unknown: number;
  readonly sigma: number;
  /** The pivot divided by the size of its diagonal entry before elimination [–]. */
  readonly relativePivot: number;
  /**
   * n, caller's numbering, largest component 1: the motion x that (K − σM) does not resist
   * within rounding. At σ = 0 it is the shape of a mechanism or of a rigid-body motion.
   */
  readonly motion: Float64Array;

  constructor(details: {
    unknown: number;
    sigma: number;
    relativePivot: number;
    motion: Float64Array;
  }) {
    super(`K − σM is singular at unknown ${details.unknown} (σ = ${details.sigma}).`);
    this.name = 'ZeroPivotError';
    this.unknown = details.unknown;
    this.sigma = details.sigma;
    this.relativePivot = details.relativePivot;
    this.motion = details.motion;
  }
}
