import type { Vector3 } from '../schemas/frameDocument.ts';
import { add, cross, norm, normalise, scale, subtract } from './vector3.ts';

/** Horizontal part of x, over its length, under which a member counts as upright. */
const UPRIGHT = 1e-3;

export interface MemberAxes {
  /** Unit vectors of the member's axes in global components. */
  readonly x: Vector3;
  readonly y: Vector3;
  readonly z: Vector3;
  /** Distance between the member's ends [m]. */
  readonly length: number;
  /** Within ten times of the limit between upright and not: a small move would turn y and z. */
  readonly nearlyUpright: boolean;
}

/**
 * Axes of a member from its two ends (the arms' ends, where it has arms) and its roll.
 *   x from start to end; z the part of global Z perpendicular to x, or of global X where x's horizontal
 *   part is under 1e-3; y = z × x; then `roll` [rad] turns y and z about x.
 * A member of no length gives NaN axes: `checkDocument` refuses it first.
 */
export function memberAxes(start: Vector3, end: Vector3, roll: number): MemberAxes {
  const along = subtract(end, start);
  const length = norm(along);
  const x = scale(along, 1 / length);
  const horizontal = Math.hypot(x[0], x[1]);
  const reference: Vector3 = horizontal < UPRIGHT ? [1, 0, 0] : [0, 0, 1];
  // y = z × x is the unit vector of reference × x, since the part of the reference along x drops out.
  const y0 = normalise(cross(reference, x));
  const z0 = cross(x, y0);
  const cos = Math.cos(roll);
  const sin = Math.sin(roll);
  return {
    x,
    y: add(scale(y0, cos), scale(z0, sin)),
    z: add(scale(y0, -sin), scale(z0, cos)),
    length,
    nearlyUpright: horizontal > UPRIGHT / 10 && horizontal < UPRIGHT * 10,
  };
}
