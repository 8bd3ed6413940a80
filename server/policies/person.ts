import type { Person } from '#server/models/Person.ts';
import { allowed, forbidden, hidden, type Rules } from './decision.ts';

type PersonSubject = Pick<Person, 'id' | 'teamId'>;

export interface PersonSubjects {
  /** Role, administrator switch, activity. */
  readonly 'administer-person': PersonSubject;
  readonly 'change-account': PersonSubject;
}

export const personRules: Rules<PersonSubjects> = {
  'administer-person': (actor, person) => {
    if (actor.teamId !== person.teamId) return hidden;
    return actor.isAdministrator
      ? allowed
      : forbidden('Only administrators of the team change people.');
  },
  'change-account': (actor, person) => (actor.id === person.id ? allowed : hidden),
};
