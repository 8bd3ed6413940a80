/**
 * Loops over one linear memory that a solve spends its time in. Addresses are bytes from the start
 * of the memory, multiples of 16 where 64-bit numbers lie; lengths count numbers.
 *
 * Tiles: a panel of `columns` (a multiple of 4) is stored in tiles of four rows, one after the
 * other; number (r, k) of a tile is its value `4 k + r`. A square of tiles stores its lower
 * triangle of 4 × 4 blocks, block (i, j) at `i (i + 1) / 2 + j`, each column by column.
 *
 * Two implementations give the same bits: WebAssembly SIMD (`assembly/index.ts`) and JavaScript
 * (`scriptKernels.ts`).
 */
export interface Kernels {
  /**
   * Eliminates the columns of one dense front: A = L D Lᵀ on its own rows, L = A L⁻ᵀ D⁻¹ below.
   *   panel      columns/4 tiles of own rows (lower triangle counts), then the rows below
   *   tiles      of both    pivots  D is written there    scale  size of each diagonal before
   *   tolerance  |d| ≤ tolerance · scale is taken as zero   work  4 · columns numbers
   * Returns −1, or the column whose pivot is zero; columns before it are whole.
   */
  eliminatePanel(
    panel: number,
    columns: number,
    tiles: number,
    pivots: number,
    scale: number,
    tolerance: number,
    work: number,
  ): number;
  /** U ← U − L D Lᵀ; `tiles` row tiles of L at `below`, U a square of tiles; work 4 · columns. */
  subtractUpdate(
    update: number,
    below: number,
    columns: number,
    tiles: number,
    pivots: number,
    work: number,
  ): void;
  /**
   * Adds a child's update (a square of tiles, `rows` rows count) into its parent's front.
   *   relative  for each row of the child, ascending: index in the parent's front (32-bit), its
   *             own `columns` first, then the rows below, which go to the square at `target`
   */
  extendAdd(
    update: number,
    rows: number,
    relative: number,
    panel: number,
    columns: number,
    target: number,
  ): void;
  /**
   * x ← L⁻¹ x over `count` supernodes.
   *   table  five 32-bit numbers each: place of the first column, columns, row tiles below, index
   *          of the first of `rows`, address of the panel
   *   rows   32-bit places of the rows below; those that only pad point to a place of zeros
   */
  forwardSweep(count: number, table: number, rows: number, x: number): void;
  /** x ← L⁻ᵀ x from supernode `last` down; work 2 · columns of the widest. */
  backSweep(last: number, table: number, rows: number, x: number, work: number): void;
  /** y[k] = x[index[k]], 0 where the index is negative. */
  gather(length: number, index: number, x: number, y: number): void;
  /** x[index[k]] = y[k], left out where the index is negative. */
  scatter(length: number, index: number, y: number, x: number): void;
  /** x[k] /= d[k]; an even number of them. */
  divide(length: number, d: number, x: number): void;
  /** y += A x; A symmetric, lower triangle with diagonal in compressed columns. */
  multiplySparse(
    n: number,
    colPtr: number,
    rowIdx: number,
    values: number,
    x: number,
    y: number,
  ): void;
  /**
   * Y = F Gᵀ, or Y += F Gᵀ to accumulate; rows of F and Y are `count` vectors, `strideF` and `strideY`
   * bytes apart.
   *   G  outputs × inputs in tiles of four rows, padded with zeros
   */
  multiplyBatch(
    count: number,
    F: number,
    strideF: number,
    inputs: number,
    G: number,
    outputs: number,
    Y: number,
    strideY: number,
    accumulate: boolean,
  ): void;
  /** y = d ∘ x for `count` vectors of `size`. */
  multiplyDiagonals(count: number, size: number, d: number, x: number, y: number): void;
  /**
   * B_m = T_m x[dofs_m] for each chain m.
   *   table  six 32-bit numbers each: how many entries of T are not zero, their address, number of dofs,
   *          address of T (`ends` × dofs, column by column), address of destinations (addCongruent), 0.
   *          An entry is its value, then as 32-bit numbers 8 · unknown and 8 · row
   *   ends   rows of T, an even number
   */
  gatherEnds(count: number, table: number, ends: number, x: number, B: number): void;
  /** x[dofs_m] += T_mᵀ B_m. */
  scatterEnds(count: number, table: number, ends: number, B: number, x: number): void;
  /**
   * Does `count` steps one after the other, which chains of many makes need by the thousand: calls from outside
   * would cost more than the work.
   *   steps  twelve 32-bit numbers each: kind (0 gatherEnds, 1 scatterEnds, 2 multiplyDiagonals, 3 multiplyBatch),
   *          chains, source and what it counts from (0 the memory, 1 x, 2 y), destination and what it counts from,
   *          table or matrix, inputs (ends, size), outputs, strides of source and destination, accumulate
   */
  run(count: number, steps: number, x: number, y: number): void;
  /**
   * values += T_mᵀ S T_m, lower triangle, at the destinations of each chain (32-bit indices: column
   * by column the entries from the diagonal down, then the place whose `scale` grows by
   * T_bᵀ diag(magnitude) T_b).
   *   S  ends × ends   magnitude  ends   work  ends
   */
  addCongruent(
    count: number,
    table: number,
    ends: number,
    S: number,
    values: number,
    scale: number,
    magnitude: number,
    work: number,
  ): void;
  /** xᵀy; n a multiple of 4. */
  dot(n: number, x: number, y: number): number;
  /** y += factor x; n a multiple of 4. */
  addScaled(n: number, factor: number, x: number, y: number): void;
  /** x ← factor x; n a multiple of 4. */
  multiply(n: number, factor: number, x: number): void;
  /** result[j] = v_jᵀ x for `count` vectors `stride` bytes apart; n a multiple of 4. */
  dots(n: number, V: number, stride: number, count: number, x: number, result: number): void;
  /** y −= Σ c[j] v_j; n a multiple of 4. */
  subtractCombination(
    n: number,
    V: number,
    stride: number,
    count: number,
    c: number,
    y: number,
  ): void;
  /** `dots` of two vectors x and y, which read each v_j once. */
  dotsOfTwo(
    n: number,
    V: number,
    stride: number,
    count: number,
    x: number,
    y: number,
    ofX: number,
    ofY: number,
  ): void;
  /** `subtractCombination` from two vectors x and y, with the coefficients of each. */
  subtractFromTwo(
    n: number,
    V: number,
    stride: number,
    count: number,
    ofX: number,
    ofY: number,
    x: number,
    y: number,
  ): void;
}
