import type { Transaction } from 'sequelize';
import { Team } from '#server/models/Team.ts';
import { recordAudit } from './recordAudit.ts';

/** A new, empty team. @param team its id is chosen by the caller, so that seeding is deterministic */
export async function createTeam(
  transaction: Transaction,
  team: { readonly id: string; readonly name: string },
): Promise<Team> {
  const created = await Team.create({ ...team }, { transaction });
  await recordAudit(transaction, {
    teamId: created.id,
    actorId: null,
    projectId: null,
    action: 'team-created',
    details: { name: created.name },
  });
  return created;
}
