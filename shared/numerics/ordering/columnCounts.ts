import type { AdjacencyGraph } from '../sparse/adjacencyGraph.ts';

/**
 * Rows of each column of L below its diagonal, counted in unknowns:
 *   count[j] = Σ weight(i) over i > j with L_ij ≠ 0
 *   graph   vertices in the caller's numbering, weight n unknowns per vertex (same numbering)
 *   order, place   n, elimination order and its inverse      parent  n, elimination tree (places)
 * The result (n) is in places. Row i of L is the subtree of the tree that hangs between i and the
 * neighbours of i eliminated before it; each is walked once.
 * Source: Liu 1990, SIAM J. Matrix Anal. Appl. 11(1), 134–172, section 3 (row subtrees).
 */
export function columnCounts(
  graph: AdjacencyGraph,
  weight: Int32Array,
  order: Int32Array,
  place: Int32Array,
  parent: Int32Array,
): Int32Array {
  const { n, ptr, adjacent } = graph;
  const count = new Int32Array(n);
  const mark = new Int32Array(n).fill(-1);
  for (let i = 0; i < n; i++) {
    const v = order[i]!;
    mark[i] = i;
    for (let p = ptr[v]!; p < ptr[v + 1]!; p++) {
      for (let j = place[adjacent[p]!]!; j < i && mark[j] !== i; j = parent[j]!) {
        mark[j] = i;
        count[j]! += weight[v]!;
      }
    }
  }
  return count;
}
