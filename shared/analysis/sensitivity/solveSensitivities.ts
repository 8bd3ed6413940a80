import { AppError } from '../../errors/AppError.ts';
import { applyState } from '../../frame/applyState.ts';
import type { MassKind } from '../../frame/assembly/FrameModel.ts';
import type { FrameDocument } from '../../schemas/frameDocument.ts';
import type { SolveSettings } from '../../schemas/solveResult.ts';
import { SharedWork } from '../SharedWork.ts';
import type { SolveHooks } from '../solveFrame.ts';
import { solveMeshed } from '../solveMeshed.ts';
import { sensitivities } from './sensitivities.ts';
import type { Sensitivities } from './sensitivities.ts';

/** Solved beyond the modes asked for: the last of them may share its frequency with the next ones. */
const BEYOND = 6;
const MOST_MODES = 200;

export interface SensitivityRequest {
  /** Accepted by `checkDocument`. */
  readonly document: FrameDocument;
  readonly method: MassKind;
  readonly stateId: string | null;
  readonly settings: SolveSettings;
}

/**
 * Solves a frame and differentiates the frequencies found with respect to every number of it.
 * Throws AppError as `solveFrame` does.
 *   complete  whether the count says that no mode is missing
 */
export function solveSensitivities(
  { document, method, stateId, settings }: SensitivityRequest,
  hooks: SolveHooks = {},
): Sensitivities & { readonly complete: boolean } {
  const wanted = settings.modes;
  const shouldStop = hooks.shouldStop ?? (() => false);
  const solved = solveMeshed(
    applyState(document, stateId, settings.supports),
    method,
    { ...settings, ...(wanted !== undefined && { modes: Math.min(wanted + BEYOND, MOST_MODES) }) },
    {
      clock: hooks.now ?? (() => 0),
      progress: hooks.onProgress ?? (() => undefined),
      shouldStop,
      stopIfAsked: () => {
        if (shouldStop()) throw new AppError('cancelled', 'The solve was cancelled.');
      },
    },
    new SharedWork(),
  );
  const { model, phi, modes, rigidBodyModes, complete } = solved;
  const lambda = modes.map(({ frequencyHz }) => (2 * Math.PI * frequencyHz) ** 2);
  const found = sensitivities({ model, phi, lambda, rigidBodyModes });
  const count = found.modes.filter((mode) => mode <= (wanted ?? Infinity)).length;
  return {
    modes: found.modes.slice(0, count),
    frequenciesHz: found.frequenciesHz.slice(0, count),
    repeated: found.repeated.slice(0, count),
    parameters: found.parameters.map((parameter) => ({
      ...parameter,
      perUnit: parameter.perUnit.slice(0, count),
    })),
    complete,
  };
}
