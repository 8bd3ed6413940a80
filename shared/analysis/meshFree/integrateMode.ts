import { displacements } from '../../frame/freedoms/Combination.ts';
import { add, cross, dot, scale, subtract } from '../../frame/vector3.ts';
import type { Vector3 } from '../../schemas/frameDocument.ts';
import { rigidMotionAt, six } from '../massProperties.ts';
import type { Six } from '../massProperties.ts';
import type { ModeEnergies } from '../modeEnergies.ts';
import type { DynamicSystem } from './DynamicSystem.ts';

/** Numbers per piece of `leversOf`. */
const LEVERS = 18;
const DIRECTIONS = [0, 1, 2, 3, 4, 5] as const;

/** One mode with its continuous shape integrated. */
export interface IntegratedMode {
  /** 2 × strain over 2 × kinetic energy: the Rayleigh quotient, 0 for a rigid motion [rad²/s²]. */
  readonly lambda: number;
  /** Scaled so that the continuous mass gives φᵀMφ = 1. */
  readonly x: Float64Array;
  readonly participation: Six;
  readonly energies: ModeEnergies;
}

/**
 * Energies and participation of a mode of the continuous frame, with the members' own functions at ω between
 * the joint displacements x. Strain energies are sums of squares, so none cancels, and the Rayleigh quotient errs only
 * by the square of the shape's error.
 *   centre of mass [m]   levers of the system about it   omega [rad/s]   x over the unknowns
 */
export function integrateMode(
  system: DynamicSystem,
  centre: Vector3,
  levers: Float64Array,
  omega: number,
  x: Float64Array,
): IntegratedMode {
  const { model, pieces, elementOf } = system;
  const members = new Float64Array(model.parts.length);
  const kineticMembers = new Float64Array(model.parts.length);
  const kineticMasses = new Float64Array(model.bodies.length);
  const d = new Float64Array(6);
  const integrals = system.elements.map((element) => element.integrals(omega));
  const all: Six = [0, 0, 0, 0, 0, 0];
  for (let i = 0; i < pieces.length; i++) {
    const { element, part, motion } = pieces[i]!;
    const { mass, strain, momenta } = integrals[elementOf[i]!]!;
    const { rows } = element;
    displacements(motion, x, d);
    members[part.index]! += 0.5 * squareOf(strain, d, rows);
    kineticMembers[part.index]! += 0.5 * bilinear(mass, d, d, rows);
    for (let k = 0; k < 3; k++) {
      const amount = product(momenta, k * rows, d, rows);
      const at = i * LEVERS + k * 6;
      for (let r = 0; r < 6; r++) all[r]! += amount * levers[at + r]!;
    }
  }
  const participation = six((r) => (model.exists[r] ? all[r]! : 0));
  for (const { motion, mass, part } of system.bars) {
    const { start, end, axes } = model.parts[part]!;
    displacements(motion, x, d);
    kineticMembers[part]! += 0.5 * bilinear(mass, d, d, 6);
    for (const r of DIRECTIONS) {
      if (!model.exists[r]) continue;
      const ends = [start, end].flatMap((at) => {
        const [t] = rigidMotionAt(r, at, centre);
        return [axes.x, axes.y, axes.z].map((unit) => dot(unit, t));
      });
      participation[r] += bilinear(mass, d, ends, 6);
    }
  }
  for (const { index, at, motion, mass } of model.bodies) {
    displacements(motion, x, d);
    kineticMasses[index] = 0.5 * bilinear(mass, d, d, 6);
    for (const r of DIRECTIONS) {
      if (model.exists[r])
        participation[r] += bilinear(mass, d, rigidMotionAt(r, at, centre).flat(), 6);
    }
  }
  const ties = Float64Array.from(model.ties, ({ motion, stiffness }) => {
    displacements(motion, x, d);
    return 0.5 * stiffness * d[0]! * d[0]!;
  });
  const sum = (values: Float64Array) => values.reduce((total, value) => total + value, 0);
  const strain = sum(members) + sum(ties);
  const kinetic = sum(kineticMembers) + sum(kineticMasses);
  const factor = 1 / Math.sqrt(2 * kinetic);
  const square = factor * factor;
  const scaled = (values: Float64Array) => values.map((value) => value * square);
  return {
    lambda: strain / kinetic,
    x: x.map((value) => value * factor),
    participation: participation.map((value) => value * factor) as Six,
    energies: {
      strain: strain * square,
      members: scaled(members),
      ties: scaled(ties),
      kinetic: 0.5,
      kineticMembers: scaled(kineticMembers),
      kineticMasses: scaled(kineticMasses),
    },
  };
}

/**
 * What a piece's unit momentum, first moment and spin are along the axes and about them through the centre of mass:
 * three times six numbers per piece.
 */
export function leversOf(system: DynamicSystem, centre: Vector3): Float64Array {
  const levers = new Float64Array(system.pieces.length * LEVERS);
  system.pieces.forEach(({ part, from, length, direction, axis }, i) => {
    const middle = add(part.start, scale(part.axes.x, from + 0.5 * length));
    levers.set(direction, i * LEVERS);
    levers.set(cross(subtract(middle, centre), direction), i * LEVERS + 3);
    levers.set(cross(part.axes.x, direction), i * LEVERS + 9);
    levers.set(axis, i * LEVERS + 15);
  });
  return levers;
}

function bilinear(
  m: Float64Array,
  a: ArrayLike<number>,
  b: ArrayLike<number>,
  rows: number,
): number {
  let sum = 0;
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < rows; j++) sum += a[i]! * m[i * rows + j]! * b[j]!;
  }
  return sum;
}

/** |R d|². */
function squareOf(R: Float64Array, d: Float64Array, rows: number): number {
  let square = 0;
  for (let i = 0; i < rows; i++) square += product(R, i * rows, d, rows) ** 2;
  return square;
}

function product(a: Float64Array, from: number, d: Float64Array, rows: number): number {
  let sum = 0;
  for (let j = 0; j < rows; j++) sum += a[from + j]! * d[j]!;
  return sum;
}
