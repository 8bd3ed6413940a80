import { analyseGraph } from '../factor/analyse.ts';
import { EntryPlaces } from '../factor/entryPlaces.ts';
import type { SymbolicFactor } from '../factor/SymbolicFactor.ts';
import type { CompressedGraph } from '../ordering/compressGraph.ts';
import { graphOfEdges } from '../sparse/adjacencyGraph.ts';
import type { ChainedPair } from './ChainedPair.ts';
import { sameNumbers } from './compare.ts';

/** What is known of a chained pair from its topology alone: it serves every pair of that topology. */
export interface ChainAnalysis {
  /** Which blocks of joint unknowns meet, once the chains are eliminated. */
  readonly graph: CompressedGraph;
  readonly symbolic: SymbolicFactor;
  /**
   * Per class, chain after chain: where Tᵀ S T goes. Column by column the indices in L of the entries
   * from the diagonal down, then the place of the column.
   */
  readonly destinations: readonly Int32Array[];
}

/**
 * Analysis of K − σM with its chains eliminated: they join the blocks at their ends.
 *   clock  milliseconds, for the timing kept in the result
 *   known  of an earlier pair; its ordering and symbolic factor are taken over where the joints hang together alike
 * Throws AppError `memory-limit` when L would not fit into the memory there is.
 */
export function analyseChains(
  pair: ChainedPair,
  clock: () => number = () => 0,
  known?: ChainAnalysis,
): ChainAnalysis {
  const begin = clock();
  const { joints, K, M, classes, blockOf } = pair;
  let blocks = 0;
  for (const block of blockOf) blocks = Math.max(blocks, block + 1);
  const weight = new Int32Array(blocks);
  for (const block of blockOf) weight[block]! += 1;
  const memberPtr = new Int32Array(blocks + 1);
  for (let b = 0; b < blocks; b++) memberPtr[b + 1] = memberPtr[b]! + weight[b]!;
  const member = new Int32Array(joints);
  const next = memberPtr.slice(0, blocks);
  for (let i = 0; i < joints; i++) member[next[blockOf[i]!]!++] = i;

  const edges: number[] = [];
  const touched: number[] = [];
  for (const { chains } of classes) {
    for (const { dofs } of chains) {
      touched.length = 0;
      for (const dof of dofs) {
        const block = blockOf[dof]!;
        if (!touched.includes(block)) touched.push(block);
      }
      for (let a = 1; a < touched.length; a++) {
        for (let b = 0; b < a; b++) edges.push(touched[a]!, touched[b]!);
      }
    }
  }
  for (const { colPtr, rowIdx } of [K, M]) {
    for (let j = 0; j < joints; j++) {
      for (let p = colPtr[j]!; p < colPtr[j + 1]!; p++) {
        const block = blockOf[rowIdx[p]!]!;
        if (block !== blockOf[j]) edges.push(block, blockOf[j]!);
      }
    }
  }
  const graph: CompressedGraph = {
    ...graphOfEdges(blocks, Int32Array.from(edges)),
    weight,
    memberPtr,
    member,
  };
  const symbolic =
    known && sameGraph(known.graph, graph) ? known.symbolic : analyseGraph(graph, clock, begin);
  const placed = clock();
  const { place } = symbolic;
  const entries = new EntryPlaces(symbolic);
  const destinations = classes.map(({ chains }) => {
    const size = chains.reduce((sum, { dofs }) => sum + entriesOf(dofs.length), 0);
    const result = new Int32Array(size);
    let at = 0;
    for (const { dofs } of chains) {
      for (let b = 0; b < dofs.length; b++) {
        const column = place[dofs[b]!]!;
        for (let a = b; a < dofs.length; a++) {
          result[at++] = entries.find(place[dofs[a]!]!, column);
        }
        result[at++] = column;
      }
    }
    return result;
  });
  const timing = {
    order: symbolic.timing.order,
    symbolic: symbolic.timing.symbolic + clock() - placed,
  };
  return {
    graph,
    symbolic: symbolic === known?.symbolic ? symbolic : { ...symbolic, timing },
    destinations,
  };
}

/** Whether the same blocks of the same unknowns meet. */
function sameGraph(a: CompressedGraph, b: CompressedGraph): boolean {
  const { member, memberPtr, ptr, adjacent } = b;
  return (
    sameNumbers(a.memberPtr, memberPtr) &&
    sameNumbers(a.member, member) &&
    sameNumbers(a.ptr, ptr) &&
    sameNumbers(a.adjacent, adjacent)
  );
}

/** Destinations of one chain with so many unknowns. */
export function entriesOf(width: number): number {
  return (width * (width + 3)) / 2;
}
