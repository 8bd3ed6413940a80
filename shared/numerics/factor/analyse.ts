import { tooLarge } from '../kernels/Arena.ts';
import { approximateMinimumDegree } from '../ordering/approximateMinimumDegree.ts';
import { columnCounts } from '../ordering/columnCounts.ts';
import { compressGraph, type CompressedGraph } from '../ordering/compressGraph.ts';
import { eliminationTree } from '../ordering/eliminationTree.ts';
import { postorder } from '../ordering/postorder.ts';
import { supernodes, type Supernodes } from '../ordering/supernodes.ts';
import { adjacencyGraph } from '../sparse/adjacencyGraph.ts';
import type { SymmetricPattern } from '../sparse/SymmetricCsc.ts';
import type { SymbolicFactor } from './SymbolicFactor.ts';

/** Values of L that the solver's 2 GiB of memory can hold. */
const MAX_VALUES = 2 ** 28;

/**
 * Symbolic factorisation of K − σM for any σ: order, supernodes, rows of L, assembly tree.
 *   K, M   patterns, n×n; M null where only K will be factorised
 *   clock  milliseconds, for the timing kept in the result
 * Throws RangeError when the orders differ, AppError `memory-limit` where L would not fit into the memory there is.
 * Source: Duff and Reid 1983, The multifrontal solution of indefinite sparse symmetric linear
 * systems, ACM Trans. Math. Softw. 9(3), 302–325; Liu 1990 for trees and supernodes.
 */
export function analyse(
  K: SymmetricPattern,
  M: SymmetricPattern | null = null,
  clock: () => number = () => 0,
): SymbolicFactor {
  const begin = clock();
  return analyseGraph(compressGraph(adjacencyGraph(K, M)), clock, begin);
}

/**
 * The same from the graph between groups of unknowns that are eliminated together.
 *   begin  by the caller's clock: when the making of the graph began
 */
export function analyseGraph(
  graph: CompressedGraph,
  clock: () => number,
  begin: number,
): SymbolicFactor {
  const minimumDegree = approximateMinimumDegree(graph, graph.weight);
  const ordered = clock();

  const groups = graph.n;
  const place = inverse(minimumDegree);
  const tree = eliminationTree(graph, minimumDegree, place);
  const post = postorder(tree);
  const postPlace = inverse(post);
  const order = new Int32Array(groups);
  const parent = new Int32Array(groups);
  const weight = new Int32Array(groups);
  for (let k = 0; k < groups; k++) {
    const v = minimumDegree[post[k]!]!;
    order[k] = v;
    weight[k] = graph.weight[v]!;
    parent[k] = tree[post[k]!]! < 0 ? -1 : postPlace[tree[post[k]!]!]!;
    place[v] = k;
  }
  const below = columnCounts(graph, graph.weight, order, place, parent);
  const nodes = supernodes(parent, weight, below);
  const symbolic = expand(graph, order, nodes);
  return { ...symbolic, timing: { order: ordered - begin, symbolic: clock() - ordered } };
}

function inverse(permutation: Int32Array): Int32Array {
  const result = new Int32Array(permutation.length);
  for (let k = 0; k < permutation.length; k++) result[permutation[k]!] = k;
  return result;
}

const toTiles = (count: number) => (count + 3) & ~3;

/** From groups to unknowns: places, rows of each supernode, indices in the parent's front. */
function expand(
  graph: CompressedGraph,
  order: Int32Array,
  nodes: Supernodes,
): Omit<SymbolicFactor, 'timing'> {
  const n = graph.member.length;
  const groups = graph.n;
  const count = nodes.count;

  // Groups by supernode, within one in the order of elimination.
  const groupPtr = new Int32Array(count + 1);
  for (let k = 0; k < groups; k++) groupPtr[nodes.of[k]! + 1]! += 1;
  for (let s = 0; s < count; s++) groupPtr[s + 1]! += groupPtr[s]!;
  const next = groupPtr.slice(0, count);
  const sequence = new Int32Array(groups);
  for (let k = 0; k < groups; k++) sequence[next[nodes.of[k]!]!++] = order[k]!;
  const groupPlace = inverse(sequence);

  const place = new Int32Array(n);
  const groupFirst = new Int32Array(groups);
  const first = new Int32Array(count + 1);
  for (let s = 0, at = 0; s < count; s++) {
    for (let g = groupPtr[s]!; g < groupPtr[s + 1]!; g++) {
      const v = sequence[g]!;
      groupFirst[g] = at;
      for (let p = graph.memberPtr[v]!; p < graph.memberPtr[v + 1]!; p++) {
        place[graph.member[p]!] = at++;
      }
    }
    at = toTiles(at);
    first[s + 1] = at;
  }
  const places = first[count]!;
  const perm = new Int32Array(places).fill(-1);
  for (let i = 0; i < n; i++) perm[place[i]!] = i;
  const supernodeOf = new Int32Array(places);
  for (let s = 0; s < count; s++) supernodeOf.fill(s, first[s], first[s + 1]);

  const { structPtr, struct } = structures(graph, sequence, groupPlace, groupPtr, nodes.parent);
  const weightAt = (g: number) => graph.weight[sequence[g]!]!;

  const rowPtr = new Int32Array(count + 1);
  const rowCount = new Int32Array(count);
  const panelPtr = new Int32Array(count + 1);
  let maxColumns = 0;
  let operations = 0;
  for (let s = 0; s < count; s++) {
    let rows = 0;
    for (let p = structPtr[s]!; p < structPtr[s + 1]!; p++) rows += weightAt(struct[p]!);
    let unknowns = 0;
    for (let g = groupPtr[s]!; g < groupPtr[s + 1]!; g++) unknowns += weightAt(g);
    for (let k = 1; k <= unknowns; k++) operations += (rows + k) ** 2;
    const columns = first[s + 1]! - first[s]!;
    rowCount[s] = rows;
    rowPtr[s + 1] = rowPtr[s]! + toTiles(rows);
    const end = panelPtr[s]! + columns * (columns + toTiles(rows));
    if (end > MAX_VALUES) throw tooLarge();
    panelPtr[s + 1] = end;
    if (columns > maxColumns) maxColumns = columns;
  }
  const rows = new Int32Array(rowPtr[count]!).fill(places);
  for (let s = 0; s < count; s++) {
    let at = rowPtr[s]!;
    for (let p = structPtr[s]!; p < structPtr[s + 1]!; p++) {
      const g = struct[p]!;
      const end = groupFirst[g]! + weightAt(g);
      for (let i = groupFirst[g]!; i < end; i++) rows[at++] = i;
    }
  }

  const relative = new Int32Array(rows.length);
  const occupied = new Int32Array(count);
  let stack = 0;
  let stackSize = 0;
  for (let s = 0; s < count; s++) {
    const update = squareSize(toTiles(rowCount[s]!));
    stackSize = Math.max(stackSize, stack + update);
    stack += update - occupied[s]!;
    const p = nodes.parent[s]!;
    if (p < 0) continue;
    occupied[p]! += update;
    const columns = first[p + 1]! - first[p]!;
    let q = rowPtr[p]!;
    for (let r = rowPtr[s]!; r < rowPtr[s]! + rowCount[s]!; r++) {
      const i = rows[r]!;
      if (i < first[p + 1]!) {
        relative[r] = i - first[p]!;
      } else {
        while (rows[q]! < i) q += 1;
        relative[r] = columns + q - rowPtr[p]!;
      }
    }
  }
  return {
    n,
    places,
    perm,
    place,
    supernodes: count,
    supernodeOf,
    first,
    parent: nodes.parent,
    rowPtr,
    rowCount,
    rows,
    relative,
    panelPtr,
    stackSize,
    maxColumns,
    operations,
  };
}

/** Values in the lower triangle of 4 × 4 blocks of a square of `rows` rows, a multiple of four. */
export function squareSize(rows: number): number {
  const tiles = rows >> 2;
  return 8 * tiles * (tiles + 1);
}

/** Groups in the rows below each supernode: its own neighbours and its children's rows, united. */
function structures(
  graph: CompressedGraph,
  sequence: Int32Array,
  groupPlace: Int32Array,
  groupPtr: Int32Array,
  parent: Int32Array,
): { structPtr: Int32Array; struct: Int32Array } {
  const count = parent.length;
  const mark = new Int32Array(graph.n).fill(-1);
  const structPtr = new Int32Array(count + 1);
  const firstChild = new Int32Array(count).fill(-1);
  const sibling = new Int32Array(count).fill(-1);
  let struct = new Int32Array(2 * graph.adjacent.length + graph.n);
  let at = 0;
  for (let s = 0; s < count; s++) {
    if (struct.length < at + graph.n) {
      const larger = new Int32Array(2 * struct.length + graph.n);
      larger.set(struct);
      struct = larger;
    }
    const begin = at;
    const end = groupPtr[s + 1]!;
    for (let g = groupPtr[s]!; g < end; g++) {
      const v = sequence[g]!;
      for (let p = graph.ptr[v]!; p < graph.ptr[v + 1]!; p++) {
        const h = groupPlace[graph.adjacent[p]!]!;
        if (h < end || mark[h] === s) continue;
        mark[h] = s;
        struct[at++] = h;
      }
    }
    for (let c = firstChild[s]!; c >= 0; c = sibling[c]!) {
      for (let p = structPtr[c]!; p < structPtr[c + 1]!; p++) {
        const h = struct[p]!;
        if (h < end || mark[h] === s) continue;
        mark[h] = s;
        struct[at++] = h;
      }
    }
    struct.subarray(begin, at).sort();
    structPtr[s + 1] = at;
    const up = parent[s]!;
    if (up >= 0) {
      sibling[s] = firstChild[up]!;
      firstChild[up] = s;
    }
  }
  return { structPtr, struct };
}
