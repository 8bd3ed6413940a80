import { addDiagonal, addEntries } from '../factor/factorise.ts';
import { Elimination, PIVOT_TOL } from '../factor/Elimination.ts';
import { ZeroPivotError } from '../factor/ZeroPivotError.ts';
import type { Arena } from '../kernels/Arena.ts';
import type { ChainAnalysis } from './analyseChains.ts';
import { orderOf, type ChainedPair } from './ChainedPair.ts';
import { packTiles, writeTiles } from './ChainMatrix.ts';
import { chainPrograms, type ChainPrograms } from './chainPrograms.ts';
import { combined, condense } from './condense.ts';
import {
  placeClass,
  placeSparse,
  type FactoredBlock,
  type PlacedClass,
  type PlacedSparse,
} from './PlacedClass.ts';
import { inMemory, inX, Program } from './Program.ts';

/**
 * A pivot inside a chain below this share of its diagonal is one of its own frequencies with the ends
 * held: its inverse would then lose that many digits, so another shift is taken.
 */
const INNER_PIVOT_TOL = 1e-10;

/** Less than this is no mass [kg or kg·m²]: what a direction misses an axis by in rounding, squared. */
const NO_MASS = 1e-100;

/** Rows over chains' unknowns as `placeRows` put them down. */
export interface PlacedRows {
  readonly program: Program;
  readonly batches: readonly {
    readonly first: number;
    readonly B: number;
    readonly out: number;
    readonly outputs: number;
  }[];
}

/** The chains of one class: products of the rows, and what they were multiplied with, chain by chain. */
export interface ChainBatch {
  readonly classIndex: number;
  readonly count: number;
  readonly products: Float64Array;
  readonly inner: Float64Array;
  readonly ends: Float64Array;
}

/**
 * K, M and (K − σM)⁻¹ of a chained pair as operators on vectors in an arena, and the inertia of K − σM.
 * Vectors are `size` numbers: those of the unknowns, then zeros up to a multiple of four.
 */
export class ChainedPencil {
  readonly arena: Arena;
  readonly n: number;
  readonly size: number;
  readonly pair: ChainedPair;
  /** Where K − σM was factored last; NaN before. */
  sigma = NaN;
  negativePivots = 0;
  readonly #classes: readonly PlacedClass[];
  readonly #K: PlacedSparse;
  readonly #M: PlacedSparse;
  readonly #elimination: Elimination;
  readonly #work: number;
  readonly #programs: ChainPrograms;
  readonly #diagonals: { K?: Float64Array; M?: Float64Array } = {};
  #smallestInnerPivot = Infinity;

  constructor(arena: Arena, pair: ChainedPair, analysis: ChainAnalysis) {
    this.arena = arena;
    this.pair = pair;
    this.n = orderOf(pair);
    this.size = (this.n + 3) & ~3;
    this.#K = placeSparse(arena, pair.K);
    this.#M = placeSparse(arena, pair.M);
    let first = pair.joints;
    this.#classes = pair.classes.map((chainClass, c) => {
      const placed = placeClass(arena, chainClass, first, analysis.destinations[c]!);
      first += chainClass.inner * chainClass.chains.length;
      return placed;
    });
    this.#elimination = new Elimination(analysis.symbolic, arena);
    this.#work = arena.numbers(pair.classes.reduce((most, { ends }) => Math.max(most, ends), 0));
    this.#programs = chainPrograms(arena, this.#classes);
  }

  /** Address of a vector of zeros. */
  vector(): number {
    const address = this.arena.numbers(this.size);
    this.arena.view(address, this.size).fill(0);
    return address;
  }

  /**
   * Factors K − σM. Returns its number of negative pivots: of eigenvalues λ below σ (Sylvester).
   * Throws ZeroPivotError where it is singular within rounding.
   */
  factorise(sigma: number): number {
    this.sigma = NaN;
    // Above zero a small pivot inside a chain is one of its own frequencies.
    const tolerance = sigma > 0 ? INNER_PIVOT_TOL : PIVOT_TOL;
    this.negativePivots = this.#factor(1, -sigma, 0, tolerance, sigma);
    this.sigma = sigma;
    return this.negativePivots;
  }

  /**
   * Factors M + δ diag(M), with 1 on the diagonal where there is no mass: `solve` then gives M⁺ b for b in
   * the range of M, but for a share of about δ.
   * Throws ZeroPivotError where δ is too small for rounding.
   */
  factoriseMass(delta: number): void {
    this.sigma = NaN;
    this.#factor(0, 1, delta, PIVOT_TOL, 0);
  }

  /** Factors kK + mM + δ diag(M). */
  #factor(k: number, m: number, delta: number, tolerance: number, sigma: number): number {
    const { kernels } = this.arena;
    this.#elimination.clear();
    let negative = 0;
    this.#smallestInnerPivot = Infinity;
    for (const placed of this.#classes) {
      const { chainClass, count, table, S, magnitude } = placed;
      const { ends } = chainClass;
      this.arena.view(S, ends * ends).fill(0);
      for (const block of placed.blocks) {
        negative += count * this.#condense(placed, block, combined(chainClass, block, k, m, delta));
      }
      if (this.#smallestInnerPivot <= tolerance) {
        throw new ZeroPivotError({
          unknown: placed.first,
          sigma,
          relativePivot: this.#smallestInnerPivot,
          motion: new Float64Array(this.n),
        });
      }
      const { values, scale } = this.#elimination;
      kernels.addCongruent(count, table, ends, S, values, scale, magnitude, this.#work);
    }
    const { K, M } = this.pair;
    if (k !== 0) addEntries(this.#elimination, this.arena.f64, K, k);
    if (m !== 0) addEntries(this.#elimination, this.arena.f64, M, m);
    if (delta !== 0) addDiagonal(this.#elimination, this.arena.f64, this.#massShift(delta));
    return negative + this.#eliminate(sigma);
  }

  /** Eliminates the inner unknowns of one block. Returns the negative pivots of one chain. */
  #condense(
    { chainClass, S, magnitude }: PlacedClass,
    block: FactoredBlock,
    given: { A: Float64Array; magnitude: Float64Array },
  ): number {
    const { arena } = this;
    const { inner, ends, endsFrom } = block;
    const condensed = condense(given.A, given.magnitude, inner, ends);
    const { inverse, W } = condensed;
    writeTiles(arena, block.inverse, inner, inner, (i, j) => inverse[i * inner + j]!);
    writeTiles(arena, block.minusW, inner, ends, (i, e) => -W[i * ends + e]!);
    writeTiles(arena, block.minusWT, ends, inner, (e, i) => -W[i * ends + e]!);
    for (let a = 0; a < ends; a++) {
      const row = S / 8 + (endsFrom + a) * chainClass.ends + endsFrom;
      arena.f64.set(condensed.S.subarray(a * ends, (a + 1) * ends), row);
    }
    arena.f64.set(given.magnitude.subarray(inner), magnitude / 8 + endsFrom);
    this.#smallestInnerPivot = Math.min(this.#smallestInnerPivot, condensed.smallestPivot);
    return condensed.negative;
  }

  /** δ diag(M) at the joints, and 1 where there is no mass. */
  #massShift(delta: number): Float64Array {
    const whole = this.diagonal('M').subarray(0, this.pair.joints);
    return whole.map((mass) => (mass < NO_MASS ? 1 : delta * mass));
  }

  #eliminate(sigma: number): number {
    try {
      return this.#elimination.eliminate(sigma);
    } catch (error) {
      if (!(error instanceof ZeroPivotError)) throw error;
      throw this.#wholeMotion(error);
    }
  }

  /** The motion of the joints with what the chains between them do: u_i = −W T x. */
  #wholeMotion(error: ZeroPivotError): ZeroPivotError {
    const { joints } = this.pair;
    const x = this.vector();
    this.arena.view(x, joints).set(error.motion);
    this.#programs.follow.run(x, x);
    const motion = this.arena.view(x, this.n).slice();
    const largest = motion.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
    const { unknown, sigma, relativePivot } = error;
    return new ZeroPivotError({
      unknown,
      sigma,
      relativePivot,
      motion: motion.map((value) => value / largest),
    });
  }

  /** Smallest pivot of the last factor over the size of its diagonal entry [–]. */
  smallestPivot(): number {
    return Math.min(this.#smallestInnerPivot, this.#elimination.smallestPivot());
  }

  /** y ← (K − σM)⁻¹ x, two different vectors. */
  solve(x: number, y: number): void {
    const { f64 } = this.arena;
    f64.copyWithin(y / 8, x / 8, x / 8 + this.pair.joints);
    f64.fill(0, y / 8 + this.n, y / 8 + this.size);
    this.#programs.reduce.run(x, y);
    this.#elimination.solve(y, y);
    this.#programs.held.run(x, y);
    this.#programs.follow.run(y, y);
  }

  /** y ← M x, two different vectors. */
  multiplyMass(x: number, y: number): void {
    this.#multiply('M', this.#M, x, y);
  }

  /** y ← K x, two different vectors. */
  multiplyStiffness(x: number, y: number): void {
    this.#multiply('K', this.#K, x, y);
  }

  #multiply(
    which: 'K' | 'M',
    { colPtr, rowIdx, values }: PlacedSparse,
    x: number,
    y: number,
  ): void {
    const { kernels, f64 } = this.arena;
    const { joints } = this.pair;
    f64.fill(0, y / 8, y / 8 + joints);
    f64.fill(0, y / 8 + this.n, y / 8 + this.size);
    kernels.multiplySparse(joints, colPtr, rowIdx, values, x, y);
    this.#programs[which].run(x, y);
  }

  /**
   * n: size of each diagonal entry of K or M, taken from the elements' own diagonals; what unknowns of
   * different units are scaled by. Treat it as read-only.
   */
  diagonal(which: 'K' | 'M'): Float64Array {
    const known = this.#diagonals[which];
    if (known !== undefined) return known;
    const { joints, classes, [which]: sparse } = this.pair;
    const result = new Float64Array(this.n);
    for (let j = 0; j < joints; j++) result[j] = sparse.values[sparse.colPtr[j]!]!;
    let first = joints;
    for (const { inner, ends, chains, [which]: A } of classes) {
      const own = Float64Array.from({ length: inner + ends }, (_, i) => A[i * (inner + ends + 1)]!);
      for (const { dofs, T } of chains) {
        result.set(own.subarray(0, inner), first);
        first += inner;
        for (let b = 0, at = 0; b < dofs.length; b++) {
          let sum = 0;
          for (let e = inner; e < inner + ends; e++, at++) sum += T[at]! * T[at]! * own[e]!;
          result[dofs[b]!]! += sum;
        }
      }
    }
    this.#diagonals[which] = result;
    return result;
  }

  /**
   * Puts down rows over the inner unknowns and the ends of each class's chains, for `applyRows`.
   *   rows  per class: outputs × (inner + ends), row by row
   */
  placeRows(rows: readonly Float64Array[]): PlacedRows {
    const { arena } = this;
    const program = new Program(arena);
    const batches = this.#classes.map(({ chainClass: { inner, ends }, count, first, table }, c) => {
      const width = inner + ends;
      const A = rows[c]!;
      const outputs = A.length / width;
      const part = (from: number, columns: number) =>
        packTiles(arena, outputs, columns, (i, j) => A[i * width + from + j]!);
      const B = arena.numbers(count * ends);
      const out = arena.numbers(count * outputs);
      const to = [inMemory(out), outputs] as const;
      program.gather(count, table, ends, inX(0), inMemory(B));
      const ofEnds = part(inner, ends);
      program.multiply(count, ofEnds, { inputs: ends, outputs }, [inMemory(B), ends], to, false);
      const F = [inX(8 * first), inner] as const;
      program.multiply(count, part(0, inner), { inputs: inner, outputs }, F, to, true);
      return { first, B, out, outputs };
    });
    return { program: program.place(), batches };
  }

  /** Hands the products of the rows with each chain's part of x to `use`, class by class. */
  applyRows({ program, batches }: PlacedRows, x: number, use: (batch: ChainBatch) => void): void {
    const { arena } = this;
    program.run(x, x);
    this.#classes.forEach(({ chainClass: { inner, ends }, count }, classIndex) => {
      const { first, B, out, outputs } = batches[classIndex]!;
      use({
        classIndex,
        count,
        products: arena.view(out, count * outputs),
        inner: arena.view(x + 8 * first, count * inner),
        ends: arena.view(B, count * ends),
      });
    });
  }

  /**
   * y += what the chains of one class answer to some numbers each: rows × numbers over their inner unknowns,
   * and over their ends by Tᵀ.
   *   rows     (inner + ends) × inputs, row by row     numbers  chains × inputs
   */
  addAnswers(classIndex: number, rows: Float64Array, numbers: Float64Array, y: number): void {
    const { arena } = this;
    const { kernels } = arena;
    const { chainClass, count, first, table } = this.#classes[classIndex]!;
    const { inner, ends } = chainClass;
    const inputs = rows.length / (inner + ends);
    const used = arena.used;
    const part = (from: number, outputs: number) =>
      packTiles(arena, outputs, inputs, (i, j) => rows[(from + i) * inputs + j]!);
    const ofInner = part(0, inner);
    const ofEnds = part(inner, ends);
    const given = arena.place(numbers);
    const B = arena.numbers(count * ends);
    const Y = y + 8 * first;
    const [i, o, n] = [8 * inner, 8 * ends, 8 * inputs];
    kernels.multiplyBatch(count, given, n, inputs, ofInner, inner, Y, i, true);
    kernels.multiplyBatch(count, given, n, inputs, ofEnds, ends, B, o, false);
    kernels.scatterEnds(count, table, ends, B, y);
    arena.rewind(used);
  }
}
