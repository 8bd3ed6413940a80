import { supportAxes } from '../../frame/assembly/buildModel.ts';
import { memberParts, partDivider } from '../../frame/assembly/memberParts.ts';
import type { DividedPart, FrameModel } from '../../frame/assembly/FrameModel.ts';
import { inModel } from '../../frame/assembly/chains.ts';
import { rigidBodyMass } from '../../frame/elements/rigidBody.ts';
import { rotationRow, translationRow } from '../../frame/freedoms/rigidGroups.ts';
import { extendBasis, unitRow } from '../../frame/freedoms/rowSpace.ts';
import type { Row } from '../../frame/freedoms/rowSpace.ts';
import { add, dot, scale, subtract } from '../../frame/vector3.ts';
import { DISPLACEMENTS } from '../../schemas/frameDocument.ts';
import type {
  FrameNode,
  PointMass,
  Spring,
  Support,
  Vector3,
} from '../../schemas/frameDocument.ts';
import { memberForm, nodesOf } from './elementForms.ts';
import { carriedTo } from './ModeFields.ts';
import type { GroupMotion, ModeField } from './ModeFields.ts';
import type { ModePair } from './ModePair.ts';

/** What hangs on the nodes of one rigid group. */
interface Attached {
  readonly nodes: readonly string[];
  readonly parts: readonly DividedPart[];
  readonly supports: readonly Support[];
  readonly springs: readonly Spring[];
  readonly masses: readonly PointMass[];
}

/**
 * φ_aᵀ(K − λM)φ_b of everything that hangs on one rigid group, while a node of it moves. The group keeps its motion,
 * less what its supports forbid at their new places; what is inside members and at joints keeps its displacements in
 * member axes. Any smooth choice gives the same derivative, since (K − λM)φ = 0.
 */
export class GroupForms {
  readonly #model: FrameModel;
  readonly #fields: readonly ModeField[];
  readonly #pairs: readonly ModePair[];
  readonly #attached: Attached[];

  constructor(model: FrameModel, fields: readonly ModeField[], pairs: readonly ModePair[]) {
    this.#model = model;
    this.#fields = fields;
    this.#pairs = pairs;
    this.#attached = attachedTo(model);
  }

  /** The form with one node replaced; one value per pair of modes. */
  of(moved: FrameNode): Float64Array {
    const { document, massKind, nodeIndex, groupOf } = this.#model;
    const group = groupOf[nodeIndex.get(moved.id)!]!;
    const attached = this.#attached[group]!;
    const members = attached.parts.map(({ member }) => member);
    const nodes = [
      ...new Set([
        ...nodesOf(this.#model, members),
        ...attached.nodes.map((id) => this.#node(id)),
        ...attached.springs.flatMap(({ start, end }) => [this.#node(start), this.#node(end)]),
      ]),
    ].map((node) => (node.id === moved.id ? moved : node));
    const changed = { ...document, nodes, members };
    const at = new Map(nodes.map(({ id, x, y, z }): [string, Vector3] => [id, [x, y, z]]));
    const divide = partDivider(massKind);
    const parts = memberParts(changed).map((part, i) => divide(part, attached.parts[i]!.divisions));
    const place: Place = { group, at, forbidden: this.#forbidden(group, attached.supports, at) };
    const moves = this.#fields.map((field) => this.#moved(field, parts, attached, place));

    const result = new Float64Array(this.#pairs.length);
    this.#pairs.forEach(({ a, b, lambda }, p) => {
      const [ofA, ofB] = [moves[a]!, moves[b]!];
      let sum = 0;
      parts.forEach((part, i) => {
        sum += memberForm(part, ofA.stations[i]!, ofB.stations[i]!, lambda);
      });
      ofA.stretches.forEach(({ stiffness, by }, i) => {
        sum += stiffness * by * ofB.stretches[i]!.by;
      });
      attached.masses.forEach((mass, i) => {
        sum -= lambda * massForm(mass, ofA.masses[i]!, ofB.masses[i]!);
      });
      result[p] = sum;
    });
    return result;
  }

  /** Orthonormal rows over the group's scaled displacements that its supports hold, at their new places. */
  #forbidden(
    group: number,
    supports: readonly Support[],
    at: ReadonlyMap<string, Vector3>,
  ): readonly Row[] {
    const { scale: length, exists, reference } = this.#model;
    const rows = supports.flatMap((support) => {
      const axes = supportAxes(support);
      const offset = subtract(at.get(support.node)!, reference[group]!);
      return support.fixed.map((name) => {
        const i = DISPLACEMENTS.indexOf(name);
        const axis = axes[i % 3]!;
        return i < 3 ? translationRow(axis, offset, length) : rotationRow(axis, length);
      });
    });
    const absent = DISPLACEMENTS.flatMap((_, i) => (exists[i] ? [] : [unitRow(i)]));
    return rows.length === 0 ? [] : extendBasis([], [...absent, ...rows]);
  }

  #moved(field: ModeField, parts: readonly DividedPart[], attached: Attached, place: Place): Moved {
    const { reference } = this.#model;
    const motion = allowed(field.groups[place.group]!, place.forbidden, this.#model.scale);
    const motionOf = (node: string): [GroupMotion, Vector3] => {
      const group = this.#groupOf(node);
      return [group === place.group ? motion : field.groups[group]!, reference[group]!];
    };
    const carried = (node: string, point: Vector3): [Vector3, Vector3] => {
      const [of, from] = motionOf(node);
      return [carriedTo(of, from, point), of.r];
    };
    const stretches: Stretch[] = [];
    const stations = parts.map((part, i) => {
      const base = field.stations[attached.parts[i]!.index]!;
      return this.#memberStations(part, base, carried, stretches);
    });
    for (const support of attached.supports) {
      const d = along(supportAxes(support), carried(support.node, place.at.get(support.node)!));
      DISPLACEMENTS.forEach((name, i) => {
        const stiffness = support.stiffness?.[name];
        if (stiffness !== undefined && !support.fixed.includes(name)) {
          stretches.push({ stiffness, by: d[i]! });
        }
      });
    }
    for (const spring of attached.springs) {
      const middle = scale(add(place.at.get(spring.start)!, place.at.get(spring.end)!), 0.5);
      const start = carried(spring.start, middle).flat();
      const end = carried(spring.end, middle).flat();
      DISPLACEMENTS.forEach((name, i) => {
        const stiffness = spring.stiffness[name];
        if (stiffness !== undefined) stretches.push({ stiffness, by: end[i]! - start[i]! });
      });
    }
    const masses = attached.masses.map(({ node, offset }) =>
      carried(node, add(place.at.get(node)!, offset)).flat(),
    );
    return { stations, stretches, masses };
  }

  /** Stations of a member whose ends follow their nodes; stretches of its joints are added. */
  #memberStations(
    { member, axes, start, end }: DividedPart,
    base: Float64Array,
    carried: (node: string, point: Vector3) => [Vector3, Vector3],
    stretches: Stretch[],
  ): Float64Array {
    const stations = base.slice();
    const width = member.kind === 'bar' ? 3 : 6;
    const directions: Axes = [axes.x, axes.y, axes.z];
    for (const which of ['start', 'end'] as const) {
      const d = along(directions, carried(member[which], which === 'start' ? start : end));
      const from = which === 'start' ? 0 : stations.length - width;
      const joint = member.joints?.[which];
      for (let i = 0; i < width; i++) {
        const stiffness = inModel(directions, i, this.#model.exists)
          ? joint?.[DISPLACEMENTS[i]!]
          : undefined;
        if (stiffness === undefined) stations[from + i] = d[i]!;
        else if (stiffness > 0) stretches.push({ stiffness, by: stations[from + i]! - d[i]! });
      }
    }
    return stations;
  }

  #node(id: string): FrameNode {
    return this.#model.document.nodes[this.#model.nodeIndex.get(id)!]!;
  }

  #groupOf(node: string): number {
    return this.#model.groupOf[this.#model.nodeIndex.get(node)!]!;
  }
}

type Axes = readonly [Vector3, Vector3, Vector3];

interface Place {
  readonly group: number;
  readonly at: ReadonlyMap<string, Vector3>;
  readonly forbidden: readonly Row[];
}

interface Stretch {
  readonly stiffness: number;
  readonly by: number;
}

/** How one mode moves what hangs on a group. */
interface Moved {
  readonly stations: readonly Float64Array[];
  readonly stretches: readonly Stretch[];
  /** Displacements of the centre of each mass. */
  readonly masses: readonly number[][];
}

/** m t_a·t_b + r_aᵀ J r_b of a mass whose centre moves so. */
export function massForm(
  { mass, inertia }: Pick<PointMass, 'mass' | 'inertia'>,
  ofA: readonly number[],
  ofB: readonly number[],
): number {
  const m = rigidBodyMass(mass, inertia);
  let sum = 0;
  for (let i = 0; i < 6; i++) {
    for (let j = 0; j < 6; j++) sum += m[i * 6 + j]! * ofA[i]! * ofB[j]!;
  }
  return sum;
}

/** Three displacements along and three about some axes. */
const along = (axes: Axes, [t, r]: readonly [Vector3, Vector3]): number[] => [
  ...axes.map((axis) => dot(axis, t)),
  ...axes.map((axis) => dot(axis, r)),
];

/** The part of a motion that is not forbidden; `length` scales rotations as the rows do [m]. */
function allowed(motion: GroupMotion, forbidden: readonly Row[], length: number): GroupMotion {
  if (forbidden.length === 0) return motion;
  const g = [...motion.t, ...scale(motion.r, length)];
  for (const row of forbidden) {
    let part = 0;
    for (let i = 0; i < 6; i++) part += row[i]! * g[i]!;
    for (let i = 0; i < 6; i++) g[i]! -= part * row[i]!;
  }
  return {
    t: [g[0]!, g[1]!, g[2]!],
    r: [g[3]! / length, g[4]! / length, g[5]! / length],
  };
}

function attachedTo({ document, parts, nodeIndex, groupOf, reference }: FrameModel): Attached[] {
  const found = reference.map(() => ({
    nodes: [] as string[],
    parts: [] as DividedPart[],
    supports: [] as Support[],
    springs: [] as Spring[],
    masses: [] as PointMass[],
  }));
  const group = (node: string) => groupOf[nodeIndex.get(node)!]!;
  for (const { id } of document.nodes) found[group(id)]!.nodes.push(id);
  for (const part of parts) {
    for (const g of new Set([group(part.member.start), group(part.member.end)])) {
      found[g]!.parts.push(part);
    }
  }
  for (const support of document.supports) found[group(support.node)]!.supports.push(support);
  for (const spring of document.springs) {
    const [start, end] = [group(spring.start), group(spring.end)];
    // Inside one rigid body it is never stretched.
    if (start !== end) for (const g of [start, end]) found[g]!.springs.push(spring);
  }
  for (const mass of document.masses) found[group(mass.node)]!.masses.push(mass);
  return found;
}
