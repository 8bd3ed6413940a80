import { AppError } from '../../errors/AppError.ts';
import type { FrameModel } from '../../frame/assembly/FrameModel.ts';
import { SymmetricTriplets } from '../../frame/assembly/SymmetricTriplets.ts';
import { barConsistentMass } from '../../frame/elements/bar.ts';
import type { Combination } from '../../frame/freedoms/Combination.ts';
import { analyse } from '../../numerics/factor/analyse.ts';
import { factorise } from '../../numerics/factor/factorise.ts';
import type { Ldlt } from '../../numerics/factor/Ldlt.ts';
import type { SymbolicFactor } from '../../numerics/factor/SymbolicFactor.ts';
import { ZeroPivotError } from '../../numerics/factor/ZeroPivotError.ts';
import type { SymmetricCsc } from '../../numerics/sparse/SymmetricCsc.ts';
import type { MemberPiece } from './memberPieces.ts';

/** Part of ω by which a frequency is moved where K_D has no certain inertia. */
const NUDGE = 1e-11;
const MOST_NUDGES = 6;

/** The dynamic stiffness at one frequency, factored, and what it counts. */
export interface Evaluation {
  readonly omega: number;
  readonly ldlt: Ldlt | null;
  /** Natural frequencies below omega: J₀ + s{K_D}. */
  readonly below: number;
  /** J₀: those with every unknown clamped. */
  readonly clamped: number;
}

/** Bars across their axes: a straight line with m̄L/6 [2 1; 1 2], over a bar's six end translations [kg]. */
function acrossMass(
  model: FrameModel,
): { motion: Combination; mass: Float64Array; part: number }[] {
  return model.segments
    .filter(({ part }) => part.member.kind === 'bar')
    .map(({ part, motion }) => {
      const mass = barConsistentMass(part.properties, part.axes.length);
      mass[0] = mass[3] = mass[18] = mass[21] = 0;
      return { motion, mass, part: part.index };
    });
}

/**
 * The dynamic stiffness of a frame over its unknowns:  K_D(ω) = Σ Tᵀ k(ω) T + K₀ − ω² M₀, with the
 * transcendental k of the member pieces, K₀ of joints, supports and springs, M₀ of masses and of bars across
 * their axes. Its pattern is analysed once.
 */
export class DynamicSystem {
  /** The frame whose members' divisions the pieces are. */
  readonly model: FrameModel;
  /** Number of unknowns: the model's, then those inside bars. */
  readonly n: number;
  readonly pieces: readonly MemberPiece[];
  /** Mass of each bar across its axis [kg]. */
  readonly bars: ReturnType<typeof acrossMass>;
  readonly symbolic: SymbolicFactor;
  readonly #K0: Float64Array;
  readonly #M0: Float64Array;
  readonly #pattern: SymmetricCsc;
  /** Per piece: place in the values of each pair of its unknowns, a ≥ b, row by row. */
  readonly #places: readonly Int32Array[];
  readonly #k = new Float64Array(16);

  constructor(
    model: FrameModel,
    { pieces, unknowns }: { pieces: readonly MemberPiece[]; unknowns: number },
    clock: () => number,
  ) {
    this.model = model;
    this.n = unknowns;
    this.pieces = pieces;
    this.bars = acrossMass(model);
    const all = [...pieces, ...this.bars, ...model.ties, ...model.bodies];
    const assembled = (fill: (into: SymmetricTriplets) => void): SymmetricCsc => {
      const triplets = new SymmetricTriplets([...all, ...all]);
      // Zeros give K₀, M₀ and K_D one pattern.
      for (const { motion } of all) triplets.add(motion, new Float64Array(motion.rows ** 2));
      fill(triplets);
      return triplets.assemble(unknowns);
    };
    this.#pattern = assembled((into) => {
      for (const { motion, stiffness } of model.ties) into.add(motion, Float64Array.of(stiffness));
    });
    this.#K0 = this.#pattern.values;
    this.#M0 = assembled((into) => {
      for (const { motion, mass } of [...this.bars, ...model.bodies]) into.add(motion, mass);
    }).values;
    this.#places = pieces.map(({ motion }) => placesOf(this.#pattern, motion.dofs));
    this.symbolic = analyse(this.#pattern, null, clock);
  }

  /** K_D(ω) [N/m], and J₀. */
  stiffness(omega: number): { K: SymmetricCsc; clamped: number } {
    const values = this.#K0.map((value, i) => value - omega * omega * this.#M0[i]!);
    let clamped = 0;
    this.pieces.forEach((piece, i) => {
      clamped += piece.element.stiffness(omega, this.#k);
      addPiece(values, this.#places[i]!, piece.motion, this.#k);
    });
    return { K: { ...this.#pattern, values }, clamped };
  }

  /** −∂K_D/∂ω² [kg]: the mass of the continuous frame in the motions that go with its unknowns at ω. */
  mass(omega: number): SymmetricCsc {
    const values = this.#M0.slice();
    this.pieces.forEach((piece, i) => {
      piece.element.mass(omega, this.#k);
      addPiece(values, this.#places[i]!, piece.motion, this.#k);
    });
    return { ...this.#pattern, values };
  }

  /** √ of the lowest K_ii / M_ii at rest: above the first modes, and of their order [rad/s]. */
  frequencyScale(): number {
    const { K } = this.stiffness(0);
    const M = this.mass(0);
    let lowest = Infinity;
    for (let j = 0; j < this.n; j++) {
      const ratio = K.values[K.colPtr[j]!]! / M.values[M.colPtr[j]!]!;
      if (ratio > 0 && ratio < lowest) lowest = ratio;
    }
    // Only clamped members are left where there is no such unknown; the search steps up to them.
    return lowest < Infinity ? Math.sqrt(lowest) : 1;
  }

  /**
   * Factors K_D and counts (Wittrick and Williams 1971). On a frequency at which a pivot vanishes the count has no
   * meaning: ω is then moved up by some 1e-11 of itself. Throws AppError `unsolvable`
   * where that does not help.
   */
  evaluate(omega: number): Evaluation {
    for (let nudge = 0; ; nudge++) {
      const shifted = omega * (1 + nudge * NUDGE);
      const { K, clamped } = this.stiffness(shifted);
      if (this.n === 0) return { omega: shifted, ldlt: null, below: clamped, clamped };
      try {
        const ldlt = factorise(this.symbolic, K, null, 0);
        return { omega: shifted, ldlt, below: clamped + ldlt.negativePivots, clamped };
      } catch (error) {
        if (!(error instanceof ZeroPivotError)) throw error;
        if (nudge === MOST_NUDGES) throw uncertain(error);
      }
    }
  }
}

function uncertain(cause: ZeroPivotError): AppError {
  const message =
    'The stiffnesses of this frame lie too far apart to count its modes: replace members that are very short or ' +
    'very stiff beside the others by rigid links or arms.';
  return new AppError('unsolvable', message, { issues: [{ path: '', message }] }, cause);
}

/** values += Tᵀ k T at the given places. */
function addPiece(
  values: Float64Array,
  places: Int32Array,
  { rows, dofs, T }: Combination,
  k: Float64Array,
): void {
  const width = dofs.length;
  for (let b = 0, at = 0; b < width; b++) {
    let c0 = 0;
    let c1 = 0;
    let c2 = 0;
    let c3 = 0;
    for (let j = 0; j < rows; j++) {
      const t = T[j * width + b]!;
      if (t === 0) continue;
      c0 += k[j]! * t;
      c1 += k[rows + j]! * t;
      if (rows === 2) continue;
      c2 += k[8 + j]! * t;
      c3 += k[12 + j]! * t;
    }
    for (let a = b; a < width; a++, at++) {
      let sum = T[a]! * c0 + T[width + a]! * c1;
      if (rows === 4) sum += T[2 * width + a]! * c2 + T[3 * width + a]! * c3;
      values[places[at]!]! += sum;
    }
  }
}

/** Places of pairs (a, b), a ≥ b, column by column, in the values of a matrix. */
function placesOf({ colPtr, rowIdx }: SymmetricCsc, dofs: Int32Array): Int32Array {
  const places = new Int32Array((dofs.length * (dofs.length + 1)) / 2);
  let at = 0;
  dofs.forEach((dof, b) => {
    for (let a = b; a < dofs.length; a++) {
      const column = Math.min(dof, dofs[a]!);
      const row = Math.max(dof, dofs[a]!);
      let low = colPtr[column]!;
      let high = colPtr[column + 1]!;
      while (low < high) {
        const middle = (low + high) >> 1;
        if (rowIdx[middle]! < row) low = middle + 1;
        else high = middle;
      }
      places[at++] = low;
    }
  });
  return places;
}
