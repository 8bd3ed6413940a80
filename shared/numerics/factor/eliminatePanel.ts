/**
 * Eliminates the columns of one dense front:  P = L D,  in place, P a panel of A's columns.
 *   values   panel row by row at `offset`: `height` rows of `columns` values; the lower triangle of
 *            its first `columns` rows counts. Overwritten by L (unit diagonal not stored).
 *   pivots   D is written to pivots[first …]
 *   scale    size of each diagonal entry before elimination, at the same indices
 *   tolerance  a pivot d with |d| ≤ tolerance · scale is taken as zero
 *   work     3 · columns, overwritten
 * Returns −1, or the column in this panel whose pivot is zero; columns before it are whole, and
 * so is its own row of L.
 *
 * Three columns at a time:  W_ij = A_ij − Σ_{k<j} L_ik d_k L_jk,  d_j = W_jj,  L_ij = W_ij / d_j
 * (Golub and Van Loan, Matrix Computations, section 4.1.2). Blocks of 3×3 sums fit the sixteen
 * floating-point registers of common processors and divide the six unknowns of a node.
 */
export function eliminatePanel(
  values: Float64Array,
  offset: number,
  height: number,
  columns: number,
  pivots: Float64Array,
  scale: Float64Array,
  first: number,
  tolerance: number,
  work: Float64Array,
): number {
  for (let j = 0; j < columns; j += 3) {
    const width = columns - j < 3 ? columns - j : 3;
    const row0 = offset + j * columns;
    const row1 = width > 1 ? row0 + columns : row0;
    const row2 = width > 2 ? row1 + columns : row1;
    // The 3×3 block on the diagonal; work holds D Lᵀ of its rows for the rows below.
    let s00 = values[row0 + j]!;
    let s10 = values[row1 + j]!;
    let s11 = width > 1 ? values[row1 + j + 1]! : 0;
    let s20 = values[row2 + j]!;
    let s21 = width > 1 ? values[row2 + j + 1]! : 0;
    let s22 = width > 2 ? values[row2 + j + 2]! : 0;
    for (let k = 0, w = 0; k < j; k++, w += 3) {
      const d = pivots[first + k]!;
      const l0 = values[row0 + k]!;
      const l1 = values[row1 + k]!;
      const l2 = values[row2 + k]!;
      const w0 = d * l0;
      const w1 = d * l1;
      const w2 = d * l2;
      work[w] = w0;
      work[w + 1] = w1;
      work[w + 2] = w2;
      s00 -= l0 * w0;
      s10 -= l1 * w0;
      s11 -= l1 * w1;
      s20 -= l2 * w0;
      s21 -= l2 * w1;
      s22 -= l2 * w2;
    }
    if (!(Math.abs(s00) > tolerance * scale[first + j]!)) {
      pivots[first + j] = s00;
      return j;
    }
    pivots[first + j] = s00;
    const inverse0 = 1 / s00;
    let inverse1 = 0;
    let inverse2 = 0;
    let l10 = 0;
    let l20 = 0;
    let l21 = 0;
    if (width > 1) {
      l10 = s10 * inverse0;
      values[row1 + j] = l10;
      s11 -= l10 * s10;
      pivots[first + j + 1] = s11;
      if (!(Math.abs(s11) > tolerance * scale[first + j + 1]!)) return j + 1;
      inverse1 = 1 / s11;
    }
    if (width > 2) {
      l20 = s20 * inverse0;
      s21 -= l10 * s20;
      l21 = s21 * inverse1;
      values[row2 + j] = l20;
      values[row2 + j + 1] = l21;
      s22 -= l20 * s20 + l21 * s21;
      pivots[first + j + 2] = s22;
      if (!(Math.abs(s22) > tolerance * scale[first + j + 2]!)) return j + 2;
      inverse2 = 1 / s22;
    }
    // Rows below, three at a time; a last row short of three is computed twice to the same value.
    for (let i = j + width; i < height; i += 3) {
      const at0 = offset + i * columns;
      const at1 = i + 1 < height ? at0 + columns : at0;
      const at2 = i + 2 < height ? at1 + columns : at1;
      let a00 = values[at0 + j]!;
      let a10 = values[at1 + j]!;
      let a20 = values[at2 + j]!;
      let a01 = 0;
      let a11 = 0;
      let a21 = 0;
      let a02 = 0;
      let a12 = 0;
      let a22 = 0;
      if (width > 1) {
        a01 = values[at0 + j + 1]!;
        a11 = values[at1 + j + 1]!;
        a21 = values[at2 + j + 1]!;
      }
      if (width > 2) {
        a02 = values[at0 + j + 2]!;
        a12 = values[at1 + j + 2]!;
        a22 = values[at2 + j + 2]!;
      }
      for (let k = 0, w = 0; k < j; k++, w += 3) {
        const w0 = work[w]!;
        const w1 = work[w + 1]!;
        const w2 = work[w + 2]!;
        const l0 = values[at0 + k]!;
        const l1 = values[at1 + k]!;
        const l2 = values[at2 + k]!;
        a00 -= l0 * w0;
        a01 -= l0 * w1;
        a02 -= l0 * w2;
        a10 -= l1 * w0;
        a11 -= l1 * w1;
        a12 -= l1 * w2;
        a20 -= l2 * w0;
        a21 -= l2 * w1;
        a22 -= l2 * w2;
      }
      values[at0 + j] = a00 * inverse0;
      values[at1 + j] = a10 * inverse0;
      values[at2 + j] = a20 * inverse0;
      if (width > 1) {
        a01 -= a00 * l10;
        a11 -= a10 * l10;
        a21 -= a20 * l10;
        values[at0 + j + 1] = a01 * inverse1;
        values[at1 + j + 1] = a11 * inverse1;
        values[at2 + j + 1] = a21 * inverse1;
      }
      if (width > 2) {
        values[at0 + j + 2] = (a02 - a00 * l20 - a01 * l21) * inverse2;
        values[at1 + j + 2] = (a12 - a10 * l20 - a11 * l21) * inverse2;
        values[at2 + j + 2] = (a22 - a20 * l20 - a21 * l21) * inverse2;
      }
    }
  }
  return -1;
}
