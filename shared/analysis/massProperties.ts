import { chainMatrix, rowOrder } from '../frame/assembly/chainedPair.ts';
import type { DividedPart, FrameModel, ModelChain } from '../frame/assembly/FrameModel.ts';
import { addForces } from '../frame/freedoms/Combination.ts';
import { add, cross, dot, scale, subtract } from '../frame/vector3.ts';
import type { Vector3 } from '../schemas/frameDocument.ts';

export type Six = [number, number, number, number, number, number];

export function six(value: (direction: number) => number): Six {
  return [value(0), value(1), value(2), value(3), value(4), value(5)];
}

export interface MassProperties {
  /** [kg] */
  readonly totalMass: number;
  /** [m] */
  readonly centre: Vector3;
}

/** Mass and centre of mass of the whole model: members, what they carry, and point masses. */
export function massProperties(model: FrameModel): MassProperties {
  let totalMass = 0;
  let moment: Vector3 = [0, 0, 0];
  for (const { properties, axes, start, end } of model.parts) {
    const mass = (properties.rho * properties.A + properties.massPerLength) * axes.length;
    totalMass += mass;
    moment = add(moment, scale(add(start, end), mass / 2));
  }
  for (const { index, at } of model.bodies) {
    const { mass } = model.document.masses[index]!;
    totalMass += mass;
    moment = add(moment, scale(at, mass));
  }
  return { totalMass, centre: totalMass > 0 ? scale(moment, 1 / totalMass) : [0, 0, 0] };
}

const AXES: readonly Vector3[] = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];

/** Translation and rotation of a point in rigid motion `direction` (0–2 along, 3–5 about the centre). */
export function rigidMotionAt(
  direction: number,
  point: Vector3,
  centre: Vector3,
): [Vector3, Vector3] {
  const axis = AXES[direction % 3]!;
  if (direction < 3) return [axis, [0, 0, 0]];
  return [cross(axis, subtract(point, centre)), axis];
}

/** Its components along the axes of a member, as element displacements of one end. */
function endMotion(
  { axes, member }: DividedPart,
  direction: number,
  point: Vector3,
  centre: Vector3,
): number[] {
  const [t, omega] = rigidMotionAt(direction, point, centre);
  const along = [dot(axes.x, t), dot(axes.y, t), dot(axes.z, t)];
  if (member.kind === 'bar') return along;
  return [...along, dot(axes.x, omega), dot(axes.y, omega), dot(axes.z, omega)];
}

export interface RigidInertia {
  /** M r of each rigid motion r over all displacements, fixed ones too, taken at the free unknowns. */
  readonly forces: Float64Array[];
  /** rᵀ M r: total mass along X Y Z [kg], moments of inertia about the centre [kg·m²]; 0 outside the set. */
  readonly total: Six;
}

/**
 * Inertia forces (M r)_free and rigid inertia rᵀMr for the six rigid motions r: translations along X Y Z and
 * rotations about axes through `centre`. r moves fixed displacements too, so the coupling M_fs of consistent
 * mass is in it. A direction that is not among the model's unknowns gives zeros.
 */
export function rigidInertia(model: FrameModel, centre: Vector3): RigidInertia {
  const total: Six = [0, 0, 0, 0, 0, 0];
  const forces = total.map((_, direction) => {
    const b = new Float64Array(model.free);
    if (!model.exists[direction]) return b;
    for (const { part, number, motion } of model.segments) {
      const at = (station: number) =>
        add(part.start, scale(part.axes.x, station * part.segmentLength));
      const r = Float64Array.from([
        ...endMotion(part, direction, at(number), centre),
        ...endMotion(part, direction, at(number + 1), centre),
      ]);
      total[direction]! += addInertia(part.mass, r, (f) => addForces(motion, f, b));
    }
    for (const { at, motion, mass } of model.bodies) {
      const r = Float64Array.from(rigidMotionAt(direction, at, centre).flat());
      total[direction]! += addInertia(mass, r, (f) => addForces(motion, f, b));
    }
    return b;
  });
  return { forces, total };
}

/** Hands m r to `use` and returns rᵀ m r. */
function addInertia(m: Float64Array, r: Float64Array, use: (f: Float64Array) => void): number {
  const f = new Float64Array(r.length);
  let energy = 0;
  for (let i = 0; i < r.length; i++) {
    for (let j = 0; j < r.length; j++) f[i]! += m[i * r.length + j]! * r[j]!;
    energy += r[i]! * f[i]!;
  }
  use(f);
  return energy;
}

/** The same as `rigidInertia` over the unknowns of a model, from what chains of one make share. */
export function chainInertia(model: FrameModel, centre: Vector3): RigidInertia {
  const total: Six = [0, 0, 0, 0, 0, 0];
  const forces = total.map(() => new Float64Array(model.free));
  const directions = [0, 1, 2, 3, 4, 5].filter((direction) => model.exists[direction]);
  const a = new Float64Array(36);
  for (const chains of model.chains) {
    const { n, MR, RMR, inner } = rigidMakeOf(chains[0]!);
    const rows = rowOrder(chains[0]!);
    const end = new Float64Array(n - inner);
    for (const chain of chains) {
      rigidParameters(chain, centre, a);
      for (const direction of directions) {
        const b = forces[direction]!;
        const from = 6 * direction;
        for (let i = 0; i < n; i++) {
          let force = 0;
          for (let k = 0; k < 6; k++) force += MR[i * 6 + k]! * a[from + k]!;
          if (i < inner) b[chain.inner + i]! += force;
          else end[rows[i - inner]!] = force;
        }
        addForces(chain.ends, end, b);
        let sum = 0;
        for (let k = 0; k < 6; k++) {
          for (let l = 0; l < 6; l++) sum += a[from + k]! * RMR[k * 6 + l]! * a[from + l]!;
        }
        total[direction]! += sum;
      }
    }
  }
  for (const direction of directions) {
    for (const { at, motion, mass } of model.bodies) {
      const r = Float64Array.from(rigidMotionAt(direction, at, centre).flat());
      total[direction]! += addInertia(mass, r, (f) => addForces(motion, f, forces[direction]!));
    }
  }
  return { forces, total };
}

/** a ← for each of the six rigid motions, translation and rotation of a chain's start in member axes. */
function rigidParameters({ part, from }: ModelChain, centre: Vector3, a: Float64Array): void {
  const { x, y, z } = part.axes;
  const along = from * part.segmentLength;
  const r = [0, 1, 2].map((k) => part.start[k]! + along * x[k]! - centre[k]!);
  const axes = [x, y, z];
  for (let i = 0; i < 3; i++) {
    const axis = axes[i]!;
    for (let k = 0; k < 3; k++) {
      a[k * 6 + i] = axis[k]!;
      a[k * 6 + 3 + i] = 0;
      // axis · (e_k × r)
      const next = (k + 1) % 3;
      const last = (k + 2) % 3;
      a[(3 + k) * 6 + i] = axis[last]! * r[next]! - axis[next]! * r[last]!;
      a[(3 + k) * 6 + 3 + i] = axis[k]!;
    }
  }
}

/**
 * What a make of chains answers to its six rigid motions about its start, in member axes: M R over inner
 * unknowns and ends, row by row, and RᵀMR.
 */
function rigidMakeOf(chain: ModelChain): {
  n: number;
  MR: Float64Array;
  RMR: Float64Array;
  inner: number;
} {
  const { part, ends, make } = chain;
  const { inner } = make;
  const n = inner + ends.rows;
  const M = chainMatrix(chain, part.mass);
  const motion = new Float64Array(n * 6);
  make.places.forEach((places, station) => {
    const along = station * part.segmentLength;
    places.forEach((place, d) => {
      if (place < 0) return;
      motion[place * 6 + d] = 1;
      // ω × (along, 0, 0) = (0, ωz along, −ωy along)
      if (d === 1) motion[place * 6 + 5] = along;
      if (d === 2) motion[place * 6 + 4] = -along;
    });
  });
  const MR = new Float64Array(n * 6);
  const RMR = new Float64Array(36);
  for (let i = 0; i < n; i++) {
    for (let k = 0; k < 6; k++) {
      let sum = 0;
      for (let j = 0; j < n; j++) sum += M[i * n + j]! * motion[j * 6 + k]!;
      MR[i * 6 + k] = sum;
      for (let l = 0; l < 6; l++) RMR[l * 6 + k]! += motion[i * 6 + l]! * sum;
    }
  }
  return { n, MR, RMR, inner };
}
