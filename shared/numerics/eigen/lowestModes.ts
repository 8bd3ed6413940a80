import type { SymmetricCsc } from '../sparse/SymmetricCsc.ts';
import type { ModesOptions, ModesResult } from './ModesResult.ts';

/** Lowest eigenpairs of K φ = λ M φ; see ModesOptions and ModesResult. */
export declare function lowestModes(
  K: SymmetricCsc,
  M: SymmetricCsc,
  options: ModesOptions,
): ModesResult;
