/** No welded or bolted frame is built truer than this [m] (common practice). */
const WORKSHOP_TOLERANCE = 2e-3;
/** A small frame is drawn, and built, truer in proportion. */
const SHARE_OF_FRAME = 1e-3;

/**
 * Distance under which two places of a drawing are most likely meant as one [m].
 *   extent  longest edge of the box around the frame [m]
 */
export function nearness(extent: number): number {
  return Math.min(WORKSHOP_TOLERANCE, SHARE_OF_FRAME * extent);
}
