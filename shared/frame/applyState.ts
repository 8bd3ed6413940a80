import { AppError } from '../errors/AppError.ts';
import {
  DISPLACEMENTS,
  type FrameDocument,
  type OperatingState,
  type PointMass,
  type Support,
  type SupportCondition,
} from '../schemas/frameDocument.ts';

/**
 * The document as it stands in one operating state: masses left out, moved or changed as the state says, and
 * support stiffnesses multiplied by their bracket factor where the state takes them soft or stiff. What is
 * fixed stays fixed. The result holds no states of its own; the argument is not changed.
 *   stateId   id of a state of the document, or null for the document as drawn
 *   supports  one condition for every support, over what the state says
 * Throws `unsolvable` where the document has no such state.
 */
export function applyState(
  document: FrameDocument,
  stateId: string | null,
  supports?: SupportCondition,
): FrameDocument {
  const state = stateId === null ? undefined : findState(document, stateId);
  return {
    ...document,
    masses: state ? massesIn(state, document.masses) : document.masses,
    supports: document.supports.map((support) =>
      supportIn(support, supports ?? conditionOf(state, support.node)),
    ),
    states: [],
  };
}

function findState(document: FrameDocument, stateId: string): OperatingState {
  const state = document.states.find((candidate) => candidate.id === stateId);
  if (state) return state;
  const known = document.states.map((candidate) => `“${candidate.id}”`).join(', ');
  throw new AppError(
    'unsolvable',
    known === ''
      ? `Operating state “${stateId}” does not exist: this frame has no operating states.`
      : `Operating state “${stateId}” does not exist. Choose one of ${known}.`,
    { stateId },
  );
}

function massesIn(state: OperatingState, masses: readonly PointMass[]): PointMass[] {
  const changes = new Map(Object.entries(state.masses));
  return masses.flatMap((mass) => {
    const change = changes.get(mass.id);
    if (!change) return [mass];
    if (change.present === false) return [];
    return [
      {
        ...mass,
        mass: change.mass ?? mass.mass,
        node: change.node ?? mass.node,
        offset: change.offset ?? mass.offset,
      },
    ];
  });
}

function conditionOf(state: OperatingState | undefined, node: string): SupportCondition {
  if (!state) return 'expected';
  if (typeof state.supports === 'string') return state.supports;
  return new Map(Object.entries(state.supports)).get(node) ?? 'expected';
}

function supportIn(support: Support, condition: SupportCondition): Support {
  if (condition === 'expected' || !support.stiffness) return support;
  const factor = support.bracket[condition];
  const stiffness = { ...support.stiffness };
  for (const displacement of DISPLACEMENTS) {
    const value = stiffness[displacement];
    if (value !== undefined) stiffness[displacement] = value * factor;
  }
  return { ...support, stiffness };
}
