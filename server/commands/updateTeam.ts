import type { TeamSettings } from '#shared/schemas/team.ts';
import { inTransaction } from '#server/models/database.ts';
import type { Person } from '#server/models/Person.ts';
import { Team } from '#server/models/Team.ts';
import { recordAudit } from './recordAudit.ts';

export interface TeamChange {
  readonly name?: string | undefined;
  readonly settings?:
    { readonly [K in keyof TeamSettings]?: TeamSettings[K] | undefined } | undefined;
}

/** Changes the name or the settings of the actor's team; saying what is so already records nothing. */
export function updateTeam(actor: Person, change: TeamChange): Promise<Team> {
  return inTransaction(async (transaction) => {
    const team = await Team.findByPk(actor.teamId, {
      lock: transaction.LOCK.UPDATE,
      transaction,
      rejectOnEmpty: true,
    });
    const from = team.name;
    const { settings = {} } = change;
    team.set({
      name: change.name ?? team.name,
      soleReviewerMayApprove: settings.soleReviewerMayApprove ?? team.soleReviewerMayApprove,
      requiredReviews: settings.requiredReviews ?? team.requiredReviews,
    });
    const isRenamed = team.changed('name');
    const { soleReviewerMayApprove, requiredReviews } = team;
    const isSetAnew = team.changed('soleReviewerMayApprove') || team.changed('requiredReviews');
    await team.save({ transaction });
    const common = { teamId: team.id, actorId: actor.id, projectId: null };
    if (isRenamed) {
      const details = { from, to: team.name };
      await recordAudit(transaction, { ...common, action: 'team-renamed', details });
    }
    if (isSetAnew) {
      const details = { soleReviewerMayApprove, requiredReviews };
      await recordAudit(transaction, { ...common, action: 'team-settings-changed', details });
    }
    return team;
  });
}
