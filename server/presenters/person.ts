import type { PersonBrief } from '#shared/schemas/common.ts';
import type { SignedInPerson } from '#shared/schemas/session.ts';
import type { Person } from '#server/models/Person.ts';
import { can } from '#server/policies/policy.ts';

/** A person as every member of the team sees them. */
export const presentPerson = (person: Person): PersonBrief => ({
  id: person.id,
  name: person.name,
  role: person.role,
});

/**
 * The person signed in, to themselves.
 *
 * @param person with `team` loaded
 * @param mailIsLocal whether there is sent mail to read at all
 */
export function presentSignedInPerson(person: Person, mailIsLocal: boolean): SignedInPerson {
  const { team } = person;
  if (team === undefined) throw new Error('The team of the person is not loaded.');
  return {
    id: person.id,
    name: person.name,
    email: person.email,
    role: person.role,
    isAdministrator: person.isAdministrator,
    units: person.units,
    theme: person.theme,
    team: { id: team.id, name: team.name },
    abilities: {
      createProject: can(person, 'create-project', team),
      administerTeam: can(person, 'administer-team', team),
      readSentMail: mailIsLocal && can(person, 'read-sent-mail', team),
    },
  };
}
