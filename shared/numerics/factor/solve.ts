import type { Ldlt } from './Ldlt.ts';

/**
 * x ← (K − σM)⁻¹ x.
 *   x        n, right-hand side; overwritten by the solution
 *   scratch  n, overwritten
 */
export declare function solveLdlt(ldlt: Ldlt, x: Float64Array, scratch?: Float64Array): void;
