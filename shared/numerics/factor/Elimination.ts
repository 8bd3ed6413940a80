import type { Arena } from '../kernels/Arena.ts';
import { squareSize } from './analyse.ts';
import type { SymbolicFactor } from './SymbolicFactor.ts';
import { ZeroPivotError } from './ZeroPivotError.ts';

/**
 * A pivot below this share of its diagonal entry K_kk + |σ| M_kk is rounding, not stiffness: the
 * sum that makes it has some tens of terms, each rounded to 2⁻⁵² of the diagonal. A slender tower
 * of a thousand members, the softest thing that is still a frame, stays above 1e-13.
 */
export const PIVOT_TOL = 2 ** -46;

/**
 * Room for P (K − σM) Pᵀ = L D Lᵀ in an arena: clear, add the entries, eliminate, solve. It can be
 * filled and eliminated any number of times.
 * Source: Duff and Reid 1983, ACM Trans. Math. Softw. 9(3), 302–325 (multifrontal method).
 */
export class Elimination {
  readonly symbolic: SymbolicFactor;
  /** Address of the values of L; entries are added at the indices of `EntryPlaces`. */
  readonly values: number;
  /** Address, by place, of the size of each diagonal entry before elimination. */
  readonly scale: number;
  readonly #arena: Arena;
  readonly #pivots: number;
  readonly #table: number;
  readonly #rows: number;
  readonly #relative: number;
  readonly #perm: number;
  readonly #x: number;
  readonly #work: number;
  readonly #stack: number;
  readonly #updates: Float64Array;

  constructor(symbolic: SymbolicFactor, arena: Arena) {
    const { supernodes, first, rowPtr, panelPtr, places } = symbolic;
    this.symbolic = symbolic;
    this.#arena = arena;
    this.values = arena.numbers(panelPtr[supernodes]!);
    this.scale = arena.numbers(places);
    this.#pivots = arena.numbers(places);
    const table = new Int32Array(5 * supernodes);
    for (let s = 0; s < supernodes; s++) {
      table[5 * s] = first[s]!;
      table[5 * s + 1] = first[s + 1]! - first[s]!;
      table[5 * s + 2] = (rowPtr[s + 1]! - rowPtr[s]!) >> 2;
      table[5 * s + 3] = rowPtr[s]!;
      table[5 * s + 4] = this.values + 8 * panelPtr[s]!;
    }
    this.#table = arena.placeIndices(table);
    this.#rows = arena.placeIndices(symbolic.rows);
    this.#relative = arena.placeIndices(symbolic.relative);
    this.#perm = arena.placeIndices(symbolic.perm);
    // One more place for the padding of rows, four so that vectors end on a tile.
    this.#x = arena.numbers(places + 4);
    this.#work = arena.numbers(4 * symbolic.maxColumns);
    this.#stack = arena.numbers(symbolic.stackSize);
    this.#updates = new Float64Array(supernodes);
    arena.view(this.#x, places + 4).fill(0);
  }

  /** Makes L and the scale ready for entries: zero, and one where a place is padding. */
  clear(): void {
    const { places, perm, first, supernodeOf, panelPtr, supernodes } = this.symbolic;
    this.#arena.view(this.values, panelPtr[supernodes]!).fill(0);
    this.#arena.view(this.scale, places).fill(0);
    const { f64 } = this.#arena;
    for (let k = 0; k < places; k++) {
      if (perm[k]! >= 0) continue;
      const s = supernodeOf[k]!;
      const index = k - first[s]!;
      const columns = first[s + 1]! - first[s]!;
      f64[this.values / 8 + panelPtr[s]! + (index >> 2) * 4 * columns + 4 * index + (index & 3)] =
        1;
      f64[this.scale / 8 + k] = 1;
    }
  }

  /**
   * Turns the entries into L and D. Returns the number of negative pivots: by Sylvester's law the
   * number of eigenvalues λ below σ.
   *   sigma  for the error only
   * Throws ZeroPivotError where the matrix is singular within rounding (PIVOT_TOL).
   */
  eliminate(sigma: number): number {
    const { supernodes, first, rowPtr, rowCount, panelPtr, parent, places } = this.symbolic;
    const { kernels, f64 } = this.#arena;
    const updates = this.#updates; // where each waiting update matrix begins
    const firstChild = new Int32Array(supernodes).fill(-1);
    const sibling = new Int32Array(supernodes).fill(-1);
    let top = this.#stack;
    for (let s = 0; s < supernodes; s++) {
      const columns = first[s + 1]! - first[s]!;
      const rows = rowPtr[s + 1]! - rowPtr[s]!;
      const size = squareSize(rows);
      const panel = this.values + 8 * panelPtr[s]!;
      f64.fill(0, top / 8, top / 8 + size);
      let bottom = top;
      for (let c = firstChild[s]!; c >= 0; c = sibling[c]!) {
        const from = updates[c]!;
        const relative = this.#relative + 4 * rowPtr[c]!;
        kernels.extendAdd(from, rowCount[c]!, relative, panel, columns, top);
        if (from < bottom) bottom = from;
      }
      const pivots = this.#pivots + 8 * first[s]!;
      const failed = kernels.eliminatePanel(
        panel,
        columns,
        (columns + rows) >> 2,
        pivots,
        this.scale + 8 * first[s]!,
        PIVOT_TOL,
        this.#work,
      );
      if (failed >= 0) throw this.#zeroPivot(sigma, s, first[s]! + failed);
      if (rows > 0) {
        const below = panel + 8 * columns * columns;
        kernels.subtractUpdate(top, below, columns, rows >> 2, pivots, this.#work);
      }
      if (bottom < top) f64.copyWithin(bottom / 8, top / 8, top / 8 + size);
      updates[s] = bottom;
      top = bottom + 8 * size;
      const up = parent[s]!;
      if (up >= 0) {
        sibling[s] = firstChild[up]!;
        firstChild[up] = s;
      }
    }
    const pivots = this.#arena.view(this.#pivots, places);
    let negative = 0;
    for (let k = 0; k < places; k++) if (pivots[k]! < 0) negative += 1;
    return negative;
  }

  /** Smallest |pivot| over the size of its diagonal entry [–]. */
  smallestPivot(): number {
    const { places } = this.symbolic;
    const pivots = this.#arena.view(this.#pivots, places);
    const scale = this.#arena.view(this.scale, places);
    let smallest = Infinity;
    for (let k = 0; k < places; k++) {
      smallest = Math.min(smallest, Math.abs(pivots[k]!) / scale[k]!);
    }
    return smallest;
  }

  /** y ← (K − σM)⁻¹ x; addresses of n numbers in the order of the unknowns, may be the same. */
  solve(x: number, y: number): void {
    const { places, supernodes } = this.symbolic;
    const { kernels } = this.#arena;
    kernels.gather(places, this.#perm, x, this.#x);
    kernels.forwardSweep(supernodes, this.#table, this.#rows, this.#x);
    kernels.divide(places, this.#pivots, this.#x);
    this.#arena.f64[this.#x / 8 + places] = 0;
    kernels.backSweep(supernodes - 1, this.#table, this.#rows, this.#x, this.#work);
    kernels.scatter(places, this.#perm, this.#x, y);
  }

  /** The motion x with L₁ᵀ x = e_k over the places up to k: (K − σM) x = d_k e_k there. */
  #zeroPivot(sigma: number, supernode: number, place: number): ZeroPivotError {
    const { n, perm, places } = this.symbolic;
    const { kernels } = this.#arena;
    const x = this.#arena.view(this.#x, places + 1);
    x.fill(0);
    x[place] = 1;
    kernels.backSweep(supernode, this.#table, this.#rows, this.#x, this.#work);
    const motion = new Float64Array(n);
    let largest = 0;
    for (let k = 0; k < places; k++) {
      if (perm[k]! >= 0) motion[perm[k]!] = x[k]!;
      largest = Math.max(largest, Math.abs(x[k]!));
    }
    for (let i = 0; i < n; i++) motion[i]! /= largest;
    const scale = this.#arena.f64[this.scale / 8 + place]!;
    const pivot = this.#arena.f64[this.#pivots / 8 + place]!;
    const relativePivot = scale > 0 ? pivot / scale : 0;
    return new ZeroPivotError({ unknown: perm[place]!, sigma, relativePivot, motion });
  }
}
