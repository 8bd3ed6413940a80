/**
 * U ← U − L D Lᵀ, the part of a front that goes up to the parent.
 *   U        lower triangle of order `size`, row by row without gaps, at `at`
 *   values   L: `size` rows of `columns` values at `offset`
 *   pivots   D at pivots[first …]
 *   work     3 · columns, overwritten
 * Blocks of 3×3 sums; see eliminatePanel.
 */
export function subtractUpdate(
  U: Float64Array,
  at: number,
  size: number,
  values: Float64Array,
  offset: number,
  columns: number,
  pivots: Float64Array,
  first: number,
  work: Float64Array,
): void {
  const last = offset + (size - 1) * columns;
  for (let j = 0; j < size; j += 3) {
    const col0 = offset + j * columns;
    const col1 = j + 1 < size ? col0 + columns : last;
    const col2 = j + 2 < size ? col1 + columns : last;
    for (let k = 0, w = 0; k < columns; k++, w += 3) {
      const d = pivots[first + k]!;
      work[w] = d * values[col0 + k]!;
      work[w + 1] = d * values[col1 + k]!;
      work[w + 2] = d * values[col2 + k]!;
    }
    for (let i = j; i < size; i += 3) {
      const row0 = offset + i * columns;
      const row1 = i + 1 < size ? row0 + columns : last;
      const row2 = i + 2 < size ? row1 + columns : last;
      let a00 = 0;
      let a01 = 0;
      let a02 = 0;
      let a10 = 0;
      let a11 = 0;
      let a12 = 0;
      let a20 = 0;
      let a21 = 0;
      let a22 = 0;
      for (let k = 0, w = 0; k < columns; k++, w += 3) {
        const w0 = work[w]!;
        const w1 = work[w + 1]!;
        const w2 = work[w + 2]!;
        const l0 = values[row0 + k]!;
        const l1 = values[row1 + k]!;
        const l2 = values[row2 + k]!;
        a00 += l0 * w0;
        a01 += l0 * w1;
        a02 += l0 * w2;
        a10 += l1 * w0;
        a11 += l1 * w1;
        a12 += l1 * w2;
        a20 += l2 * w0;
        a21 += l2 * w1;
        a22 += l2 * w2;
      }
      const u0 = at + ((i * (i + 1)) >> 1) + j;
      const u1 = u0 + i + 1;
      const u2 = u1 + i + 2;
      U[u0]! -= a00;
      if (i === j) {
        if (i + 1 < size) {
          U[u1]! -= a10;
          U[u1 + 1]! -= a11;
        }
        if (i + 2 < size) {
          U[u2]! -= a20;
          U[u2 + 1]! -= a21;
          U[u2 + 2]! -= a22;
        }
        continue;
      }
      // Off the diagonal all three columns exist; the last rows may not.
      U[u0 + 1]! -= a01;
      U[u0 + 2]! -= a02;
      if (i + 1 < size) {
        U[u1]! -= a10;
        U[u1 + 1]! -= a11;
        U[u1 + 2]! -= a12;
      }
      if (i + 2 < size) {
        U[u2]! -= a20;
        U[u2 + 1]! -= a21;
        U[u2 + 2]! -= a22;
      }
    }
  }
}
