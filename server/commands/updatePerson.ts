import type { Transaction } from 'sequelize';
import type { Role } from '#shared/schemas/common.ts';
import { inTransaction } from '#server/models/database.ts';
import { Person } from '#server/models/Person.ts';
import { Team } from '#server/models/Team.ts';
import { endSessions } from './endSessions.ts';
import { recordAudit } from './recordAudit.ts';

export interface PersonChange {
  readonly role?: Role | undefined;
  readonly isAdministrator?: boolean | undefined;
  readonly active?: boolean | undefined;
}

/**
 * Changes what a person may do. Ends their sessions when anything really changed.
 *
 * @throws {AppError} `conflict` when the team would be left without an active administrator
 */
export function updatePerson(
  actor: Person,
  personId: string,
  change: PersonChange,
): Promise<Person> {
  return inTransaction(async (transaction) => {
    // Two administrators who change people at the same moment do it one after the other.
    await Team.findByPk(actor.teamId, { lock: transaction.LOCK.UPDATE, transaction });
    const person = await Person.findByPk(personId, {
      lock: transaction.LOCK.UPDATE,
      transaction,
      rejectOnEmpty: true,
    });
    const { role: before } = person;
    person.set(withoutUndefined(change));
    const changed = ['role', 'isAdministrator', 'active'].filter((field) =>
      person.changed(field as keyof PersonChange),
    );
    if (changed.length === 0) return person;
    await person.save({ transaction });
    await endSessions(transaction, person);
    await recordChanges(transaction, actor, person, before, changed);
    return person;
  });
}

const withoutUndefined = (change: PersonChange): Partial<Person> =>
  Object.fromEntries(Object.entries(change).filter(([, value]) => value !== undefined));

async function recordChanges(
  transaction: Transaction,
  actor: Person,
  person: Person,
  roleBefore: Role,
  changed: readonly string[],
): Promise<void> {
  const common = { teamId: person.teamId, actorId: actor.id, projectId: null };
  const personId = person.id;
  if (changed.includes('role')) {
    const details = { personId, from: roleBefore, to: person.role };
    await recordAudit(transaction, { ...common, action: 'role-changed', details });
  }
  if (changed.includes('isAdministrator')) {
    const details = { personId, on: person.isAdministrator };
    await recordAudit(transaction, { ...common, action: 'administrator-switched', details });
  }
  if (changed.includes('active')) {
    const action = person.active ? 'person-reactivated' : 'person-deactivated';
    await recordAudit(transaction, { ...common, action, details: { personId } });
  }
}
