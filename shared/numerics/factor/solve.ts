import type { Ldlt } from './Ldlt.ts';
import { substituteBack } from './substituteBack.ts';
import { substituteForward } from './substituteForward.ts';

/**
 * x ← (K − σM)⁻¹ x.
 *   x        n, right-hand side; overwritten by the solution
 *   scratch  n, overwritten
 */
export function solveLdlt(
  ldlt: Ldlt,
  x: Float64Array,
  scratch: Float64Array = new Float64Array(ldlt.symbolic.n),
): void {
  const { symbolic, values, pivots } = ldlt;
  const { n, perm, supernodes } = symbolic;
  for (let k = 0; k < n; k++) scratch[k] = x[perm[k]!]!;
  substituteForward(symbolic, values, scratch);
  for (let k = 0; k < n; k++) scratch[k]! /= pivots[k]!;
  substituteBack(symbolic, values, scratch, supernodes - 1);
  for (let k = 0; k < n; k++) x[perm[k]!] = scratch[k]!;
}
