import { createHash } from 'node:crypto';
import { fn, literal, type Transaction } from 'sequelize';
import type { SolveReply } from '#shared/analysis/runSolve.ts';
import type { WireError } from '#shared/errors/AppError.ts';
import { METHODS } from '#shared/schemas/solveResult.ts';
import { inTransaction } from '#server/models/database.ts';
import { Solve } from '#server/models/Solve.ts';
import { SolveResult } from '#server/models/SolveResult.ts';
import { enqueue } from './jobs.ts';
import { notify } from './notifications.ts';

/**
 * How solves pass between processes. The row is the truth: whoever moves it from `queued` to `running` has
 * it, as runner and attempt number, and only they may move it on. A runner that stops beating loses it.
 */

/** A beat comes every 2 s, so five in a row are missing. */
const LOST_AFTER_SECONDS = 10;
/** A job this long unclaimed was fetched by a runner that died before it claimed the row. */
const UNCLAIMED_AFTER_SECONDS = 20;
const MOST_ATTEMPTS = 3;

/** Who has the solve; every further change is fenced by both. */
export interface Claim {
  readonly id: string;
  readonly runnerId: string;
  readonly attempt: number;
}

const held = ({ id, runnerId, attempt }: Claim) => ({
  id,
  runnerId,
  attempt,
  status: 'running' as const,
});

/**
 * Hands a queued solve to the runners. Of those that wait, consistent goes before lumped and mesh-free last: the
 * screens stand on the first, and jobs of one press carry the same time.
 */
export function queueSolve(transaction: Transaction, { id, method }: Solve): Promise<void> {
  const priority = METHODS.length - METHODS.indexOf(method);
  return enqueue(transaction, 'solve', { solveId: id }, { priority });
}

/** Takes a queued solve; null when it is not to be had (cancelled, or another runner was quicker). */
export async function claimSolve(solveId: string, runnerId: string): Promise<Solve | null> {
  const [, rows] = await Solve.update(
    {
      status: 'running',
      stage: 'starting',
      runnerId,
      attempt: literal('attempt + 1'),
      startedAt: fn('clock_timestamp'),
      heartbeatAt: fn('clock_timestamp'),
    },
    { where: { id: solveId, status: 'queued' }, returning: true },
  );
  const solve = rows[0] ?? null;
  if (solve) await announce(null, solve);
  return solve;
}

/** Writes progress and beats; false when the solve is no longer this runner's (cancelled, or taken away). */
export async function beat(claim: Claim, progress: number, stage: string): Promise<boolean> {
  const [count, rows] = await Solve.update(
    { progress, stage, heartbeatAt: fn('clock_timestamp') },
    { where: held(claim), returning: true },
  );
  if (rows[0]) await announce(null, rows[0]);
  return count > 0;
}

/** Stores the result and ends the solve, in one step and once; false when it was no longer this runner's. */
export async function finishSolve(
  claim: Claim,
  solve: Solve,
  reply: Extract<SolveReply, { kind: 'done' }>,
): Promise<boolean> {
  const { summary, timing, complete, firstFrequencyHz } = reply;
  const shapes = Buffer.from(reply.shapes.buffer);
  return inTransaction(async (transaction) => {
    const mine = await Solve.findOne({ where: held(claim), transaction, lock: true });
    if (!mine) return false;
    await SolveResult.bulkCreate(
      [
        {
          teamId: solve.teamId,
          key: solve.resultKey,
          documentFingerprint: solve.documentFingerprint,
          stateId: solve.stateId,
          method: solve.method,
          settings: solve.settings,
          solverVersion: solve.solverVersion,
          complete,
          firstFrequencyHz,
          summary,
          summaryFingerprint: sha256(summary),
          timing,
          shapes,
          shapesFingerprint: sha256(shapes),
        },
      ],
      { transaction, ignoreDuplicates: true },
    );
    await end(transaction, mine, { status: 'done', progress: 1, stage: '' });
    return true;
  });
}

/** Ends the solve as failed; false when it was no longer this runner's. */
export async function failSolve(claim: Claim, error: WireError): Promise<boolean> {
  return inTransaction(async (transaction) => {
    const mine = await Solve.findOne({ where: held(claim), transaction, lock: true });
    if (!mine) return false;
    await end(transaction, mine, { status: 'failed', error });
    return true;
  });
}

/** Gives the solve back, for another runner to take: this one is shutting down. */
export async function releaseSolve(claim: Claim): Promise<void> {
  await inTransaction(async (transaction) => {
    const mine = await Solve.findOne({ where: held(claim), transaction, lock: true });
    if (mine) await requeue(transaction, mine);
  });
}

/**
 * Gives the solves of runners that died to others, or ends them when that has happened too often; queues
 * again those whose job was lost. Any number of processes may do this at once.
 */
export async function rescueSolves(): Promise<void> {
  await inTransaction(async (transaction) => {
    const lost = await Solve.findAll({ where: LOST, transaction, lock: true, skipLocked: true });
    for (const solve of lost) await requeue(transaction, solve);
  });
}

const LOST = literal(`
  (status = 'running'
    AND heartbeat_at < clock_timestamp() - interval '${LOST_AFTER_SECONDS} seconds')
  OR (status = 'queued'
    AND queued_at < clock_timestamp() - interval '${UNCLAIMED_AFTER_SECONDS} seconds'
    AND NOT EXISTS (SELECT FROM pgboss.job
                     WHERE name = 'solve' AND state IN ('created', 'retry')
                       AND data ->> 'solveId' = "Solve".id::text))`);

async function requeue(transaction: Transaction, solve: Solve): Promise<void> {
  if (solve.attempt >= MOST_ATTEMPTS) {
    await end(transaction, solve, {
      status: 'failed',
      error: {
        code: 'unavailable',
        message: `The solve was interrupted ${MOST_ATTEMPTS} times: solve again, and tell your administrator if it stays so.`,
        details: {},
      },
    });
    return;
  }
  await solve.update(
    {
      status: 'queued',
      progress: 0,
      stage: 'waiting for a runner',
      runnerId: null,
      heartbeatAt: null,
      queuedAt: new Date(),
    },
    { transaction },
  );
  await queueSolve(transaction, solve);
  await announce(transaction, solve);
}

async function end(
  transaction: Transaction,
  solve: Solve,
  outcome: Partial<Pick<Solve, 'status' | 'progress' | 'stage' | 'error'>>,
): Promise<void> {
  const finishedAt = new Date();
  const elapsedMs = solve.startedAt ? finishedAt.getTime() - solve.startedAt.getTime() : null;
  await solve.update({ ...outcome, finishedAt, elapsedMs }, { transaction });
  await announce(transaction, solve);
}

function announce(transaction: Transaction | null, solve: Solve): Promise<void> {
  const { projectId, id: solveId, status, progress } = solve;
  return notify(transaction, projectId, { kind: 'solve', solveId, status, progress });
}

const sha256 = (data: string | Buffer): string => createHash('sha256').update(data).digest('hex');
