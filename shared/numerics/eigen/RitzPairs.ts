/** Approximate eigenpairs of A = (K − σM)⁻¹ M out of a Krylov space of dimension m. */
export interface RitzPairs {
  /** Address of the basis: m vectors, then those that residuals lie in. */
  readonly basis: number;
  readonly dimension: number;
  /** Vectors beyond the first m. */
  readonly beyond: number;
  /** m, descending: θ = 1/(λ − σ). */
  readonly theta: Float64Array;
  /** m: residual norms ‖A y − θ y‖_M, which bound the error of θ. */
  readonly residual: Float64Array;
  /** m + beyond coordinates of y in the basis after one more step of A, for Ritz pair `index`. */
  readonly coordinates: (index: number) => Float64Array;
  /** The space is invariant: these are eigenvalues, and nothing else can be reached from it. */
  readonly invariant: boolean;
  readonly stopped: boolean;
}

export interface KrylovSettings {
  /** Largest dimension of the space. */
  readonly maxDimension: number;
  /** Dimension at which Ritz values are looked at first. */
  readonly firstCheck: number;
  /** Tells whether they are good enough. */
  readonly accept: (theta: Float64Array, residual: Float64Array) => boolean;
  readonly shouldStop: () => boolean;
}
