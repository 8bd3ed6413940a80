import type { Combination } from '../../frame/freedoms/Combination.ts';
import { assembleSymmetric } from '../../numerics/sparse/SymmetricCsc.ts';
import type { SymmetricCsc } from '../../numerics/sparse/SymmetricCsc.ts';

/** Widest element: twelve displacements of a beam's ends. */
const MOST_ROWS = 12;
const scratch = new Float64Array(MOST_ROWS);

/** Where one element's Tᵀ k T goes in the values of a matrix: pairs of its unknowns a ≥ b, column by column. */
export type Places = Int32Array;

/** A symmetric n×n matrix of zeros with room for all elements, and each element's places in it. */
export function assemblyPlan(
  n: number,
  motions: readonly Combination[],
): { pattern: SymmetricCsc; places: Places[] } {
  const length = motions.reduce((sum, { dofs }) => sum + pairs(dofs.length), 0);
  const rows = new Int32Array(length);
  const cols = new Int32Array(length);
  let at = 0;
  for (const { dofs } of motions) {
    for (let b = 0; b < dofs.length; b++) {
      for (let a = b; a < dofs.length; a++, at++) {
        rows[at] = dofs[a]!;
        cols[at] = dofs[b]!;
      }
    }
  }
  const pattern = assembleSymmetric(n, rows, cols, new Float64Array(length), length);
  return { pattern, places: motions.map(({ dofs }) => placesOf(pattern, dofs)) };
}

function pairs(width: number): number {
  return (width * (width + 1)) / 2;
}

function placesOf({ colPtr, rowIdx }: SymmetricCsc, dofs: Int32Array): Places {
  const places = new Int32Array(pairs(dofs.length));
  let at = 0;
  for (let b = 0; b < dofs.length; b++) {
    for (let a = b; a < dofs.length; a++) {
      const column = Math.min(dofs[b]!, dofs[a]!);
      const row = Math.max(dofs[b]!, dofs[a]!);
      let low = colPtr[column]!;
      let high = colPtr[column + 1]!;
      while (low < high) {
        const middle = (low + high) >> 1;
        if (rowIdx[middle]! < row) low = middle + 1;
        else high = middle;
      }
      places[at++] = low;
    }
  }
  return places;
}

/** block ← Tᵀ k T, pairs a ≥ b, column by column; k rows × rows, symmetric, row by row. */
export function transformed(
  { rows, dofs, T }: Combination,
  k: Float64Array,
  block: Float64Array,
): void {
  const width = dofs.length;
  for (let b = 0, at = 0; b < width; b++) {
    for (let i = 0; i < rows; i++) {
      let sum = 0;
      for (let j = 0; j < rows; j++) sum += k[i * rows + j]! * T[j * width + b]!;
      scratch[i] = sum;
    }
    for (let a = b; a < width; a++, at++) {
      let sum = 0;
      for (let i = 0; i < rows; i++) sum += T[i * width + a]! * scratch[i]!;
      block[at] = sum;
    }
  }
}

/** values += a block at an element's places. */
export function addBlock(values: Float64Array, places: Places, block: Float64Array): void {
  for (let at = 0; at < places.length; at++) values[places[at]!]! += block[at]!;
}

export function blockOf({ dofs }: Combination): Float64Array {
  return new Float64Array(pairs(dofs.length));
}

export function sameTransform(a: Combination, b: Combination): boolean {
  if (a.T === b.T) return true;
  return a.T.length === b.T.length && a.T.every((value, i) => value === b.T[i]);
}
