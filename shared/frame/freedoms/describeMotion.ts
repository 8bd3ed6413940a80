import type { Issue } from '../../errors/AppError.ts';
import type { Vector3 } from '../../schemas/frameDocument.ts';
import type { FrameModel, Segment } from '../assembly/FrameModel.ts';
import { add, norm, scale } from '../vector3.ts';
import { displacements } from './Combination.ts';
import { direction, inWords } from './directions.ts';

/** Size of a displacement, over the largest of its motion, under which a thing counts as at rest. */
const AT_REST = 1e-6;
/** Size of a shift over the same thing's turn, or of a turn over its shift, under which it is not worth a word. */
const MINOR = 1e-3;
/** Sizes that differ by less than this share of the largest count as equal, whatever rounding says. */
const SIZE_STEP = 0.01;
/** Things named in one sentence; the rest are counted. */
const MOST_NAMED = 8;

/** What one node or member does in a motion. */
interface Mover {
  readonly noun: 'node' | 'member';
  readonly path: string;
  readonly name: string;
  readonly shift: Vector3;
  /** Rotation × the model's scale [m]. */
  readonly turn: Vector3;
  readonly size: number;
  /** A member that turns about its own axis and does nothing else. */
  readonly spins: boolean;
}

/**
 * A motion in words, the nodes and then the members that move most first:
 * "nodes “a”, “b” move along X; node “c” turns about Y; members “leg 1”, “leg 2” move along X and turn about Y:
 * nothing resists this motion."
 *   x  over the free unknowns of a model with one element per member; it deforms nothing, so that every
 *      member moves as a rigid line
 * Its path is that of what moves most.
 */
export function describeMotion(model: FrameModel, x: Float64Array): Issue {
  const all = [movingNodes(model, x), movingMembers(model, x)];
  const largest = all.flat().reduce((most, { size }) => Math.max(most, size), 0);
  const movers = all.flatMap((list) => largestFirst(list, largest));
  return {
    path: movers[0]?.path ?? '',
    message: `${inGroups(movers)}: nothing resists this motion.`,
  };
}

function largestFirst(movers: readonly Mover[], largest: number): Mover[] {
  const steps = ({ size }: Mover) => Math.round(size / (SIZE_STEP * largest));
  return movers.filter(({ size }) => size > AT_REST * largest).sort((a, b) => steps(b) - steps(a));
}

function movingNodes(model: FrameModel, x: Float64Array): Mover[] {
  const d = new Float64Array(6);
  return model.nodes.map((motion, i) => {
    displacements(motion, x, d);
    const shift: Vector3 = [d[0]!, d[1]!, d[2]!];
    const turn = scale([d[3]!, d[4]!, d[5]!], model.scale);
    const size = Math.hypot(norm(shift), norm(turn));
    const name = model.document.nodes[i]!.id;
    return { noun: 'node', path: `nodes.${i}`, name, shift, turn, size, spins: false };
  });
}

function movingMembers(model: FrameModel, x: Float64Array): Mover[] {
  return model.segments.map((segment) => {
    const { index, member } = segment.part;
    const { shift, turn, spin } = lineMotion(segment, x, model.scale);
    const size = Math.hypot(norm(shift), norm(turn));
    const spins = norm(shift) <= MINOR * size && Math.abs(spin) >= (1 - MINOR) * size;
    const name = member.name ?? member.id;
    return { noun: 'member', path: `members.${index}`, name, shift, turn, size, spins };
  });
}

/** Of a straight member: shift of its middle, its rotation × `length`, and the part of that about its own axis. */
function lineMotion({ part, motion }: Segment, x: Float64Array, length: number) {
  const d = new Float64Array(motion.rows);
  displacements(motion, x, d);
  const { axes } = part;
  const inGlobalAxes = (a: number, b: number, c: number): Vector3 =>
    add(add(scale(axes.x, a), scale(axes.y, b)), scale(axes.z, c));
  const end = motion.rows / 2;
  const middle = (i: number) => (d[i]! + d[end + i]!) / 2;
  // The end's displacement over the start's is θ × L x.
  const slope = (i: number) => (d[end + i]! - d[i]!) / axes.length;
  const spin = motion.rows === 12 ? d[3]! * length : 0;
  return {
    shift: inGlobalAxes(middle(0), middle(1), middle(2)),
    turn: inGlobalAxes(spin, -slope(2) * length, slope(1) * length),
    spin,
  };
}

/** Movers that do the same in one part each; of nodes and of members so many named and the rest counted. */
function inGroups(movers: readonly Mover[]): string {
  return (['node', 'member'] as const)
    .flatMap((noun) => {
      const own = movers.filter((mover) => mover.noun === noun);
      const groups = new Map<string, Mover[]>();
      for (const mover of own.slice(0, MOST_NAMED)) {
        const motion = inWords(verbs(mover, false));
        groups.set(motion, [...(groups.get(motion) ?? []), mover]);
      }
      const parts = [...groups.values()].map(sameMotion);
      const more = own.length - MOST_NAMED;
      return more > 0 ? [...parts, `${more} more ${noun}${more > 1 ? 's' : ''}`] : parts;
    })
    .join('; ');
}

function sameMotion(group: readonly Mover[]): string {
  const several = group.length > 1;
  const names = group.map(({ name }) => `“${name}”`).join(', ');
  return `${group[0]!.noun}${several ? 's' : ''} ${names} ${inWords(verbs(group[0]!, several))}`;
}

function verbs({ shift, turn, size, spins }: Mover, several: boolean): string[] {
  if (spins) return [several ? 'spin about their own axes' : 'spins about its own axis'];
  const s = several ? '' : 's';
  const parts: string[] = [];
  if (norm(shift) > MINOR * size) parts.push(`move${s} along ${direction(shift)}`);
  if (norm(turn) > MINOR * size) parts.push(`turn${s} about ${direction(turn)}`);
  return parts;
}
