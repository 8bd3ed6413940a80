import { randomUUID } from 'node:crypto';
import type { SolveReply } from '#shared/analysis/runSolve.ts';
import { AppError } from '#shared/errors/AppError.ts';
import type { Config } from '#server/config/config.ts';
import type { Log } from '#server/config/log.ts';
import { FrameDocumentRecord } from '#server/models/FrameDocumentRecord.ts';
import type { Solve } from '#server/models/Solve.ts';
import { nudge, workOn } from './jobs.ts';
import { listen } from './notifications.ts';
import { startSolverThread } from './solverThread.ts';
import {
  beat,
  claimSolve,
  failSolve,
  finishSolve,
  releaseSolve,
  rescueSolves,
  type Claim,
} from './solveQueue.ts';
import type { SolveProgress } from './solveWorker.ts';

/** Progress reaches people four times a second at most … */
const REPORT_MS = 250;
/** … and a runner without progress still says that it lives. */
const BEAT_MS = 2_000;
const RESCUE_MS = 5_000;

/** Why a solve's thread was terminated. */
type Ending = 'taken' | 'stopping';

export interface Runner {
  /** Whether the solver thread is warm. */
  readonly isReady: () => boolean;
  /** Gives the solve under way back to the queue and lets go of the thread. */
  readonly stop: () => Promise<void>;
}

/**
 * Takes solves from the queue, one at a time, and solves them in a worker thread. The database, the job queues
 * and the notifications have to be started. Any number of processes may run one.
 */
export async function startRunner(
  config: Pick<Config, 'solveTimeLimitMs' | 'solveMemoryLimitMb'>,
  log: Log,
): Promise<Runner> {
  const runnerId = randomUUID();
  const thread = startSolverThread(config);
  let ready = false;
  let stopping = false;
  let current: { readonly claim: Claim; readonly controller: AbortController } | undefined;
  let settled: Promise<void> = Promise.resolve();

  const serve = async (solveId: string): Promise<void> => {
    if (stopping) return;
    const solve = await claimSolve(solveId, runnerId);
    if (solve === null) return;
    const claim = { id: solve.id, runnerId, attempt: solve.attempt };
    const controller = new AbortController();
    current = { claim, controller };
    try {
      const reply = await solveWatched(claim, solve, controller);
      if (reply.kind === 'done') await finishSolve(claim, solve, reply);
      else await failSolve(claim, reply.error);
    } catch (error) {
      if (controller.signal.aborted) {
        if (controller.signal.reason === ('stopping' satisfies Ending)) await releaseSolve(claim);
        return;
      }
      log.error({ err: error, solveId }, 'solve failed unexpectedly');
      await failSolve(claim, unexpected().toWire());
    } finally {
      current = undefined;
    }
  };

  /** Solves, writing progress and heart-beats meanwhile; ends when the solve is no longer this runner's. */
  const solveWatched = async (
    claim: Claim,
    solve: Solve,
    controller: AbortController,
  ): Promise<SolveReply> => {
    const document = await FrameDocumentRecord.read(solve.teamId, solve.documentFingerprint);
    const { method, stateId, settings } = solve;
    const beating = beatRegularly(claim, controller, log);
    try {
      return await thread.solve(
        { document, method, stateId, settings },
        controller.signal,
        beating.progress,
      );
    } finally {
      await beating.stop();
    }
  };

  const stopListening = listen((message) => {
    if (message === 'missed') {
      nudge('solve');
    } else if (message.event.kind === 'solve') {
      const { solveId, status } = message.event;
      if (status === 'queued') nudge('solve');
      if (status === 'cancelled' && current?.claim.id === solveId) {
        current.controller.abort('taken' satisfies Ending);
      }
    }
  });
  const rescue = setInterval(() => {
    rescueSolves().catch((error: unknown) => {
      log.warn({ err: error }, 'looking for lost solves failed');
    });
  }, RESCUE_MS);

  await thread.warm();
  ready = true;
  const takeNoMore = await workOn('solve', ({ solveId }) => {
    settled = serve(solveId);
    return settled;
  });
  return {
    isReady: () => ready,
    stop: async () => {
      ready = false;
      stopping = true;
      clearInterval(rescue);
      stopListening();
      await takeNoMore();
      current?.controller.abort('stopping' satisfies Ending);
      await settled.catch(() => undefined);
      await thread.close();
    },
  };
}

interface Beating {
  readonly progress: (progress: SolveProgress) => void;
  readonly stop: () => Promise<void>;
}

function beatRegularly(claim: Claim, controller: AbortController, log: Log): Beating {
  let latest: SolveProgress = { fraction: 0, stage: 'starting' };
  let written = latest;
  let beatenAt = performance.now();
  let writing: Promise<void> | undefined;

  const write = async (): Promise<void> => {
    written = latest;
    beatenAt = performance.now();
    const mine = await beat(claim, Math.min(latest.fraction, 1), latest.stage);
    if (!mine) controller.abort('taken' satisfies Ending);
  };
  const timer = setInterval(() => {
    const due = latest !== written || performance.now() - beatenAt >= BEAT_MS;
    if (!due || writing !== undefined) return;
    writing = write()
      .catch((error: unknown) => {
        log.warn({ err: error, solveId: claim.id }, 'heart-beat failed');
      })
      .finally(() => {
        writing = undefined;
      });
  }, REPORT_MS);
  return {
    progress: (progress) => {
      latest = progress;
    },
    stop: async () => {
      clearInterval(timer);
      await writing;
    },
  };
}

const unexpected = (): AppError =>
  new AppError(
    'internal',
    'Something went wrong on our side while solving. Solve again, and tell your administrator if it stays so.',
  );
