import { addDiagonal, addEntries } from '../factor/factorise.ts';
import { Elimination, PIVOT_TOL } from '../factor/Elimination.ts';
import { ZeroPivotError } from '../factor/ZeroPivotError.ts';
import type { Arena } from '../kernels/Arena.ts';
import type { SymmetricCsc } from '../sparse/SymmetricCsc.ts';
import { entriesOf, type ChainAnalysis } from './analyseChains.ts';
import { orderOf, type ChainClass, type ChainedPair } from './ChainedPair.ts';
import {
  packChainMatrix,
  packTiles,
  tiledSize,
  writeTiles,
  type ChainMatrix,
} from './ChainMatrix.ts';
import { condense } from './condense.ts';

/** Chains worked on together: what they need fits into the first cache. */
const BATCH = 64;
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
  readonly inverse: number;
  /** −W and its transpose. */
  readonly minusW: number;
  readonly minusWT: number;
  readonly S: number;
  readonly magnitude: number;
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
      const { chainClass, count, table } = placed;
      const { inner, ends } = chainClass;
      const { A, magnitude } = combined(chainClass, k, m, delta);
      const condensed = condense(A, magnitude, inner, ends);
      this.#smallestInnerPivot = Math.min(this.#smallestInnerPivot, condensed.smallestPivot);
      if (condensed.smallestPivot <= tolerance) {
        throw new ZeroPivotError({
          unknown: placed.first,
          sigma,
          relativePivot: condensed.smallestPivot,
          motion: new Float64Array(this.n),
        });
      }
      negative += condensed.negative * count;
      const { inverse, W, S } = condensed;
      writeTiles(this.arena, placed.inverse, inner, inner, (i, j) => inverse[i * inner + j]!);
      writeTiles(this.arena, placed.minusW, inner, ends, (i, e) => -W[i * ends + e]!);
      writeTiles(this.arena, placed.minusWT, ends, inner, (e, i) => -W[i * ends + e]!);
      this.arena.view(placed.S, ends * ends).set(S);
      this.arena.view(placed.magnitude, ends).set(magnitude.subarray(inner));
      const { values, scale } = this.#elimination;
      const { S: at, magnitude: sizes } = placed;
      kernels.addCongruent(count, table, ends, at, values, scale, sizes, this.#work);
    }
    const { K, M } = this.pair;
    if (k !== 0) addEntries(this.#elimination, this.arena.f64, K, k);
    if (m !== 0) addEntries(this.#elimination, this.arena.f64, M, m);
    if (delta !== 0) addDiagonal(this.#elimination, this.arena.f64, this.#massShift(delta));
    return negative + this.#eliminate(sigma);
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
    this.#inBatches((placed, from, count) => {
      const { inner, ends } = placed.chainClass;
      if (inner === 0) return;
      const F = x + 8 * (placed.first + from * inner);
      kernels.multiplyBatch(count, F, inner, placed.minusWT, ends, this.#ends, false);
      kernels.scatterEnds(count, placed.table + 24 * from, ends, this.#ends, y);
    });
    this.#elimination.solve(y, y);
    this.#inBatches((placed, from, count) => {
      const { inner } = placed.chainClass;
      if (inner === 0) return;
      const offset = 8 * (placed.first + from * inner);
      kernels.multiplyBatch(count, x + offset, inner, placed.inverse, inner, y + offset, false);
    });
    this.#addChainMotion(y, y);
  }

  /** u_i −= W T x, for the inner unknowns u of y. */
  #addChainMotion(x: number, y: number): void {
    const { kernels } = this.arena;
    this.#inBatches((placed, from, count) => {
      const { inner, ends } = placed.chainClass;
      if (inner === 0) return;
      kernels.gatherEnds(count, placed.table + 24 * from, ends, x, this.#ends);
      const at = y + 8 * (placed.first + from * inner);
      kernels.multiplyBatch(count, this.#ends, ends, placed.minusW, inner, at, true);
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
      const offset = 8 * (placed.first + from * inner);
      const out = this.#ends + 8 * BATCH * ends;
      kernels.gatherEnds(count, table, ends, x, this.#ends);
      if (matrix.kind === 'diagonal') {
        kernels.multiplyDiagonals(count, inner, matrix.inner, x + offset, y + offset);
        kernels.multiplyDiagonals(count, ends, matrix.ends, this.#ends, out);
      } else {
        const { innerInner, innerEnds, endsInner, endsEnds } = matrix;
        kernels.multiplyBatch(count, this.#ends, ends, endsEnds, ends, out, false);
        if (inner > 0) {
          kernels.multiplyBatch(count, x + offset, inner, endsInner, ends, out, true);
          kernels.multiplyBatch(count, x + offset, inner, innerInner, inner, y + offset, false);
          kernels.multiplyBatch(count, this.#ends, ends, innerEnds, inner, y + offset, true);
        }
      }
      kernels.scatterEnds(count, table, ends, out, y);
    });
  }

  /**
   * n: size of each diagonal entry of K or M, taken from the elements' own diagonals; what unknowns of
   * different units are scaled by.
   */
  diagonal(which: 'K' | 'M'): Float64Array {
    const { joints, classes, [which]: sparse } = this.pair;
    const result = new Float64Array(this.n);
    for (let j = 0; j < joints; j++) result[j] = sparse.values[sparse.colPtr[j]!]!;
    let first = joints;
    for (const { inner, ends, chains, [which]: A } of classes) {
      const own = (i: number) => A[i * (inner + ends + 1)]!;
      for (const { dofs, T } of chains) {
        for (let i = 0; i < inner; i++) result[first++] = own(i);
        dofs.forEach((dof, b) => {
          for (let e = 0; e < ends; e++) result[dof]! += T[b * ends + e]! ** 2 * own(inner + e);
        });
      }
    }
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
      kernels.multiplyBatch(count, this.#ends, ends, row.ends, row.outputs, out, false);
      if (inner > 0) kernels.multiplyBatch(count, F, inner, row.inner, row.outputs, out, true);
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

/** kK + mM + δ diag(M) of a chain, 1 on the diagonal of inner unknowns without mass where δ is given. */
function combined(
  { inner, ends, K, M }: ChainClass,
  k: number,
  m: number,
  delta: number,
): { A: Float64Array; magnitude: Float64Array } {
  const n = inner + ends;
  const A = K.map((value, i) => k * value + m * M[i]!);
  const magnitude = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    const at = i * (n + 1);
    magnitude[i] = Math.abs(k * K[at]!) + Math.abs(m * M[at]!);
    // At the ends it is added to the joints, in whose axes the sum is regular.
    if (delta === 0 || i >= inner) continue;
    A[at]! += M[at] === 0 ? 1 : delta * M[at]!;
    if (M[at] === 0) magnitude[i] = 1;
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
  const { inner, ends, chains } = chainClass;
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
    K: packChainMatrix(arena, chainClass.K, inner, ends),
    M: packChainMatrix(arena, chainClass.M, inner, ends),
    inverse: arena.numbers(tiledSize(inner, inner)),
    minusW: arena.numbers(tiledSize(inner, ends)),
    minusWT: arena.numbers(tiledSize(ends, inner)),
    S: arena.numbers(ends * ends),
    magnitude: arena.numbers(ends),
  };
}
