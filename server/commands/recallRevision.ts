import { inTransaction } from '#server/models/database.ts';
import type { Person } from '#server/models/Person.ts';
import { Revision } from '#server/models/Revision.ts';
import { authorize } from '#server/policies/policy.ts';
import { auditSubject, moveRevision } from './moveRevision.ts';
import { recordAudit } from './recordAudit.ts';

/** Takes a submitted revision back. */
export async function recallRevision(person: Person, revisionId: string): Promise<void> {
  await inTransaction(async (transaction) => {
    const revision = await Revision.lock(transaction, revisionId);
    authorize(person, 'recall-revision', revision);
    await moveRevision(transaction, revision, 'recall');
    await revision.project.touch(transaction);
    await recordAudit(transaction, {
      teamId: revision.teamId,
      actorId: person.id,
      projectId: revision.projectId,
      action: 'revision-recalled',
      details: auditSubject(revision),
    });
  });
}
