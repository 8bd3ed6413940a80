import { AppError } from '#shared/errors/AppError.ts';
import { inTransaction } from '#server/models/database.ts';
import { Person } from '#server/models/Person.ts';
import { endSessions } from './endSessions.ts';
import { hashPassword, verifyPassword } from './password.ts';
import { recordAudit } from './recordAudit.ts';

/**
 * Changes one's own password and ends every session; the caller begins a new one.
 *
 * @throws {AppError} `wrong-credentials` when the current password is not the current one
 */
export async function changePassword(
  person: Person,
  currentPassword: string,
  newPassword: string,
): Promise<void> {
  await requirePassword(person, currentPassword, 'currentPassword');
  const passwordHash = await hashPassword(newPassword);
  await inTransaction(async (transaction) => {
    await Person.update({ passwordHash }, { where: { id: person.id }, transaction });
    await endSessions(transaction, person);
    await recordAudit(transaction, {
      teamId: person.teamId,
      actorId: person.id,
      projectId: null,
      action: 'password-changed',
      details: { personId: person.id },
    });
  });
}

/**
 * Lets somebody signed in prove that it is still them. Limit the attempts (`password-person`).
 *
 * @param path of the field the password came in
 * @throws {AppError} `wrong-credentials`
 */
export async function requirePassword(
  person: Person,
  password: string,
  path: string,
): Promise<void> {
  if (await verifyPassword(person.passwordHash, password)) return;
  throw new AppError('wrong-credentials', 'The password is not right.', {
    issues: [{ path, message: 'The password is not right.' }],
  });
}
