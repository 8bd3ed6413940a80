import {
  lockRecord,
  type LockRecord as LockRecordContract,
  type Review as ReviewContract,
  type RevisionBrief,
  type RevisionComment as RevisionCommentContract,
  type RevisionResponse,
} from '#shared/schemas/revision.ts';
import type { PersonBrief } from '#shared/schemas/common.ts';
import type { ListedRevision, RevisionContents } from '#server/models/revisionContents.ts';
import type { LockRecord } from '#server/models/LockRecord.ts';
import type { Person } from '#server/models/Person.ts';
import type { Review } from '#server/models/Review.ts';
import type { LoadedRevision } from '#server/models/Revision.ts';
import type { RevisionComment } from '#server/models/RevisionComment.ts';
import { can, decide } from '#server/policies/policy.ts';
import { mayStep } from '#server/policies/revisionTransitions.ts';
import { presentPerson } from './person.ts';

/** @param listed with submitter, authors and reviews loaded */
export function presentRevisionBrief({ revision, first }: ListedRevision): RevisionBrief {
  const decidedAt = revision.state === 'submitted' ? null : revision.stateSince;
  return {
    id: revision.id,
    projectId: revision.projectId,
    number: revision.number,
    state: revision.state,
    changeNote: revision.changeNote,
    documentFingerprint: revision.documentFingerprint,
    submittedBy: loaded(revision.submittedBy),
    submittedAt: revision.submittedAt.toISOString(),
    authors: (revision.authorships ?? []).map(({ person }) => loaded(person)),
    decidedAt: decidedAt?.toISOString() ?? null,
    requiredReviews: revision.requiredReviews,
    acceptedReviews: revision.acceptedByIds.length,
    firstFrequencyHz: first?.hz ?? null,
    firstFrequencyComplete: first?.complete ?? null,
  };
}

export function presentRevision(
  person: Person,
  revision: LoadedRevision,
  contents: RevisionContents,
): RevisionResponse {
  const { approvedBy, approvedAt, withdrawnBy, withdrawnAt, withdrawalReason } = revision;
  return {
    ...presentRevisionBrief({ revision, first: contents.first }),
    document: contents.document,
    settings: revision.settings,
    solves: contents.solves.map(({ id, stateId, method }) => ({ solveId: id, stateId, method })),
    reviews: (revision.reviews ?? []).map(presentReview),
    comments: contents.comments.map(presentComment),
    approvedBy: approvedBy ? presentPerson(approvedBy) : null,
    approvedAt: approvedAt?.toISOString() ?? null,
    withdrawal:
      withdrawnBy && withdrawnAt && withdrawalReason !== null
        ? {
            by: presentPerson(withdrawnBy),
            at: withdrawnAt.toISOString(),
            reason: withdrawalReason,
          }
        : null,
    lock: contents.lock && presentLock(contents.lock),
    abilities: presentAbilities(person, revision),
    withheld: presentWithheld(person, revision),
  };
}

function presentAbilities(person: Person, revision: LoadedRevision): RevisionResponse['abilities'] {
  const { state } = revision;
  const reviews = can(person, 'review-revision', revision);
  return {
    recall: mayStep(state, 'recall') && can(person, 'recall-revision', revision),
    review: mayStep(state, 'accept') && reviews && !revision.acceptedByIds.includes(person.id),
    return: mayStep(state, 'return') && reviews,
    approve: mayStep(state, 'approve') && can(person, 'approve-revision', revision),
    withdraw: mayStep(state, 'withdraw') && can(person, 'withdraw-revision', revision),
    comment: can(person, 'comment-on-revision', revision),
  };
}

/** Reasons are for those whose role would let them; what the role itself does not let is no surprise. */
function presentWithheld(person: Person, revision: LoadedRevision): RevisionResponse['withheld'] {
  const { state } = revision;
  const isLead = person.role === 'lead';
  const isReviewer = isLead || person.role === 'reviewer';
  const review =
    isReviewer && mayStep(state, 'accept') ? decide(person, 'review-revision', revision) : null;
  const approve =
    isLead && mayStep(state, 'approve') ? decide(person, 'approve-revision', revision) : null;
  const accepted = review?.kind === 'allowed' && revision.acceptedByIds.includes(person.id);
  return {
    review: accepted
      ? 'You have accepted it; another reviewer has to accept it too.'
      : review?.kind === 'forbidden'
        ? review.reason
        : null,
    approve: approve?.kind === 'forbidden' ? approve.reason : null,
  };
}

const presentReview = (review: Review): ReviewContract => ({
  id: review.id,
  reviewer: loaded(review.reviewer),
  verdict: review.verdict,
  comment: review.comment,
  at: review.createdAt.toISOString(),
});

/** @param comment with `author` loaded */
export const presentComment = (comment: RevisionComment): RevisionCommentContract => ({
  id: comment.id,
  author: loaded(comment.author),
  body: comment.body,
  at: comment.createdAt.toISOString(),
});

const presentLock = ({ fingerprint, content }: LockRecord): LockRecordContract =>
  lockRecord.parse({ fingerprint, content: JSON.parse(content) as unknown });

function loaded(person: Person | undefined): PersonBrief {
  if (person === undefined) throw new Error('A person of the revision is not loaded.');
  return presentPerson(person);
}
