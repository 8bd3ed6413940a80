import { buildModel } from '../../frame/assembly/buildModel.ts';
import { DynamicSystem } from './DynamicSystem.ts';
import { memberPieces } from './memberPieces.ts';

/** Room above the highest frequency, so that no pole of a piece lies near a mode. */
const ROOM = 1.1;

/**
 * The same continuous frame with members divided until none of their pieces, both ends clamped, has a natural
 * frequency below omega [rad/s]: J₀ = 0 there, K_D has no poles, and a mode in which no joint moves (a pole of
 * the undivided K_D) shows in the unknowns inside its members. Dividing changes no frequency: the functions are exact.
 * Each round divides a member further by the number of clamped frequencies that its pieces still have.
 */
export function dividedSystem(
  joints: DynamicSystem,
  omega: number,
  clock: () => number,
): DynamicSystem {
  const k = new Float64Array(16);
  const divisions = new Int32Array(joints.model.parts.length).fill(1);
  let system = joints;
  for (;;) {
    const most = new Int32Array(divisions.length);
    for (const { element, part } of system.pieces) {
      most[part.index] = Math.max(most[part.index]!, element.stiffness(omega * ROOM, k));
    }
    if (most.every((clamped) => clamped === 0)) return system;
    most.forEach((clamped, i) => (divisions[i]! += clamped));
    const model = buildModel(joints.model.document, {
      massKind: 'consistent',
      divisionsOf: ({ index }) => divisions[index]!,
    });
    system = new DynamicSystem(
      model,
      memberPieces(model, ({ index }) => divisions[index]!),
      clock,
    );
  }
}
