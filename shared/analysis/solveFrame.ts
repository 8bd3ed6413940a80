import { AppError } from '../errors/AppError.ts';
import { applyState } from '../frame/applyState.ts';
import type { FrameDocument } from '../schemas/frameDocument.ts';
import type { Method, ModelWarning, SolveSettings, SolveSummary } from '../schemas/solveResult.ts';
import { solveMeshFree } from './meshFree/solveMeshFree.ts';
import type { ModeShapes } from './shapesFile.ts';
import { SharedWork } from './SharedWork.ts';
import type { SolveProgress } from './SolvedFrame.ts';
import { solveMeshed } from './solveMeshed.ts';
import { SOLVER_VERSION } from './solverVersion.ts';

export interface SolveRequest {
  /** Accepted by `checkDocument`. */
  readonly document: FrameDocument;
  readonly method: Method;
  readonly stateId: string | null;
  readonly settings: SolveSettings;
}

export interface SolveHooks {
  /** fraction 0 … 1, never falling; stage in words. */
  readonly onProgress?: (fraction: number, stage: string) => void;
  /** Asked between steps; true ends the solve with AppError `cancelled`. */
  readonly shouldStop?: () => boolean;
  /** Milliseconds; timings are 0 without it. */
  readonly now?: () => number;
  /** Warnings of `checkDocument`, passed on into the summary. */
  readonly warnings?: readonly ModelWarning[];
}

export interface SolveOutcome {
  readonly summary: SolveSummary;
  readonly shapes: ModeShapes;
}

/**
 * Natural frequencies and mode shapes of a frame with consistent or lumped mass, or mesh-free, with everything
 * that the frame document page says a solve returns.
 * Throws AppError `unsolvable` (no mass, unknown state), `mechanism` (a motion that nothing resists), `cancelled`.
 *   shared  hand the same to the next solve of a frame that was edited: what still fits is not done again
 * Not converging is no error: the summary says `complete: false` and holds what was found.
 */
export function solveFrame(
  request: SolveRequest,
  hooks: SolveHooks = {},
  shared: SharedWork = new SharedWork(),
): SolveOutcome {
  const { method, stateId, settings } = request;
  const clock = hooks.now ?? (() => 0);
  const shouldStop = hooks.shouldStop ?? (() => false);
  const steps: SolveProgress = {
    clock,
    progress: hooks.onProgress ?? (() => undefined),
    shouldStop,
    stopIfAsked: () => {
      if (shouldStop()) throw new AppError('cancelled', 'The solve was cancelled.');
    },
  };

  const began = clock();
  steps.progress(0, 'assembling');
  const document = applyState(request.document, stateId, settings.supports);
  const solved =
    method === 'mesh-free'
      ? solveMeshFree(document, settings, steps)
      : solveMeshed(document, method, settings, steps, shared);
  const ended = clock();
  steps.progress(1, 'done');
  return {
    summary: {
      method,
      stateId,
      settings,
      solverVersion: SOLVER_VERSION,
      freeDof: solved.model.free,
      totalMassKg: solved.totalMass,
      centreOfMass: [...solved.centre],
      rigidBodyModes: solved.rigidBodyModes,
      count: solved.count,
      complete: solved.complete,
      modes: solved.modes,
      effectiveMass: solved.effectiveMass,
      ...(solved.handChecks && { handChecks: solved.handChecks }),
      warnings: [...(hooks.warnings ?? []), ...solved.warnings],
      timing: { ...solved.timing, read: 0, total: ended - began },
    },
    shapes: solved.shapes,
  };
}
