import { randomUUID } from 'node:crypto';
import type { Transaction } from 'sequelize';
import type { z } from 'zod';
import { AppError } from '#shared/errors/AppError.ts';
import { SOLVER_VERSION } from '#shared/analysis/solverVersion.ts';
import { checkDocument } from '#shared/frame/checkDocument.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { createSolves as contract } from '#shared/schemas/solve.ts';
import { inTransaction } from '#server/models/database.ts';
import { Draft } from '#server/models/Draft.ts';
import { FrameDocumentRecord } from '#server/models/FrameDocumentRecord.ts';
import type { Person } from '#server/models/Person.ts';
import { Project } from '#server/models/Project.ts';
import { Revision } from '#server/models/Revision.ts';
import { Solve } from '#server/models/Solve.ts';
import { resultKey, SolveResult, type ResultSubject } from '#server/models/SolveResult.ts';
import { authorize } from '#server/policies/policy.ts';
import { notify } from '#server/workers/notifications.ts';
import { queueSolve } from '#server/workers/solveQueue.ts';
import { recordAudit } from './recordAudit.ts';

/** Solves of one project that may wait or run at once: three methods in each of the 50 states of a document. */
const MOST_UNDER_WAY = 150;

type Input = z.output<typeof contract.body>;

/**
 * Asks for one solve per method. A solve of the same document, state, settings and solver version that the
 * project has, done or under way, is given instead of a second one; a result stored anywhere in the team is
 * taken at once.
 *
 * @throws {AppError} `invalid-document` with every reason why the document cannot be solved
 */
export async function requestSolves(person: Person, input: Input): Promise<Solve[]> {
  const loaded = await Project.load(input.projectId);
  authorize(person, 'solve-project', loaded);
  const fingerprint = await documentToSolve(loaded, input.revisionId);
  const document = await FrameDocumentRecord.read(loaded.teamId, fingerprint);
  requireSolvable(document);
  requireState(document, input.stateId);
  return inTransaction(async (transaction) => {
    const project = await Project.lock(transaction, input.projectId);
    authorize(person, 'solve-project', project);
    const solves: Solve[] = [];
    let added = 0;
    for (const method of new Set(input.methods)) {
      const subject = {
        documentFingerprint: fingerprint,
        stateId: input.stateId,
        method,
        settings: input.settings,
        solverVersion: SOLVER_VERSION,
      };
      const known = await findSolve(transaction, project.id, resultKey(subject));
      if (known === null) added += 1;
      solves.push(known ?? (await addSolve(transaction, person, project, subject, input)));
    }
    if (added === 0) return solves;
    await requireRoom(transaction, project.id);
    await project.touch(transaction);
    await recordAudit(transaction, {
      teamId: project.teamId,
      actorId: person.id,
      projectId: project.id,
      action: 'solves-requested',
      details: {
        methods: solves.map(({ method }) => method),
        stateId: input.stateId,
        documentFingerprint: fingerprint,
      },
    });
    return solves;
  });
}

async function documentToSolve(project: Project, revisionId: string | null): Promise<string> {
  if (revisionId === null) {
    const draft = await Draft.findByPk(project.id, { rejectOnEmpty: true });
    return draft.fingerprint;
  }
  const revision = await Revision.findOne({ where: { id: revisionId, projectId: project.id } });
  if (!revision) throw new AppError('not-found', 'There is no such revision in this project.');
  return revision.documentFingerprint;
}

/** @throws {AppError} `invalid-document` with every reason */
export function requireSolvable(document: FrameDocument): void {
  const { errors } = checkDocument(document);
  if (errors.length > 0) {
    throw new AppError('invalid-document', 'The frame cannot be solved as it is.', {
      issues: errors,
    });
  }
}

function requireState(document: FrameDocument, stateId: string | null): void {
  if (stateId === null || document.states.some(({ id }) => id === stateId)) return;
  throw new AppError('invalid-request', 'Some of the input is not valid; see each field.', {
    issues: [{ path: 'stateId', message: 'The frame has no operating state of this id.' }],
  });
}

/** The project's solve of this key that is done or under way. */
function findSolve(
  transaction: Transaction,
  projectId: string,
  key: string,
): Promise<Solve | null> {
  return Solve.findOne({
    where: { projectId, resultKey: key, status: ['queued', 'running', 'done'] },
    order: [['requestedAt', 'DESC']],
    transaction,
  });
}

async function addSolve(
  transaction: Transaction,
  person: Person,
  project: Project,
  subject: ResultSubject,
  { revisionId }: Pick<Input, 'revisionId'>,
): Promise<Solve> {
  const key = resultKey(subject);
  const { teamId, id: projectId } = project;
  const stored = await SolveResult.count({ where: { teamId, key }, transaction });
  if (stored > 0) return addDoneSolve(transaction, person, project, subject, revisionId);
  const solve = await Solve.create(
    {
      ...subject,
      id: randomUUID(),
      teamId,
      projectId,
      revisionId,
      resultKey: key,
      status: 'queued',
      stage: 'waiting for a runner',
      requestedById: person.id,
    },
    { transaction },
  );
  await queueSolve(transaction, solve);
  await notify(transaction, projectId, {
    kind: 'solve',
    solveId: solve.id,
    status: 'queued',
    progress: 0,
  });
  return solve;
}

/** A solve whose result the team already has: done at once. */
export async function addDoneSolve(
  transaction: Transaction,
  person: Person,
  { teamId, id: projectId }: Project,
  subject: ResultSubject,
  revisionId: string | null,
): Promise<Solve> {
  const now = new Date();
  const solve = await Solve.create(
    {
      ...subject,
      id: randomUUID(),
      teamId,
      projectId,
      revisionId,
      resultKey: resultKey(subject),
      status: 'done',
      progress: 1,
      stage: 'taken from an earlier solve',
      requestedById: person.id,
      requestedAt: now,
      startedAt: now,
      finishedAt: now,
      elapsedMs: 0,
    },
    { transaction },
  );
  await notify(transaction, projectId, {
    kind: 'solve',
    solveId: solve.id,
    status: 'done',
    progress: 1,
  });
  return solve;
}

async function requireRoom(transaction: Transaction, projectId: string): Promise<void> {
  const underWay = await Solve.count({
    where: { projectId, status: ['queued', 'running'] },
    transaction,
  });
  if (underWay > MOST_UNDER_WAY) {
    throw new AppError(
      'too-many-requests',
      `At most ${MOST_UNDER_WAY} solves of a project wait at once: let some finish, or cancel them.`,
      { retryAfterSeconds: 10 },
    );
  }
}
