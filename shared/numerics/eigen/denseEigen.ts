import { EigenvalueDecomposition, Matrix } from 'ml-matrix';

/** Eigenvalues of a small symmetric matrix, largest first, and its orthonormal eigenvectors. */
export interface DenseEigen {
  /** m, descending. */
  readonly values: Float64Array;
  /** m × m, row by row: vectors[j * m + i] is component i of eigenvector j. */
  readonly vectors: Float64Array;
}

/**
 * All eigenpairs of a dense symmetric matrix:  A s = θ s.
 *   A       m × m with `stride` values a row; both triangles are read
 *   m       order, ≥ 1
 */
export function denseEigen(A: Float64Array, stride: number, m: number): DenseEigen {
  const matrix = new Matrix(m, m);
  for (let i = 0; i < m; i++) {
    for (let j = 0; j < m; j++) matrix.set(i, j, A[i * stride + j]!);
  }
  const decomposition = new EigenvalueDecomposition(matrix, { assumeSymmetric: true });
  const ascending = decomposition.realEigenvalues;
  const order = Int32Array.from({ length: m }, (_, j) => j).sort(
    (a, b) => ascending[b]! - ascending[a]! || a - b,
  );
  const values = new Float64Array(m);
  const vectors = new Float64Array(m * m);
  const columns = decomposition.eigenvectorMatrix;
  for (let j = 0; j < m; j++) {
    values[j] = ascending[order[j]!]!;
    for (let i = 0; i < m; i++) vectors[j * m + i] = columns.get(i, order[j]!);
  }
  return { values, vectors };
}
