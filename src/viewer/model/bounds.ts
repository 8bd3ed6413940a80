import type { Vector3 } from '#shared/schemas/frameDocument.ts';

/** An upright box around things, m. */
export interface Bounds {
  readonly min: Vector3;
  readonly max: Vector3;
}

/** The box around points; a box of one metre about the origin where there are none. */
export function boundsOf(points: Iterable<Vector3>): Bounds {
  const min: Vector3 = [Infinity, Infinity, Infinity];
  const max: Vector3 = [-Infinity, -Infinity, -Infinity];
  for (const point of points) {
    for (const axis of [0, 1, 2] as const) {
      min[axis] = Math.min(min[axis], point[axis]);
      max[axis] = Math.max(max[axis], point[axis]);
    }
  }
  return min[0] <= max[0] ? { min, max } : { min: [-0.5, -0.5, 0], max: [0.5, 0.5, 1] };
}

/** The diagonal of the box, m. */
export function sizeOf({ min, max }: Bounds): number {
  return Math.hypot(max[0] - min[0], max[1] - min[1], max[2] - min[2]);
}

export function corners({ min, max }: Bounds): Vector3[] {
  return [0, 1, 2, 3, 4, 5, 6, 7].map((bits) => [
    bits & 1 ? max[0] : min[0],
    bits & 2 ? max[1] : min[1],
    bits & 4 ? max[2] : min[2],
  ]);
}
