import { allowed, forbidden, hidden, type Actor, type Decision, type Rules } from './decision.ts';

/** The only part of a team that deciding needs. */
interface TeamSubject {
  readonly id: string;
}

export interface TeamSubjects {
  readonly 'read-team': TeamSubject;
  /** Name, settings, invitations. */
  readonly 'administer-team': TeamSubject;
  readonly 'read-sent-mail': TeamSubject;
  /** Who joined, whose role changed; what happens in a project goes by `read-project`. */
  readonly 'read-team-activity': TeamSubject;
  readonly 'create-project': TeamSubject;
}

const administers = (actor: Actor, team: TeamSubject): Decision => {
  if (actor.teamId !== team.id) return hidden;
  return actor.isAdministrator ? allowed : forbidden('Only administrators of the team do this.');
};

const belongs = (actor: Actor, team: TeamSubject): Decision =>
  actor.teamId === team.id ? allowed : hidden;

export const teamRules: Rules<TeamSubjects> = {
  'read-team': belongs,
  'administer-team': administers,
  'read-sent-mail': administers,
  'read-team-activity': (actor, team) => {
    if (actor.teamId !== team.id) return hidden;
    return actor.role === 'guest' ? forbidden('Guests see their projects only.') : allowed;
  },
  'create-project': (actor, team) => {
    if (actor.teamId !== team.id) return hidden;
    return actor.role === 'designer' ? allowed : forbidden('Only designers make projects.');
  },
};
