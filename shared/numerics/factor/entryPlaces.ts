import type { SymmetricPattern } from '../sparse/SymmetricCsc.ts';
import type { SymbolicFactor } from './SymbolicFactor.ts';

/** Finds where entries of K − σM go in the values of L. */
export class EntryPlaces {
  readonly #symbolic: SymbolicFactor;
  #supernode = -1;
  #row = -1;
  /** Index in `rows` of the row found last: entries of one element come in runs of rows. */
  #at = -1;

  constructor(symbolic: SymbolicFactor) {
    this.#symbolic = symbolic;
  }

  /** Index in L of the entry at two places. Throws RangeError where the pattern has none. */
  find(a: number, b: number): number {
    const { supernodeOf, first, panelPtr } = this.#symbolic;
    const column = a < b ? a : b;
    const row = a < b ? b : a;
    const s = supernodeOf[column]!;
    const columns = first[s + 1]! - first[s]!;
    let index = row - first[s]!;
    if (index >= columns) index = columns + this.#rowIndex(s, row);
    return panelPtr[s]! + (index >> 2) * 4 * columns + 4 * (column - first[s]!) + (index & 3);
  }

  #rowIndex(s: number, row: number): number {
    const { rows, rowPtr, rowCount } = this.#symbolic;
    const begin = rowPtr[s]!;
    const end = begin + rowCount[s]!;
    let at = -1;
    if (s === this.#supernode && row === this.#row + 1 && this.#at + 1 < end) at = this.#at + 1;
    if (at < 0 || rows[at] !== row) {
      let low = begin;
      let high = end;
      while (low < high) {
        const middle = (low + high) >> 1;
        if (rows[middle]! < row) low = middle + 1;
        else high = middle;
      }
      if (low === end || rows[low] !== row) {
        throw new RangeError('An entry is not in the analysed pattern.');
      }
      at = low;
    }
    this.#supernode = s;
    this.#row = row;
    this.#at = at;
    return at - begin;
  }
}

/** Index in L of each stored entry of a matrix whose pattern is a part of the one analysed. */
export function entryPlaces(symbolic: SymbolicFactor, pattern: SymmetricPattern): Int32Array {
  const { n, place } = symbolic;
  if (pattern.n !== n) {
    throw new RangeError(`A matrix of order ${pattern.n} was given to a factor of order ${n}.`);
  }
  const places = new EntryPlaces(symbolic);
  const { colPtr, rowIdx } = pattern;
  const result = new Int32Array(colPtr[n]!);
  for (let j = 0; j < n; j++) {
    for (let q = colPtr[j]!; q < colPtr[j + 1]!; q++) {
      result[q] = places.find(place[rowIdx[q]!]!, place[j]!);
    }
  }
  return result;
}
