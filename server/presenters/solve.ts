import type { SolveBrief, SolveResponse } from '#shared/schemas/solve.ts';
import { solveSummary, type SolveSummary } from '#shared/schemas/solveResult.ts';
import type { Person } from '#server/models/Person.ts';
import type { Solve } from '#server/models/Solve.ts';
import type { SolveResult } from '#server/models/SolveResult.ts';
import { can } from '#server/policies/policy.ts';
import type { ProjectSubject } from '#server/policies/project.ts';
import { presentPerson } from './person.ts';

/**
 * One solve without its summary.
 *
 * @param solve with `requestedBy` loaded
 * @param result null until it is in
 */
export function presentSolveBrief(
  person: Person,
  project: ProjectSubject,
  solve: Solve,
  result: Pick<SolveResult, 'complete' | 'firstFrequencyHz'> | null,
): SolveBrief {
  if (solve.requestedBy === undefined) throw new Error('Who asked for the solve is not loaded.');
  const { error } = solve;
  const underWay = solve.status === 'queued' || solve.status === 'running';
  return {
    id: solve.id,
    projectId: solve.projectId,
    revisionId: solve.revisionId,
    documentFingerprint: solve.documentFingerprint,
    stateId: solve.stateId,
    method: solve.method,
    settings: solve.settings,
    solverVersion: solve.solverVersion,
    status: solve.status,
    progress: solve.progress,
    stage: solve.stage,
    complete: result?.complete ?? null,
    firstFrequencyHz: result?.firstFrequencyHz ?? null,
    error: error && {
      code: error.code,
      message: error.message,
      issues: (error.details.issues ?? []).map(({ path, message }) => ({ path, message })),
    },
    requestedBy: presentPerson(solve.requestedBy),
    requestedAt: solve.requestedAt.toISOString(),
    finishedAt: solve.finishedAt?.toISOString() ?? null,
    elapsedMs: solve.elapsedMs,
    abilities: { cancel: underWay && can(person, 'solve-project', project) },
  };
}

/** One solve with its summary; the stored result carries its timing apart. */
export function presentSolve(
  person: Person,
  project: ProjectSubject,
  solve: Solve,
  result: SolveResult | null,
): SolveResponse {
  return {
    ...presentSolveBrief(person, project, solve, result),
    summary: result && presentSummary(result),
  };
}

function presentSummary({ summary, timing }: SolveResult): SolveSummary {
  const stored = JSON.parse(summary) as object;
  return solveSummary.parse({ ...stored, timing });
}
