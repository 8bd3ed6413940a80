/** Pattern of a symmetric matrix: lower triangle with its diagonal, rows ascending in each column. */
export interface SymmetricPattern {
  readonly n: number;
  /** n + 1 offsets into `rowIdx`. */
  readonly colPtr: Int32Array;
  /** Row of each stored entry, ≥ its column. */
  readonly rowIdx: Int32Array;
}

/** Symmetric n×n matrix in compressed sparse columns: each symmetric pair is stored once. */
export interface SymmetricCsc extends SymmetricPattern {
  readonly values: Float64Array;
}

/**
 * Symmetric matrix from triplets:  A = Σ_k values[k] (e_i e_jᵀ, and e_j e_iᵀ where i ≠ j).
 *   n       order of A
 *   rows, cols, values   triplets 0 … length−1; the unit is that of A's entries
 * An entry may lie in either triangle and is folded to the lower one, so the caller gives each
 * symmetric pair once. Duplicates are summed in the order of the input, hence the result is
 * the same in every bit on every run. Explicit zeros are kept: the pattern follows the topology,
 * not the numbers. Every diagonal entry is stored, with the value 0 when none was given.
 * Throws RangeError for an index outside 0 … n−1.
 */
export function assembleSymmetric(
  n: number,
  rows: Int32Array,
  cols: Int32Array,
  values: Float64Array,
  length: number,
): SymmetricCsc {
  // Two stable counting sorts (by row, then by column) leave every column ascending and equal
  // positions in the order of the input.
  const total = length + n;
  const rowStart = new Int32Array(n + 1);
  const colPtr = new Int32Array(n + 1);
  for (let k = 0; k < length; k++) {
    const i = rows[k]!;
    const j = cols[k]!;
    if (i < 0 || j < 0 || i >= n || j >= n) {
      throw new RangeError(`Triplet ${k} at (${i}, ${j}) lies outside a matrix of order ${n}.`);
    }
    const low = i > j ? i : j;
    rowStart[low + 1]! += 1;
    colPtr[i + j - low + 1]! += 1;
  }
  for (let i = 0; i < n; i++) {
    rowStart[i + 1]! += rowStart[i]! + 1;
    colPtr[i + 1]! += colPtr[i]! + 1;
  }
  const byRow = new Int32Array(total);
  const cursor = rowStart.slice(0, n);
  for (let i = 0; i < n; i++) byRow[cursor[i]!++] = -1;
  for (let k = 0; k < length; k++) {
    const i = rows[k]!;
    const j = cols[k]!;
    byRow[cursor[i > j ? i : j]!++] = k;
  }
  const rowIdx = new Int32Array(total);
  const sorted = new Float64Array(total);
  const next = colPtr.slice(0, n);
  for (let i = 0; i < n; i++) {
    for (let p = rowStart[i]!; p < rowStart[i + 1]!; p++) {
      const k = byRow[p]!;
      const j = k < 0 ? i : rows[k]! + cols[k]! - i;
      const q = next[j]!++;
      rowIdx[q] = i;
      sorted[q] = k < 0 ? 0 : values[k]!;
    }
  }
  let write = 0;
  let begin = 0;
  for (let j = 0; j < n; j++) {
    const end = colPtr[j + 1]!;
    colPtr[j] = write;
    let previous = -1;
    for (let p = begin; p < end; p++) {
      const i = rowIdx[p]!;
      if (i === previous) {
        sorted[write - 1]! += sorted[p]!;
      } else {
        rowIdx[write] = i;
        sorted[write] = sorted[p]!;
        write += 1;
        previous = i;
      }
    }
    begin = end;
  }
  colPtr[n] = write;
  return { n, colPtr, rowIdx: rowIdx.slice(0, write), values: sorted.slice(0, write) };
}

/**
 * y = A x.
 *   A  n×n, symmetric     x  n, any unit     y  n, overwritten; must not be x
 */
export function multiplySymmetric(A: SymmetricCsc, x: Float64Array, y: Float64Array): void {
  const { n, colPtr, rowIdx, values } = A;
  y.fill(0, 0, n);
  for (let j = 0; j < n; j++) {
    const xj = x[j]!;
    let sum = 0;
    const end = colPtr[j + 1]!;
    for (let p = colPtr[j]!; p < end; p++) {
      const i = rowIdx[p]!;
      const a = values[p]!;
      if (i === j) {
        sum += a * xj;
      } else {
        y[i]! += a * xj;
        sum += a * x[i]!;
      }
    }
    y[j]! += sum;
  }
}
