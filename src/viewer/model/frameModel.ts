import { memberAxes, type MemberAxes } from '#shared/frame/memberAxes.ts';
import { add } from '#shared/frame/vector3.ts';
import type {
  FrameDocument,
  Member,
  PointMass,
  Section,
  Vector3,
} from '#shared/schemas/frameDocument.ts';
import { boundsOf, sizeOf, type Bounds } from './bounds.ts';

/** A member placed in space: its nodes, the ends of its arms, its axes. */
export interface PlacedMember {
  readonly member: Member;
  readonly section: Section | undefined;
  readonly startNode: Vector3;
  readonly endNode: Vector3;
  /** The member's own ends, past its rigid arms. */
  readonly start: Vector3;
  readonly end: Vector3;
  readonly axes: MemberAxes;
}

export interface PlacedMass {
  readonly mass: PointMass;
  readonly node: Vector3;
  /** The centre of gravity. */
  readonly centre: Vector3;
  /** Radius of a steel ball of that mass, m: how large it is drawn. */
  readonly radius: number;
}

/** What a document draws: everything placed; entries whose references lead nowhere are left out. */
export interface FrameModel {
  readonly document: FrameDocument;
  readonly nodes: ReadonlyMap<string, Vector3>;
  readonly members: readonly PlacedMember[];
  readonly masses: readonly PlacedMass[];
  readonly bounds: Bounds;
  /** Diagonal of the bounds, m. */
  readonly size: number;
}

const STEEL_DENSITY = 7850;

export function frameModel(document: FrameDocument): FrameModel {
  const nodes = new Map<string, Vector3>(
    document.nodes.map((node) => [node.id, [node.x, node.y, node.z]]),
  );
  const sections = new Map(document.sections.map((section) => [section.id, section]));
  const members = document.members.flatMap((member) => {
    const startNode = nodes.get(member.start);
    const endNode = nodes.get(member.end);
    if (!startNode || !endNode) return [];
    const start = member.startArm ? add(startNode, member.startArm) : startNode;
    const end = member.endArm ? add(endNode, member.endArm) : endNode;
    const axes = memberAxes(start, end, member.roll);
    if (!(axes.length > 0)) return [];
    const section = sections.get(member.section);
    return [{ member, section, startNode, endNode, start, end, axes }];
  });
  const masses = document.masses.flatMap((mass) => {
    const node = nodes.get(mass.node);
    if (!node) return [];
    const radius = Math.cbrt((3 * mass.mass) / (4 * Math.PI * STEEL_DENSITY));
    return [{ mass, node, centre: add(node, mass.offset), radius }];
  });
  const bounds = boundsOf([
    ...nodes.values(),
    ...members.flatMap((placed) => [placed.start, placed.end]),
    ...masses.map((placed) => placed.centre),
  ]);
  return { document, nodes, members, masses, bounds, size: sizeOf(bounds) };
}
