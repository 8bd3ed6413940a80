import type { AdjacencyGraph } from '../sparse/adjacencyGraph.ts';

/** Graph whose vertices are groups of unknowns with the same neighbours. */
export interface CompressedGraph extends AdjacencyGraph {
  /** n: number of unknowns in each group. */
  readonly weight: Int32Array;
  /** n + 1 offsets into `member`. */
  readonly memberPtr: Int32Array;
  /** The unknowns of each group, ascending. */
  readonly member: Int32Array;
}

/**
 * Groups of unknowns that are adjacent to each other and to the same others (the six displacements
 * of a node, as a rule), and the graph between the groups. Ordering the groups instead of the
 * unknowns gives the same fill for a fraction of the work.
 * Source: Ashcraft 1995, Compressed graphs and the minimum degree algorithm, SIAM J. Sci. Comput.
 * 16(6), 1404–1411: equal check sums of the closed neighbourhoods first, then the lists compared.
 */
export function compressGraph(graph: AdjacencyGraph): CompressedGraph {
  const { n, ptr, adjacent } = graph;
  const checksum = new Float64Array(n);
  for (let v = 0; v < n; v++) {
    let sum = v;
    for (let p = ptr[v]!; p < ptr[v + 1]!; p++) sum += adjacent[p]!;
    checksum[v] = sum;
  }
  const groupOf = new Int32Array(n).fill(-1);
  const mark = new Int32Array(n).fill(-1);
  let groups = 0;
  for (let v = 0; v < n; v++) {
    if (groupOf[v]! >= 0) continue;
    const group = groups++;
    groupOf[v] = group;
    const size = ptr[v + 1]! - ptr[v]!;
    let marked = false;
    for (let p = ptr[v]!; p < ptr[v + 1]!; p++) {
      const u = adjacent[p]!;
      if (u < v || groupOf[u]! >= 0 || checksum[u] !== checksum[v]) continue;
      if (ptr[u + 1]! - ptr[u]! !== size) continue;
      if (!marked) {
        mark[v] = v;
        for (let q = ptr[v]!; q < ptr[v + 1]!; q++) mark[adjacent[q]!] = v;
        marked = true;
      }
      let same = true;
      for (let q = ptr[u]!; same && q < ptr[u + 1]!; q++) same = mark[adjacent[q]!] === v;
      if (same) groupOf[u] = group;
    }
  }
  const weight = new Int32Array(groups);
  for (let v = 0; v < n; v++) weight[groupOf[v]!]! += 1;
  const memberPtr = new Int32Array(groups + 1);
  for (let g = 0; g < groups; g++) memberPtr[g + 1] = memberPtr[g]! + weight[g]!;
  const member = new Int32Array(n);
  const next = memberPtr.slice(0, groups);
  for (let v = 0; v < n; v++) member[next[groupOf[v]!]!++] = v;

  const seen = new Int32Array(groups).fill(-1);
  const groupPtr = new Int32Array(groups + 1);
  const neighbours = new Int32Array(adjacent.length);
  let write = 0;
  for (let g = 0; g < groups; g++) {
    // One member stands for all: their closed neighbourhoods are equal.
    const v = member[memberPtr[g]!]!;
    seen[g] = g;
    for (let p = ptr[v]!; p < ptr[v + 1]!; p++) {
      const h = groupOf[adjacent[p]!]!;
      if (seen[h] === g) continue;
      seen[h] = g;
      neighbours[write++] = h;
    }
    groupPtr[g + 1] = write;
  }
  return {
    n: groups,
    ptr: groupPtr,
    adjacent: neighbours.slice(0, write),
    weight,
    memberPtr,
    member,
  };
}
