import type { AdjacencyGraph } from '../sparse/adjacencyGraph.ts';

/**
 * Elimination tree: parent[j] = min{ i > j : L_ij ≠ 0 }, −1 at a root.
 *   graph  vertices in the caller's numbering
 *   order  n, vertex eliminated at each place        place  n, its inverse
 * Both arguments and the result (n) are in places.
 * Source: Liu 1990, The role of elimination trees in sparse factorization, SIAM J. Matrix Anal.
 * Appl. 11(1), 134–172, section 5 (path compression through virtual ancestors).
 */
export function eliminationTree(
  graph: AdjacencyGraph,
  order: Int32Array,
  place: Int32Array,
): Int32Array {
  const { n, ptr, adjacent } = graph;
  const parent = new Int32Array(n).fill(-1);
  const ancestor = new Int32Array(n).fill(-1);
  for (let i = 0; i < n; i++) {
    const v = order[i]!;
    for (let p = ptr[v]!; p < ptr[v + 1]!; p++) {
      let j = place[adjacent[p]!]!;
      while (j < i) {
        const up = ancestor[j]!;
        if (up === i) break;
        ancestor[j] = i;
        if (up < 0) {
          parent[j] = i;
          break;
        }
        j = up;
      }
    }
  }
  return parent;
}
