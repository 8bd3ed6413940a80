import { addDiagonal, addEntries } from '../factor/factorise.ts';
import { Elimination, PIVOT_TOL } from '../factor/Elimination.ts';
import { ZeroPivotError } from '../factor/ZeroPivotError.ts';
import type { Arena } from '../kernels/Arena.ts';
import type { Kernels } from '../kernels/Kernels.ts';
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
  type PackedBlock,
} from './ChainMatrix.ts';
import { condense } from './condense.ts';

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

/** Rows over a chain's unknowns, per class, as `packRows` placed them. */
export interface PackedRows {
  readonly outputs: number;
  readonly inner: number;
  readonly ends: number;
}

/** Some chains of one class: products of the rows, and what they were multiplied with, chain by chain. */
export interface ChainBatch {
  readonly classIndex: number;
  readonly from: number;
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
    this.#addChainMotion(x, x);
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
    const { kernels, f64 } = this.arena;
    f64.copyWithin(y / 8, x / 8, x / 8 + this.pair.joints);
    f64.fill(0, y / 8 + this.n, y / 8 + this.size);
    this.#inBatches(({ chainClass: { inner, ends }, blocks, first, table }, from, count) => {
      if (inner === 0) return;
      const F = x + 8 * (first + from * inner);
      const B = this.#ends;
      for (const { inner: inputs, ends: outputs, innerFrom, endsFrom, minusWT } of blocks) {
        kernels.multiplyBatch(
          count,
          F + 8 * innerFrom,
          8 * inner,
          inputs,
          minusWT,
          outputs,
          B + 8 * endsFrom,
          8 * ends,
          false,
        );
      }
      kernels.scatterEnds(count, table + 24 * from, ends, B, y);
    });
    this.#elimination.solve(y, y);
    this.#inBatches(({ chainClass: { inner }, blocks, first }, from, count) => {
      const offset = 8 * (first + from * inner);
      for (const { inner: size, innerFrom, inverse } of blocks) {
        const at = offset + 8 * innerFrom;
        kernels.multiplyBatch(
          count,
          x + at,
          8 * inner,
          size,
          inverse,
          size,
          y + at,
          8 * inner,
          false,
        );
      }
    });
    this.#addChainMotion(y, y);
  }

  /** u_i −= W T x, for the inner unknowns u of y. */
  #addChainMotion(x: number, y: number): void {
    const { kernels } = this.arena;
    this.#inBatches(({ chainClass: { inner, ends }, blocks, first, table }, from, count) => {
      if (inner === 0) return;
      const B = this.#ends;
      kernels.gatherEnds(count, table + 24 * from, ends, x, B);
      const Y = y + 8 * (first + from * inner);
      for (const { inner: outputs, ends: inputs, innerFrom, endsFrom, minusW } of blocks) {
        kernels.multiplyBatch(
          count,
          B + 8 * endsFrom,
          8 * ends,
          inputs,
          minusW,
          outputs,
          Y + 8 * innerFrom,
          8 * inner,
          true,
        );
      }
    });
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
    this.#inBatches((placed, from, count) => {
      const { inner, ends } = placed.chainClass;
      const matrix = placed[which];
      const table = placed.table + 24 * from;
      const F = x + 8 * (placed.first + from * inner);
      const Y = y + 8 * (placed.first + from * inner);
      const B = this.#ends;
      const C = B + 8 * BATCH * ends;
      kernels.gatherEnds(count, table, ends, x, B);
      if (matrix.kind === 'diagonal') {
        kernels.multiplyDiagonals(count, inner, matrix.inner, F, Y);
        kernels.multiplyDiagonals(count, ends, matrix.ends, B, C);
      } else {
        for (const block of matrix.blocks)
          multiplyBlock(kernels, count, block, inner, ends, F, B, Y, C);
      }
      kernels.scatterEnds(count, table, ends, C, y);
    });
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
   * Packs, per class, rows over a chain's inner unknowns and ends for `applyRows`.
   *   rows  per class: outputs × (inner + ends), row by row
   */
  packRows(rows: readonly Float64Array[]): PackedRows[] {
    return this.pair.classes.map(({ inner, ends }, c) => {
      const width = inner + ends;
      const A = rows[c]!;
      const outputs = A.length / width;
      const part = (from: number, columns: number) =>
        packTiles(this.arena, outputs, columns, (i, j) => A[i * width + from + j]!);
      return { outputs, inner: part(0, inner), ends: part(inner, ends) };
    });
  }

  /** Hands the products of the rows with each chain's part of x to `use`, batch by batch. */
  applyRows(rows: readonly PackedRows[], x: number, use: (batch: ChainBatch) => void): void {
    const { arena } = this;
    const { kernels } = arena;
    const used = arena.used;
    const most = rows.reduce((sum, { outputs }) => Math.max(sum, outputs), 0);
    const out = arena.numbers(BATCH * most);
    this.#inBatches((placed, from, count, c) => {
      const { inner, ends } = placed.chainClass;
      const row = rows[c]!;
      const F = x + 8 * (placed.first + from * inner);
      kernels.gatherEnds(count, placed.table + 24 * from, ends, x, this.#ends);
      const width = 8 * row.outputs;
      kernels.multiplyBatch(
        count,
        this.#ends,
        8 * ends,
        ends,
        row.ends,
        row.outputs,
        out,
        width,
        false,
      );
      kernels.multiplyBatch(count, F, 8 * inner, inner, row.inner, row.outputs, out, width, true);
      use({
        classIndex: c,
        from,
        count,
        products: arena.view(out, count * row.outputs),
        inner: arena.view(F, count * inner),
        ends: arena.view(this.#ends, count * ends),
      });
    });
    arena.rewind(used);
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

  /** Hands the inner unknowns and the ends of every chain to `use`, batch by batch. */
  eachBatch(x: number, use: (batch: Omit<ChainBatch, 'products'>) => void): void {
    const { arena } = this;
    this.#inBatches(({ chainClass: { inner, ends }, first, table }, from, count, classIndex) => {
      const F = x + 8 * (first + from * inner);
      arena.kernels.gatherEnds(count, table + 24 * from, ends, x, this.#ends);
      const parts = {
        inner: arena.view(F, count * inner),
        ends: arena.view(this.#ends, count * ends),
      };
      use({ classIndex, from, count, ...parts });
    });
  }

  #inBatches(use: (placed: Placed, from: number, count: number, c: number) => void): void {
    this.#classes.forEach((placed, c) => {
      for (let from = 0; from < placed.count; from += BATCH) {
        use(placed, from, Math.min(BATCH, placed.count - from), c);
      }
    });
  }
}

/** One block's part of (Y, C) = A (F, B), inner unknowns and ends. */
function multiplyBlock(
  kernels: Kernels,
  count: number,
  block: PackedBlock,
  inner: number,
  ends: number,
  F: number,
  B: number,
  Y: number,
  C: number,
): void {
  const { inner: m, ends: e, innerInner, innerEnds, endsInner, endsEnds } = block;
  const [f, y] = [F + 8 * block.innerFrom, Y + 8 * block.innerFrom];
  const [b, c] = [B + 8 * block.endsFrom, C + 8 * block.endsFrom];
  const [i, o] = [8 * inner, 8 * ends];
  kernels.multiplyBatch(count, b, o, e, endsEnds, e, c, o, false);
  if (m === 0) return;
  kernels.multiplyBatch(count, f, i, m, endsInner, e, c, o, true);
  kernels.multiplyBatch(count, f, i, m, innerInner, m, y, i, false);
  kernels.multiplyBatch(count, b, o, e, innerEnds, m, y, i, true);
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
