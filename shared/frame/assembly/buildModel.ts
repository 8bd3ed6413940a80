import { DISPLACEMENTS } from '../../schemas/frameDocument.ts';
import type { Displacement, FrameDocument, Support, Vector3 } from '../../schemas/frameDocument.ts';
import { rigidBodyMass } from '../elements/rigidBody.ts';
import { combine } from '../freedoms/Combination.ts';
import { GroupFreedoms } from '../freedoms/GroupFreedoms.ts';
import type { GroupDisplacement } from '../freedoms/GroupFreedoms.ts';
import { add, cross, dot, normalise, scale, subtract } from '../vector3.ts';
import { carriedBy, carriersOf, GLOBAL_AXES, groupOfNode, offsetFrom } from './carriers.ts';
import type { Carriers } from './carriers.ts';
import { componentsOf } from './components.ts';
import { inModel, isRotation, layChains, refuseTooManyStations, segmentsOf } from './chains.ts';
import type { MemberEnd } from './chains.ts';
import { memberParts, partDivider } from './memberParts.ts';
import type {
  Body,
  DividedPart,
  FrameModel,
  Hold,
  MassKind,
  MemberPart,
  Segment,
  Tie,
} from './FrameModel.ts';

export interface ModelOptions {
  readonly massKind: MassKind;
  /** Elements of a beam. */
  readonly divisionsOf: (part: MemberPart) => number;
}

/** A stiffness or fixing before the unknowns are numbered: displacements that it adds up. */
interface TieDraft extends Omit<Tie, 'motion'> {
  readonly sum: readonly { displacement: GroupDisplacement; factor: number }[];
}

/**
 * The frame as elements over free unknowns (frame document page, "Element matrices" and "Axes, unknowns,
 * signs"). Rigid links, arms and offsets of masses are carried by exact small-displacement kinematics; a
 * joint's displacement is an unknown of its own at the member's end; fixed displacements are left out.
 *   document  accepted by `checkDocument`, with an operating state applied
 * Throws AppError `memory-limit` for more unknowns than a solve can hold.
 */
export function buildModel(document: FrameDocument, options: ModelOptions): FrameModel {
  const carriers = carriersOf(document);
  const exists = Uint8Array.from(DISPLACEMENTS, (d) => (document.unknowns.includes(d) ? 1 : 0));
  const freedoms = new GroupFreedoms(carriers.reference.length, exists);
  const divide = partDivider(options.massKind);
  const parts = memberParts(document).map((part) => divide(part, options.divisionsOf(part)));

  refuseTooManyStations(parts);
  const ends = parts.map((part) => [
    memberEnd(part, 'start', exists),
    memberEnd(part, 'end', exists),
  ]);
  parts.forEach((part, i) => {
    for (const end of ends[i]!) useEnd(freedoms, carriers, part, end);
  });
  const { holds, fixed, drafts } = supportTies(document.supports, carriers);
  for (const displacement of fixed) freedoms.fix(displacement);
  drafts.push(...springTies(document, carriers));
  for (const { displacement } of drafts.flatMap((draft) => draft.sum)) freedoms.use(displacement);
  const bodyDisplacements = document.masses.map((mass) => {
    const at = add(carriers.at.get(mass.node)!, mass.offset);
    return { at, displacements: carriedBy(carriers, mass.node, GLOBAL_AXES, at) };
  });
  const bodyMasses = document.masses.map((mass) => rigidBodyMass(mass.mass, mass.inertia));
  bodyDisplacements.forEach(({ displacements }, i) => {
    useBody(freedoms, displacements, bodyMasses[i]!);
  });

  freedoms.number();
  const ties: Tie[] = drafts.map(({ sum, ...tie }) => ({
    ...tie,
    motion: combine([
      sum.flatMap(({ displacement, factor }) => freedoms.terms(displacement, factor)),
    ]),
  }));
  const { chains, joints, free } = layChains(parts, ends, carriers, freedoms, exists, ties);
  const bodies: Body[] = bodyDisplacements.map(({ at, displacements }, index) => ({
    index,
    at,
    motion: combine(displacements.map((displacement) => freedoms.terms(displacement))),
    mass: bodyMasses[index]!,
  }));
  let segments: Segment[] | undefined;
  return {
    document,
    massKind: options.massKind,
    free,
    joints,
    blockOf: Int32Array.from(freedoms.blockOf),
    chains,
    scale: carriers.scale,
    exists,
    parts,
    get segments() {
      segments ??= segmentsOf(chains);
      return segments;
    },
    ties: ties.filter((tie) => tie.motion.dofs.length > 0),
    bodies,
    nodeIndex: carriers.index,
    nodes: document.nodes.map((node) => {
      const group = groupOfNode(carriers, node.id);
      const offset = offsetFrom(carriers, group, carriers.at.get(node.id)!);
      return freedoms.carried(group, GLOBAL_AXES, offset, carriers.scale, 6);
    }),
    meanings: freedoms.meanings,
    holds,
    groupOf: carriers.groupOf,
    reference: carriers.reference,
    ...componentsOf(document, carriers),
  };
}

function memberEnd(
  { member, axes, start, end }: DividedPart,
  which: 'start' | 'end',
  exists: Uint8Array,
): MemberEnd {
  const point = which === 'start' ? start : end;
  const joint = member.joints?.[which];
  if (!joint) return { which, point, joint: null };
  const directions = [axes.x, axes.y, axes.z] as const;
  return {
    which,
    point,
    joint: DISPLACEMENTS.slice(0, member.kind === 'bar' ? 3 : 6).map((name, i) =>
      inModel(directions, i, exists) ? joint[name] : undefined,
    ),
  };
}

/** A member's end uses what it is not free in. */
function useEnd(
  freedoms: GroupFreedoms,
  carriers: Carriers,
  { member, axes }: DividedPart,
  { which, point, joint }: MemberEnd,
): void {
  if (joint === null && member.kind === 'beam') {
    freedoms.useWhole(groupOfNode(carriers, member[which]));
    return;
  }
  const all = carriedBy(carriers, member[which], [axes.x, axes.y, axes.z], point);
  all.slice(0, member.kind === 'bar' ? 3 : 6).forEach((displacement, i) => {
    if (joint?.[i] !== 0) freedoms.use(displacement);
  });
}

/** Axes of a support in global components: z is made perpendicular to x. */
export function supportAxes({ axes }: Support): [Vector3, Vector3, Vector3] {
  if (!axes) return [...GLOBAL_AXES];
  const x = normalise(axes.x);
  const z = normalise(subtract(axes.z, scale(x, dot(axes.z, x))));
  return [x, cross(z, x), z];
}

function supportTies(
  supports: readonly Support[],
  carriers: Carriers,
): { holds: Hold[]; fixed: GroupDisplacement[]; drafts: TieDraft[] } {
  const holds: Hold[] = [];
  const fixed: GroupDisplacement[] = [];
  const drafts: TieDraft[] = [];
  for (const support of supports) {
    const displacements = carriedBy(carriers, support.node, supportAxes(support));
    DISPLACEMENTS.forEach((name, i) => {
      const displacement = displacements[i]!;
      const stiffness = support.stiffness?.[name];
      if (support.fixed.includes(name)) fixed.push(displacement);
      else if (stiffness === undefined) return;
      else {
        drafts.push({
          owner: 'support',
          id: support.node,
          along: name,
          sum: [{ displacement, factor: 1 }],
          stiffness,
          turns: isRotation(i),
        });
      }
      holds.push(displacement);
    });
  }
  return { holds, fixed, drafts };
}

function springTies(document: FrameDocument, carriers: Carriers): TieDraft[] {
  return document.springs.flatMap((spring) => {
    const middle = scale(add(carriers.at.get(spring.start)!, carriers.at.get(spring.end)!), 0.5);
    const start = carriedBy(carriers, spring.start, GLOBAL_AXES, middle);
    const end = carriedBy(carriers, spring.end, GLOBAL_AXES, middle);
    // Inside one rigid group the mid-point has one displacement, so the spring is never stretched.
    if (start[0]!.group === end[0]!.group) return [];
    return DISPLACEMENTS.flatMap((name: Displacement, i) => {
      const stiffness = spring.stiffness[name];
      if (stiffness === undefined) return [];
      return {
        owner: 'spring' as const,
        id: spring.id,
        along: name,
        sum: [
          { displacement: end[i]!, factor: 1 },
          { displacement: start[i]!, factor: -1 },
        ],
        stiffness,
        turns: isRotation(i),
      };
    });
  });
}

/** A body uses its translations, and the rotations about which it has inertia. */
function useBody(
  freedoms: GroupFreedoms,
  displacements: readonly GroupDisplacement[],
  mass: Float64Array,
): void {
  for (const displacement of displacements.slice(0, 3)) freedoms.use(displacement);
  for (let i = 3; i < 6; i++) {
    const row = new Float64Array(6);
    for (let j = 3; j < 6; j++) {
      for (let k = 0; k < 6; k++) row[k]! += mass[i * 6 + j]! * displacements[j]!.row[k]!;
    }
    freedoms.use({ group: displacements[0]!.group, row });
  }
}
