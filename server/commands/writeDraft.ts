import type { Transaction } from 'sequelize';
import { AppError } from '#shared/errors/AppError.ts';
import { describeChanges, documentDiff } from '#shared/frame/documentDiff.ts';
import { fingerprint as fingerprintOf } from '#shared/frame/fingerprint.ts';
import type { StaleDraftDetails } from '#shared/schemas/project.ts';
import { inTransaction } from '#server/models/database.ts';
import { Draft } from '#server/models/Draft.ts';
import { DraftVersion } from '#server/models/DraftVersion.ts';
import { FrameDocumentRecord } from '#server/models/FrameDocumentRecord.ts';
import { Person } from '#server/models/Person.ts';
import { Project } from '#server/models/Project.ts';
import { authorize } from '#server/policies/policy.ts';
import { notify } from '#server/workers/notifications.ts';
import { requireForm } from './createProject.ts';
import { recordAudit } from './recordAudit.ts';

/**
 * Replaces the draft's document. The document that is already there makes no new version, whatever version
 * the writer knew, so that a repeated request is harmless.
 *
 * @throws {AppError} `invalid-document` with every fault of form; `stale-version` with what changed
 */
export async function writeDraft(
  person: Person,
  projectId: string,
  input: { readonly version: number; readonly document?: unknown },
): Promise<Draft> {
  authorize(person, 'edit-project', await Project.load(projectId));
  const document = requireForm(input.document);
  const fingerprint = fingerprintOf(document);
  return inTransaction(async (transaction) => {
    const project = await Project.lock(transaction, projectId);
    authorize(person, 'edit-project', project);
    const { teamId } = project;
    const draft = await Draft.findByPk(projectId, {
      include: [{ model: Person, as: 'updatedBy' }],
      transaction,
      rejectOnEmpty: true,
    });
    if (draft.fingerprint === fingerprint) return draft;
    if (draft.version !== input.version) throw await staleDraft(transaction, draft, input.version);
    await FrameDocumentRecord.store(transaction, teamId, document);
    const version = draft.version + 1;
    await DraftVersion.create(
      { projectId, version, teamId, fingerprint, writtenById: person.id },
      { transaction },
    );
    const updatedAt = new Date();
    await draft.update(
      { version, fingerprint, updatedById: person.id, updatedAt },
      { transaction },
    );
    await project.touch(transaction);
    await notify(transaction, projectId, { kind: 'draft', version });
    await recordAudit(transaction, {
      teamId,
      actorId: person.id,
      projectId,
      action: 'draft-changed',
      details: { version, fingerprint },
    });
    return draft;
  });
}

/**
 * The 412 for somebody who worked on an earlier version, with what changed since.
 *
 * @param draft with `updatedBy` loaded
 */
export async function staleDraft(
  transaction: Transaction,
  draft: Draft,
  knownVersion: number,
): Promise<AppError> {
  const { teamId, projectId, updatedBy } = draft;
  if (updatedBy === undefined) throw new Error('Who changed the draft is not loaded.');
  const known = await DraftVersion.findOne({
    where: { projectId, version: knownVersion },
    transaction,
  });
  const changes = known
    ? documentDiff(
        await FrameDocumentRecord.read(teamId, known.fingerprint, transaction),
        await FrameDocumentRecord.read(teamId, draft.fingerprint, transaction),
      )
    : [];
  const details: StaleDraftDetails = {
    currentVersion: draft.version,
    updatedBy: { id: updatedBy.id, name: updatedBy.name, role: updatedBy.role },
    updatedAt: draft.updatedAt.toISOString(),
    changes: changes.map(({ list, id, kind, fields }) => ({ list, id, kind, fields: [...fields] })),
  };
  return new AppError(
    'stale-version',
    `${updatedBy.name} changed the draft meanwhile. ${describeChanges(changes)} Read the draft again, then make your change on it.`,
    { ...details },
  );
}
