import type { SymmetricPattern } from '../sparse/SymmetricCsc.ts';
import type { SymbolicFactor } from './SymbolicFactor.ts';

/**
 * Index, in the values of L, of each stored entry of a matrix.
 *   pattern  its pattern, a part of the one that `symbolic` was made from
 * Worked out once per pattern and remembered. Throws RangeError for an entry that has no place.
 */
export function entryDestinations(symbolic: SymbolicFactor, pattern: SymmetricPattern): Int32Array {
  const known = symbolic.destinations.get(pattern.rowIdx);
  if (known !== undefined) return known;
  const { n, place, first, rowPtr, rows, panelPtr, supernodes } = symbolic;
  if (pattern.n !== n) {
    throw new RangeError(`A matrix of order ${pattern.n} was given to a factor of order ${n}.`);
  }
  const nodeOf = new Int32Array(n);
  for (let s = 0; s < supernodes; s++) nodeOf.fill(s, first[s], first[s + 1]);
  const { colPtr, rowIdx } = pattern;
  const result = new Int32Array(colPtr[n]!);
  for (let j = 0; j < n; j++) {
    const pj = place[j]!;
    for (let q = colPtr[j]!; q < colPtr[j + 1]!; q++) {
      const pi = place[rowIdx[q]!]!;
      const column = pi < pj ? pi : pj;
      const row = pi < pj ? pj : pi;
      const s = nodeOf[column]!;
      const columns = first[s + 1]! - first[s]!;
      let index = row - first[s]!;
      if (index >= columns) {
        let low = rowPtr[s]!;
        let high = rowPtr[s + 1]!;
        while (low < high) {
          const middle = (low + high) >> 1;
          if (rows[middle]! < row) low = middle + 1;
          else high = middle;
        }
        if (low === rowPtr[s + 1]! || rows[low] !== row) {
          throw new RangeError(`Entry (${rowIdx[q]}, ${j}) is not in the analysed pattern.`);
        }
        index = columns + low - rowPtr[s]!;
      }
      result[q] = panelPtr[s]! + index * columns + column - first[s]!;
    }
  }
  symbolic.destinations.set(pattern.rowIdx, result);
  return result;
}
