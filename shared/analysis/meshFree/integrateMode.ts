import { displacements } from '../../frame/freedoms/Combination.ts';
import { integrate } from '../../frame/elements/gaussPanels.ts';
import type { WavePoint } from '../../frame/elements/DynamicElement.ts';
import { add, dot, scale } from '../../frame/vector3.ts';
import type { Vector3 } from '../../schemas/frameDocument.ts';
import { rigidMotionAt } from '../massProperties.ts';
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
 * the joint displacements x. Gauss quadrature in panels of 1 rad of the shortest wave makes each integral good to
 * about 1e-13 of itself; strain energies are sums of squares, so none cancels, and the Rayleigh quotient errs only by the
 * square of the shape's error.
 *   omega [rad/s]   x over the unknowns of `system`   centre of mass [m]
 */
export function integrateMode(
  system: DynamicSystem,
  centre: Vector3,
  omega: number,
  x: Float64Array,
): IntegratedMode {
  const { model } = system;
  const members = new Float64Array(model.parts.length);
  const kineticMembers = new Float64Array(model.parts.length);
  const kineticMasses = new Float64Array(model.bodies.length);
  const participation: Six = [0, 0, 0, 0, 0, 0];
  const d = new Float64Array(6);
  const point: WavePoint = { displacement: 0, rotation: 0, strain: 0 };

  for (const { element, part, from, length, motion, direction, axis } of system.pieces) {
    displacements(motion, x, d);
    const wave = element.wave(omega, d);
    let momentum = 0;
    let firstMoment = 0;
    let spin = 0;
    integrate(length, wave.phase, (at, weight) => {
      wave.at(at / length - 0.5, point);
      const moving = element.massPerLength * point.displacement;
      const turning = element.inertiaPerLength * point.rotation;
      members[part.index]! += 0.5 * weight * point.strain;
      kineticMembers[part.index]! +=
        0.5 * weight * (moving * point.displacement + turning * point.rotation);
      momentum += weight * moving;
      firstMoment += weight * moving * (from + at);
      spin += weight * turning;
    });
    for (const r of DIRECTIONS) {
      if (!model.exists[r]) continue;
      const [t, turn] = rigidMotionAt(r, part.start, centre);
      // The motion of the point at distance s along the member is t + s (turn × x).
      const [far] = rigidMotionAt(r, add(part.start, part.axes.x), centre);
      const slope = add(far, scale(t, -1));
      participation[r] +=
        momentum * dot(direction, t) + firstMoment * dot(direction, slope) + spin * dot(axis, turn);
    }
  }
  for (const { motion, mass, part } of system.bars) {
    const { start, end, axes } = model.parts[part]!;
    displacements(motion, x, d);
    kineticMembers[part]! += 0.5 * bilinear(mass, d, d);
    for (const r of DIRECTIONS) {
      if (!model.exists[r]) continue;
      const ends = [start, end].flatMap((at) => {
        const [t] = rigidMotionAt(r, at, centre);
        return [axes.x, axes.y, axes.z].map((unit) => dot(unit, t));
      });
      participation[r] += bilinear(mass, d, ends);
    }
  }
  for (const { index, at, motion, mass } of model.bodies) {
    displacements(motion, x, d);
    kineticMasses[index] = 0.5 * bilinear(mass, d, d);
    for (const r of DIRECTIONS) {
      if (model.exists[r])
        participation[r] += bilinear(mass, d, rigidMotionAt(r, at, centre).flat());
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

function bilinear(m: Float64Array, a: ArrayLike<number>, b: ArrayLike<number>): number {
  let sum = 0;
  for (let i = 0; i < 6; i++) {
    for (let j = 0; j < 6; j++) sum += a[i]! * m[i * 6 + j]! * b[j]!;
  }
  return sum;
}
