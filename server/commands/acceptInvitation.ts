import { Op, type Transaction } from 'sequelize';
import { AppError } from '#shared/errors/AppError.ts';
import { inTransaction } from '#server/models/database.ts';
import { Invitation } from '#server/models/Invitation.ts';
import type { Person } from '#server/models/Person.ts';
import { Team } from '#server/models/Team.ts';
import { createPerson } from './createPerson.ts';
import { tokenHash } from './token.ts';

/**
 * The open invitation that a token belongs to, with its team.
 *
 * @throws {AppError} `token-expired` when the token is used, withdrawn, replaced, too old or made up
 */
export async function findInvitation(
  token: string,
  transaction?: Transaction,
): Promise<Invitation & { team: Team }> {
  const invitation = await Invitation.findOne({
    where: {
      tokenHash: tokenHash(token),
      acceptedAt: null,
      expiresAt: { [Op.gt]: new Date() },
    },
    include: { model: Team, as: 'team', required: true },
    ...(transaction
      ? { transaction, lock: { level: transaction.LOCK.UPDATE, of: Invitation } }
      : {}),
  });
  if (invitation?.team === undefined) {
    throw new AppError(
      'token-expired',
      'This invitation was used, taken back or is too old: ask for a new one.',
    );
  }
  return Object.assign(invitation, { team: invitation.team });
}

/**
 * Joins the team that the token invites to. The token works once.
 *
 * @returns the new person, with `team` loaded
 * @throws {AppError} `token-expired`; `conflict` when the address has an account already
 */
export function acceptInvitation(token: string, name: string, password: string): Promise<Person> {
  return inTransaction(async (transaction) => {
    const invitation = await findInvitation(token, transaction);
    const { teamId, email, role, isAdministrator, team } = invitation;
    const acceptedAt = new Date();
    await invitation.update({ acceptedAt, tokenHash: null }, { transaction });
    const person = await createPerson(transaction, {
      ...{ teamId, name, email, password, role, isAdministrator },
    });
    await person.update({ lastSignInAt: acceptedAt }, { transaction });
    person.team = team;
    return person;
  });
}
