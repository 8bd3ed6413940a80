/** What to look for in K φ = λ M φ, and the caller's clock, seed and hooks. */
export interface ModesOptions {
  /** Return the `count` lowest modes. Exactly one of `count` and `upToLambda` is given. */
  count?: number;
  /** Return every mode with λ ≤ this [rad²/s²]. */
  upToLambda?: number;
  /**
   * Known motions with K x = 0 (rigid-body motions of each separate part), n each, linearly
   * independent. They are returned with λ = 0 exactly and taken out of the iteration.
   */
  nullVectors?: Float64Array[];
  /** Seed of the start vectors: the same seed gives the same bits. */
  seed: number;
  /** Asked between steps; true ends the run with status 'partial'. */
  shouldStop?: () => boolean;
  /** 0 … 1, never falling. */
  onProgress?: (fraction: number) => void;
  /** Milliseconds; timings are 0 without it. */
  clock?: () => number;
  /**
   * λ of a shape with φᵀMφ = 1 [rad²/s²], given by its address, for a caller that can do better than φᵀKφ (element
   * strain energies lose no digits where stiff members ride along with soft ones).
   */
  refineLambda?: (phi: number) => number;
}

export interface ModesTiming {
  order: number;
  symbolic: number;
  factor: number;
  iterate: number;
  finish: number;
  certify: number;
}

export interface ModesResult {
  /** λ ascending [rad²/s²], the zeros of the null vectors first. */
  lambda: Float64Array;
  /** Shapes, n each, φᵀMφ = 1, orthogonal in M. */
  phi: Float64Array[];
  /** The same in the pencil's arena while that lasts, and their images M φ. */
  addresses: { readonly vector: number; readonly image: number }[];
  /** Shift of the count check, in a clear gap above the returned modes [rad²/s²]. */
  sigma: number;
  /** Negative pivots of K − sigma·M: the number of eigenvalues below sigma. */
  below: number;
  /** Eigenvalues found below sigma; may exceed the number returned. */
  found: number;
  /** found = below, and every mode asked for is returned (or all that exist). */
  complete: boolean;
  /** 'partial': stopped, or not converged; what was found is returned. */
  status: 'complete' | 'partial';
  /** Milliseconds by the caller's clock. */
  timing: ModesTiming;
}
