import { newArena } from '../kernels/Arena.ts';
import type { SymmetricCsc } from '../sparse/SymmetricCsc.ts';
import { Elimination } from './Elimination.ts';
import { EntryPlaces, entryPlaces } from './entryPlaces.ts';
import type { Ldlt } from './Ldlt.ts';
import type { SymbolicFactor } from './SymbolicFactor.ts';

/** Where the entries of a pattern go, remembered per symbolic factor and pattern. */
const known = new WeakMap<SymbolicFactor, WeakMap<Int32Array, Int32Array>>();

/**
 * P (K − σM) Pᵀ = L D Lᵀ without pivoting.
 *   symbolic  from analyse(K, M)
 *   K, M      n×n; M null: K alone          sigma  [rad²/s²]
 *   reuse     a factorisation whose storage is overwritten (it is of no use afterwards)
 * Throws ZeroPivotError when K − σM is singular within rounding (PIVOT_TOL).
 */
export function factorise(
  symbolic: SymbolicFactor,
  K: SymmetricCsc,
  M: SymmetricCsc | null,
  sigma: number,
  reuse?: Ldlt,
): Ldlt {
  const reusable = reuse?.symbolic === symbolic ? reuse : undefined;
  const arena = reusable?.arena ?? newArena();
  const elimination = reusable?.elimination ?? new Elimination(symbolic, arena);
  const x = reusable?.x ?? arena.numbers(symbolic.n);
  elimination.clear();
  addEntries(elimination, arena.f64, K, 1);
  if (M !== null && sigma !== 0) addEntries(elimination, arena.f64, M, -sigma);
  const negativePivots = elimination.eliminate(sigma);
  return { symbolic, sigma, negativePivots, elimination, arena, x };
}

/** L += factor · A,  scale[k] += |factor · A_kk|. */
export function addEntries(
  { symbolic, values, scale }: Elimination,
  f64: Float64Array,
  A: SymmetricCsc,
  factor: number,
): void {
  const at = placesOf(symbolic, A);
  const { n, place } = symbolic;
  const { colPtr, rowIdx, values: a } = A;
  const L = values / 8;
  for (let j = 0; j < n; j++) {
    for (let q = colPtr[j]!; q < colPtr[j + 1]!; q++) {
      const value = factor * a[q]!;
      f64[L + at[q]!]! += value;
      if (rowIdx[q] === j) f64[scale / 8 + place[j]!]! += Math.abs(value);
    }
  }
}

/** L_kk += d_k; d by unknown. */
export function addDiagonal(
  { symbolic, values, scale }: Elimination,
  f64: Float64Array,
  d: Float64Array,
): void {
  const { place } = symbolic;
  const entries = new EntryPlaces(symbolic);
  d.forEach((value, j) => {
    f64[values / 8 + entries.find(place[j]!, place[j]!)]! += value;
    f64[scale / 8 + place[j]!]! += Math.abs(value);
  });
}

function placesOf(symbolic: SymbolicFactor, A: SymmetricCsc): Int32Array {
  let patterns = known.get(symbolic);
  if (patterns === undefined) {
    patterns = new WeakMap();
    known.set(symbolic, patterns);
  }
  let places = patterns.get(A.rowIdx);
  if (places === undefined) {
    places = entryPlaces(symbolic, A);
    patterns.set(A.rowIdx, places);
  }
  return places;
}
