import { AppError } from '#shared/errors/AppError.ts';
import type { RevisionState } from '#shared/schemas/project.ts';

/**
 * The transition table of a revision: the only place in code that says which step leads from where to where
 * (migration create-revisions holds the same table for the database). Recalled, returned, superseded and
 * withdrawn are final. `accept` moves the state only with the last required acceptance. An accepted revision
 * can still be returned: otherwise one that a lead will not approve would block the project for good.
 */
export const REVISION_STEPS = {
  recall: { from: ['submitted'], to: 'recalled', done: 'recalled' },
  accept: { from: ['submitted'], to: 'accepted', done: 'accepted' },
  return: { from: ['submitted', 'accepted'], to: 'returned', done: 'returned' },
  approve: { from: ['accepted'], to: 'approved', done: 'approved' },
  supersede: { from: ['approved'], to: 'superseded', done: 'superseded' },
  withdraw: { from: ['approved'], to: 'withdrawn', done: 'withdrawn' },
} as const satisfies Record<
  string,
  { from: readonly RevisionState[]; to: RevisionState; done: string }
>;

export type RevisionStep = keyof typeof REVISION_STEPS;

export function mayStep(state: RevisionState, step: RevisionStep): boolean {
  const from: readonly RevisionState[] = REVISION_STEPS[step].from;
  return from.includes(state);
}

const STANDING: Record<RevisionState, string> = {
  submitted: 'waits for review',
  recalled: 'has been recalled by its authors',
  returned: 'has been returned by a reviewer',
  accepted: 'has been accepted in review and waits for a lead',
  approved: 'has been approved and is locked',
  superseded: 'has been superseded by a later revision',
  withdrawn: 'has been withdrawn',
};

/** The 409 for a step that the state does not allow, often because somebody else was quicker. */
export function stepConflict(number: number, state: RevisionState, step: RevisionStep): AppError {
  return new AppError(
    'conflict',
    `R${number} ${STANDING[state]}, so it cannot be ${REVISION_STEPS[step].done} now.`,
    { state },
  );
}
