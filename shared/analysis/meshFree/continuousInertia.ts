import { SymmetricTriplets } from '../../frame/assembly/SymmetricTriplets.ts';
import { addForces } from '../../frame/freedoms/Combination.ts';
import { add, cross, dot, scale, subtract } from '../../frame/vector3.ts';
import type { Vector3 } from '../../schemas/frameDocument.ts';
import { attainableMassOf } from '../attainableMass.ts';
import { rigidMotionAt, six } from '../massProperties.ts';
import type { Six } from '../massProperties.ts';
import type { DynamicSystem } from './DynamicSystem.ts';

/**
 * Rigid inertia of a frame of continuous members, and what all its modes together reach of it. The modes are
 * complete in the space of fields with finite energy, in which fixing a point of a distributed mass takes none of it
 * away: members reach all of theirs. Masses at joints, and bars across their axes, reach bᵀM₀⁺b.
 *   joints  one piece per member; its masses at rest hold rigid motions exactly
 */
export function continuousInertia(
  joints: DynamicSystem,
  centre: Vector3,
): { total: Six; attainable: Six } {
  const { model, bars, n } = joints;
  const members = ofMembers(joints, centre);
  const triplets = new SymmetricTriplets([...bars, ...model.bodies]);
  for (const { motion, mass } of [...bars, ...model.bodies]) triplets.add(motion, mass);
  const M0 = triplets.assemble(n);
  const atJoints = six(() => 0);
  const attainable = six((direction) => {
    if (!model.exists[direction]) return 0;
    const b = new Float64Array(n);
    for (const { motion, mass, part } of bars) {
      const { start, end, axes } = model.parts[part]!;
      const r = [start, end].flatMap((point) => {
        const [t] = rigidMotionAt(direction, point, centre);
        return [dot(axes.x, t), dot(axes.y, t), dot(axes.z, t)];
      });
      const f = product(mass, r, 6);
      atJoints[direction]! += inner(r, f);
      addForces(motion, f, b);
    }
    for (const { at, motion, mass } of model.bodies) {
      const r = rigidMotionAt(direction, at, centre).flat();
      const f = product(mass, r, 6);
      atJoints[direction]! += inner(r, f);
      addForces(motion, f, b);
    }
    const reached = atJoints[direction]! > 0 ? attainableMassOf(M0, b) : 0;
    return members[direction]! + reached;
  });
  return { total: six((direction) => members[direction]! + atJoints[direction]!), attainable };
}

/** rᵀMr of the members' distributed mass in the six rigid motions r. */
function ofMembers({ model, pieces, elements, elementOf }: DynamicSystem, centre: Vector3): Six {
  const masses = elements.map(({ rows }) => new Float64Array(rows * rows));
  elements.forEach((element, e) => element.mass(0, masses[e]!));
  const total = six(() => 0);
  const r = new Float64Array(4);
  for (let i = 0; i < pieces.length; i++) {
    const { element, part, from, length, direction: along, axis } = pieces[i]!;
    const mass = masses[elementOf[i]!]!;
    const { rows, twists } = element;
    const arms = [from, from + length].map((at) =>
      // along · (e × arm) = e · (arm × along)
      cross(subtract(add(part.start, scale(part.axes.x, at)), centre), along),
    );
    for (let direction = 0; direction < 6; direction++) {
      if (!model.exists[direction]) continue;
      const turn = direction < 3 ? 0 : axis[direction - 3]!;
      for (let end = 0; end < 2; end++) {
        const moves = direction < 3 ? along[direction]! : arms[end]![direction - 3]!;
        if (rows === 2) r[end] = twists ? turn : moves;
        else {
          r[2 * end] = moves;
          r[2 * end + 1] = turn;
        }
      }
      let sum = 0;
      for (let a = 0; a < rows; a++) {
        for (let b = 0; b < rows; b++) sum += r[a]! * mass[a * rows + b]! * r[b]!;
      }
      total[direction]! += sum;
    }
  }
  return total;
}

function product(m: Float64Array, r: readonly number[], rows: number): Float64Array {
  const f = new Float64Array(rows);
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < rows; j++) f[i]! += m[i * rows + j]! * r[j]!;
  }
  return f;
}

function inner(a: readonly number[], b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < b.length; i++) sum += a[i]! * b[i]!;
  return sum;
}
