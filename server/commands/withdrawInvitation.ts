import { inTransaction } from '#server/models/database.ts';
import { Invitation } from '#server/models/Invitation.ts';
import type { Person } from '#server/models/Person.ts';
import { recordAudit } from './recordAudit.ts';

/** Takes an open invitation back: its link stops working. Doing it twice is the same as once. */
export function withdrawInvitation(actor: Person, invitation: Invitation): Promise<void> {
  return inTransaction(async (transaction) => {
    const removed = await Invitation.destroy({
      where: { id: invitation.id, acceptedAt: null },
      transaction,
    });
    if (removed === 0) return;
    await recordAudit(transaction, {
      teamId: invitation.teamId,
      actorId: actor.id,
      projectId: null,
      action: 'invitation-withdrawn',
      details: { invitationId: invitation.id },
    });
  });
}
