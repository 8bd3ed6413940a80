import { chainMatrix } from '../frame/assembly/chainedPair.ts';
import type { FrameModel, ModelChain } from '../frame/assembly/FrameModel.ts';
import { addForces } from '../frame/freedoms/Combination.ts';
import type { ChainedPencil } from '../numerics/chains/ChainedPencil.ts';
import { add, cross, scale, subtract } from '../frame/vector3.ts';
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

/** What a frame's mass answers to its six rigid motions. */
export interface RigidInertia {
  /**
   * Address, in a pencil's arena, of M r of each rigid motion r over all displacements, fixed ones too, taken at the
   * free unknowns: six vectors of the pencil, one after the other.
   */
  readonly forces: number;
  /** rᵀ M r: total mass along X Y Z [kg], moments of inertia about the centre [kg·m²]; 0 outside the set. */
  readonly total: Six;
}

/**
 * Inertia forces (M r)_free and rigid inertia rᵀMr for the six rigid motions r: translations along X Y Z and
 * rotations about axes through `centre`. r moves fixed displacements too, so the coupling M_fs of consistent
 * mass is in it. A direction that is not among the model's unknowns gives zeros.
 */
export function chainInertia(
  model: FrameModel,
  pencil: ChainedPencil,
  centre: Vector3,
): RigidInertia {
  const { arena, size, n } = pencil;
  const total: Six = [0, 0, 0, 0, 0, 0];
  const forces = arena.numbers(6 * size);
  arena.view(forces, 6 * size).fill(0);
  const directions = [0, 1, 2, 3, 4, 5].filter((direction) => model.exists[direction]);
  const a = new Float64Array(36);
  model.chains.forEach((chains, classIndex) => {
    const { MR, RMR } = rigidMakeOf(chains[0]!);
    const parameters = directions.map(() => new Float64Array(6 * chains.length));
    for (let m = 0; m < chains.length; m++) {
      rigidParameters(chains[m]!, centre, a);
      for (let k = 0; k < directions.length; k++) {
        const from = 6 * directions[k]!;
        parameters[k]!.set(a.subarray(from, from + 6), 6 * m);
        let sum = 0;
        for (let i = 0; i < 6; i++) {
          for (let j = 0; j < 6; j++) sum += a[from + i]! * RMR[i * 6 + j]! * a[from + j]!;
        }
        total[directions[k]!]! += sum;
      }
    }
    directions.forEach((direction, k) => {
      pencil.addAnswers(classIndex, MR, parameters[k]!, forces + 8 * size * direction);
    });
  });
  for (const direction of directions) {
    const b = arena.view(forces + 8 * size * direction, n);
    for (const { at, motion, mass } of model.bodies) {
      const r = Float64Array.from(rigidMotionAt(direction, at, centre).flat());
      total[direction]! += addInertia(mass, r, (f) => addForces(motion, f, b));
    }
  }
  return { forces, total };
}

/** a ← for each of the six rigid motions, translation and rotation of a chain's start in member axes. */
function rigidParameters({ part, from }: ModelChain, centre: Vector3, a: Float64Array): void {
  const { x, y, z } = part.axes;
  const along = from * part.segmentLength;
  const rx = part.start[0] + along * x[0] - centre[0];
  const ry = part.start[1] + along * x[1] - centre[1];
  const rz = part.start[2] + along * x[2] - centre[2];
  a.fill(0);
  for (let i = 0; i < 3; i++) {
    const axis = i === 0 ? x : i === 1 ? y : z;
    a[i] = a[18 + 3 + i] = axis[0];
    a[6 + i] = a[24 + 3 + i] = axis[1];
    a[12 + i] = a[30 + 3 + i] = axis[2];
    // axis · (e_k × r)
    a[18 + i] = axis[2] * ry - axis[1] * rz;
    a[24 + i] = axis[0] * rz - axis[2] * rx;
    a[30 + i] = axis[1] * rx - axis[0] * ry;
  }
}

/**
 * What a make of chains answers to its six rigid motions about its start, in member axes: M R over inner
 * unknowns and ends, row by row, and RᵀMR.
 */
function rigidMakeOf(chain: ModelChain): { MR: Float64Array; RMR: Float64Array } {
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
  return { MR, RMR };
}
