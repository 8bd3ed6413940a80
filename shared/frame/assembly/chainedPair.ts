import type { Chain, ChainClass, ChainedPair } from '../../numerics/chains/ChainedPair.ts';
import type { SymmetricCsc } from '../../numerics/sparse/SymmetricCsc.ts';
import type { FrameModel, ModelChain } from './FrameModel.ts';
import { SymmetricTriplets } from './SymmetricTriplets.ts';

/**
 * Stiffness K [N, m] and mass M [kg, m] of a frame as chains between joints: the unknowns of the model, in
 * its order.
 */
export function chainedPair(model: FrameModel): ChainedPair {
  const { joints, blockOf, bodies, chains } = model;
  const M = new SymmetricTriplets(bodies);
  for (const { motion, mass } of bodies) M.add(motion, mass);
  return {
    joints,
    blockOf,
    K: stiffnessOfTies(model),
    M: M.assemble(joints),
    classes: chains.map(chainClass),
  };
}

/** The part of K that joints, supports and springs make. */
export function stiffnessOfTies({ joints, ties }: FrameModel): SymmetricCsc {
  const K = new SymmetricTriplets(ties);
  for (const { motion, stiffness } of ties) K.add(motion, Float64Array.of(stiffness));
  return K.assemble(joints);
}

function chainClass(chains: readonly ModelChain[]): ChainClass {
  const [first] = chains;
  if (first === undefined) throw new RangeError('A class of chains has at least one.');
  const { part, ends, elements, make } = first;
  const rows = rowOrder(first);
  return {
    inner: make.inner,
    ends: ends.rows,
    blocks: make.blocks.map((block) => ({
      inner: (elements - 1) * block.filter((d) => make.exists[d]).length,
      ends: 2 * block.length,
    })),
    K: chainMatrix(first, part.stiffness),
    M: chainMatrix(first, part.mass),
    chains: chains.map(({ ends: { dofs, T } }): Chain => ({
      dofs,
      T: byColumns(T, rows, dofs.length),
    })),
  };
}

/** For each end in the make's order: its row among the displacements of start and end. */
function rowOrder({ make, ends, elements }: ModelChain): Int32Array {
  const half = ends.rows / 2;
  const rows = new Int32Array(ends.rows);
  for (let d = 0; d < half; d++) {
    rows[make.places[0]![d]! - make.inner] = d;
    rows[make.places[elements]![d]! - make.inner] = half + d;
  }
  return rows;
}

/** The given rows of T, column by column. */
function byColumns(T: Float64Array, rows: Int32Array, columns: number): Float64Array {
  const result = new Float64Array(T.length);
  let at = 0;
  for (let j = 0; j < columns; j++) {
    for (const row of rows) result[at++] = T[row * columns + j]!;
  }
  return result;
}

/** Σ of one element's matrix over the elements of a chain, inner unknowns first, row by row. */
export function chainMatrix(
  { make, ends, elements }: ModelChain,
  element: Float64Array,
): Float64Array {
  const n = make.inner + ends.rows;
  const result = new Float64Array(n * n);
  for (let k = 0; k < elements; k++) {
    const at = [...make.places[k]!, ...make.places[k + 1]!];
    for (let i = 0; i < ends.rows; i++) {
      for (let j = 0; j < ends.rows; j++) {
        if (at[i]! >= 0 && at[j]! >= 0) result[at[i]! * n + at[j]!]! += element[i * ends.rows + j]!;
      }
    }
  }
  return result;
}
