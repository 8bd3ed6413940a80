import { randomUUID } from 'node:crypto';
import type { Transaction } from 'sequelize';
import { inTransaction } from '#server/models/database.ts';
import { Person } from '#server/models/Person.ts';
import { Review } from '#server/models/Review.ts';
import { Revision, type LoadedRevision } from '#server/models/Revision.ts';
import { authorize, can } from '#server/policies/policy.ts';
import {
  announceRevision,
  auditSubject,
  mailAboutRevision,
  moveRevision,
  requireStep,
} from './moveRevision.ts';
import { recordAudit } from './recordAudit.ts';

/**
 * Accepts a revision in review; with the last review that it requires it is accepted. Accepting it twice
 * counts once.
 */
export async function acceptRevision(
  person: Person,
  revisionId: string,
  comment: string,
): Promise<void> {
  await inTransaction(async (transaction) => {
    const revision = await Revision.lock(transaction, revisionId);
    authorize(person, 'review-revision', revision);
    if (revision.acceptedByIds.includes(person.id)) return;
    requireStep(revision, 'accept');
    await addReview(transaction, person, revision, 'accept', comment);
    if (revision.acceptedByIds.length + 1 >= revision.requiredReviews) {
      await moveRevision(transaction, revision, 'accept');
      await askForApproval(transaction, person, revision);
    } else {
      await announceRevision(transaction, revision);
    }
    await revision.project.touch(transaction);
    await recordAudit(transaction, {
      teamId: revision.teamId,
      actorId: person.id,
      projectId: revision.projectId,
      action: 'revision-accepted',
      details: { ...auditSubject(revision), comment },
    });
  });
}

/** Returns a revision to its authors, with a comment. */
export async function returnRevision(
  person: Person,
  revisionId: string,
  comment: string,
): Promise<void> {
  await inTransaction(async (transaction) => {
    const revision = await Revision.lock(transaction, revisionId);
    authorize(person, 'review-revision', revision);
    requireStep(revision, 'return');
    await addReview(transaction, person, revision, 'return', comment);
    await moveRevision(transaction, revision, 'return');
    await mailAboutRevision(transaction, revision, {
      to: revision.authorIds,
      subject: `${revision.project.name}: R${revision.number} was returned`,
      text: `${person.name} returned R${revision.number} of ${revision.project.name}.\n\n${comment}`,
    });
    await revision.project.touch(transaction);
    await recordAudit(transaction, {
      teamId: revision.teamId,
      actorId: person.id,
      projectId: revision.projectId,
      action: 'revision-returned',
      details: { ...auditSubject(revision), comment },
    });
  });
}

async function addReview(
  transaction: Transaction,
  person: Person,
  revision: Revision,
  verdict: Review['verdict'],
  comment: string,
): Promise<void> {
  await Review.create(
    { id: randomUUID(), revisionId: revision.id, reviewerId: person.id, verdict, comment },
    { transaction },
  );
}

/** Writes to the leads who may approve it, now that this person accepted it too. */
async function askForApproval(
  transaction: Transaction,
  person: Person,
  revision: LoadedRevision,
): Promise<void> {
  const { project, authorIds, soleReviewerMayApprove } = revision;
  const acceptedByIds = [...revision.acceptedByIds, person.id];
  const subject = { project, authorIds, acceptedByIds, soleReviewerMayApprove };
  const leads = await Person.findAll({
    where: { teamId: revision.teamId, active: true, role: 'lead' },
    transaction,
  });
  await mailAboutRevision(transaction, revision, {
    to: leads.filter((lead) => can(lead, 'approve-revision', subject)).map(({ id }) => id),
    subject: `${project.name}: R${revision.number} waits for approval`,
    text: `R${revision.number} of ${project.name} has been accepted in review. A lead can approve it.`,
  });
}
