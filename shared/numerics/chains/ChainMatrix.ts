import type { Arena } from '../kernels/Arena.ts';
import type { ChainClass } from './ChainedPair.ts';

/** A block of a class, and where it lies among the inner unknowns and the ends. */
export interface BlockRange {
  readonly inner: number;
  readonly ends: number;
  readonly innerFrom: number;
  readonly endsFrom: number;
}

export function blockRanges({ blocks }: ChainClass): BlockRange[] {
  let innerFrom = 0;
  let endsFrom = 0;
  return blocks.map(({ inner, ends }) => {
    const range = { inner, ends, innerFrom, endsFrom };
    innerFrom += inner;
    endsFrom += ends;
    return range;
  });
}

/** One block of a matrix of a class, split by inner unknowns and ends and packed for `multiplyBatch`. */
export interface PackedBlock extends BlockRange {
  readonly innerInner: number;
  /** Inner rows of the ends' columns, and the other way round. */
  readonly innerEnds: number;
  readonly endsInner: number;
  readonly endsEnds: number;
}

/** One matrix of a class by blocks; where it is diagonal (lumped mass) its diagonal alone. */
export type ChainMatrix =
  | { readonly kind: 'diagonal'; readonly inner: number; readonly ends: number }
  | { readonly kind: 'full'; readonly blocks: readonly PackedBlock[] };

/** Packs K or M of a class. */
export function packChainMatrix(
  arena: Arena,
  chainClass: ChainClass,
  which: 'K' | 'M',
): ChainMatrix {
  const { inner, ends, [which]: A } = chainClass;
  const n = inner + ends;
  if (isDiagonal(A, n)) {
    const diagonal = Float64Array.from({ length: n }, (_, i) => A[i * n + i]!);
    return {
      kind: 'diagonal',
      inner: arena.place(diagonal.subarray(0, inner)),
      ends: arena.place(diagonal.subarray(inner)),
    };
  }
  const blocks = blockRanges(chainClass).map((block): PackedBlock => {
    const i = block.innerFrom;
    const e = inner + block.endsFrom;
    const part = (rowFrom: number, rows: number, colFrom: number, cols: number) =>
      packTiles(arena, rows, cols, (r, c) => A[(rowFrom + r) * n + colFrom + c]!);
    return {
      ...block,
      innerInner: part(i, block.inner, i, block.inner),
      innerEnds: part(i, block.inner, e, block.ends),
      endsInner: part(e, block.ends, i, block.inner),
      endsEnds: part(e, block.ends, e, block.ends),
    };
  });
  return { kind: 'full', blocks };
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
