import type { SymmetricPattern } from './SymmetricCsc.ts';

/** Undirected graph of a symmetric pattern, without loops; each edge is stored at both ends. */
export interface AdjacencyGraph {
  readonly n: number;
  /** n + 1 offsets into `adjacent`. */
  readonly ptr: Int32Array;
  /** Neighbours, ascending for each vertex. */
  readonly adjacent: Int32Array;
}

/**
 * Graph of |K| + |M|: vertices are unknowns, edges the off-diagonal entries of either pattern.
 *   K, M  patterns of order n; M may be null
 * Throws RangeError when their orders differ.
 */
export function adjacencyGraph(K: SymmetricPattern, M: SymmetricPattern | null): AdjacencyGraph {
  const n = K.n;
  if (M !== null && M.n !== n) {
    throw new RangeError(`K has order ${n} but M has order ${M.n}.`);
  }
  const patterns = M === null || M.rowIdx === K.rowIdx ? [K] : [K, M];
  const edges = new Int32Array(2 * patterns.reduce((sum, { colPtr }) => sum + colPtr[n]!, 0));
  let write = 0;
  for (const { colPtr, rowIdx } of patterns) {
    for (let j = 0; j < n; j++) {
      for (let p = colPtr[j]!; p < colPtr[j + 1]!; p++) {
        if (rowIdx[p] === j) continue;
        edges[write++] = rowIdx[p]!;
        edges[write++] = j;
      }
    }
  }
  return graphOfEdges(n, edges.subarray(0, write));
}

/**
 * Graph of n vertices from pairs of them, one edge each; an edge may be given several times, in either
 * direction, and joins different vertices.
 */
export function graphOfEdges(n: number, edges: Int32Array): AdjacencyGraph {
  const count = new Int32Array(n + 1);
  for (const vertex of edges) count[vertex + 1]! += 1;
  for (let i = 0; i < n; i++) count[i + 1]! += count[i]!;
  const loose = new Int32Array(edges.length);
  const next = count.slice(0, n);
  for (let e = 0; e < edges.length; e += 2) {
    const i = edges[e]!;
    const j = edges[e + 1]!;
    loose[next[i]!++] = j;
    loose[next[j]!++] = i;
  }
  // Transposing a symmetric list sorts it: vertex v is appended to its neighbours in order of v.
  const adjacent = new Int32Array(loose.length);
  const last = new Int32Array(n).fill(-1);
  const ptr = new Int32Array(n + 1);
  next.set(count.subarray(0, n));
  for (let v = 0; v < n; v++) {
    for (let p = count[v]!; p < count[v + 1]!; p++) {
      const u = loose[p]!;
      if (last[u] === v) continue;
      last[u] = v;
      adjacent[next[u]!++] = v;
    }
  }
  let write = 0;
  for (let v = 0; v < n; v++) {
    const end = next[v]!;
    ptr[v] = write;
    for (let p = count[v]!; p < end; p++) adjacent[write++] = adjacent[p]!;
  }
  ptr[n] = write;
  return { n, ptr, adjacent: adjacent.slice(0, write) };
}
