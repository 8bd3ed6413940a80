import type { z } from 'zod';
import { AppError } from '#shared/errors/AppError.ts';
import { readForm } from '#shared/frame/checks/readForm.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { createProject as contract } from '#shared/schemas/project.ts';
import { inTransaction } from '#server/models/database.ts';
import { Draft } from '#server/models/Draft.ts';
import { DraftVersion } from '#server/models/DraftVersion.ts';
import { FrameDocumentRecord } from '#server/models/FrameDocumentRecord.ts';
import type { Person } from '#server/models/Person.ts';
import { Project } from '#server/models/Project.ts';
import { ProjectMember } from '#server/models/ProjectMember.ts';
import { authorize } from '#server/policies/policy.ts';
import { recordAudit } from './recordAudit.ts';

/**
 * The document as it may be stored in a draft: well formed, though perhaps not finished.
 *
 * @throws {AppError} `invalid-document` with every fault of its form
 */
export function requireForm(input: unknown): FrameDocument {
  const { document, issues } = readForm(input);
  if (document === null) {
    throw new AppError('invalid-document', 'The frame document is not well formed.', { issues });
  }
  return document;
}

/**
 * Makes a project with its first draft; its maker is its first member. Repeating it with the same id gives
 * the project that is there.
 */
export async function createProject(
  person: Person,
  input: z.output<typeof contract.body>,
): Promise<void> {
  const { teamId } = person;
  authorize(person, 'create-project', { id: teamId });
  const document = requireForm(input.document);
  await inTransaction(async (transaction) => {
    const existing = await Project.findByPk(input.id, { transaction });
    if (existing?.teamId === teamId && existing.createdById === person.id) return;
    if (existing) throw new AppError('conflict', 'This id is taken: choose another.');
    const fingerprint = await FrameDocumentRecord.store(transaction, teamId, document);
    const project = await Project.create(
      { id: input.id, teamId, name: input.name, machine: input.machine, createdById: person.id },
      { transaction },
    );
    await ProjectMember.create(
      { projectId: project.id, personId: person.id, addedById: person.id },
      { transaction },
    );
    await Draft.create(
      { projectId: project.id, teamId, version: 1, fingerprint, updatedById: person.id },
      { transaction },
    );
    await DraftVersion.create(
      { projectId: project.id, version: 1, teamId, fingerprint, writtenById: person.id },
      { transaction },
    );
    await recordAudit(transaction, {
      teamId,
      actorId: person.id,
      projectId: project.id,
      action: 'project-created',
      details: { name: project.name },
    });
  });
}
