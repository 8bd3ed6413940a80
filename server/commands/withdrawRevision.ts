import { inTransaction } from '#server/models/database.ts';
import type { Person } from '#server/models/Person.ts';
import { Revision } from '#server/models/Revision.ts';
import { authorize } from '#server/policies/policy.ts';
import { auditSubject, mailAboutRevision, moveRevision } from './moveRevision.ts';
import { recordAudit } from './recordAudit.ts';

/** Withdraws an approval, with a reason; the revision stays as it was frozen. */
export async function withdrawRevision(
  person: Person,
  revisionId: string,
  reason: string,
): Promise<void> {
  await inTransaction(async (transaction) => {
    const revision = await Revision.lock(transaction, revisionId);
    authorize(person, 'withdraw-revision', revision);
    const { teamId, projectId, number, project } = revision;
    await moveRevision(transaction, revision, 'withdraw', {
      withdrawnById: person.id,
      withdrawnAt: new Date(),
      withdrawalReason: reason,
    });
    await project.touch(transaction);
    await mailAboutRevision(transaction, revision, {
      to: [...project.memberIds, ...revision.acceptedByIds].filter((id) => id !== person.id),
      subject: `${project.name}: the approval of R${number} was withdrawn`,
      text: `${person.name} withdrew the approval of R${number} of ${project.name}: it is no longer released for manufacture.\n\n${reason}`,
    });
    await recordAudit(transaction, {
      teamId,
      actorId: person.id,
      projectId,
      action: 'revision-withdrawn',
      details: { ...auditSubject(revision), reason },
    });
  });
}
