import { AppError } from '#shared/errors/AppError.ts';
import type { Actor, Decision, Rules } from './decision.ts';
import { personRules, type PersonSubjects } from './person.ts';
import { projectRules, type ProjectSubjects } from './project.ts';
import { revisionRules, type RevisionSubjects } from './revision.ts';
import { solveRules, type SolveSubjects } from './solve.ts';
import { teamRules, type TeamSubjects } from './team.ts';

/** What each action is done to. */
interface Subjects
  extends TeamSubjects, PersonSubjects, ProjectSubjects, SolveSubjects, RevisionSubjects {}

/** Everything that can be asked of the policy layer. */
export type Action = keyof Subjects;

const rules: Rules<Subjects> = {
  ...teamRules,
  ...personRules,
  ...projectRules,
  ...solveRules,
  ...revisionRules,
};

/** The decision on one action; presenters turn it into `abilities`. */
export function decide<A extends Action>(actor: Actor, action: A, subject: Subjects[A]): Decision {
  return rules[action](actor, subject);
}

/** Whether the person may do it. */
export function can<A extends Action>(actor: Actor, action: A, subject: Subjects[A]): boolean {
  return decide(actor, action, subject).kind === 'allowed';
}

/**
 * Lets the request go on, or ends it.
 *
 * @param subject null or undefined when there is no such thing: the same answer as when it is hidden
 * @throws {AppError} `not-found` when they may not read it, `forbidden` when they may read but not act
 */
export function authorize<A extends Action, S extends Subjects[A]>(
  actor: Actor,
  action: A,
  subject: S | null | undefined,
): asserts subject is S {
  const decision: Decision = subject ? decide(actor, action, subject) : { kind: 'hidden' };
  if (decision.kind === 'hidden') {
    throw new AppError('not-found', 'There is no such thing, or it is not shared with you.');
  }
  if (decision.kind === 'forbidden') throw new AppError('forbidden', decision.reason);
}
