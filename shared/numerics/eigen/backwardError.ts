import type { SymmetricCsc } from '../sparse/SymmetricCsc.ts';

/** Backward error of one mode; phi n, lambda [rad²/s²], scratch 2n overwritten. */
export declare function backwardError(
  K: SymmetricCsc,
  M: SymmetricCsc,
  phi: Float64Array,
  lambda: number,
  scratch: Float64Array,
): number;
