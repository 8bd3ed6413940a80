import type { FrameModel } from '../../frame/assembly/FrameModel.ts';
import { SymmetricTriplets } from '../../frame/assembly/SymmetricTriplets.ts';
import type { Vector3 } from '../../schemas/frameDocument.ts';
import { attainableMassOf } from '../attainableMass.ts';
import { rigidInertia, six } from '../massProperties.ts';
import type { Six } from '../massProperties.ts';
import type { DynamicSystem } from './DynamicSystem.ts';

/**
 * Rigid inertia of a frame of continuous members, and what all its modes together reach of it. The modes are
 * complete in the space of fields with finite energy, in which fixing a point of a distributed mass takes none of it
 * away: members reach all of theirs. Masses at joints, and bars across their axes, reach bᵀM₀⁺b.
 *   model  one element per member; its consistent masses hold rigid motions exactly
 */
export function continuousInertia(
  model: FrameModel,
  joints: DynamicSystem,
  centre: Vector3,
): { total: Six; attainable: Six } {
  const { total } = rigidInertia(model, centre);
  const across = new Map(joints.bars.map(({ part, mass }) => [part, mass]));
  const bars = model.segments.flatMap((segment) => {
    const mass = across.get(segment.part.index);
    return mass ? [{ ...segment, part: { ...segment.part, mass } }] : [];
  });
  const atJoints = rigidInertia({ ...model, segments: bars }, centre);
  const triplets = new SymmetricTriplets([...bars, ...model.bodies]);
  for (const { motion, part } of bars) triplets.add(motion, part.mass);
  for (const { motion, mass } of model.bodies) triplets.add(motion, mass);
  const M0 = triplets.assemble(model.free);
  return {
    total,
    attainable: six(
      (direction) =>
        total[direction]! -
        atJoints.total[direction]! +
        attainableMassOf(M0, atJoints.forces[direction]!),
    ),
  };
}
