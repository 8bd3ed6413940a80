import type { Invitation } from '#server/models/Invitation.ts';
import type { Person } from '#server/models/Person.ts';
import { allowed, forbidden, hidden, type Rules } from './decision.ts';

type PersonSubject = Pick<Person, 'id' | 'teamId'>;
type InvitationSubject = Pick<Invitation, 'teamId'>;

export interface PersonSubjects {
  /** Role, administrator switch, activity. */
  readonly 'administer-person': PersonSubject;
  /** Only administrators see invitations at all. */
  readonly 'administer-invitation': InvitationSubject;
  readonly 'change-account': PersonSubject;
}

export const personRules: Rules<PersonSubjects> = {
  'administer-person': (actor, person) => {
    if (actor.teamId !== person.teamId) return hidden;
    return actor.isAdministrator
      ? allowed
      : forbidden('Only administrators of the team change people.');
  },
  'administer-invitation': (actor, invitation) =>
    actor.teamId === invitation.teamId && actor.isAdministrator ? allowed : hidden,
  'change-account': (actor, person) => (actor.id === person.id ? allowed : hidden),
};
