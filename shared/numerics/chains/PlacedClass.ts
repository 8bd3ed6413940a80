import type { Arena } from '../kernels/Arena.ts';
import type { SymmetricCsc } from '../sparse/SymmetricCsc.ts';
import { entriesOf } from './analyseChains.ts';
import type { ChainClass } from './ChainedPair.ts';
import {
  blockRanges,
  packChainMatrix,
  tiledSize,
  type BlockRange,
  type ChainMatrix,
} from './ChainMatrix.ts';

/** What of a class lies in an arena, by addresses. */
export interface PlacedClass {
  readonly chainClass: ChainClass;
  readonly count: number;
  /** First unknown of its first chain. */
  readonly first: number;
  readonly table: number;
  readonly K: ChainMatrix;
  readonly M: ChainMatrix;
  readonly blocks: readonly FactoredBlock[];
  readonly S: number;
  readonly magnitude: number;
}

/** Where one block of a class, its inner unknowns eliminated, is kept. */
export interface FactoredBlock extends BlockRange {
  readonly inverse: number;
  /** −W and its transpose. */
  readonly minusW: number;
  readonly minusWT: number;
}

/** A sparse matrix in an arena, by addresses. */
export interface PlacedSparse {
  readonly colPtr: number;
  readonly rowIdx: number;
  readonly values: number;
}

export function placeSparse(arena: Arena, { colPtr, rowIdx, values }: SymmetricCsc): PlacedSparse {
  return {
    colPtr: arena.placeIndices(colPtr),
    rowIdx: arena.placeIndices(rowIdx),
    values: arena.place(values),
  };
}

/** Puts a class into the arena: tables, T, K and M, and room for what a factorisation makes of it. */
export function placeClass(
  arena: Arena,
  chainClass: ChainClass,
  first: number,
  destinations: Int32Array,
): PlacedClass {
  const { ends, chains } = chainClass;
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
    K: packChainMatrix(arena, chainClass, 'K'),
    M: packChainMatrix(arena, chainClass, 'M'),
    blocks: blockRanges(chainClass).map((block) => ({
      ...block,
      inverse: arena.numbers(tiledSize(block.inner, block.inner)),
      minusW: arena.numbers(tiledSize(block.inner, block.ends)),
      minusWT: arena.numbers(tiledSize(block.ends, block.inner)),
    })),
    S: arena.numbers(ends * ends),
    magnitude: arena.numbers(ends),
  };
}
