import { QueryTypes } from 'sequelize';
import { database } from '#server/models/database.ts';
import { Person } from '#server/models/Person.ts';
import { Solve } from '#server/models/Solve.ts';
import { SolveResult } from '#server/models/SolveResult.ts';

/** What lists need of a result, without the summary and the shapes. */
export type ResultBrief = Pick<SolveResult, 'key' | 'complete' | 'firstFrequencyHz'>;

export interface ListedSolve {
  readonly solve: Solve;
  /** Null until it is in. */
  readonly result: ResultBrief | null;
}

const MOST_LISTED = 1_000;

/**
 * The newest solve per document, state, method and settings of a project, newest first.
 *
 * @param fingerprint only those of this document
 */
export async function listSolves(projectId: string, fingerprint?: string): Promise<ListedSolve[]> {
  const newest = await database().query<{ id: string }>(
    `SELECT DISTINCT ON (document_fingerprint, state_id, method, settings) id
       FROM solves
      WHERE project_id = :projectId AND (:fingerprint = '' OR document_fingerprint = :fingerprint)
      ORDER BY document_fingerprint, state_id, method, settings, requested_at DESC`,
    { type: QueryTypes.SELECT, replacements: { projectId, fingerprint: fingerprint ?? '' } },
  );
  const solves = await Solve.findAll({
    where: { id: newest.map(({ id }) => id) },
    include: [{ model: Person, as: 'requestedBy' }],
    order: [['requestedAt', 'DESC']],
    limit: MOST_LISTED,
  });
  return withResults(solves);
}

/** Solves again from the database, in their order, with who asked and the results. */
export async function reloadSolves(ids: readonly string[]): Promise<ListedSolve[]> {
  const solves = await Solve.findAll({
    where: { id: [...ids] },
    include: [{ model: Person, as: 'requestedBy' }],
  });
  solves.sort((a, b) => ids.indexOf(a.id) - ids.indexOf(b.id));
  return withResults(solves);
}

async function withResults(solves: readonly Solve[]): Promise<ListedSolve[]> {
  const done = solves.filter(({ status }) => status === 'done');
  const [first] = done;
  const results = first
    ? await SolveResult.findAll({
        attributes: ['key', 'complete', 'firstFrequencyHz'],
        where: { teamId: first.teamId, key: done.map(({ resultKey }) => resultKey) },
      })
    : [];
  const byKey = new Map(results.map((result) => [result.key, result]));
  return solves.map((solve) => ({
    solve,
    result: solve.status === 'done' ? (byKey.get(solve.resultKey) ?? null) : null,
  }));
}
