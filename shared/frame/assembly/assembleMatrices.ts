import type { SymmetricCsc } from '../../numerics/sparse/SymmetricCsc.ts';
import type { FrameModel } from './FrameModel.ts';
import { SymmetricTriplets } from './SymmetricTriplets.ts';

/**
 * Stiffness K [N, m] and mass M [kg, m] over the free unknowns of a frame, n×n, from Σ Tᵀ k T. Entries
 * that are zero are kept, so the patterns depend on the topology alone.
 */
export function assembleMatrices(model: FrameModel): { K: SymmetricCsc; M: SymmetricCsc } {
  const { segments, ties, bodies, free } = model;
  const K = new SymmetricTriplets([...segments, ...ties]);
  const M = new SymmetricTriplets([...segments, ...bodies]);
  for (const { part, motion } of segments) {
    K.add(motion, part.stiffness);
    M.add(motion, part.mass);
  }
  for (const { motion, stiffness } of ties) K.add(motion, Float64Array.of(stiffness));
  for (const { motion, mass } of bodies) M.add(motion, mass);
  return { K: K.assemble(free), M: M.assemble(free) };
}
