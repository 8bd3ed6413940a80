import { inTransaction } from '#server/models/database.ts';
import type { Person } from '#server/models/Person.ts';
import { Project } from '#server/models/Project.ts';
import { Solve } from '#server/models/Solve.ts';
import { authorize } from '#server/policies/policy.ts';
import { notify } from '#server/workers/notifications.ts';
import { recordAudit } from './recordAudit.ts';

/**
 * Ends a queued or running solve; one that has ended stays as it is. The runner that has it hears of it by
 * the notification and terminates the solver thread.
 */
export async function cancelSolve(person: Person, solve: Solve): Promise<void> {
  const { id, projectId } = solve;
  await inTransaction(async (transaction) => {
    const project = await Project.lock(transaction, projectId);
    authorize(person, 'solve-project', project);
    const [cancelled] = await Solve.update(
      { status: 'cancelled', stage: '', finishedAt: new Date() },
      { where: { id, status: ['queued', 'running'] }, transaction },
    );
    if (cancelled === 0) return;
    await notify(transaction, projectId, {
      kind: 'solve',
      solveId: id,
      status: 'cancelled',
      progress: solve.progress,
    });
    await recordAudit(transaction, {
      teamId: project.teamId,
      actorId: person.id,
      projectId,
      action: 'solve-cancelled',
      details: { solveId: id, method: solve.method },
    });
  });
}
