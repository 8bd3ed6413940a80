import type { FrameModel } from '../../frame/assembly/FrameModel.ts';
import { displacements } from '../../frame/freedoms/Combination.ts';
import { add, cross, dot, scale, subtract } from '../../frame/vector3.ts';
import type { Vector3 } from '../../schemas/frameDocument.ts';
import { rigidMotionAt, six } from '../massProperties.ts';
import type { Six } from '../massProperties.ts';
import type { ModeEnergies } from '../modeEnergies.ts';
import type { DynamicSystem } from './DynamicSystem.ts';

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
 *   omega [rad/s]   x over the unknowns of `system`   centre of mass [m]
 */
export function integrateMode(
  system: DynamicSystem,
  centre: Vector3,
  omega: number,
  x: Float64Array,
): IntegratedMode {
  const { model, pieces, elementOf } = system;
  const members = new Float64Array(model.parts.length);
  const kineticMembers = new Float64Array(model.parts.length);
  const kineticMasses = new Float64Array(model.bodies.length);
  const d = new Float64Array(6);
  const integrals = system.elements.map((element) => element.integrals(omega));
  // Momentum along the axes and about them, through the centre.
  let along: Vector3 = [0, 0, 0];
  let about: Vector3 = [0, 0, 0];
  for (let i = 0; i < pieces.length; i++) {
    const { element, part, from, length, motion, direction, axis } = pieces[i]!;
    const { mass, strain, momenta } = integrals[elementOf[i]!]!;
    const { rows } = element;
    displacements(motion, x, d);
    members[part.index]! += 0.5 * squareOf(strain, d, rows);
    kineticMembers[part.index]! += 0.5 * bilinear(mass, d, d, rows);
    const momentum = product(momenta, 0, d, rows);
    const firstMoment = product(momenta, rows, d, rows);
    const spin = product(momenta, 2 * rows, d, rows);
    const middle = add(part.start, scale(part.axes.x, from + 0.5 * length));
    const arm = add(scale(subtract(middle, centre), momentum), scale(part.axes.x, firstMoment));
    along = add(along, scale(direction, momentum));
    about = add(add(about, cross(arm, direction)), scale(axis, spin));
  }
  const participation = ofModel(model, [...along, ...about]);
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

/** Participation in the rigid motions that the model has. */
function ofModel({ exists }: FrameModel, all: Six): Six {
  return six((r) => (exists[r] ? all[r]! : 0));
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
