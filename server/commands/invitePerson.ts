import type { Transaction } from 'sequelize';
import { AppError } from '#shared/errors/AppError.ts';
import type { Role } from '#shared/schemas/common.ts';
import { inTransaction } from '#server/models/database.ts';
import { Invitation } from '#server/models/Invitation.ts';
import { Person } from '#server/models/Person.ts';
import { Team } from '#server/models/Team.ts';
import { enqueue } from '#server/workers/jobs.ts';
import { recordAudit } from './recordAudit.ts';

const INVITATION_DAYS = 7;

export interface InvitationRequest {
  readonly email: string;
  readonly role: Role;
  readonly isAdministrator: boolean;
}

/**
 * Invites an address into the actor's team and queues the mail. An open invitation of the same address is
 * renewed: its earlier link stops working.
 *
 * @throws {AppError} `conflict` when the address is a person of the team
 */
export function invitePerson(actor: Person, request: InvitationRequest): Promise<Invitation> {
  const { teamId } = actor;
  return inTransaction(async (transaction) => {
    // One invitation of a team at a time: two of the same address would race.
    await Team.findByPk(teamId, { lock: transaction.LOCK.UPDATE, transaction });
    await refuseMember(teamId, request.email, transaction);
    const values = {
      ...request,
      invitedById: actor.id,
      tokenHash: null,
      expiresAt: new Date(Date.now() + INVITATION_DAYS * 86_400_000),
    };
    const open = await Invitation.findOne({
      where: { teamId, email: request.email, acceptedAt: null },
      transaction,
    });
    const invitation = open
      ? await open.update(values, { transaction })
      : await Invitation.create({ teamId, ...values }, { transaction });
    await enqueue(transaction, 'mail', { kind: 'invitation', invitationId: invitation.id });
    await recordAudit(transaction, {
      teamId,
      actorId: actor.id,
      projectId: null,
      action: 'person-invited',
      details: {
        invitationId: invitation.id,
        role: request.role,
        isAdministrator: request.isAdministrator,
      },
    });
    invitation.invitedBy = actor;
    return invitation;
  });
}

async function refuseMember(
  teamId: string,
  email: string,
  transaction: Transaction,
): Promise<void> {
  if ((await Person.count({ where: { teamId, email }, transaction })) > 0) {
    throw new AppError('conflict', 'Somebody with this e-mail address is in the team already.', {
      issues: [{ path: 'email', message: 'Is in the team already.' }],
    });
  }
}
