import { tooLarge } from '../../numerics/kernels/Arena.ts';
import { DISPLACEMENTS } from '../../schemas/frameDocument.ts';
import type { Vector3 } from '../../schemas/frameDocument.ts';
import { combine, stacked, termsOf } from '../freedoms/Combination.ts';
import type { Combination, Terms } from '../freedoms/Combination.ts';
import type { GroupFreedoms } from '../freedoms/GroupFreedoms.ts';
import { add, scale } from '../vector3.ts';
import { carriedBy, groupOfNode, offsetFrom } from './carriers.ts';
import type { Carriers } from './carriers.ts';
import type { ChainMake, DividedPart, ModelChain, Segment, Tie } from './FrameModel.ts';

/** Elements of one chain at most: its inner part is a dense matrix, whose work grows with the square. */
const MOST_ELEMENTS = 5;

/** Unknowns of a frame at most: more do not fit into the memory of a solve, nor do the objects that describe them. */
const MOST_UNKNOWNS = 1_000_000;

/** Throws AppError `memory-limit` where members are divided into more stations than a solve can hold. */
export function refuseTooManyStations(parts: readonly DividedPart[]): void {
  const stations = parts.reduce((sum, { divisions }) => sum + divisions, 0);
  if (6 * stations > MOST_UNKNOWNS) throw tooLarge();
}

/** One end of a member, rigid on its node or through a joint. */
export interface MemberEnd {
  readonly which: 'start' | 'end';
  /** Where it is, arms included [m]. */
  readonly point: Vector3;
  /** Per displacement: undefined = rigid, 0 = free, else the joint's stiffness; null: rigid in all. */
  readonly joint: readonly (number | undefined)[] | null;
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

/** Chains of one make before their inner unknowns are numbered. */
interface MakeDraft {
  readonly make: ChainMake;
  readonly chains: Omit<ModelChain, 'inner' | 'make'>[];
}

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
  const makes = new Map<string, MakeDraft>();
  parts.forEach((part, i) => {
    const { divisions } = part;
    const [start, end] = ends[i]!;
    const last = endMotion(part, end!, carriers, freedoms, ties);
    const inSet = displacementsInSet(part, exists);
    const count = Math.ceil(divisions / MOST_ELEMENTS);
    let before = endMotion(part, start!, carriers, freedoms, ties);
    let from = 0;
    for (let c = 0; c < count; c++) {
      const elements = Math.floor(((c + 1) * divisions) / count) - from;
      const after =
        c === count - 1
          ? last
          : combine(stationTerms(part, from + elements, inSet, carriers, freedoms));
      const key = `${part.make} ${elements} ${inSet.join()}`;
      let drafts = makes.get(key);
      if (drafts === undefined) {
        drafts = { make: chainMake(part, elements, inSet), chains: [] };
        makes.set(key, drafts);
      }
      const draft = { part, from, elements, ends: stacked(before, after) };
      drafts.chains.push(draft);
      before = after;
      from += elements;
    }
  });
  const joints = freedoms.meanings.length;
  let free = joints;
  const chains = [...makes.values()].map(({ make, chains: drafts }) =>
    drafts.map((draft) => {
      const inner = free;
      free += make.inner;
      const { part, from, elements, ends: motion } = draft;
      return { part, from, elements, ends: motion, inner, make };
    }),
  );
  return { chains, joints, free };
}

const ALL_OF_BEAM: readonly boolean[] = new Array<boolean>(6).fill(true);
const ALL_OF_BAR: readonly boolean[] = new Array<boolean>(3).fill(true);

/** Which displacements in member axes exist in this model. */
function displacementsInSet({ member, axes }: DividedPart, exists: Uint8Array): readonly boolean[] {
  const all = member.kind === 'bar' ? ALL_OF_BAR : ALL_OF_BEAM;
  if (!exists.includes(0)) return all;
  return all.map((_, d) => inModel([axes.x, axes.y, axes.z], d, exists));
}

/** Order of the unknowns of a chain of so many elements. */
function chainMake(part: DividedPart, elements: number, exists: readonly boolean[]): ChainMake {
  const blocks = uncoupledBlocks(part, exists.length);
  const inner = (elements - 1) * exists.filter(Boolean).length;
  const places = Array.from({ length: elements + 1 }, () => new Int32Array(exists.length).fill(-1));
  let innerAt = 0;
  let endsAt = inner;
  for (const block of blocks) {
    for (const d of block) places[0]![d] = endsAt++;
    for (const d of block) places[elements]![d] = endsAt++;
    for (let station = 1; station < elements; station++) {
      for (const d of block) if (exists[d]) places[station]![d] = innerAt++;
    }
  }
  return { blocks, exists, inner, places };
}

/** Displacements of a station by what couples them in the element matrices, ascending. */
function uncoupledBlocks({ stiffness, mass }: DividedPart, count: number): number[][] {
  const blockOf = Array.from({ length: count }, (_, d) => d);
  for (let i = 0; i < 2 * count; i++) {
    for (let j = 0; j < i; j++) {
      const at = i * 2 * count + j;
      if (stiffness[at] === 0 && mass[at] === 0) continue;
      const [a, b] = [blockOf[i % count]!, blockOf[j % count]!];
      for (let d = 0; d < count; d++)
        if (blockOf[d] === Math.max(a, b)) blockOf[d] = Math.min(a, b);
    }
  }
  const parts = [...new Set(blockOf)].map((block) =>
    blockOf.flatMap((other, d) => (other === block ? [d] : [])),
  );
  // Stretch and twist alone are too small for a block of their own; together they fill one.
  const alone = parts.filter((part) => part.length === 1).flat();
  const larger = parts.filter((part) => part.length > 1);
  return alone.length > 0 ? [alone, ...larger] : larger;
}

/** Unknowns of their own, in member axes, at a station between two chains of a member. */
function stationTerms(
  { member, start, axes, segmentLength }: DividedPart,
  station: number,
  inSet: readonly boolean[],
  carriers: Carriers,
  freedoms: GroupFreedoms,
): Terms[] {
  const point = add(start, scale(axes.x, station * segmentLength));
  freedoms.beginBlock();
  return carriedBy(carriers, member.start, [axes.x, axes.y, axes.z], point).map(
    (displacement, i) => (inSet[i] ? [[freedoms.add(displacement), 1]] : []),
  );
}

/** Displacements of a member's end in terms of joint unknowns; its joint's own are numbered. */
function endMotion(
  { member, axes }: DividedPart,
  { which, point, joint }: MemberEnd,
  carriers: Carriers,
  freedoms: GroupFreedoms,
  ties: Tie[],
): Combination {
  const directions: [Vector3, Vector3, Vector3] = [axes.x, axes.y, axes.z];
  const rows = member.kind === 'bar' ? 3 : 6;
  if (joint === null) {
    const group = groupOfNode(carriers, member[which]);
    const offset = offsetFrom(carriers, group, point);
    return freedoms.carried(group, directions, offset, carriers.scale, rows);
  }
  freedoms.beginBlock();
  const all = carriedBy(carriers, member[which], directions, point).slice(0, rows);
  return combine(
    all.map((displacement, i) => {
      const stiffness = joint[i];
      if (stiffness === undefined) return freedoms.terms(displacement);
      const own = freedoms.add(displacement);
      if (stiffness > 0) {
        ties.push({
          owner: 'joint',
          id: `${member.id} ${which}`,
          along: DISPLACEMENTS[i]!,
          motion: combine([[[own, 1], ...freedoms.terms(displacement, -1)]]),
          stiffness,
          turns: isRotation(i),
        });
      }
      return [[own, 1]];
    }),
  );
}

/** The elements of all chains, member by member. */
export function segmentsOf(chains: readonly (readonly ModelChain[])[]): Segment[] {
  const segments = chains.flat().flatMap(({ part, from, elements, ends, inner, make }) => {
    const half = ends.rows / 2;
    const station = (s: number): Terms[] => {
      if (s === 0) return termsOf(ends, 0, half);
      if (s === elements) return termsOf(ends, half, ends.rows);
      return Array.from(make.places[s]!, (place) => (place < 0 ? [] : [[inner + place, 1]]));
    };
    return Array.from({ length: elements }, (_, k) => ({
      part,
      number: from + k,
      motion: combine([...station(k), ...station(k + 1)]),
    }));
  });
  return segments.sort((a, b) => a.part.index - b.part.index || a.number - b.number);
}
