import { inTransaction } from '#server/models/database.ts';
import { Team } from '#server/models/Team.ts';
import { recordAudit } from './recordAudit.ts';

/** A new, empty team. @param id chosen by the caller, so that seeding is deterministic */
export function createTeam(team: { readonly id: string; readonly name: string }): Promise<Team> {
  return inTransaction(async (transaction) => {
    const created = await Team.create({ ...team }, { transaction });
    await recordAudit(transaction, {
      teamId: created.id,
      actorId: null,
      projectId: null,
      action: 'team-created',
      details: { name: created.name },
    });
    return created;
  });
}
