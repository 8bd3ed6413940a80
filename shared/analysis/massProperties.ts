import type { DividedPart, FrameModel } from '../frame/assembly/FrameModel.ts';
import { addForces } from '../frame/freedoms/Combination.ts';
import { add, cross, dot, scale, subtract } from '../frame/vector3.ts';
import type { Vector3 } from '../schemas/frameDocument.ts';

export type Six = [number, number, number, number, number, number];

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
