import { describe, expect, it } from 'vitest';
import { REVISION_STATES } from '#shared/schemas/project.ts';
import {
  mayStep,
  REVISION_STEPS,
  stepConflict,
  type RevisionStep,
} from '#server/policies/revisionTransitions.ts';

/** The table as the product is specified, with the one addition that an accepted revision can be returned. */
const SPECIFIED: readonly (readonly [string, RevisionStep, string])[] = [
  ['submitted', 'recall', 'recalled'],
  ['submitted', 'return', 'returned'],
  ['submitted', 'accept', 'accepted'],
  ['accepted', 'return', 'returned'],
  ['accepted', 'approve', 'approved'],
  ['approved', 'supersede', 'superseded'],
  ['approved', 'withdraw', 'withdrawn'],
];
const steps = Object.keys(REVISION_STEPS) as RevisionStep[];

describe('the transition table', () => {
  it('allows what is specified and nothing else', () => {
    const allowed = REVISION_STATES.flatMap((state) =>
      steps
        .filter((step) => mayStep(state, step))
        .map((step) => [state, step, REVISION_STEPS[step].to]),
    );
    expect(allowed.map(String).sort()).toEqual(SPECIFIED.map(String).sort());
  });

  it('says how the revision stands when it refuses', () => {
    const error = stepConflict(2, 'returned', 'approve');
    expect(error.code).toBe('conflict');
    expect(error.message).toBe('R2 has been returned by a reviewer, so it cannot be approved now.');
  });
});
