/** Rotations after which an eigenvalue would long have converged; a few are usual. */
const MOST_SWEEPS = 60;

/** Eigenvalues of a small symmetric tridiagonal matrix, largest first, and eigenvectors or a part. */
export interface TridiagonalEigen {
  /** m, descending. */
  readonly values: Float64Array;
  /** Component k of eigenvector j at `j * length + k`, the last `length` components of each. */
  readonly vectors: Float64Array;
  readonly length: number;
}

/**
 * All eigenvalues of a symmetric tridiagonal matrix by implicit QL.
 *   alpha   diagonal, at least m     beta  beta[i] couples i and i + 1, at least m − 1
 *   length  how many of the last components of the eigenvectors are wanted: m for all, 1 for
 *           residuals, at a cost in proportion to it
 * Source: Dubrulle, Martin and Wilkinson 1968, The implicit QL algorithm, Numer. Math. 12, 377–383.
 */
export function tridiagonalEigen(
  alpha: Float64Array,
  beta: Float64Array,
  m: number,
  length: number,
): TridiagonalEigen {
  const d = alpha.slice(0, m);
  const e = new Float64Array(m + 1);
  e.set(beta.subarray(0, Math.max(m - 1, 0)));
  const z = new Float64Array(m * length);
  for (let k = 0; k < length; k++) z[(m - length + k) * length + k] = 1;
  for (let l = 0; l < m; l++) {
    for (let sweep = 0; sweep < MOST_SWEEPS; sweep++) {
      let end = l;
      while (end < m - 1) {
        const size = Math.abs(d[end]!) + Math.abs(d[end + 1]!);
        if (Math.abs(e[end]!) <= Number.EPSILON * size) break;
        end += 1;
      }
      if (end === l) break;
      let g = (d[l + 1]! - d[l]!) / (2 * e[l]!);
      const root = Math.sqrt(g * g + 1);
      g = d[end]! - d[l]! + e[l]! / (g + (g < 0 ? -root : root));
      let s = 1;
      let c = 1;
      let p = 0;
      let i = end - 1;
      for (; i >= l; i--) {
        const f = s * e[i]!;
        const b = c * e[i]!;
        let r = Math.sqrt(f * f + g * g);
        e[i + 1] = r;
        if (r === 0) {
          d[i + 1]! -= p;
          e[end] = 0;
          break;
        }
        s = f / r;
        c = g / r;
        g = d[i + 1]! - p;
        r = (d[i]! - g) * s + 2 * c * b;
        p = s * r;
        d[i + 1] = g + p;
        g = c * r - b;
        for (let k = i * length, next = k + length; k < (i + 1) * length; k++, next++) {
          const upper = z[next]!;
          const lower = z[k]!;
          z[next] = s * lower + c * upper;
          z[k] = c * lower - s * upper;
        }
      }
      if (i >= l) continue;
      d[l]! -= p;
      e[l] = g;
      e[end] = 0;
    }
  }
  const order = Int32Array.from(d, (_, j) => j).sort((a, b) => d[b]! - d[a]! || a - b);
  const values = Float64Array.from(order, (j) => d[j]!);
  const vectors = new Float64Array(m * length);
  order.forEach((j, r) => vectors.set(z.subarray(j * length, (j + 1) * length), r * length));
  return { values, vectors, length };
}
