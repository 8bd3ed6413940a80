import type { SymbolicFactor } from './SymbolicFactor.ts';

/** P (K − σM) Pᵀ = L D Lᵀ with unit lower triangular L and diagonal D. */
export interface Ldlt {
  readonly symbolic: SymbolicFactor;
  /** Dense panels of L, row by row, supernode after supernode. */
  readonly values: Float64Array;
  /** n: pivots in the order of elimination. */
  readonly pivots: Float64Array;
  readonly sigma: number;
  /** Number of negative pivots: by Sylvester's law the number of eigenvalues λ below σ. */
  readonly negativePivots: number;
}
