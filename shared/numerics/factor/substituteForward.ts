import type { SymbolicFactor } from './SymbolicFactor.ts';

/**
 * x ← L⁻¹ x, in places.
 *   values  panels of L      x  n, overwritten
 * Rows of a panel are taken three at a time so that each x is loaded once for three products.
 */
export function substituteForward(
  symbolic: SymbolicFactor,
  values: Float64Array,
  x: Float64Array,
): void {
  const { supernodes, first, rowPtr, rows, panelPtr } = symbolic;
  for (let s = 0; s < supernodes; s++) {
    const begin = first[s]!;
    const columns = first[s + 1]! - begin;
    let at = panelPtr[s]!;
    for (let i = 0; i < columns; i++) {
      let sum = x[begin + i]!;
      for (let k = 0; k < i; k++) sum -= values[at + k]! * x[begin + k]!;
      x[begin + i] = sum;
      at += columns;
    }
    const end = rowPtr[s + 1]!;
    let r = rowPtr[s]!;
    for (; r + 2 < end; r += 3) {
      const at1 = at + columns;
      const at2 = at1 + columns;
      let sum0 = 0;
      let sum1 = 0;
      let sum2 = 0;
      for (let k = 0; k < columns; k++) {
        const xk = x[begin + k]!;
        sum0 += values[at + k]! * xk;
        sum1 += values[at1 + k]! * xk;
        sum2 += values[at2 + k]! * xk;
      }
      x[rows[r]!]! -= sum0;
      x[rows[r + 1]!]! -= sum1;
      x[rows[r + 2]!]! -= sum2;
      at = at2 + columns;
    }
    for (; r < end; r++) {
      let sum = 0;
      for (let k = 0; k < columns; k++) sum += values[at + k]! * x[begin + k]!;
      x[rows[r]!]! -= sum;
      at += columns;
    }
  }
}
