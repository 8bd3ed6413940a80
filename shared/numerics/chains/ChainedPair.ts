import { compressGraph } from '../ordering/compressGraph.ts';
import { adjacencyGraph } from '../sparse/adjacencyGraph.ts';
import type { SymmetricCsc } from '../sparse/SymmetricCsc.ts';

/** Two ends and the unknowns between them, of one make wherever they stand. */
export interface Chain {
  /** Joint unknowns that the ends are made of. */
  readonly dofs: Int32Array;
  /** ends × dofs, column by column: displacements of the ends from the joint unknowns. */
  readonly T: Float64Array;
}

/** Chains with the same matrices over their inner unknowns and their ends. */
export interface ChainClass {
  /** Number of inner unknowns of each chain. */
  readonly inner: number;
  /** Displacements of both ends together, an even number. */
  readonly ends: number;
  /**
   * Parts that neither K nor M couples (stretch, twist, bending in each plane of a straight member), in the
   * order in which inner unknowns and ends are numbered; even numbers of ends.
   */
  readonly blocks: readonly { readonly inner: number; readonly ends: number }[];
  /** (inner + ends)², row by row, inner unknowns first; symmetric, zero between blocks. */
  readonly K: Float64Array;
  readonly M: Float64Array;
  readonly chains: readonly Chain[];
}

/**
 * A symmetric pair K, M over joint unknowns, given as sparse matrices, and chains between them:
 *   A = [A_joints 0; 0 0] + Σ_classes Σ_chains Bᵀ a B,   B = [0 I; T 0] over (joints, inner).
 * Unknowns are numbered: joints first, then class by class, chain by chain, the inner ones. What the
 * chains of a class share is eliminated once for all of them.
 */
export interface ChainedPair {
  /** Number of joint unknowns. */
  readonly joints: number;
  /** Part of K and of M that no chain holds, over the joint unknowns. */
  readonly K: SymmetricCsc;
  readonly M: SymmetricCsc;
  readonly classes: readonly ChainClass[];
  /**
   * joints: number of the block that each joint unknown belongs to (the displacements of a node, as
   * a rule), from 0 without a gap. Unknowns of one block are eliminated together.
   */
  readonly blockOf: Int32Array;
}

/** Number of all unknowns. */
export function orderOf({ joints, classes }: ChainedPair): number {
  return classes.reduce((sum, { inner, chains }) => sum + inner * chains.length, joints);
}

/** A pair without chains: blocks are the groups of unknowns that have the same neighbours. */
export function unchained(K: SymmetricCsc, M: SymmetricCsc): ChainedPair {
  const { member, memberPtr, n: blocks } = compressGraph(adjacencyGraph(K, M));
  const blockOf = new Int32Array(K.n);
  for (let b = 0; b < blocks; b++) {
    for (let p = memberPtr[b]!; p < memberPtr[b + 1]!; p++) blockOf[member[p]!] = b;
  }
  return { joints: K.n, K, M, classes: [], blockOf };
}
