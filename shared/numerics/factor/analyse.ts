import type { SymmetricPattern } from '../sparse/SymmetricCsc.ts';
import type { SymbolicFactor } from './SymbolicFactor.ts';

/**
 * Symbolic factorisation of K − σM for any σ.
 *   K, M   patterns, n×n; M null where only K will be factorised
 *   clock  milliseconds, for the timing kept in the result
 */
export declare function analyse(
  K: SymmetricPattern,
  M?: SymmetricPattern | null,
  clock?: () => number,
): SymbolicFactor;
