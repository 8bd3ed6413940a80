import { Person } from '#server/models/Person.ts';
import { Team } from '#server/models/Team.ts';
import { verifyPassword } from './password.ts';

/** Who signs in with this address and password; null when there is no such active person. */
export async function verifyCredentials(email: string, password: string): Promise<Person | null> {
  const person = await Person.findOne({
    where: { email, active: true },
    include: { model: Team, as: 'team' },
  });
  return (await verifyPassword(person?.passwordHash ?? null, password)) ? person : null;
}
