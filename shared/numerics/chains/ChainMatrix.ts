import type { Arena } from '../kernels/Arena.ts';

/**
 * One matrix of a class of chains, split by inner unknowns and ends and packed for `multiplyBatch`;
 * where it is diagonal (lumped mass) its diagonal alone.
 */
export type ChainMatrix =
  | { readonly kind: 'diagonal'; readonly inner: number; readonly ends: number }
  | {
      readonly kind: 'full';
      readonly innerInner: number;
      /** Inner rows of the ends' columns, and the other way round. */
      readonly innerEnds: number;
      readonly endsInner: number;
      readonly endsEnds: number;
    };

/** Packs the (inner + ends)² matrix `A`, row by row, inner unknowns first. */
export function packChainMatrix(
  arena: Arena,
  A: Float64Array,
  inner: number,
  ends: number,
): ChainMatrix {
  const n = inner + ends;
  const part = (rowFrom: number, rows: number, colFrom: number, cols: number) =>
    packTiles(arena, rows, cols, (i, j) => A[(rowFrom + i) * n + colFrom + j]!);
  if (isDiagonal(A, n)) {
    const diagonal = Float64Array.from({ length: n }, (_, i) => A[i * n + i]!);
    return {
      kind: 'diagonal',
      inner: arena.place(diagonal.subarray(0, inner)),
      ends: arena.place(diagonal.subarray(inner)),
    };
  }
  return {
    kind: 'full',
    innerInner: part(0, inner, 0, inner),
    innerEnds: part(0, inner, inner, ends),
    endsInner: part(inner, ends, 0, inner),
    endsEnds: part(inner, ends, inner, ends),
  };
}

function isDiagonal(A: Float64Array, n: number): boolean {
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) if (i !== j && A[i * n + j] !== 0) return false;
  }
  return true;
}

/** Address of rows × cols numbers in tiles of four rows, padded with zeros. */
export function packTiles(
  arena: Arena,
  rows: number,
  cols: number,
  value: (i: number, j: number) => number,
): number {
  const address = arena.numbers(tiledSize(rows, cols));
  writeTiles(arena, address, rows, cols, value);
  return address;
}

export function tiledSize(rows: number, cols: number): number {
  return ((rows + 3) & ~3) * cols;
}

export function writeTiles(
  arena: Arena,
  address: number,
  rows: number,
  cols: number,
  value: (i: number, j: number) => number,
): void {
  const { f64 } = arena;
  let at = address / 8;
  for (let i = 0; i < rows; i += 4) {
    for (let j = 0; j < cols; j++) {
      for (let r = i; r < i + 4; r++) f64[at++] = r < rows ? value(r, j) : 0;
    }
  }
}
