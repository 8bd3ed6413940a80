import type { NewPerson } from '#server/commands/createPerson.ts';

/** The invented maker of process machines whose frames the demo is about. */
export const TEAM = {
  id: '6f2d7c1e-3a54-4f0b-9c86-51d2a7be0001',
  name: 'Ellerby Process Machines',
};

/** One pass phrase for all: the demo goes into a private database on this machine only. */
export const PASSWORD = 'slow river under granite';

const person = (
  last: number,
  name: string,
  role: NewPerson['role'],
  isAdministrator = false,
): NewPerson & { readonly id: string } => ({
  id: `6f2d7c1e-3a54-4f0b-9c86-51d2a7be010${last}`,
  teamId: TEAM.id,
  name,
  email: `${(name.split(' ')[0] ?? name).toLowerCase()}@ellerby.example`,
  password: PASSWORD,
  role,
  isAdministrator,
});

export const PEOPLE = {
  noor: person(1, 'Noor Hadley', 'guest'),
  tomas: person(2, 'Tomas Wick', 'technician'),
  mira: person(3, 'Mira Castellan', 'designer'),
  jonah: person(4, 'Jonah Prewitt', 'designer'),
  agnes: person(5, 'Agnes Lorne', 'reviewer'),
  viktor: person(6, 'Viktor Amsel', 'lead'),
  petra: person(7, 'Petra Quill', 'technician', true),
} as const;

/** What `npm start` prints: one sign-in for each role and one for the administrator switch. */
export const demoSignIns = [
  { role: 'guest', email: PEOPLE.noor.email, password: PASSWORD },
  { role: 'technician', email: PEOPLE.tomas.email, password: PASSWORD },
  { role: 'designer', email: PEOPLE.mira.email, password: PASSWORD },
  { role: 'reviewer', email: PEOPLE.agnes.email, password: PASSWORD },
  { role: 'lead', email: PEOPLE.viktor.email, password: PASSWORD },
  { role: 'administrator', email: PEOPLE.petra.email, password: PASSWORD },
] as const;
