import { BEAM_DEFORMATIONS, beamDeformationRows } from '../frame/elements/beamStiffness.ts';
import type { FrameModel, ModelChain } from '../frame/assembly/FrameModel.ts';
import { displacements } from '../frame/freedoms/Combination.ts';
import type { ChainedPencil, PlacedRows } from '../numerics/chains/ChainedPencil.ts';

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

interface Strain {
  readonly total: number;
  readonly members: Float64Array;
  readonly ties: Float64Array;
}

/**
 * Strain and kinetic energies of shapes of one frame, from the deformations of its elements. The shapes stay at
 * their addresses unchanged.
 */
export class FrameEnergies {
  readonly #model: FrameModel;
  readonly #pencil: ChainedPencil;
  readonly #deformations: PlacedRows;
  #masses: PlacedRows | undefined;
  /** Of the shapes asked for before, by address: λ is asked for first, the energies of those returned later. */
  readonly #strains = new Map<number, Strain>();

  /** `pencil`: of the model's `chainedPair`. */
  constructor(model: FrameModel, pencil: ChainedPencil) {
    this.#model = model;
    this.#pencil = pencil;
    this.#deformations = pencil.placeRows(model.chains.map(([chain]) => deformationRows(chain!)));
  }

  /**
   * λ of a shape with φᵀMφ = 1 as a Rayleigh quotient from element strain energies [rad²/s²].
   *   phi  address over the free unknowns
   * Extension, twist and end rotations relative to the chord are squared and summed: no terms cancel, where
   * φᵀKφ loses as many digits as the stiffnesses of one frame differ by.
   */
  lambda(phi: number): number {
    return 2 * this.#strain(phi).total;
  }

  /** Strain and kinetic energy of a shape by member, tie and mass; phi an address. */
  of(phi: number): ModeEnergies {
    const { parts, bodies } = this.#model;
    const { total: strain, members, ties } = this.#strain(phi);
    const kineticMembers = new Float64Array(parts.length);
    const kineticMasses = new Float64Array(bodies.length);
    let kinetic = this.#addKinetic(phi, kineticMembers);
    const x = this.#pencil.arena.view(phi, this.#pencil.n);
    const d = new Float64Array(6);
    for (const { index, motion, mass } of bodies) {
      displacements(motion, x, d);
      let sum = 0;
      for (let i = 0; i < 6; i++) {
        for (let j = 0; j < 6; j++) sum += d[i]! * mass[i * 6 + j]! * d[j]!;
      }
      kineticMasses[index] = 0.5 * sum;
      kinetic += kineticMasses[index];
    }
    return { strain, members, ties, kinetic, kineticMembers, kineticMasses };
  }

  #strain(phi: number): Strain {
    const known = this.#strains.get(phi);
    if (known !== undefined) return known;
    const { chains, parts, ties: all } = this.#model;
    const members = new Float64Array(parts.length);
    const ties = new Float64Array(all.length);
    let total = 0;
    this.#pencil.applyRows(this.#deformations, phi, ({ classIndex, count, products }) => {
      const make = chains[classIndex]!;
      const { part, elements } = make[0]!;
      const { axial, torsion, bending, sway } = part.rigidity;
      const isBar = part.member.kind === 'bar';
      let at = 0;
      for (let m = 0; m < count; m++) {
        let twice = 0;
        if (isBar) {
          twice = axial * products[at]! * products[at]!;
          at += 1;
        } else {
          for (let e = 0; e < elements; e++, at += BEAM_DEFORMATIONS) {
            const bendV = products[at + 2]!;
            const bendW = products[at + 3]!;
            const swayV = products[at + 4]!;
            const swayW = products[at + 5]!;
            twice +=
              axial * products[at]! * products[at]! +
              torsion * products[at + 1]! * products[at + 1]! +
              bending.vv * bendV * bendV +
              2 * bending.vw * bendV * bendW +
              bending.ww * bendW * bendW +
              sway.vv * swayV * swayV +
              2 * sway.vw * swayV * swayW +
              sway.ww * swayW * swayW;
          }
        }
        members[make[m]!.part.index]! += 0.5 * twice;
        total += 0.5 * twice;
      }
    });
    const x = this.#pencil.arena.view(phi, this.#pencil.n);
    const d = new Float64Array(1);
    all.forEach(({ motion, stiffness }, i) => {
      displacements(motion, x, d);
      ties[i] = 0.5 * stiffness * d[0]! * d[0]!;
      total += ties[i];
    });
    const strain = { total, members, ties };
    this.#strains.set(phi, strain);
    return strain;
  }

  #addKinetic(phi: number, members: Float64Array): number {
    const { chains } = this.#model;
    this.#masses ??= this.#pencil.placeRows(this.#pencil.pair.classes.map(({ M }) => M));
    let total = 0;
    this.#pencil.applyRows(this.#masses, phi, (batch) => {
      const { classIndex, count, products } = batch;
      const inner = batch.inner.length / count;
      const ends = batch.ends.length / count;
      let at = 0;
      for (let m = 0; m < count; m++) {
        let sum = 0;
        for (let i = 0; i < inner; i++) sum += products[at++]! * batch.inner[m * inner + i]!;
        for (let e = 0; e < ends; e++) sum += products[at++]! * batch.ends[m * ends + e]!;
        members[chains[classIndex]![m]!.part.index]! += 0.5 * sum;
        total += 0.5 * sum;
      }
    });
    return total;
  }
}

/** Deformations of every element of a chain over its inner unknowns and its ends, row by row. */
function deformationRows(chain: ModelChain): Float64Array {
  const { part, elements, ends, make } = chain;
  const width = make.inner + ends.rows;
  const element =
    part.member.kind === 'bar'
      ? Float64Array.of(-1, 0, 0, 1, 0, 0)
      : beamDeformationRows(part.segmentLength);
  const rows = element.length / ends.rows;
  const result = new Float64Array(elements * rows * width);
  for (let e = 0; e < elements; e++) {
    const at = [...make.places[e]!, ...make.places[e + 1]!];
    for (let i = 0; i < rows; i++) {
      at.forEach((place, j) => {
        if (place >= 0) result[(e * rows + i) * width + place] = element[i * ends.rows + j]!;
      });
    }
  }
  return result;
}
