import type { Transaction } from 'sequelize';
import { canonicalJson } from '#shared/frame/canonicalJson.ts';
import { fingerprint } from '#shared/frame/fingerprint.ts';
import type { LockRecord as LockRecordContract } from '#shared/schemas/revision.ts';
import { inTransaction } from '#server/models/database.ts';
import { LockRecord } from '#server/models/LockRecord.ts';
import type { Person } from '#server/models/Person.ts';
import { Revision, type LoadedRevision } from '#server/models/Revision.ts';
import { RevisionSolve } from '#server/models/RevisionSolve.ts';
import { SolveResult } from '#server/models/SolveResult.ts';
import { authorize } from '#server/policies/policy.ts';
import { auditSubject, mailAboutRevision, moveRevision, requireStep } from './moveRevision.ts';
import { recordAudit, type AuditHead } from './recordAudit.ts';

/**
 * Approves and locks a revision: "calculation released for manufacture". The revision approved before is
 * superseded in the same step. The caller has checked the person's password again.
 */
export async function approveRevision(person: Person, revisionId: string): Promise<void> {
  await inTransaction(async (transaction) => {
    const revision = await Revision.lock(transaction, revisionId);
    authorize(person, 'approve-revision', revision);
    requireStep(revision, 'approve');
    const { teamId, projectId, number, project } = revision;
    const approvedAt = new Date();
    const entry = { teamId, actorId: person.id, projectId };

    const earlier = await Revision.findOne({
      where: { projectId, state: 'approved' },
      transaction,
      lock: true,
    });
    if (earlier) await moveRevision(transaction, earlier, 'supersede');
    await moveRevision(transaction, revision, 'approve', { approvedById: person.id, approvedAt });
    await project.touch(transaction);
    await mailAboutRevision(transaction, revision, {
      to: [...revision.authorIds, ...revision.acceptedByIds].filter((id) => id !== person.id),
      subject: `${project.name}: R${number} is approved`,
      text: `${person.name} approved R${number} of ${project.name}: calculation released for manufacture. It is locked.`,
    });
    if (earlier) {
      await recordAudit(transaction, {
        ...entry,
        action: 'revision-superseded',
        details: { ...auditSubject(earlier), by: number },
      });
    }
    const head = await recordAudit(transaction, {
      ...entry,
      action: 'revision-approved',
      details: auditSubject(revision),
    });
    const content = await lockContent(transaction, revision, person.id, approvedAt, head);
    const lock = await LockRecord.create(
      { revisionId, content: canonicalJson(content), fingerprint: fingerprint(content) },
      { transaction },
    );
    await recordAudit(transaction, {
      ...entry,
      action: 'revision-locked',
      details: { ...auditSubject(revision), fingerprint: lock.fingerprint },
    });
  });
}

async function lockContent(
  transaction: Transaction,
  revision: LoadedRevision,
  approvedBy: string,
  approvedAt: Date,
  head: AuditHead,
): Promise<LockRecordContract['content']> {
  const { teamId } = revision;
  const frozen = await RevisionSolve.findAll({ where: { revisionId: revision.id }, transaction });
  const results = await SolveResult.findAll({
    attributes: ['stateId', 'method', 'summaryFingerprint', 'shapesFingerprint'],
    where: { teamId, key: frozen.map(({ resultKey }) => resultKey) },
    order: ['stateId', 'method'],
    transaction,
  });
  return {
    project: revision.projectId,
    revision: revision.number,
    scope: 'calculation released for manufacture',
    documentFingerprint: revision.documentFingerprint,
    settings: revision.settings,
    release: {
      soleReviewerMayApprove: revision.soleReviewerMayApprove,
      requiredReviews: revision.requiredReviews,
    },
    solverVersion: revision.solverVersion,
    results: results.map(({ stateId, method, summaryFingerprint, shapesFingerprint }) => ({
      stateId,
      method,
      summaryFingerprint,
      shapesFingerprint,
    })),
    auditSequence: head.sequence,
    auditHead: head.hash,
    approvedBy,
    approvedAt: approvedAt.toISOString(),
  };
}
