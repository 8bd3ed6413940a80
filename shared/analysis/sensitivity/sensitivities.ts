import type { FrameModel } from '../../frame/assembly/FrameModel.ts';
import { add } from '../../frame/vector3.ts';
import { denseEigen } from '../../numerics/eigen/denseEigen.ts';
import { differentiate } from './differentiate.ts';
import { ElementForms } from './elementForms.ts';
import { GroupForms, massForm } from './groupForms.ts';
import { carriedTo, modeField } from './ModeFields.ts';
import type { ModePair } from './ModePair.ts';
import { parametersOf, withNumber } from './Parameter.ts';
import type { Parameter } from './Parameter.ts';

/**
 * Share of a member's length that a node's move is measured by: steps stay under the tilt at which an upright member
 * changes its axes (frame document page).
 */
const REACH = 0.05;
/** Relative distance of two ω² under which they count as one: a change turns their shapes into each other. */
const REPEATED = 1e-6;

export interface Sensitivity extends Parameter {
  /** df/dp of each mode looked at [Hz per SI unit of the parameter]. */
  readonly perUnit: Float64Array;
}

export interface Sensitivities {
  /** Numbers of the modes looked at, 1-based; rigid-body modes have no sensitivity and are left out. */
  readonly modes: readonly number[];
  readonly frequenciesHz: Float64Array;
  /**
   * Whether a mode shares its frequency with others. Their derivatives are then those of the frequencies that they
   * part into, ascending, whichever shapes those have.
   */
  readonly repeated: readonly boolean[];
  readonly parameters: readonly Sensitivity[];
}

/** A solved frame: its model, ω² [rad²/s²] and shapes with φᵀMφ = 1 over the model's unknowns, rigid modes first. */
export interface SolvedShapes {
  readonly model: FrameModel;
  readonly lambda: ArrayLike<number>;
  readonly phi: readonly Float64Array[];
  readonly rigidBodyModes: number;
}

/**
 * Derivatives of natural frequencies with respect to every number of the frame:
 *   dλ/dp = φᵀ(∂K/∂p − λ ∂M/∂p)φ,   df/dp = dλ/dp / 8π²f
 * exact for the divided frame (Fox and Kapoor 1968, AIAA Journal 6, 2426–2429); for a repeated λ the eigenvalues of
 * the matrix φ_aᵀ(∂K/∂p − λ ∂M/∂p)φ_b over its modes (Ojalvo 1988, AIAA Journal 26, 361–366). Only elements, ties and
 * masses that the parameter touches are looked at; K and M are never assembled again. Their own dependence on p is
 * differentiated with `differentiate`, to rounding.
 */
export function sensitivities(solved: SolvedShapes): Sensitivities {
  const { model, lambda, phi, rigidBodyModes } = solved;
  const elastic = phi.slice(rigidBodyModes);
  const omega2 = Float64Array.from(elastic, (_, i) => lambda[rigidBodyModes + i]!);
  const clusters = clustersOf(omega2);
  const pairs = clusters.flatMap((cluster) => pairsOf(cluster, omega2));
  const slopes = slopesOf(model, elastic, pairs);
  const frequenciesHz = omega2.map((value) => Math.sqrt(value) / (2 * Math.PI));
  const parameters = parametersOf(model.document).map((parameter) => {
    const byPair = slopes(parameter);
    const perUnit = new Float64Array(elastic.length);
    let from = 0;
    for (const cluster of clusters) {
      const width = (cluster.length * (cluster.length + 1)) / 2;
      const parts = eigenSlopes(byPair.subarray(from, from + width), cluster.length);
      cluster.forEach((mode, k) => {
        perUnit[mode] = parts[k]! / (8 * Math.PI ** 2 * frequenciesHz[mode]!);
      });
      from += width;
    }
    return { ...parameter, perUnit };
  });
  return {
    modes: elastic.map((_, i) => rigidBodyModes + i + 1),
    frequenciesHz,
    repeated: elastic.map((_, i) =>
      clusters.some((cluster) => cluster.length > 1 && cluster.includes(i)),
    ),
    parameters,
  };
}

/** Modes of one λ each, ascending. */
function clustersOf(lambda: Float64Array): number[][] {
  const clusters: number[][] = [];
  lambda.forEach((value, i) => {
    const last = clusters.at(-1);
    if (last && value - lambda[i - 1]! <= REPEATED * value) last.push(i);
    else clusters.push([i]);
  });
  return clusters;
}

/** a ≤ b of one cluster, row by row of the lower triangle. */
function pairsOf(cluster: readonly number[], lambda: Float64Array): ModePair[] {
  const mean = cluster.reduce((sum, mode) => sum + lambda[mode]!, 0) / cluster.length;
  return cluster.flatMap((b, i) =>
    cluster.slice(0, i + 1).map((a): ModePair => ({ a, b, lambda: mean })),
  );
}

/** Eigenvalues, ascending, of the symmetric matrix whose lower triangle is given row by row. */
function eigenSlopes(triangle: Float64Array, m: number): Float64Array {
  if (m === 1) return triangle;
  const A = new Float64Array(m * m);
  let at = 0;
  for (let i = 0; i < m; i++) {
    for (let j = 0; j <= i; j++) A[i * m + j] = A[j * m + i] = triangle[at++]!;
  }
  return denseEigen(A, m, m).values.reverse();
}

/** φ_aᵀ(∂K/∂p − λ ∂M/∂p)φ_b for every pair of modes, as a function of the parameter. */
function slopesOf(
  model: FrameModel,
  phi: readonly Float64Array[],
  pairs: readonly ModePair[],
): (parameter: Parameter) => Float64Array {
  const { document } = model;
  const fields = phi.map((shape) => modeField(model, shape));
  const elements = new ElementForms(model, fields, pairs);
  const groups = new GroupForms(model, fields, pairs);
  const byId = {
    sections: new Map(document.sections.map((entry) => [entry.id, entry])),
    materials: new Map(document.materials.map((entry) => [entry.id, entry])),
    masses: new Map(document.masses.map((entry) => [entry.id, entry])),
    nodes: new Map(document.nodes.map((entry) => [entry.id, entry])),
    parts: new Map(model.parts.map((part) => [part.member.id, part])),
  };
  const reach = reachOf(model);
  const ties = new Map(model.ties.map(({ owner, id, along }, i) => [`${owner} ${id} ${along}`, i]));
  const ofTie = (key: string): Float64Array => {
    const tie = ties.get(key);
    return Float64Array.from(pairs, ({ a, b }) =>
      tie === undefined ? 0 : fields[a]!.ties[tie]! * fields[b]!.ties[tie]!,
    );
  };
  /** A zero has no size of its own. */
  const slope = (f: (p: number) => Float64Array, value: number, size = Math.abs(value)) =>
    differentiate(f, value, size > 0 ? size : 1);

  return ({ list, id, field, value }) => {
    switch (list) {
      case 'sections': {
        const entry = byId.sections.get(id)!;
        return slope(
          (p) => {
            const section = { ...entry, shape: withNumber(entry.shape, field, p) };
            return elements.of(({ member }) => member.section === id, { section });
          },
          value,
          field === 'Iyz' && entry.shape.kind === 'custom'
            ? Math.min(entry.shape.Iy, entry.shape.Iz)
            : undefined,
        );
      }
      case 'materials': {
        const entry = byId.materials.get(id)!;
        return slope((p) => {
          const material = withNumber(entry, field, p);
          return elements.of(({ member }) => member.material === id, { material });
        }, value);
      }
      case 'members': {
        if (field !== 'massPerLength') {
          const [, end, along] = field.split('.');
          return ofTie(`joint ${id} ${end} ${along}`);
        }
        const part = byId.parts.get(id)!;
        // The mass grows in proportion, so any size gives the slope.
        const own = part.properties.rho * part.properties.A;
        return slope(
          (p) => elements.ofMember(part, { member: { ...part.member, massPerLength: p } }),
          value,
          own,
        );
      }
      case 'supports':
        return ofTie(`support ${id} ${field.slice('stiffness.'.length)}`);
      case 'springs':
        return ofTie(`spring ${id} ${field.slice('stiffness.'.length)}`);
      case 'masses': {
        const entry = byId.masses.get(id)!;
        const group = model.groupOf[model.nodeIndex.get(entry.node)!]!;
        const { x, y, z } = byId.nodes.get(entry.node)!;
        return slope(
          (p) => {
            const mass = withNumber(entry, field, p);
            const at = add([x, y, z], mass.offset);
            const moved = fields.map(({ groups: motions }) => [
              ...carriedTo(motions[group]!, model.reference[group]!, at),
              ...motions[group]!.r,
            ]);
            return Float64Array.from(
              pairs,
              ({ a, b, lambda }) => -lambda * massForm(mass, moved[a]!, moved[b]!),
            );
          },
          value,
          field.startsWith('offset') ? model.scale : undefined,
        );
      }
      case 'nodes': {
        const entry = byId.nodes.get(id)!;
        return slope((p) => groups.of(withNumber(entry, field, p)), value, reach.get(id));
      }
    }
  };
}

/** Per node the length [m] that steps of moving it are a share of. */
function reachOf({ document, parts, scale }: FrameModel): Map<string, number> {
  const reach = new Map(document.nodes.map(({ id }) => [id, scale]));
  for (const { member, axes } of parts) {
    for (const id of [member.start, member.end]) {
      reach.set(id, Math.min(reach.get(id)!, REACH * axes.length));
    }
  }
  return reach;
}
