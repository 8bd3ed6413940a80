import { AppError } from '#shared/errors/AppError.ts';
import {
  cancelSolve as cancelSolveContract,
  createSolves,
  listSolves as listSolvesContract,
  readSolve,
  readSolveShapes,
} from '#shared/schemas/solve.ts';
import { cancelSolve } from '#server/commands/cancelSolve.ts';
import { listSolves, reloadSolves, type ListedSolve } from '#server/commands/listSolves.ts';
import { requestSolves } from '#server/commands/requestSolves.ts';
import { handle, type Route } from '#server/middlewares/handle.ts';
import { Person } from '#server/models/Person.ts';
import { Project } from '#server/models/Project.ts';
import { Revision } from '#server/models/Revision.ts';
import { Solve } from '#server/models/Solve.ts';
import { SolveResult } from '#server/models/SolveResult.ts';
import { authorize } from '#server/policies/policy.ts';
import { presentSolve, presentSolveBrief } from '#server/presenters/solve.ts';

export const solveRoutes = (): readonly Route[] => [
  handle(createSolves, async ({ person, input }) => {
    const solves = await requestSolves(person, input.body);
    const project = await Project.load(input.body.projectId);
    authorize(person, 'read-project', project);
    return { solves: presentAll(person, project, await reloadSolves(solves.map(({ id }) => id))) };
  }),

  handle(listSolvesContract, async ({ person, input }) => {
    const { projectId, revisionId, fingerprint } = input.query;
    const project = await Project.load(projectId);
    authorize(person, 'read-project', project);
    const document =
      revisionId === undefined ? fingerprint : await frozenFingerprint(projectId, revisionId);
    return { solves: presentAll(person, project, await listSolves(projectId, document)) };
  }),

  handle(readSolve, async ({ person, input }) => {
    const { solve, project } = await loadSolve(person, input.params.solveId);
    const result = solve.status === 'done' ? await loadResult(solve) : null;
    return presentSolve(person, project, solve, result);
  }),

  handle(readSolveShapes, async ({ person, input, response }) => {
    const { solve } = await loadSolve(person, input.params.solveId);
    const result =
      solve.status === 'done'
        ? await SolveResult.findOne({
            attributes: ['shapes', 'shapesFingerprint'],
            where: { teamId: solve.teamId, key: solve.resultKey },
          })
        : null;
    if (!result) throw new AppError('not-found', 'This solve has no shapes (yet).');
    // A stored result never changes, but who may read it does: the browser asks again each time.
    response
      .set({ 'Cache-Control': 'private, no-cache', ETag: `"${result.shapesFingerprint}"` })
      .type('application/octet-stream')
      .send(result.shapes);
  }),

  handle(cancelSolveContract, async ({ person, input }) => {
    const { solve, project } = await loadSolve(person, input.params.solveId);
    await cancelSolve(person, solve);
    const [listed] = await reloadSolves([solve.id]);
    if (!listed) throw new Error('The solve is gone.');
    return presentSolveBrief(person, project, listed.solve, listed.result);
  }),
];

const presentAll = (person: Person, project: Project, listed: readonly ListedSolve[]) =>
  listed.map(({ solve, result }) => presentSolveBrief(person, project, solve, result));

/** @throws {AppError} `not-found` also when the project is hidden from the person */
async function loadSolve(
  person: Person,
  id: string,
): Promise<{ readonly solve: Solve; readonly project: Project }> {
  const solve = await Solve.findByPk(id, { include: [{ model: Person, as: 'requestedBy' }] });
  const project = solve && (await Project.load(solve.projectId));
  authorize(person, 'read-project', project);
  if (!solve) throw new Error('A project without the solve it was found by.');
  return { solve, project };
}

const loadResult = ({ teamId, resultKey: key }: Solve): Promise<SolveResult> =>
  SolveResult.findOne({
    attributes: { exclude: ['shapes'] },
    where: { teamId, key },
    rejectOnEmpty: true,
  });

async function frozenFingerprint(projectId: string, revisionId: string): Promise<string> {
  const revision = await Revision.findOne({ where: { id: revisionId, projectId } });
  if (!revision) throw new AppError('not-found', 'There is no such revision in this project.');
  return revision.documentFingerprint;
}
