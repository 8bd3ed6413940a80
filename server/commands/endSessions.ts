import type { Transaction } from 'sequelize';
import { database } from '#server/models/database.ts';
import type { Person } from '#server/models/Person.ts';

/**
 * Ends every session of the person. Raising the epoch is what does it, also for a session that begins at this
 * very moment; deleting the rows only tidies up.
 */
export async function endSessions(transaction: Transaction, person: Person): Promise<void> {
  await person.increment('sessionEpoch', { transaction });
  await person.reload({ transaction });
  await database().query(
    `DELETE FROM sessions WHERE sess #>> '{passport,user,personId}' = :personId`,
    { replacements: { personId: person.id }, transaction },
  );
}
