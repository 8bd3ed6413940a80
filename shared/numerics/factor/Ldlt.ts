import type { Arena } from '../kernels/Arena.ts';
import type { Elimination } from './Elimination.ts';
import type { SymbolicFactor } from './SymbolicFactor.ts';

/** P (K − σM) Pᵀ = L D Lᵀ with unit lower triangular L and diagonal D. */
export interface Ldlt {
  readonly symbolic: SymbolicFactor;
  readonly sigma: number;
  /** Number of negative pivots: by Sylvester's law the number of eigenvalues λ below σ. */
  readonly negativePivots: number;
  readonly elimination: Elimination;
  readonly arena: Arena;
  /** Address of room for one right-hand side. */
  readonly x: number;
}
