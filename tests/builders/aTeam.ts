import { randomUUID } from 'node:crypto';
import { createTeam } from '#server/commands/createTeam.ts';
import { inTransaction } from '#server/models/database.ts';
import type { Team } from '#server/models/Team.ts';

/** A new team, made by the same command as everybody's. */
export const aTeam = (name = 'Brackwell Machines'): Promise<Team> =>
  inTransaction((transaction) => createTeam(transaction, { id: randomUUID(), name }));
