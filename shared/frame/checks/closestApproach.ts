import type { Lines } from './closePairs.ts';

/**
 * Where two lines come closest: the points start + s (end − start) of line i and the same with t of line j.
 *   out  3, overwritten: distance [m], s and t, both 0 … 1
 * The quadratic |p(s) − q(t)|² is minimised on the unit square edge by edge (Ericson, Real-Time Collision
 * Detection, 2005, §5.1.9, from memory). Both lines have a length.
 */
export function closestApproach(lines: Lines, i: number, j: number, out: Float64Array): void {
  let a = 0;
  let b = 0;
  let c = 0;
  let e = 0;
  let f = 0;
  for (let axis = 0; axis < 3; axis++) {
    const p = lines[6 * i + axis]!;
    const q = lines[6 * j + axis]!;
    const d = lines[6 * i + 3 + axis]! - p;
    const g = lines[6 * j + 3 + axis]! - q;
    a += d * d;
    b += d * g;
    c += d * (p - q);
    e += g * g;
    f += g * (p - q);
  }
  const skew = a * e - b * b;
  // Parallel lines are as close everywhere, so any s will do.
  let s = skew > Number.EPSILON * a * e ? clamp((b * f - c * e) / skew) : 0;
  let t = (b * s + f) / e;
  if (t < 0) {
    t = 0;
    s = clamp(-c / a);
  } else if (t > 1) {
    t = 1;
    s = clamp((b - c) / a);
  }
  let square = 0;
  for (let axis = 0; axis < 3; axis++) {
    const p = lines[6 * i + axis]!;
    const q = lines[6 * j + axis]!;
    const apart = p + s * (lines[6 * i + 3 + axis]! - p) - q - t * (lines[6 * j + 3 + axis]! - q);
    square += apart * apart;
  }
  out[0] = Math.sqrt(square);
  out[1] = s;
  out[2] = t;
}

function clamp(value: number): number {
  return Math.min(1, Math.max(0, value));
}
