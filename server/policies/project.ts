import { allowed, forbidden, hidden, type Actor, type Decision, type Rules } from './decision.ts';

/** The only part of a project that deciding needs. */
export interface ProjectSubject {
  readonly teamId: string;
  readonly memberIds: readonly string[];
}

export interface ProjectSubjects {
  readonly 'read-project': ProjectSubject;
  /** Draft, name, machine. */
  readonly 'edit-project': ProjectSubject;
  readonly 'manage-members': ProjectSubject;
}

/** Reviewers and leads read every project of their team; everybody else those shared with them. */
export function readsProject(actor: Actor, project: ProjectSubject): boolean {
  if (actor.teamId !== project.teamId) return false;
  return actor.role === 'reviewer' || actor.role === 'lead' || project.memberIds.includes(actor.id);
}

/** A designer the project is shared with: the only ones who change its frame. */
export const designs = (actor: Actor, project: ProjectSubject): boolean =>
  actor.role === 'designer' && readsProject(actor, project);

/** Hidden from those who may not read the project; otherwise allowed or forbidden with the reason. */
export function decideForReader(
  actor: Actor,
  project: ProjectSubject,
  may: boolean,
  reason: string,
): Decision {
  if (!readsProject(actor, project)) return hidden;
  return may ? allowed : forbidden(reason);
}

export const projectRules: Rules<ProjectSubjects> = {
  'read-project': (actor, project) => (readsProject(actor, project) ? allowed : hidden),
  'edit-project': (actor, project) =>
    decideForReader(
      actor,
      project,
      designs(actor, project),
      'Only designers of the project change it.',
    ),
  // Leads too: somebody has to hand a project on when its designers have left.
  'manage-members': (actor, project) =>
    decideForReader(
      actor,
      project,
      designs(actor, project) || actor.role === 'lead',
      'Only designers of the project, and leads, share it.',
    ),
};
