import { addDiagonal, addEntries } from '../factor/factorise.ts';
import { Elimination, PIVOT_TOL } from '../factor/Elimination.ts';
import { ZeroPivotError } from '../factor/ZeroPivotError.ts';
import type { Arena } from '../kernels/Arena.ts';
import type { SymmetricCsc } from '../sparse/SymmetricCsc.ts';
import { entriesOf, type ChainAnalysis } from './analyseChains.ts';
import { orderOf, type ChainClass, type ChainedPair } from './ChainedPair.ts';
import {
  blockRanges,
  packChainMatrix,
  packTiles,
  tiledSize,
  writeTiles,
  type BlockRange,
  type ChainMatrix,
} from './ChainMatrix.ts';
import { condense } from './condense.ts';
import { inMemory, inX, inY, Program } from './Program.ts';

/** Chains worked on together: what they need fits into the first cache. */
const BATCH = 512;
/**
 * A pivot inside a chain below this share of its diagonal is one of its own frequencies with the ends
 * held: its inverse would then lose that many digits, so another shift is taken.
 */
const INNER_PIVOT_TOL = 1e-10;

/** What of a class lies in the arena. */
interface Placed {
  readonly chainClass: ChainClass;
  readonly count: number;
  /** First unknown of its first chain. */
  readonly first: number;
  readonly table: number;
  readonly K: ChainMatrix;
  readonly M: ChainMatrix;
  readonly blocks: readonly FactoredBlock[];
  readonly S: number;
  readonly magnitude: number;
}

/** Where one block of a class, its inner unknowns eliminated, is kept. */
interface FactoredBlock extends BlockRange {
  readonly inverse: number;
  /** −W and its transpose. */
  readonly minusW: number;
  readonly minusWT: number;
}

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

interface PlacedSparse {
  readonly colPtr: number;
  readonly rowIdx: number;
  readonly values: number;
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
  readonly analysis: ChainAnalysis;
  /** Where K − σM was factored last; NaN before. */
  sigma = NaN;
  negativePivots = 0;
  readonly #classes: readonly Placed[];
  readonly #K: PlacedSparse;
  readonly #M: PlacedSparse;
  readonly #elimination: Elimination;
  readonly #ends: number;
  readonly #work: number;
  /** Joints' right-hand side from the inner ones; inner unknowns with the ends held; their part of the ends. */
  readonly #reduce: Program;
  readonly #held: Program;
  readonly #follow: Program;
  readonly #products: { readonly K: Program; readonly M: Program };
  readonly #diagonals: { K?: Float64Array; M?: Float64Array } = {};
  #smallestInnerPivot = Infinity;

  constructor(arena: Arena, pair: ChainedPair, analysis: ChainAnalysis) {
    this.arena = arena;
    this.pair = pair;
    this.analysis = analysis;
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
    const widest = pair.classes.reduce((most, { ends }) => Math.max(most, ends), 0);
    this.#ends = arena.numbers(2 * BATCH * widest);
    this.#work = arena.numbers(widest);
    this.#reduce = this.#reduceProgram();
    this.#held = this.#heldProgram();
    this.#follow = this.#followProgram();
    this.#products = { K: this.#productProgram('K'), M: this.#productProgram('M') };
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
    { chainClass, S, magnitude }: Placed,
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
    return whole.map((mass) => (mass === 0 ? 1 : delta * mass));
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
    this.#follow.run(x, x);
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
    this.#reduce.run(x, y);
    this.#elimination.solve(y, y);
    this.#held.run(x, y);
    this.#follow.run(y, y);
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
    this.#products[which].run(x, y);
  }

  /** y_joints −= Tᵀ Wᵀ x_inner. */
  #reduceProgram(): Program {
    const program = new Program(this.arena);
    this.#inBatches(({ chainClass: { inner, ends }, blocks, first, table }, from, count) => {
      if (inner === 0) return;
      const F = 8 * (first + from * inner);
      const B = this.#ends;
      for (const { inner: inputs, ends: outputs, innerFrom, endsFrom, minusWT } of blocks) {
        program.multiply(
          count,
          minusWT,
          { inputs, outputs },
          [inX(F + 8 * innerFrom), inner],
          [inMemory(B + 8 * endsFrom), ends],
          false,
        );
      }
      program.scatter(count, table + 24 * from, ends, inMemory(B), inY(0));
    });
    return program.place();
  }

  /** y_inner = (K − σM)_ii⁻¹ x_inner. */
  #heldProgram(): Program {
    const program = new Program(this.arena);
    this.#inBatches(({ chainClass: { inner }, blocks, first }, from, count) => {
      for (const { inner: size, innerFrom, inverse } of blocks) {
        const at = 8 * (first + from * inner + innerFrom);
        const sizes = { inputs: size, outputs: size };
        program.multiply(count, inverse, sizes, [inX(at), inner], [inY(at), inner], false);
      }
    });
    return program.place();
  }

  /** y_inner −= W T x_joints. */
  #followProgram(): Program {
    const program = new Program(this.arena);
    this.#inBatches(({ chainClass: { inner, ends }, blocks, first, table }, from, count) => {
      if (inner === 0) return;
      const B = this.#ends;
      program.gather(count, table + 24 * from, ends, inX(0), inMemory(B));
      const Y = 8 * (first + from * inner);
      for (const { inner: outputs, ends: inputs, innerFrom, endsFrom, minusW } of blocks) {
        program.multiply(
          count,
          minusW,
          { inputs, outputs },
          [inMemory(B + 8 * endsFrom), ends],
          [inY(Y + 8 * innerFrom), inner],
          true,
        );
      }
    });
    return program.place();
  }

  /** y += K x or M x, the chains' part. */
  #productProgram(which: 'K' | 'M'): Program {
    const program = new Program(this.arena);
    this.#inBatches((placed, from, count) => {
      const { inner, ends } = placed.chainClass;
      const matrix = placed[which];
      const table = placed.table + 24 * from;
      const at = 8 * (placed.first + from * inner);
      const B = this.#ends;
      const C = B + 8 * BATCH * ends;
      program.gather(count, table, ends, inX(0), inMemory(B));
      if (matrix.kind === 'diagonal') {
        program.diagonal(count, inner, matrix.inner, inX(at), inY(at));
        program.diagonal(count, ends, matrix.ends, inMemory(B), inMemory(C));
      } else {
        for (const block of matrix.blocks) {
          const { inner: m, ends: e, innerFrom: i, endsFrom: o } = block;
          const x = [inX(at + 8 * i), inner] as const;
          const y = [inY(at + 8 * i), inner] as const;
          const b = [inMemory(B + 8 * o), ends] as const;
          const c = [inMemory(C + 8 * o), ends] as const;
          program.multiply(count, block.endsEnds, { inputs: e, outputs: e }, b, c, false);
          program.multiply(count, block.endsInner, { inputs: m, outputs: e }, x, c, true);
          program.multiply(count, block.innerInner, { inputs: m, outputs: m }, x, y, false);
          program.multiply(count, block.innerEnds, { inputs: e, outputs: m }, b, y, true);
        }
      }
      program.scatter(count, table, ends, inMemory(C), inY(0));
    });
    return program.place();
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

  #inBatches(use: (placed: Placed, from: number, count: number) => void): void {
    for (const placed of this.#classes) {
      for (let from = 0; from < placed.count; from += BATCH) {
        use(placed, from, Math.min(BATCH, placed.count - from));
      }
    }
  }
}

/**
 * kK + mM + δ diag(M) of one block of a chain, inner unknowns first; 1 on the diagonal of inner unknowns without
 * mass where δ is given.
 */
function combined(
  { inner, ends, K, M }: ChainClass,
  block: BlockRange,
  k: number,
  m: number,
  delta: number,
): { A: Float64Array; magnitude: Float64Array } {
  const n = inner + ends;
  const size = block.inner + block.ends;
  const A = new Float64Array(size * size);
  const magnitude = new Float64Array(size);
  const place = (i: number) =>
    i < block.inner ? block.innerFrom + i : inner + block.endsFrom + i - block.inner;
  for (let i = 0; i < size; i++) {
    const row = place(i) * n;
    for (let j = 0; j < size; j++) {
      const at = row + place(j);
      A[i * size + j] = k * K[at]! + m * M[at]!;
    }
    const diagonal = row + place(i);
    const mass = M[diagonal]!;
    magnitude[i] = Math.abs(k * K[diagonal]!) + Math.abs(m * mass);
    // At the ends it is added to the joints, in whose axes the sum is regular.
    if (delta === 0 || i >= block.inner) continue;
    A[i * size + i]! += mass === 0 ? 1 : delta * mass;
    if (mass === 0) magnitude[i] = 1;
  }
  return { A, magnitude };
}

function placeSparse(arena: Arena, { colPtr, rowIdx, values }: SymmetricCsc): PlacedSparse {
  return {
    colPtr: arena.placeIndices(colPtr),
    rowIdx: arena.placeIndices(rowIdx),
    values: arena.place(values),
  };
}

function placeClass(
  arena: Arena,
  chainClass: ChainClass,
  first: number,
  destinations: Int32Array,
): Placed {
  const { ends, chains } = chainClass;
  let widths = 0;
  let nonZero = 0;
  for (const { dofs, T } of chains) {
    widths += dofs.length;
    for (const value of T) if (value !== 0) nonZero += 1;
  }
  const table = arena.indices(6 * chains.length);
  const entries = arena.numbers(2 * nonZero);
  const dense = arena.numbers(widths * ends);
  const placesAt = arena.placeIndices(destinations);
  const { i32, f64 } = arena;
  let entry = entries;
  let column = dense / 8;
  let destination = placesAt;
  chains.forEach(({ dofs, T }, m) => {
    const row = table / 4 + 6 * m;
    i32[row + 1] = entry;
    i32[row + 2] = dofs.length;
    i32[row + 3] = 8 * column;
    i32[row + 4] = destination;
    i32[row + 5] = 0;
    for (let j = 0; j < dofs.length; j++) {
      for (let e = 0; e < ends; e++, column++) {
        const value = T[j * ends + e]!;
        f64[column] = value;
        if (value === 0) continue;
        f64[entry / 8] = value;
        i32[entry / 4 + 2] = 8 * dofs[j]!;
        i32[entry / 4 + 3] = 8 * e;
        entry += 16;
      }
    }
    i32[row] = (entry - i32[row + 1]!) / 16;
    destination += 4 * entriesOf(dofs.length);
  });
  return {
    chainClass,
    count: chains.length,
    first,
    table,
    K: packChainMatrix(arena, chainClass, 'K'),
    M: packChainMatrix(arena, chainClass, 'M'),
    blocks: blockRanges(chainClass).map((block) => ({
      ...block,
      inverse: arena.numbers(tiledSize(block.inner, block.inner)),
      minusW: arena.numbers(tiledSize(block.inner, block.ends)),
      minusWT: arena.numbers(tiledSize(block.ends, block.inner)),
    })),
    S: arena.numbers(ends * ends),
    magnitude: arena.numbers(ends),
  };
}
