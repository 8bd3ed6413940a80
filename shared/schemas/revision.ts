import { z } from 'zod';
import { fingerprintHex, nothing, personBrief, timestamp, uuid } from './common.ts';
import { endpoint } from './endpoint.ts';
import { frameDocument } from './frameDocument.ts';
import { revisionState } from './project.ts';
import { DEFAULT_SOLVE_SETTINGS, method, solveSettings } from './solveResult.ts';
import { teamSettings } from './team.ts';

/** What a lock record holds, and what its fingerprint is taken over (canonical JSON, RFC 8785). */
export const lockRecord = z.object({
  /** SHA-256 over the canonical JSON of `content`. */
  fingerprint: fingerprintHex,
  content: z.object({
    project: uuid,
    revision: z.int(),
    scope: z.literal('calculation released for manufacture'),
    documentFingerprint: fingerprintHex,
    settings: solveSettings,
    release: teamSettings,
    solverVersion: z.string(),
    results: z.array(
      z.object({
        stateId: z.string().nullable(),
        method,
        /** SHA-256 over canonical summary without timing, then over the shapes file. */
        summaryFingerprint: fingerprintHex,
        shapesFingerprint: fingerprintHex,
      }),
    ),
    /** Head of the team's audit chain when the lock was made. */
    auditSequence: z.int(),
    auditHead: fingerprintHex,
    approvedBy: uuid,
    approvedAt: timestamp,
  }),
});
export type LockRecord = z.infer<typeof lockRecord>;

export const review = z.object({
  id: uuid,
  reviewer: personBrief,
  verdict: z.enum(['accept', 'return']),
  comment: z.string(),
  at: timestamp,
});
export type Review = z.infer<typeof review>;

export const revisionComment = z.object({
  id: uuid,
  author: personBrief,
  body: z.string(),
  at: timestamp,
});
export type RevisionComment = z.infer<typeof revisionComment>;

export const revisionBrief = z.object({
  id: uuid,
  projectId: uuid,
  number: z.int(),
  state: revisionState,
  changeNote: z.string(),
  documentFingerprint: fingerprintHex,
  submittedBy: personBrief,
  submittedAt: timestamp,
  authors: z.array(personBrief),
  decidedAt: timestamp.nullable(),
  requiredReviews: z.int(),
  acceptedReviews: z.int(),
  /** Lowest elastic natural frequency by the consistent method over all states. */
  firstFrequencyHz: z.number().nullable(),
  /** False where one of those solves is incomplete; null where there is none. */
  firstFrequencyComplete: z.boolean().nullable(),
});
export type RevisionBrief = z.infer<typeof revisionBrief>;

export const revisionResponse = revisionBrief.extend({
  document: frameDocument,
  settings: solveSettings,
  /** The solves frozen with the revision. */
  solves: z.array(z.object({ solveId: uuid, stateId: z.string().nullable(), method })),
  reviews: z.array(review),
  comments: z.array(revisionComment),
  approvedBy: personBrief.nullable(),
  approvedAt: timestamp.nullable(),
  withdrawal: z.object({ by: personBrief, at: timestamp, reason: z.string() }).nullable(),
  lock: lockRecord.nullable(),
  abilities: z.object({
    recall: z.boolean(),
    /** Accept it; returning is possible longer, until it is approved. */
    review: z.boolean(),
    return: z.boolean(),
    approve: z.boolean(),
    withdraw: z.boolean(),
    comment: z.boolean(),
  }),
  /** Why an ability that the role would have is withheld, in words ("You changed this draft."). */
  withheld: z.object({ review: z.string().nullable(), approve: z.string().nullable() }),
});
export type RevisionResponse = z.infer<typeof revisionResponse>;

const note = (label: string) =>
  z.string().trim().min(1, `${label} must not be empty.`).max(4000, 'At most 4,000 characters.');
const revisionParams = z.strictObject({ revisionId: uuid });

export const listRevisions = endpoint({
  method: 'get',
  path: '/api/projects/:projectId/revisions',
  summary: 'The revisions of a project, newest first.',
  status: 200,
  access: 'signed-in',
  params: z.strictObject({ projectId: uuid }),
  query: nothing,
  body: nothing,
  response: z.object({ revisions: z.array(revisionBrief) }),
});

export const submitRevision = endpoint({
  method: 'post',
  path: '/api/projects/:projectId/revisions',
  summary:
    'Freeze the draft as the next revision and ask for review. Needs complete consistent and lumped results of this ' +
    'very draft in every operating state (409 lists what is missing) and no other revision under way.',
  status: 201,
  access: 'signed-in',
  params: z.strictObject({ projectId: uuid }),
  query: nothing,
  body: z.strictObject({
    draftVersion: z.int().min(1),
    changeNote: note('The change note'),
    settings: solveSettings.default(DEFAULT_SOLVE_SETTINGS),
  }),
  response: revisionResponse,
});

export const readRevision = endpoint({
  method: 'get',
  path: '/api/revisions/:revisionId',
  summary: 'One revision, with its frozen document, reviews, comments and lock record.',
  status: 200,
  access: 'signed-in',
  params: revisionParams,
  query: nothing,
  body: nothing,
  response: revisionResponse,
});

const transition = <Body extends z.ZodType>(verb: string, summary: string, body: Body) =>
  endpoint({
    method: 'post',
    path: `/api/revisions/:revisionId/${verb}`,
    summary,
    status: 200,
    access: 'signed-in',
    params: revisionParams,
    query: nothing,
    body,
    response: revisionResponse,
  });

export const recallRevision = transition(
  'recall',
  'Take a submitted revision back (authors).',
  nothing,
);
export const acceptRevision = transition(
  'accept',
  'Accept in review; the last required acceptance makes the revision accepted.',
  z.strictObject({ comment: z.string().trim().max(4000).default('') }),
);
export const returnRevision = transition(
  'return',
  'Return to the designers with a comment.',
  z.strictObject({ comment: note('The comment') }),
);
export const approveRevision = transition(
  'approve',
  'Approve and lock (leads), with the password again: calculation released for manufacture.',
  z.strictObject({ password: z.string().min(1).max(200) }),
);
export const withdrawRevision = transition(
  'withdraw',
  'Withdraw an approval (leads), with a reason.',
  z.strictObject({ reason: note('The reason') }),
);

export const createRevisionComment = endpoint({
  method: 'post',
  path: '/api/revisions/:revisionId/comments',
  summary: 'Comment on a revision. The client chooses the id, so that repeating makes one comment.',
  status: 201,
  access: 'signed-in',
  params: revisionParams,
  query: nothing,
  body: z.strictObject({ id: uuid, body: note('The comment') }),
  response: revisionComment,
});
