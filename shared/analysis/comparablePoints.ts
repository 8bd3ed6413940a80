import { VALUES_PER_POINT } from './shapesFile.ts';
import type { ModeShapes } from './shapesFile.ts';

/**
 * Length by which rotations are weighed, over the frame's extent: a shaft that only twists still has a shape,
 * while translation decides wherever there is any.
 */
const ROTATION_LENGTH = 0.05;

/** Points that two sets of shapes have in common: place of each in either. */
export interface CommonPoints {
  readonly inA: readonly number[];
  readonly inB: readonly number[];
}

/**
 * Nodes of the same id, and stations of members of the same id at the same fraction of their length: of a member
 * divided into 4 here and 6 there, both have the ends and the middle.
 */
export function commonPoints(a: ModeShapes, b: ModeShapes): CommonPoints {
  const inA: number[] = [];
  const inB: number[] = [];
  const nodes = new Map(b.nodes.map((id, point) => [id, point]));
  a.nodes.forEach((id, point) => {
    const other = nodes.get(id);
    if (other === undefined) return;
    inA.push(point);
    inB.push(other);
  });
  const members = new Map(b.members.map((member) => [member.id, member]));
  for (const member of a.members) {
    const other = members.get(member.id);
    if (!other) continue;
    const shared = greatestCommonDivisor(member.count - 1, other.count - 1);
    for (let i = 0; i <= shared; i++) {
      inA.push(member.first + (i * (member.count - 1)) / shared);
      inB.push(other.first + (i * (other.count - 1)) / shared);
    }
  }
  return { inA, inB };
}

function greatestCommonDivisor(a: number, b: number): number {
  return b === 0 ? a : greatestCommonDivisor(b, a % b);
}

/** Diagonal of the box around the undeformed points [m]. */
export function extentOf({ positions }: ModeShapes): number {
  const low = [Infinity, Infinity, Infinity];
  const high = [-Infinity, -Infinity, -Infinity];
  positions.forEach((value, i) => {
    low[i % 3] = Math.min(low[i % 3]!, value);
    high[i % 3] = Math.max(high[i % 3]!, value);
  });
  return positions.length === 0 ? 0 : Math.hypot(...high.map((value, k) => value - low[k]!));
}

/**
 * Each mode at the given points as one vector: translations, and rotations times a twentieth of `extent`.
 *   extent  [m], the same for both of two sets that are compared
 */
export function shapeVectors(
  { modes, points, shapes }: ModeShapes,
  at: readonly number[],
  extent: number,
): Float64Array[] {
  const weight = ROTATION_LENGTH * extent;
  return Array.from({ length: modes }, (_, mode) => {
    const vector = new Float64Array(at.length * VALUES_PER_POINT);
    at.forEach((point, i) => {
      const from = (mode * points + point) * VALUES_PER_POINT;
      for (let k = 0; k < VALUES_PER_POINT; k++) {
        vector[i * VALUES_PER_POINT + k] = shapes[from + k]! * (k < 3 ? 1 : weight);
      }
    });
    return vector;
  });
}
