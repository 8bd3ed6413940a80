import { barStrainEnergy } from '../frame/elements/bar.ts';
import { beamDeformations, beamStrainEnergy } from '../frame/elements/beamStiffness.ts';
import type { FrameModel } from '../frame/assembly/FrameModel.ts';
import { displacements } from '../frame/freedoms/Combination.ts';

/** Energies of one shape, by part of the frame; all scale with the square of the shape. */
export interface ModeEnergies {
  /** ½ φᵀKφ, summed from element deformations. */
  readonly strain: number;
  /** By place in `document.members`. */
  readonly members: Float64Array;
  /** By place in `model.ties`. */
  readonly ties: Float64Array;
  /** ½ φᵀMφ: kinetic energy over ω². */
  readonly kinetic: number;
  readonly kineticMembers: Float64Array;
  /** By place in `document.masses`. */
  readonly kineticMasses: Float64Array;
}

/** Strain energy of every element from its deformations, which lose no digits where stiff members ride along. */
function addStrain(
  model: FrameModel,
  phi: Float64Array,
  members: Float64Array,
  ties: Float64Array,
): number {
  const d = new Float64Array(12);
  const g = new Float64Array(6);
  let total = 0;
  for (const { part, motion } of model.segments) {
    displacements(motion, phi, d);
    let energy: number;
    if (part.member.kind === 'bar') {
      energy = barStrainEnergy(part.rigidity.axial, d);
    } else {
      beamDeformations(d, part.segmentLength, g);
      energy = beamStrainEnergy(part.rigidity, g);
    }
    members[part.index]! += energy;
    total += energy;
  }
  model.ties.forEach(({ motion, stiffness }, i) => {
    displacements(motion, phi, d);
    ties[i] = 0.5 * stiffness * d[0]! * d[0]!;
    total += ties[i];
  });
  return total;
}

/**
 * λ of a shape with φᵀMφ = 1 as a Rayleigh quotient from element strain energies [rad²/s²].
 *   phi  over the free unknowns
 * Extension, twist and end rotations relative to the chord are squared and summed: no terms cancel, where
 * φᵀKφ loses as many digits as the stiffnesses of one frame differ by.
 */
export function lambdaFromEnergies(model: FrameModel, phi: Float64Array): number {
  const members = new Float64Array(model.parts.length);
  return 2 * addStrain(model, phi, members, new Float64Array(model.ties.length));
}

function quadraticForm(m: Float64Array, d: Float64Array, rows: number): number {
  let sum = 0;
  for (let i = 0; i < rows; i++) {
    let row = 0;
    for (let j = 0; j < rows; j++) row += m[i * rows + j]! * d[j]!;
    sum += d[i]! * row;
  }
  return sum;
}

/** Strain and kinetic energy of a shape by member, tie and mass; phi over the free unknowns. */
export function modeEnergies(model: FrameModel, phi: Float64Array): ModeEnergies {
  const members = new Float64Array(model.parts.length);
  const ties = new Float64Array(model.ties.length);
  const strain = addStrain(model, phi, members, ties);
  const kineticMembers = new Float64Array(model.parts.length);
  const kineticMasses = new Float64Array(model.bodies.length);
  const d = new Float64Array(12);
  let kinetic = 0;
  for (const { part, motion } of model.segments) {
    displacements(motion, phi, d);
    const energy = 0.5 * quadraticForm(part.mass, d, motion.rows);
    kineticMembers[part.index]! += energy;
    kinetic += energy;
  }
  for (const { index, motion, mass } of model.bodies) {
    displacements(motion, phi, d);
    kineticMasses[index] = 0.5 * quadraticForm(mass, d, 6);
    kinetic += kineticMasses[index];
  }
  return { strain, members, ties, kinetic, kineticMembers, kineticMasses };
}
