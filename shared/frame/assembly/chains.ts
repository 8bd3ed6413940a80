import type { Vector3 } from '../../schemas/frameDocument.ts';
import { combine } from '../freedoms/Combination.ts';
import type { Combination, Terms } from '../freedoms/Combination.ts';
import type { GroupDisplacement, GroupFreedoms } from '../freedoms/GroupFreedoms.ts';
import { add, scale } from '../vector3.ts';
import { carriedBy } from './carriers.ts';
import type { Carriers } from './carriers.ts';
import type { DividedPart, ModelChain, Segment, Tie } from './FrameModel.ts';

/** Elements of one chain at most: its inner part is a dense matrix, whose work grows with the square. */
const MOST_ELEMENTS = 5;

/** One end of a member: its displacements in member axes, rigid or through a joint. */
export interface MemberEnd {
  readonly rigid: readonly GroupDisplacement[];
  /** Per displacement: undefined = rigid, 0 = free, else the joint's stiffness. */
  readonly joint: readonly (number | undefined)[];
}

export const isRotation = (displacement: number) => displacement >= 3;

/** Whether displacement `i` along or about a member's axes exists in a model of a reduced set. */
export function inModel(axes: readonly Vector3[], i: number, exists: Uint8Array): boolean {
  const axis = axes[i % 3]!;
  const offset = isRotation(i) ? 3 : 0;
  const share = axis.reduce((sum, c, k) => sum + (exists[offset + k] ? c * c : 0), 0);
  // `checkDocument` refuses axes that leave the set, so this is 0 or 1 up to rounding.
  return share > 0.5;
}

/** A chain before its inner unknowns are numbered. */
type ChainDraft = Omit<ModelChain, 'inner'>;

/**
 * Numbers what is left of a frame's unknowns, joints' and members' own, and lays chains between them.
 *   parts, ends  the divided members and both ends of each
 *   freedoms     with the unknowns of the groups numbered; joint unknowns are added
 *   ties         stiffnesses of joints are added
 */
export function layChains(
  parts: readonly DividedPart[],
  ends: readonly (readonly MemberEnd[])[],
  carriers: Carriers,
  freedoms: GroupFreedoms,
  exists: Uint8Array,
  ties: Tie[],
): { chains: ModelChain[][]; joints: number; free: number } {
  const makes = new Map<string, ChainDraft[]>();
  parts.forEach((part, i) => {
    const { member, axes, divisions } = part;
    const [start, end] = ends[i]!;
    const last = endTerms(part, 'end', end!, freedoms, ties);
    const all = member.kind === 'bar' ? [0, 1, 2] : [0, 1, 2, 3, 4, 5];
    const directions = all.filter((d) => inModel([axes.x, axes.y, axes.z], d, exists));
    const count = Math.ceil(divisions / MOST_ELEMENTS);
    let before = endTerms(part, 'start', start!, freedoms, ties);
    let from = 0;
    for (let c = 0; c < count; c++) {
      const elements = Math.floor(((c + 1) * divisions) / count) - from;
      const after =
        c === count - 1
          ? last
          : stationTerms(part, from + elements, directions, carriers, freedoms);
      const make = `${part.make} ${elements} ${directions.join('')}`;
      let drafts = makes.get(make);
      if (drafts === undefined) {
        drafts = [];
        makes.set(make, drafts);
      }
      drafts.push({ part, from, elements, ends: combine([...before, ...after]), directions });
      before = after;
      from += elements;
    }
  });
  const joints = freedoms.meanings.length;
  let free = joints;
  const chains = [...makes.values()].map((drafts) =>
    drafts.map((draft) => {
      const inner = free;
      free += (draft.elements - 1) * draft.directions.length;
      return { ...draft, inner };
    }),
  );
  return { chains, joints, free };
}

/** Unknowns of their own, in member axes, at a station between two chains of a member. */
function stationTerms(
  { member, start, axes, segmentLength }: DividedPart,
  station: number,
  directions: readonly number[],
  carriers: Carriers,
  freedoms: GroupFreedoms,
): Terms[] {
  const point = add(start, scale(axes.x, station * segmentLength));
  freedoms.beginBlock();
  return carriedBy(carriers, member.start, [axes.x, axes.y, axes.z], point).map(
    (displacement, i) => (directions.includes(i) ? [[freedoms.add(displacement), 1]] : []),
  );
}

/** Displacements of a member's end in terms of joint unknowns; its joint's own are numbered. */
function endTerms(
  { member }: DividedPart,
  which: 'start' | 'end',
  { rigid, joint }: MemberEnd,
  freedoms: GroupFreedoms,
  ties: Tie[],
): Terms[] {
  freedoms.beginBlock();
  return rigid.map((displacement, i) => {
    const stiffness = joint[i];
    if (stiffness === undefined) return freedoms.terms(displacement);
    const own = freedoms.add(displacement);
    if (stiffness > 0) {
      ties.push({
        owner: 'joint',
        id: `${member.id} ${which}`,
        motion: combine([[[own, 1], ...freedoms.terms(displacement, -1)]]),
        stiffness,
        turns: isRotation(i),
      });
    }
    return [[own, 1]];
  });
}

/** The elements of all chains, member by member. */
export function segmentsOf(chains: readonly (readonly ModelChain[])[]): Segment[] {
  const segments = chains.flat().flatMap(({ part, from, elements, ends, inner, directions }) => {
    const half = ends.rows / 2;
    const station = (s: number): Terms[] => {
      if (s === 0) return termsOf(ends, 0, half);
      if (s === elements) return termsOf(ends, half, ends.rows);
      const first = inner + (s - 1) * directions.length;
      return Array.from({ length: half }, (_, d) => {
        const at = directions.indexOf(d);
        return at < 0 ? [] : [[first + at, 1]];
      });
    };
    return Array.from({ length: elements }, (_, k) => ({
      part,
      number: from + k,
      motion: combine([...station(k), ...station(k + 1)]),
    }));
  });
  return segments.sort((a, b) => a.part.index - b.part.index || a.number - b.number);
}

function termsOf({ dofs, T }: Combination, from: number, to: number): Terms[] {
  return Array.from({ length: to - from }, (_, row) =>
    Array.from(dofs, (dof, j) => [dof, T[(from + row) * dofs.length + j]!] as const).filter(
      ([, coefficient]) => coefficient !== 0,
    ),
  );
}
