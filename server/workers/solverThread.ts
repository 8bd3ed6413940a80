import { fileURLToPath } from 'node:url';
import { MessageChannel } from 'node:worker_threads';
import { Piscina } from 'piscina';
import type { SolveReply } from '#shared/analysis/runSolve.ts';
import type { SolveRequest } from '#shared/analysis/solveFrame.ts';
import { AppError, type ErrorCode } from '#shared/errors/AppError.ts';
import type { Config } from '#server/config/config.ts';
import { memoryLimit, type SolveProgress, type SolveTask } from './solveWorker.ts';

const MEGABYTE = 1024 * 1024;
const MEMORY_LOOK_MS = 200;

/** From sources the thread loads TypeScript; bundled, it lies in a folder beside the two programs. */
const fromSources = import.meta.url.endsWith('.ts');
const file = fromSources ? './solveWorkerFromSources.mjs' : './workers/solveWorker.js';

export interface SolverThread {
  /** Resolves when everything the solver needs is loaded. */
  readonly warm: () => Promise<void>;
  /**
   * Solves in the thread. Aborting terminates the thread at once, whatever it is doing; a fresh one takes
   * its place.
   *
   * @throws the signal's reason when aborted
   */
  readonly solve: (
    request: SolveRequest,
    signal: AbortSignal,
    onProgress: (progress: SolveProgress) => void,
  ) => Promise<SolveReply>;
  readonly close: () => Promise<void>;
}

/** One worker thread that solves, with limits on the memory and the time of each solve. */
export function startSolverThread(
  config: Pick<Config, 'solveTimeLimitMs' | 'solveMemoryLimitMb'>,
): SolverThread {
  const { solveTimeLimitMs, solveMemoryLimitMb } = config;
  const pool = new Piscina<SolveTask | undefined, unknown>({
    filename: fileURLToPath(new URL(file, import.meta.url)),
    minThreads: 1,
    maxThreads: 1,
    resourceLimits: { maxOldGenerationSizeMb: solveMemoryLimitMb },
  });
  return {
    warm: async () => {
      await pool.run(undefined, { name: 'warm' });
    },
    solve: async (request, signal, onProgress) => {
      const { port1, port2 } = new MessageChannel();
      port1.on('message', onProgress);
      const timeLimit = AbortSignal.timeout(solveTimeLimitMs);
      const memory = watchMemory(solveMemoryLimitMb * MEGABYTE);
      const any = AbortSignal.any([signal, timeLimit, memory.limit]);
      try {
        const task = { request, port: port2, memoryLimitBytes: solveMemoryLimitMb * MEGABYTE };
        return (await pool.run(task, { transferList: [port2], signal: any })) as SolveReply;
      } catch (error) {
        if (signal.aborted) throw signal.reason;
        if (timeLimit.aborted) return failed('time-limit', timeLimitMessage(solveTimeLimitMs));
        if (memory.limit.aborted || isOutOfMemory(error)) {
          return { kind: 'failed', error: memoryLimit().toWire() };
        }
        throw error;
      } finally {
        memory.stop();
        port1.close();
      }
    },
    close: () => pool.destroy(),
  };
}

interface MemoryWatch {
  readonly limit: AbortSignal;
  readonly stop: () => void;
}

/**
 * Watches how much the process grows while a solve runs. The thread looks at its own arrays only where it reports
 * progress, and a factorisation can take all the memory of the machine before that.
 */
function watchMemory(limitBytes: number): MemoryWatch {
  const before = process.memoryUsage.rss();
  const controller = new AbortController();
  const timer = setInterval(() => {
    if (process.memoryUsage.rss() - before > limitBytes) controller.abort();
  }, MEMORY_LOOK_MS);
  return {
    limit: controller.signal,
    stop: () => {
      clearInterval(timer);
    },
  };
}

const failed = (code: ErrorCode, message: string): SolveReply => ({
  kind: 'failed',
  error: new AppError(code, message).toWire(),
});

const timeLimitMessage = (ms: number): string =>
  `The solve took longer than the ${ms / 1000} s that a solve may take: fewer divisions or modes make it faster.`;

/** The thread's heap limit, or a typed array that could not be had. */
function isOutOfMemory(error: unknown): boolean {
  if (!(error instanceof Error)) return false;
  if ('code' in error && error.code === 'ERR_WORKER_OUT_OF_MEMORY') return true;
  return error.name === 'RangeError' && error.message.includes('Array buffer allocation failed');
}
