import type { ChainedPair } from './ChainedPair.ts';

type Numbers = Int32Array | Float64Array;

/** Whether both hold the same numbers. */
export function sameNumbers(a: Numbers, b: Numbers): boolean {
  if (a === b) return true;
  if (a.length !== b.length) return false;
  for (let i = 0; i < a.length; i++) if (a[i] !== b[i]) return false;
  return true;
}

/**
 * Whether an analysis of one pair serves the other: the same unknowns, tied to each other alike, by chains of the same
 * makes (a member that is no longer of one make with its equals changes their numbers).
 */
export function sameTopology(a: ChainedPair, b: ChainedPair): boolean {
  if (a.joints !== b.joints || a.classes.length !== b.classes.length) return false;
  if (!sameNumbers(a.blockOf, b.blockOf)) return false;
  for (const which of ['K', 'M'] as const) {
    if (!sameNumbers(a[which].colPtr, b[which].colPtr)) return false;
    if (!sameNumbers(a[which].rowIdx, b[which].rowIdx)) return false;
  }
  return a.classes.every((one, c) => {
    const other = b.classes[c]!;
    if (one.inner !== other.inner || one.ends !== other.ends) return false;
    if (one.chains.length !== other.chains.length) return false;
    return one.chains.every(({ dofs }, m) => sameNumbers(dofs, other.chains[m]!.dofs));
  });
}

/** Whether both have the same mass matrix, number by number; topologies are the same. */
export function sameMass(a: ChainedPair, b: ChainedPair): boolean {
  if (!sameNumbers(a.M.values, b.M.values)) return false;
  return a.classes.every(({ M, chains }, c) => {
    const other = b.classes[c]!;
    return (
      sameNumbers(M, other.M) && chains.every(({ T }, m) => sameNumbers(T, other.chains[m]!.T))
    );
  });
}
