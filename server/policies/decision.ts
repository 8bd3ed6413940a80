import type { Person } from '#server/models/Person.ts';

/** What deciding needs to know of the person who asks. */
export type Actor = Pick<Person, 'id' | 'teamId' | 'role' | 'isAdministrator'>;

/** `hidden`: they may not even know that it exists. `forbidden`: they see it, but may not do that. */
export type Decision =
  | { readonly kind: 'allowed' }
  | { readonly kind: 'hidden' }
  | { readonly kind: 'forbidden'; readonly reason: string };

export const allowed: Decision = { kind: 'allowed' };
export const hidden: Decision = { kind: 'hidden' };
export const forbidden = (reason: string): Decision => ({ kind: 'forbidden', reason });

/** One rule per action of a feature. */
export type Rules<Subjects> = {
  readonly [A in keyof Subjects]: (actor: Actor, subject: Subjects[A]) => Decision;
};
