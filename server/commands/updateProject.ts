import type { z } from 'zod';
import type { updateProject as contract } from '#shared/schemas/project.ts';
import { inTransaction } from '#server/models/database.ts';
import type { Person } from '#server/models/Person.ts';
import { Project } from '#server/models/Project.ts';
import { authorize } from '#server/policies/policy.ts';
import { notify } from '#server/workers/notifications.ts';
import { recordAudit } from './recordAudit.ts';

/** Renames a project or its machine. */
export async function updateProject(
  person: Person,
  projectId: string,
  input: z.output<typeof contract.body>,
): Promise<void> {
  await inTransaction(async (transaction) => {
    const project = await Project.lock(transaction, projectId);
    authorize(person, 'edit-project', project);
    const { name = project.name, machine = project.machine } = input;
    if (name === project.name && machine === project.machine) return;
    await project.update({ name, machine, updatedAt: new Date() }, { transaction });
    await notify(transaction, projectId, { kind: 'project' });
    await recordAudit(transaction, {
      teamId: project.teamId,
      actorId: person.id,
      projectId,
      action: 'project-changed',
      details: { name, machine },
    });
  });
}
