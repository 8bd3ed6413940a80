/**
 * Relative distance between neighbouring eigenvalues from which a shift between them has a certain
 * inertia: factorising moves eigenvalues by about 2⁻⁵² λ_max/λ relative to λ, which is below 1e-6
 * for frames, and the estimates themselves are good to 1e-8.
 */
export const CLEAR_GAP = 1e-3;

/**
 * First clear gap at or above the wanted modes.
 *   lambda  ascending
 *   wanted  at least this many eigenvalues lie below the gap
 *   floor   the gap is measured above this λ too; −Infinity when there is none
 * Returns the number of eigenvalues below the gap (the gap lies between the eigenvalues `result`
 * and `result + 1`, counted from one), or −1 when there is none yet.
 */
export function clearGap(lambda: ArrayLike<number>, wanted: number, floor: number): number {
  for (let below = wanted; below < lambda.length; below++) {
    const low = below > 0 ? Math.max(lambda[below - 1]!, floor) : floor;
    const high = lambda[below]!;
    if (high > 0 && high - low >= CLEAR_GAP * high) return below;
  }
  return -1;
}
