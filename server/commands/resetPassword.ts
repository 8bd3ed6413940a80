import { Op } from 'sequelize';
import { AppError } from '#shared/errors/AppError.ts';
import { inTransaction } from '#server/models/database.ts';
import { PasswordReset } from '#server/models/PasswordReset.ts';
import { Person } from '#server/models/Person.ts';
import { enqueue } from '#server/workers/jobs.ts';
import { endSessions } from './endSessions.ts';
import { hashPassword } from './password.ts';
import { recordAudit } from './recordAudit.ts';
import { tokenHash } from './token.ts';

/** Queues a mail with a reset link; nothing here, not even the time taken, depends on who has the address. */
export function requestPasswordReset(email: string): Promise<void> {
  return inTransaction((transaction) =>
    enqueue(transaction, 'mail', { kind: 'password-reset', email }),
  );
}

/**
 * Sets a new password by the token of a reset link, ends every session and makes every other reset link of the
 * person worthless.
 *
 * @throws {AppError} `token-expired` when the token is used, replaced, too old or made up
 */
export async function resetPassword(token: string, password: string): Promise<void> {
  const passwordHash = await hashPassword(password);
  await inTransaction(async (transaction) => {
    const reset = await PasswordReset.findOne({
      where: {
        tokenHash: tokenHash(token),
        usedAt: null,
        expiresAt: { [Op.gt]: new Date() },
      },
      lock: true,
      transaction,
    });
    const person = reset && (await Person.findByPk(reset.personId, { lock: true, transaction }));
    if (!person?.active) {
      throw new AppError(
        'token-expired',
        'This link was used or is too old: ask for a new one at the sign-in page.',
      );
    }
    await PasswordReset.update(
      { usedAt: new Date() },
      { where: { personId: person.id, usedAt: null }, transaction },
    );
    await person.update({ passwordHash }, { transaction });
    await endSessions(transaction, person);
    await recordAudit(transaction, {
      teamId: person.teamId,
      actorId: person.id,
      projectId: null,
      action: 'password-reset',
      details: { personId: person.id },
    });
  });
}
