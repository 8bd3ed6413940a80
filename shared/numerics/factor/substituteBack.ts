import type { SymbolicFactor } from './SymbolicFactor.ts';

/**
 * x ← L⁻ᵀ x, in places.
 *   values  panels of L      x  n, overwritten
 *   last    supernode to begin with; x must be zero after its columns
 */
export function substituteBack(
  symbolic: SymbolicFactor,
  values: Float64Array,
  x: Float64Array,
  last: number,
): void {
  const { first, rowPtr, rows, panelPtr } = symbolic;
  for (let s = last; s >= 0; s--) {
    const begin = first[s]!;
    const columns = first[s + 1]! - begin;
    const end = rowPtr[s + 1]!;
    let at = panelPtr[s]! + columns * columns;
    let r = rowPtr[s]!;
    for (; r + 2 < end; r += 3) {
      const at1 = at + columns;
      const at2 = at1 + columns;
      const x0 = x[rows[r]!]!;
      const x1 = x[rows[r + 1]!]!;
      const x2 = x[rows[r + 2]!]!;
      for (let k = 0; k < columns; k++) {
        x[begin + k]! -= values[at + k]! * x0 + values[at1 + k]! * x1 + values[at2 + k]! * x2;
      }
      at = at2 + columns;
    }
    for (; r < end; r++) {
      const xr = x[rows[r]!]!;
      for (let k = 0; k < columns; k++) x[begin + k]! -= values[at + k]! * xr;
      at += columns;
    }
    for (let i = columns - 1; i > 0; i--) {
      const xi = x[begin + i]!;
      at = panelPtr[s]! + i * columns;
      for (let k = 0; k < i; k++) x[begin + k]! -= values[at + k]! * xi;
    }
  }
}
