import type { MessagePort } from 'node:worker_threads';
import { move, transferableSymbol, valueSymbol } from 'piscina';
import { runSolve } from '#shared/analysis/runSolve.ts';
import type { SolveRequest } from '#shared/analysis/solveFrame.ts';
import { AppError } from '#shared/errors/AppError.ts';
import { STARTERS } from '#shared/frame/starters/starters.ts';
import { DEFAULT_SOLVE_SETTINGS, METHODS } from '#shared/schemas/solveResult.ts';

export interface SolveTask {
  readonly request: SolveRequest;
  /** Takes the progress. */
  readonly port: MessagePort;
  readonly memoryLimitBytes: number;
}

export interface SolveProgress {
  readonly fraction: number;
  readonly stage: string;
}

/** The solver thread of a runner: piscina calls it once per task. */
export default function solve({ request, port, memoryLimitBytes }: SolveTask): unknown {
  const reply = runSolve(request, {
    now: () => performance.now(),
    onProgress: (fraction, stage) => {
      // The thread's own heap limit does not count typed arrays, which are most of a solve.
      if (process.memoryUsage().arrayBuffers > memoryLimitBytes) throw memoryLimit();
      port.postMessage({ fraction, stage } satisfies SolveProgress);
    },
  });
  const buffers = reply.kind === 'done' ? [reply.shapes.buffer] : [];
  return move({ [transferableSymbol]: buffers, [valueSymbol]: reply });
}

export const memoryLimit = (): AppError =>
  new AppError(
    'memory-limit',
    'The solve needs more memory than a runner may use: fewer divisions or modes make it smaller.',
  );

/** The engine compiles what runs often: for about this long the thread solves small frames before the first request. */
const WARM_UP_MS = 400;

/** Called once at start: by then everything the solver needs is loaded and compiled. */
export function warm(): void {
  const began = performance.now();
  do {
    for (const { name, parameters, build } of STARTERS) {
      const document = build(parameters.parse({ name }));
      for (const method of METHODS) {
        runSolve({ document, method, stateId: null, settings: DEFAULT_SOLVE_SETTINGS }, {});
      }
    }
  } while (performance.now() - began < WARM_UP_MS);
}
