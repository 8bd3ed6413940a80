import type { Lines } from './closePairs.ts';

/**
 * Length that two lines have in common where they lie on one straight line [m]; −1 where they do not.
 *   length     of the longer one [m]
 *   tolerance  how far off the longer one both ends of the shorter may lie [m]
 */
export function sharedLength(
  lines: Lines,
  longer: number,
  shorter: number,
  length: number,
  tolerance: number,
): number {
  const at = 6 * longer;
  const ux = (lines[at + 3]! - lines[at]!) / length;
  const uy = (lines[at + 4]! - lines[at + 1]!) / length;
  const uz = (lines[at + 5]! - lines[at + 2]!) / length;
  let least = Infinity;
  let most = -Infinity;
  for (let end = 0; end < 6; end += 3) {
    const x = lines[6 * shorter + end]! - lines[at]!;
    const y = lines[6 * shorter + end + 1]! - lines[at + 1]!;
    const z = lines[6 * shorter + end + 2]! - lines[at + 2]!;
    const cx = y * uz - z * uy;
    const cy = z * ux - x * uz;
    const cz = x * uy - y * ux;
    if (cx * cx + cy * cy + cz * cz > tolerance * tolerance) return -1;
    const along = x * ux + y * uy + z * uz;
    least = Math.min(least, along);
    most = Math.max(most, along);
  }
  return Math.max(0, Math.min(most, length) - Math.max(least, 0));
}
