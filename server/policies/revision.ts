import { allowed, forbidden, hidden, type Actor, type Decision, type Rules } from './decision.ts';
import { decideForReader, designs, readsProject, type ProjectSubject } from './project.ts';

/** What deciding on a revision needs to know of it; its state is the transition table's matter. */
export interface RevisionSubject {
  readonly project: ProjectSubject;
  /** Whoever changed the draft before it was frozen, and who submitted it. */
  readonly authorIds: readonly string[];
  /** Reviewers who accepted it so far. */
  readonly acceptedByIds: readonly string[];
  /** The team's release rule, as frozen with the revision. */
  readonly soleReviewerMayApprove: boolean;
}

export interface RevisionSubjects {
  readonly 'submit-revision': ProjectSubject;
  readonly 'read-revision': RevisionSubject;
  readonly 'recall-revision': RevisionSubject;
  /** Accepting and returning. */
  readonly 'review-revision': RevisionSubject;
  readonly 'approve-revision': RevisionSubject;
  readonly 'withdraw-revision': RevisionSubject;
  readonly 'comment-on-revision': RevisionSubject;
}

const AUTHOR = 'You changed this draft, so somebody else has to';

function decideReview(actor: Actor, revision: RevisionSubject): Decision {
  if (!readsProject(actor, revision.project)) return hidden;
  if (actor.role !== 'reviewer' && actor.role !== 'lead') {
    return forbidden('Only reviewers and leads review.');
  }
  if (revision.authorIds.includes(actor.id)) return forbidden(`${AUTHOR} review it.`);
  return allowed;
}

function decideApproval(actor: Actor, revision: RevisionSubject): Decision {
  if (!readsProject(actor, revision.project)) return hidden;
  if (actor.role !== 'lead') return forbidden('Only leads approve.');
  if (revision.authorIds.includes(actor.id)) return forbidden(`${AUTHOR} approve it.`);
  const reviewedByOthers = revision.acceptedByIds.some((id) => id !== actor.id);
  const reviewedAlone = revision.acceptedByIds.includes(actor.id) && !reviewedByOthers;
  if (reviewedAlone && !revision.soleReviewerMayApprove) {
    return forbidden(
      'You are its only reviewer: in this team another lead has to approve, or another reviewer accept it too.',
    );
  }
  return allowed;
}

export const revisionRules: Rules<RevisionSubjects> = {
  'submit-revision': (actor, project) =>
    decideForReader(
      actor,
      project,
      designs(actor, project),
      'Only designers of the project submit its draft.',
    ),
  'read-revision': (actor, { project }) => (readsProject(actor, project) ? allowed : hidden),
  'recall-revision': (actor, { project, authorIds }) =>
    decideForReader(
      actor,
      project,
      designs(actor, project) && authorIds.includes(actor.id),
      'Only its authors recall a revision.',
    ),
  'review-revision': decideReview,
  'approve-revision': decideApproval,
  'withdraw-revision': (actor, { project }) =>
    decideForReader(actor, project, actor.role === 'lead', 'Only leads withdraw an approval.'),
  'comment-on-revision': (actor, { project }) =>
    decideForReader(
      actor,
      project,
      designs(actor, project) || actor.role === 'reviewer' || actor.role === 'lead',
      'Only designers of the project, reviewers and leads comment.',
    ),
};
