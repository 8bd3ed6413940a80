import { AppError } from '#shared/errors/AppError.ts';
import { inTransaction } from '#server/models/database.ts';
import { Person } from '#server/models/Person.ts';
import { Project } from '#server/models/Project.ts';
import { ProjectMember } from '#server/models/ProjectMember.ts';
import { authorize } from '#server/policies/policy.ts';
import { notify } from '#server/workers/notifications.ts';
import { recordAudit } from './recordAudit.ts';

/** Shares the project with a person of the team, or stops sharing it; repeating it changes nothing. */
export async function shareProject(
  actor: Person,
  projectId: string,
  personId: string,
  shared: boolean,
): Promise<void> {
  await inTransaction(async (transaction) => {
    const project = await Project.lock(transaction, projectId);
    authorize(actor, 'manage-members', project);
    const { teamId } = project;
    const person = await Person.findOne({ where: { id: personId, teamId }, transaction });
    if (!person || (shared && !person.active)) {
      throw new AppError('not-found', 'There is no such active person in the team.');
    }
    if (project.memberIds.includes(personId) === shared) return;
    if (shared) {
      await ProjectMember.create({ projectId, personId, addedById: actor.id }, { transaction });
    } else {
      await ProjectMember.destroy({ where: { projectId, personId }, transaction });
    }
    await notify(transaction, projectId, { kind: 'project' });
    await recordAudit(transaction, {
      teamId,
      actorId: actor.id,
      projectId,
      action: shared ? 'project-shared' : 'project-unshared',
      details: { personId },
    });
  });
}
