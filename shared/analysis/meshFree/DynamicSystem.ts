import { AppError } from '../../errors/AppError.ts';
import { CERTAIN_PIVOT } from '../checkMotion.ts';
import type { FrameModel } from '../../frame/assembly/FrameModel.ts';
import type { DynamicElement } from '../../frame/elements/DynamicElement.ts';
import { barConsistentMass } from '../../frame/elements/bar.ts';
import type { Combination } from '../../frame/freedoms/Combination.ts';
import { analyseChains } from '../../numerics/chains/analyseChains.ts';
import type { ChainAnalysis } from '../../numerics/chains/analyseChains.ts';
import { unchained } from '../../numerics/chains/ChainedPair.ts';
import type { ChainedPair } from '../../numerics/chains/ChainedPair.ts';
import { factorise } from '../../numerics/factor/factorise.ts';
import type { Ldlt } from '../../numerics/factor/Ldlt.ts';
import { ZeroPivotError } from '../../numerics/factor/ZeroPivotError.ts';
import type { SymmetricCsc } from '../../numerics/sparse/SymmetricCsc.ts';
import { addBlock, assemblyPlan, blockOf, sameTransform, transformed } from './assemblyPlan.ts';
import type { Places } from './assemblyPlan.ts';
import type { MemberPiece } from './memberPieces.ts';

/**
 * Parts of ω by which a frequency is moved, in turn, where K_D has no certain inertia: a low mode of short, stiff pieces
 * leaves a pivot of rounding on either side of it.
 */
const NUDGES = [0, 1e-11, 4e-11, 1.6e-10, 6.4e-10, 2.5e-9, 1e-8] as const;

/** The dynamic stiffness at one frequency, factored, and what it counts. */
export interface Evaluation {
  readonly omega: number;
  /** Good until the next evaluation, which takes over its storage. */
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
  return model.chains
    .flat()
    .filter(({ part }) => part.member.kind === 'bar')
    .map(({ part, ends }) => {
      const mass = barConsistentMass(part.properties, part.axes.length);
      mass[0] = mass[3] = mass[18] = mass[21] = 0;
      return { motion: ends, mass, part: part.index };
    });
}

/** Pieces that enter K_D with the same numbers: of one element, and turned alike. */
interface PieceBlock {
  readonly element: number;
  readonly motion: Combination;
  /** Tᵀ k T, overwritten. */
  readonly block: Float64Array;
  readonly pieces: number[];
}

/** Orientations of one element that are looked through for one alike; more are kept apart. */
const MOST_ORIENTATIONS = 16;

function pieceBlocks(pieces: readonly MemberPiece[], elementOf: Int32Array): PieceBlock[] {
  const blocks: PieceBlock[] = [];
  const byElement: PieceBlock[][] = [];
  pieces.forEach(({ motion }, i) => {
    const element = elementOf[i]!;
    const known = (byElement[element] ??= []);
    const alike = known.find((block) => sameTransform(block.motion, motion));
    if (alike) {
      alike.pieces.push(i);
      return;
    }
    const block = { element, motion, block: blockOf(motion), pieces: [i] };
    blocks.push(block);
    if (known.length < MOST_ORIENTATIONS) known.push(block);
  });
  return blocks;
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
  /** The distinct elements of the pieces, and which of them each piece has. */
  readonly elements: readonly DynamicElement[];
  readonly elementOf: Int32Array;
  readonly analysis: ChainAnalysis;
  readonly #pair: ChainedPair;
  readonly #K0: Float64Array;
  readonly #M0: Float64Array;
  readonly #pattern: SymmetricCsc;
  /** Per piece. */
  readonly #places: readonly Places[];
  /** Matrices of the distinct elements at one ω. */
  readonly #k: readonly Float64Array[];
  readonly #clampedOf: Int32Array;
  readonly #blocks: readonly PieceBlock[];
  /** What is factored. */
  readonly #work: SymmetricCsc;
  #ldlt: Ldlt | undefined;

  constructor(
    model: FrameModel,
    { pieces, unknowns }: { pieces: readonly MemberPiece[]; unknowns: number },
    clock: () => number,
  ) {
    this.model = model;
    this.n = unknowns;
    this.pieces = pieces;
    this.bars = acrossMass(model);
    const numbers = new Map<DynamicElement, number>();
    for (const { element } of pieces) {
      if (!numbers.has(element)) numbers.set(element, numbers.size);
    }
    this.elements = [...numbers.keys()];
    this.elementOf = Int32Array.from(pieces, ({ element }) => numbers.get(element)!);
    this.#k = this.elements.map(({ rows }) => new Float64Array(rows * rows));
    this.#clampedOf = new Int32Array(this.elements.length);

    const all = [...pieces, ...this.bars, ...model.ties, ...model.bodies];
    const { pattern, places } = assemblyPlan(
      unknowns,
      all.map(({ motion }) => motion),
    );
    this.#pattern = pattern;
    this.#places = places;
    this.#K0 = pattern.values.slice();
    this.#M0 = pattern.values.slice();
    this.#work = { ...pattern, values: pattern.values.slice() };
    let at = pieces.length;
    const add = (values: Float64Array, motion: Combination, matrix: Float64Array) => {
      const block = blockOf(motion);
      transformed(motion, matrix, block);
      addBlock(values, places[at++]!, block);
    };
    for (const { motion, mass } of this.bars) add(this.#M0, motion, mass);
    for (const { motion, stiffness } of model.ties) {
      add(this.#K0, motion, Float64Array.of(stiffness));
    }
    for (const { motion, mass } of model.bodies) add(this.#M0, motion, mass);
    this.#blocks = pieceBlocks(pieces, this.elementOf);
    this.#pair = unchained(pattern, pattern);
    this.analysis = analyseChains(this.#pair, clock);
  }

  /** K_D(ω) [N/m], and J₀. */
  stiffness(omega: number): { K: SymmetricCsc; clamped: number } {
    const values = new Float64Array(this.#K0.length);
    const clamped = this.#stiffnessInto(values, omega);
    return { K: { ...this.#pattern, values }, clamped };
  }

  #stiffnessInto(values: Float64Array, omega: number): number {
    const square = omega * omega;
    for (let i = 0; i < values.length; i++) values[i] = this.#K0[i]! - square * this.#M0[i]!;
    for (let e = 0; e < this.elements.length; e++) {
      this.#clampedOf[e] = this.elements[e]!.stiffness(omega, this.#k[e]!);
    }
    this.#addPieces(values);
    let clamped = 0;
    for (let i = 0; i < this.elementOf.length; i++) clamped += this.#clampedOf[this.elementOf[i]!]!;
    return clamped;
  }

  /** −∂K_D/∂ω² [kg]: the mass of the continuous frame in the motions that go with its unknowns at ω. */
  mass(omega: number): SymmetricCsc {
    const values = this.#M0.slice();
    for (let e = 0; e < this.elements.length; e++) this.elements[e]!.mass(omega, this.#k[e]!);
    this.#addPieces(values);
    return { ...this.#pattern, values };
  }

  #addPieces(values: Float64Array): void {
    for (const { element, motion, block, pieces } of this.#blocks) {
      transformed(motion, this.#k[element]!, block);
      for (const piece of pieces) addBlock(values, this.#places[piece]!, block);
    }
  }

  /** The frame at rest, K_D(0) and −∂K_D/∂ω²(0): one consistent element per piece. */
  atRest(): ChainedPair {
    return { ...this.#pair, K: this.stiffness(0).K, M: this.mass(0) };
  }

  /** Whether the frame at rest certainly resists every motion. */
  resistsEveryMotion(): boolean {
    if (this.n === 0) return true;
    this.#stiffnessInto(this.#work.values, 0);
    try {
      this.#ldlt = factorise(this.analysis.symbolic, this.#work, null, 0, this.#ldlt);
    } catch (error) {
      if (error instanceof ZeroPivotError) return false;
      throw error;
    }
    const { negativePivots, elimination } = this.#ldlt;
    return negativePivots === 0 && elimination.smallestPivot() > CERTAIN_PIVOT;
  }

  /** A frequency from `omega` up, at most 32 times it, below which no piece, clamped, has one of its own. */
  clampedAbove(omega: number): number {
    let above = omega;
    for (let doubling = 0; doubling < 5; doubling++) {
      for (let e = 0; e < this.elements.length; e++) {
        if (this.elements[e]!.stiffness(2 * above, this.#k[e]!) > 0) return above;
      }
      above *= 2;
    }
    return above;
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
   * meaning: ω is then moved up by 1e-11 to 1e-8 of itself. Throws AppError `unsolvable`
   * where that does not help.
   */
  evaluate(omega: number): Evaluation {
    let cause: ZeroPivotError | undefined;
    for (const nudge of NUDGES) {
      const shifted = omega * (1 + nudge);
      const clamped = this.#stiffnessInto(this.#work.values, shifted);
      if (this.n === 0) return { omega: shifted, ldlt: null, below: clamped, clamped };
      try {
        this.#ldlt = factorise(this.analysis.symbolic, this.#work, null, 0, this.#ldlt);
        const below = clamped + this.#ldlt.negativePivots;
        return { omega: shifted, ldlt: this.#ldlt, below, clamped };
      } catch (error) {
        if (!(error instanceof ZeroPivotError)) throw error;
        cause = error;
      }
    }
    throw uncertain(cause);
  }
}

function uncertain(cause: ZeroPivotError | undefined): AppError {
  const message =
    'The stiffnesses of this frame lie too far apart to count its modes: replace members that are very short or ' +
    'very stiff beside the others by rigid links or arms.';
  return new AppError('unsolvable', message, { issues: [{ path: '', message }] }, cause);
}
