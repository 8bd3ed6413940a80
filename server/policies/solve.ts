import type { Rules } from './decision.ts';
import { decideForReader, designs, type ProjectSubject } from './project.ts';

export interface SolveSubjects {
  /** Asking for a solve in the project, and cancelling one. */
  readonly 'solve-project': ProjectSubject;
}

export const solveRules: Rules<SolveSubjects> = {
  'solve-project': (actor, project) =>
    decideForReader(
      actor,
      project,
      designs(actor, project) || actor.role === 'reviewer' || actor.role === 'lead',
      'Only designers of the project, reviewers and leads solve.',
    ),
};
