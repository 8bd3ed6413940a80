import { randomUUID } from 'node:crypto';
import { createPerson, type NewPerson } from '#server/commands/createPerson.ts';
import { inTransaction } from '#server/models/database.ts';
import type { Person } from '#server/models/Person.ts';
import type { Team } from '#server/models/Team.ts';

/** What every person of the builders signs in with. */
export const PASSWORD = 'seven small rivets in a row';

/** A new person of the team: a designer without the administrator switch unless said otherwise. */
export function aPerson(team: Team, overrides: Partial<NewPerson> = {}): Promise<Person> {
  return inTransaction(async (transaction) => {
    const person = await createPerson(transaction, {
      teamId: team.id,
      name: 'Ida Merrow',
      email: `${randomUUID()}@example.com`,
      password: PASSWORD,
      role: 'designer',
      isAdministrator: false,
      ...overrides,
    });
    person.team = team;
    return person;
  });
}

/** An administrator of the team; a lead unless said otherwise. */
export const anAdministrator = (team: Team, overrides: Partial<NewPerson> = {}): Promise<Person> =>
  aPerson(team, { name: 'Tomas Quell', role: 'lead', isAdministrator: true, ...overrides });
