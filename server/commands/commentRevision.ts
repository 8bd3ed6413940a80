import { AppError } from '#shared/errors/AppError.ts';
import { inTransaction } from '#server/models/database.ts';
import type { Person } from '#server/models/Person.ts';
import { Revision } from '#server/models/Revision.ts';
import { RevisionComment } from '#server/models/RevisionComment.ts';
import { authorize } from '#server/policies/policy.ts';
import { announceRevision, auditSubject } from './moveRevision.ts';
import { recordAudit } from './recordAudit.ts';

/** Comments on a revision. Repeating it with the same id gives the comment that is there. */
export async function commentRevision(
  person: Person,
  revisionId: string,
  { id, body }: { readonly id: string; readonly body: string },
): Promise<RevisionComment> {
  return inTransaction(async (transaction) => {
    const revision = await Revision.lock(transaction, revisionId);
    authorize(person, 'comment-on-revision', revision);
    const existing = await RevisionComment.findByPk(id, { transaction });
    if (existing?.revisionId === revisionId && existing.authorId === person.id) return existing;
    if (existing) throw new AppError('conflict', 'This id is taken: choose another.');
    const comment = await RevisionComment.create(
      { id, revisionId, authorId: person.id, body },
      { transaction },
    );
    await announceRevision(transaction, revision);
    await recordAudit(transaction, {
      teamId: revision.teamId,
      actorId: person.id,
      projectId: revision.projectId,
      action: 'revision-commented',
      details: { ...auditSubject(revision), commentId: id },
    });
    return comment;
  });
}
