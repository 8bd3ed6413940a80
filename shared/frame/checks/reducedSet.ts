import { DISPLACEMENTS, type Displacement, type Vector3 } from '../../schemas/frameDocument.ts';
import type { FormedDocument } from './formedDocument.ts';

/** Lengths [m] and direction cosines below this count as zero: far under any drawing's precision. */
export const FLAT_TOLERANCE = 1e-9;

/** Which displacements exist in a document, and what that asks of its geometry. */
export interface UnknownSet {
  /** True for one of the three reduced sets. */
  readonly reduced: boolean;
  readonly has: (displacement: Displacement) => boolean;
  /** Global coordinates that have to be 0, as indices 0…2 for X Y Z. */
  readonly flat: readonly number[];
  /** The set in words, such as `u w ry`. */
  readonly words: string;
}

export function unknownSet(document: FormedDocument): UnknownSet {
  const set = new Set(document.unknowns);
  const reduced = document.unknowns.length < DISPLACEMENTS.length;
  const line = document.unknowns.length < 3;
  return {
    reduced,
    has: (displacement) => set.has(displacement),
    flat: reduced ? (line ? [1, 2] : [1]) : [],
    words: document.unknowns.join(' '),
  };
}

export const AXIS_NAMES = ['X', 'Y', 'Z'] as const;

/** The global axes along which a vector sticks out of the set's plane or line, as words; empty if none. */
export function outOfPlane(set: UnknownSet, vector: Vector3): string {
  return set.flat
    .filter((axis) => Math.abs(vector[axis]!) > FLAT_TOLERANCE)
    .map((axis) => AXIS_NAMES[axis]!)
    .join(' and ');
}

const TRANSLATIONS = ['u', 'v', 'w'] as const;
const ROTATIONS = ['rx', 'ry', 'rz'] as const;

/**
 * Whether a displacement along (or about) a unit direction in global axes exists in the set: `inside`,
 * `outside`, or `mixed` where the direction couples existing with missing displacements.
 */
export function directionInSet(
  set: UnknownSet,
  kind: 'translation' | 'rotation',
  direction: Vector3,
): 'inside' | 'outside' | 'mixed' {
  const names = kind === 'translation' ? TRANSLATIONS : ROTATIONS;
  let inside = 0;
  let outside = 0;
  names.forEach((name, axis) => {
    const share = direction[axis]! ** 2;
    if (set.has(name)) inside += share;
    else outside += share;
  });
  if (inside <= FLAT_TOLERANCE) return 'outside';
  return outside <= FLAT_TOLERANCE ? 'inside' : 'mixed';
}

/** Quarter turns in a roll [rad], or null where it is not a whole number of them. */
export function quarterTurns(roll: number): number | null {
  const turns = roll / (Math.PI / 2);
  const whole = Math.round(turns);
  return Math.abs(turns - whole) <= FLAT_TOLERANCE ? whole : null;
}

/**
 * Whether a displacement in a member's own axes exists in the set. In the X–Z plane the member's y axis is
 * ±Y, so that its u, w and ry lie in the plane; an odd quarter turn puts v and rz there instead.
 */
export function memberDisplacementInSet(
  set: UnknownSet,
  displacement: Displacement,
  turns: number,
): boolean {
  if (turns % 2 === 0) return set.has(displacement);
  const turned: Record<Displacement, Displacement> = {
    u: 'u',
    v: 'w',
    w: 'v',
    rx: 'rx',
    ry: 'rz',
    rz: 'ry',
  };
  return set.has(turned[displacement]);
}
