import type { NoticeKind } from '#src/components/Notice.tsx';
import type { RevisionState } from '#shared/schemas/project.ts';

interface StateWords {
  /** One word for tables. */
  readonly word: string;
  /** What it means and who moves next. */
  readonly meaning: string;
  readonly kind: NoticeKind;
}

/** How each state of a revision is said; `kind` gives it a shape as well as an ink. */
export const REVISION_WORDS: Record<RevisionState, StateWords> = {
  submitted: {
    word: 'Submitted',
    meaning: 'Waits for review.',
    kind: 'caution',
  },
  recalled: {
    word: 'Recalled',
    meaning: 'Taken back by its authors; work goes on in the draft.',
    kind: 'plain',
  },
  returned: {
    word: 'Returned',
    meaning: 'A reviewer sent it back; work goes on in the draft.',
    kind: 'signal',
  },
  accepted: {
    word: 'Accepted',
    meaning: 'The required reviews accept it; waits for a lead.',
    kind: 'caution',
  },
  approved: {
    word: 'Approved',
    meaning: 'Calculation released for manufacture; locked.',
    kind: 'clear',
  },
  superseded: {
    word: 'Superseded',
    meaning: 'A later revision was approved.',
    kind: 'plain',
  },
  withdrawn: {
    word: 'Withdrawn',
    meaning: 'A lead withdrew the approval: do not build from it.',
    kind: 'signal',
  },
};

/** The cautions that stand wherever numbers are released. */
export const CAUTIONS = [
  'Linear, small displacements; members idealised as bars and beams.',
  'No strength or fatigue check. Sheets and panels are not covered.',
  'Axial load neither stiffens nor softens a member here.',
  'Supports and joints govern the lowest modes: verify by test on the built machine.',
  'Local codes, the machine’s safety standards and a licensed engineer decide.',
] as const;
