import type { Theme } from '#shared/schemas/session.ts';
import type { Person } from '#server/models/Person.ts';
import type { UnitSystem } from '#shared/units/displayUnits.ts';

export interface AccountChange {
  readonly name?: string | undefined;
  readonly units?: UnitSystem | undefined;
  readonly theme?: Theme | undefined;
}

/** Changes one's own name and habits; of the fields left out nothing changes. */
export function updateAccount(person: Person, change: AccountChange): Promise<Person> {
  return person.update({
    name: change.name ?? person.name,
    units: change.units ?? person.units,
    theme: change.theme ?? person.theme,
  });
}
