import type { Transaction } from 'sequelize';
import type { Role } from '#shared/schemas/common.ts';
import { Person } from '#server/models/Person.ts';
import type { UnitSystem } from '#shared/units/displayUnits.ts';
import { hashPassword } from './password.ts';
import { recordAudit } from './recordAudit.ts';

export interface NewPerson {
  readonly id?: string;
  readonly teamId: string;
  readonly name: string;
  /** Lower case. */
  readonly email: string;
  readonly password: string;
  readonly role: Role;
  readonly isAdministrator: boolean;
  readonly units?: UnitSystem;
}

/**
 * Adds a person to a team.
 *
 * @throws {AppError} `conflict` from the surrounding `inTransaction` when the address has an account
 */
export async function createPerson(
  transaction: Transaction,
  { password, ...attributes }: NewPerson,
): Promise<Person> {
  const passwordHash = await hashPassword(password);
  const person = await Person.create({ ...attributes, passwordHash }, { transaction });
  await recordAudit(transaction, {
    teamId: person.teamId,
    actorId: person.id,
    projectId: null,
    action: 'person-joined',
    details: { personId: person.id, role: person.role, isAdministrator: person.isAdministrator },
  });
  return person;
}
