import type { Arena } from '../kernels/Arena.ts';

/** Numbers of each vector that are summed over at a time: the basis' share of them fills a cache. */
const STRETCH = 512;

/**
 * Linear combinations of the vectors of a basis, side by side in memory:  y_i = Σ_j coordinates[i][j] v_j.
 *   basis  address of the v_j, `size` numbers each (a multiple of 4), one after the other
 *   to     address of the y_i, likewise; overwritten
 */
export function combineVectors(
  arena: Arena,
  size: number,
  basis: number,
  coordinates: readonly Float64Array[],
  to: number,
): void {
  const used = arena.used;
  const { kernels } = arena;
  const stride = 8 * size;
  const minus = coordinates.map((values) => arena.place(values.map((value) => -value)));
  arena.view(to, coordinates.length * size).fill(0);
  for (let from = 0; from < size; from += STRETCH) {
    const length = Math.min(STRETCH, size - from);
    const v = basis + 8 * from;
    let i = 0;
    for (; i + 1 < coordinates.length; i += 2) {
      const y = to + 8 * from + i * stride;
      const count = coordinates[i]!.length;
      kernels.subtractFromTwo(length, v, stride, count, minus[i]!, minus[i + 1]!, y, y + stride);
    }
    if (i < coordinates.length) {
      const y = to + 8 * from + i * stride;
      kernels.subtractCombination(length, v, stride, coordinates[i]!.length, minus[i]!, y);
    }
  }
  arena.rewind(used);
}
