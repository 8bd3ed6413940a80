import type { Chain, ChainClass, ChainedPair } from '../../numerics/chains/ChainedPair.ts';
import type { FrameModel, ModelChain } from './FrameModel.ts';
import { SymmetricTriplets } from './SymmetricTriplets.ts';

/**
 * Stiffness K [N, m] and mass M [kg, m] of a frame as chains between joints: the unknowns of the model, in
 * its order.
 */
export function chainedPair(model: FrameModel): ChainedPair {
  const { joints, blockOf, ties, bodies, chains } = model;
  const K = new SymmetricTriplets(ties);
  for (const { motion, stiffness } of ties) K.add(motion, Float64Array.of(stiffness));
  const M = new SymmetricTriplets(bodies);
  for (const { motion, mass } of bodies) M.add(motion, mass);
  return {
    joints,
    blockOf,
    K: K.assemble(joints),
    M: M.assemble(joints),
    classes: chains.map(chainClass),
  };
}

function chainClass(chains: readonly ModelChain[]): ChainClass {
  const [first] = chains;
  if (first === undefined) throw new RangeError('A class of chains has at least one.');
  const { part, ends } = first;
  return {
    inner: innerCount(first),
    ends: ends.rows,
    K: chainMatrix(first, part.stiffness),
    M: chainMatrix(first, part.mass),
    chains: chains.map(({ ends: { rows, dofs, T } }): Chain => ({
      dofs,
      T: transposed(T, rows, dofs.length),
    })),
  };
}

export function innerCount({ elements, directions }: ModelChain): number {
  return (elements - 1) * directions.length;
}

function transposed(T: Float64Array, rows: number, columns: number): Float64Array {
  const result = new Float64Array(T.length);
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < columns; j++) result[j * rows + i] = T[i * columns + j]!;
  }
  return result;
}

/**
 * Place of each displacement of a chain's stations, station by station, among its inner unknowns and then its
 * ends; −1 for one that does not exist.
 */
export function stationPlaces(chain: ModelChain): Int32Array[] {
  const { elements, directions, ends } = chain;
  const half = ends.rows / 2;
  const inner = innerCount(chain);
  return Array.from({ length: elements + 1 }, (_, station) =>
    Int32Array.from({ length: half }, (_unused, d) => {
      if (station === 0) return inner + d;
      if (station === elements) return inner + half + d;
      const at = directions.indexOf(d);
      return at < 0 ? -1 : (station - 1) * directions.length + at;
    }),
  );
}

/** Σ of one element's matrix over the elements of a chain, inner unknowns first, row by row. */
export function chainMatrix(chain: ModelChain, element: Float64Array): Float64Array {
  const places = stationPlaces(chain);
  const rows = chain.ends.rows;
  const n = innerCount(chain) + rows;
  const result = new Float64Array(n * n);
  for (let k = 0; k < chain.elements; k++) {
    const at = [...places[k]!, ...places[k + 1]!];
    for (let i = 0; i < rows; i++) {
      for (let j = 0; j < rows; j++) {
        if (at[i]! >= 0 && at[j]! >= 0) result[at[i]! * n + at[j]!]! += element[i * rows + j]!;
      }
    }
  }
  return result;
}
