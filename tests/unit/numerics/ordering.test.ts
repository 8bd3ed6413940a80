import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { approximateMinimumDegree } from '#shared/numerics/ordering/approximateMinimumDegree.ts';
import { columnCounts } from '#shared/numerics/ordering/columnCounts.ts';
import { compressGraph } from '#shared/numerics/ordering/compressGraph.ts';
import { eliminationTree } from '#shared/numerics/ordering/eliminationTree.ts';
import { postorder } from '#shared/numerics/ordering/postorder.ts';
import { adjacencyGraph, type AdjacencyGraph } from '#shared/numerics/sparse/adjacencyGraph.ts';
import { PROPERTY, sparse, type Triplet } from './pencils.ts';

type Edge = [number, number];

function graphOf(n: number, edges: readonly Edge[]): AdjacencyGraph {
  return adjacencyGraph(
    sparse(
      n,
      edges.map(([i, j]): Triplet => [i, j, 1]),
    ),
    null,
  );
}

function inverse(order: Int32Array): Int32Array {
  const place = new Int32Array(order.length);
  order.forEach((v, k) => (place[v] = k));
  return place;
}

/** Columns of L below the diagonal by the definition: eliminating a vertex joins its neighbours. */
function eliminate(graph: AdjacencyGraph, order: Int32Array): number[][] {
  const place = inverse(order);
  const later = Array.from(order, (v, k) => {
    const all = graph.adjacent.subarray(graph.ptr[v], graph.ptr[v + 1]);
    return new Set(Array.from(all, (u) => place[u]!).filter((q) => q > k));
  });
  for (const column of later) {
    for (const a of column) for (const b of column) if (b > a) later[a]!.add(b);
  }
  return later.map((column) => [...column].sort((a, b) => a - b));
}

const arbitraryGraph = fc
  .integer({ min: 1, max: 30 })
  .chain((n) =>
    fc
      .array(fc.tuple(fc.nat(n - 1), fc.nat(n - 1)), { maxLength: 3 * n })
      .map((edges) => ({ n, graph: graphOf(n, edges) })),
  );

function grid(side: number): AdjacencyGraph {
  const edges: Edge[] = [];
  for (let y = 0; y < side; y++) {
    for (let x = 0; x < side; x++) {
      if (x + 1 < side) edges.push([y * side + x, y * side + x + 1]);
      if (y + 1 < side) edges.push([y * side + x, (y + 1) * side + x]);
    }
  }
  return graphOf(side * side, edges);
}

const ones = (n: number) => new Int32Array(n).fill(1);

describe('approximateMinimumDegree', () => {
  it('is a permutation, whatever the graph and the weights', () => {
    fc.assert(
      fc.property(arbitraryGraph, fc.infiniteStream(fc.integer({ min: 1, max: 6 })), (g, w) => {
        const weight = Int32Array.from({ length: g.n }, () => Number(w.next().value));
        const order = approximateMinimumDegree(g.graph, weight);
        expect(Array.from(order).sort((a, b) => a - b)).toEqual([...Array(g.n).keys()]);
      }),
      PROPERTY,
    );
  });

  it('eliminates a tree without fill', () => {
    const edges = Array.from({ length: 60 }, (_, k): Edge => [k + 1, (k * 7) % (k + 1)]);
    const graph = graphOf(61, edges);
    const order = approximateMinimumDegree(graph, ones(61));
    const fill = eliminate(graph, order).reduce((sum, column) => sum + column.length, 0);
    expect(fill).toBe(60);
  });

  it('stays near (31/4) N log₂ N on a grid, far below the band order', () => {
    // George 1973, SIAM J. Numer. Anal. 10(2): nested dissection of an m×m grid, the best order
    // known, gives about (31/4) m² log₂ m entries; row by row gives m³.
    const side = 40;
    const graph = grid(side);
    const count = (order: Int32Array) =>
      eliminate(graph, order).reduce((sum, column) => sum + column.length, 0);
    const fill = count(approximateMinimumDegree(graph, ones(side * side)));
    expect(fill).toBeLessThan((31 / 4) * side * side * Math.log2(side));
    expect(fill).toBeLessThan(0.4 * side ** 3);
  });

  it('gives the same order every time', () => {
    const graph = grid(12);
    const order = approximateMinimumDegree(graph, ones(144));
    expect(approximateMinimumDegree(graph, ones(144))).toEqual(order);
  });
});

describe('compressGraph', () => {
  it('joins the unknowns of one node and keeps the graph between nodes', () => {
    // A path of three nodes with 3, 2 and 1 unknowns, every pair of neighbours fully coupled.
    const node = [0, 0, 0, 1, 1, 2];
    const edges: Edge[] = [];
    for (let i = 0; i < 6; i++) {
      for (let j = 0; j < i; j++) if (node[i]! - node[j]! <= 1) edges.push([i, j]);
    }
    const compressed = compressGraph(graphOf(6, edges));
    expect(Array.from(compressed.weight)).toEqual([3, 2, 1]);
    expect(Array.from(compressed.member)).toEqual([0, 1, 2, 3, 4, 5]);
    expect(Array.from(compressed.ptr)).toEqual([0, 1, 3, 4]);
    expect(Array.from(compressed.adjacent)).toEqual([1, 0, 2, 1]);
  });
});

describe('elimination tree and column counts', () => {
  it('agree with eliminating the graph by the definition', () => {
    fc.assert(
      fc.property(arbitraryGraph, ({ n, graph }) => {
        const order = approximateMinimumDegree(graph, ones(n));
        const place = inverse(order);
        const columns = eliminate(graph, order);
        const parent = eliminationTree(graph, order, place);
        expect(Array.from(parent)).toEqual(columns.map((column) => column[0] ?? -1));
        const weight = Int32Array.from({ length: n }, (_, v) => 1 + (v % 3));
        const count = columnCounts(graph, weight, order, place, parent);
        expect(Array.from(count)).toEqual(
          columns.map((column) => column.reduce((sum, k) => sum + weight[order[k]!]!, 0)),
        );
      }),
      PROPERTY,
    );
  });

  it('postorder puts every subtree together, children first', () => {
    expect(Array.from(postorder(Int32Array.of(5, 3, 3, 5, 5, -1, -1)))).toEqual([
      0, 1, 2, 3, 4, 5, 6,
    ]);
    expect(Array.from(postorder(Int32Array.of(-1, 0, 0, 1)))).toEqual([3, 1, 2, 0]);
  });
});
