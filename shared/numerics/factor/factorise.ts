import type { SymmetricCsc } from '../sparse/SymmetricCsc.ts';
import type { Ldlt } from './Ldlt.ts';
import type { SymbolicFactor } from './SymbolicFactor.ts';

/**
 * P (K − σM) Pᵀ = L D Lᵀ without pivoting.
 *   symbolic  from analyse(K, M)
 *   K, M      n×n; M null: K alone          sigma  [rad²/s²]
 *   reuse     a factorisation whose storage is overwritten (it is of no use afterwards)
 * Throws ZeroPivotError when K − σM is singular within rounding.
 */
export declare function factorise(
  symbolic: SymbolicFactor,
  K: SymmetricCsc,
  M: SymmetricCsc | null,
  sigma: number,
  reuse?: Ldlt,
): Ldlt;
