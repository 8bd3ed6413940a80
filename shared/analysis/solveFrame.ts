import { AppError } from '../errors/AppError.ts';
import { applyState } from '../frame/applyState.ts';
import { assembleMatrices } from '../frame/assembly/assembleMatrices.ts';
import { buildModel } from '../frame/assembly/buildModel.ts';
import { divisionsOf } from '../frame/assembly/divisions.ts';
import type { FrameModel } from '../frame/assembly/FrameModel.ts';
import { refuseMechanisms } from '../frame/freedoms/mechanisms.ts';
import { massNormalised, rigidMotions } from '../frame/freedoms/rigidMotions.ts';
import { lowestModes } from '../numerics/eigen/lowestModes.ts';
import type { ModesResult } from '../numerics/eigen/ModesResult.ts';
import type { FrameDocument } from '../schemas/frameDocument.ts';
import { DEFAULT_SOLVE_SETTINGS } from '../schemas/solveResult.ts';
import type { Method, ModelWarning, SolveSettings, SolveSummary } from '../schemas/solveResult.ts';
import { massProperties } from './massProperties.ts';
import { lambdaFromEnergies } from './modeEnergies.ts';
import type { ModeShapes } from './shapesFile.ts';
import { shapesAtPoints } from './shapesAtPoints.ts';
import { summariseModes } from './summariseModes.ts';
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

/** Seed of the eigen solver's start vectors: the same document gives the same bits. */
const SEED = 20_001;

/**
 * Natural frequencies and mode shapes of a frame with consistent or lumped mass, with everything that the
 * frame document page says a solve returns.
 * Throws AppError `unsolvable` (no mass, unknown state), `mechanism` (a motion that nothing resists), `cancelled`.
 * Not converging is no error: the summary says `complete: false` and holds what was found.
 */
export function solveFrame(request: SolveRequest, hooks: SolveHooks = {}): SolveOutcome {
  const { method, stateId, settings } = request;
  if (method === 'mesh-free') {
    throw new AppError(
      'unsolvable',
      'The mesh-free method is not available yet: choose consistent or lumped.',
    );
  }
  const clock = hooks.now ?? (() => 0);
  const progress = hooks.onProgress ?? (() => undefined);
  const stopIfAsked = () => {
    if (hooks.shouldStop?.()) throw new AppError('cancelled', 'The solve was cancelled.');
  };

  const began = clock();
  progress(0, 'assembling');
  const document = applyState(request.document, stateId, settings.supports);
  const model = buildModel(document, {
    massKind: method,
    divisionsOf: (part) => divisionsOf(part, settings.divisions, settings.upToHz),
  });
  const { totalMass, centre } = massProperties(model);
  if (totalMass === 0) throw noMass();
  const { K, M } = assembleMatrices(model);
  const assembled = clock();
  stopIfAsked();

  progress(0.05, 'looking for mechanisms');
  const rigid = massNormalised(rigidMotions(model), M, model, totalMass).map(({ x }) => x);
  refuseMechanismsOf(document, model);
  const checked = clock();
  stopIfAsked();

  progress(0.1, 'finding modes');
  const found = lowestModes(K, M, {
    ...modesWanted(settings),
    nullVectors: rigid,
    seed: SEED,
    clock,
    refineLambda: (phi) => lambdaFromEnergies(model, phi),
    onProgress: (fraction) => progress(0.1 + 0.8 * fraction, 'finding modes'),
    ...(hooks.shouldStop && { shouldStop: hooks.shouldStop }),
  });
  stopIfAsked();

  progress(0.9, 'summing energies');
  const beforeSummary = clock();
  const shapes = shapesAtPoints(model, found.phi);
  const summary = summariseModes({
    model,
    K,
    M,
    found,
    shapes,
    rigid: rigid.length,
    totalMass,
    centre,
  });
  const ended = clock();
  progress(1, 'done');
  return {
    summary: {
      method,
      stateId,
      settings,
      solverVersion: SOLVER_VERSION,
      freeDof: model.free,
      totalMassKg: totalMass,
      centreOfMass: [...centre],
      rigidBodyModes: rigid.length,
      count: countCheck(found),
      complete: found.complete && found.status === 'complete',
      ...summary,
      warnings: [...(hooks.warnings ?? [])],
      timing: {
        ...found.timing,
        read: 0,
        assemble: assembled - began,
        // Looking for mechanisms certifies the model, as the count check does the modes.
        certify: found.timing.certify + (checked - assembled) + (ended - beforeSummary),
        total: ended - began,
      },
    },
    shapes,
  };
}

function modesWanted({ modes, upToHz }: SolveSettings): { count: number } | { upToLambda: number } {
  if (upToHz !== undefined) return { upToLambda: (2 * Math.PI * upToHz) ** 2 };
  return { count: modes ?? DEFAULT_SOLVE_SETTINGS.modes! };
}

function countCheck({ sigma, below, found, lambda, complete }: ModesResult) {
  const shiftHz = Math.sqrt(Math.max(sigma, 0)) / (2 * Math.PI);
  return { shiftHz, below, found, returned: lambda.length, complete: complete && below === found };
}

/** Dividing a member adds no motion without stiffness, so one element per member shows them all. */
function refuseMechanismsOf(document: FrameDocument, model: FrameModel): void {
  const undivided = model.parts.every((part) => part.divisions === 1)
    ? model
    : buildModel(document, { massKind: model.massKind, divisionsOf: () => 1 });
  refuseMechanisms(
    undivided,
    rigidMotions(undivided).map(({ x }) => x),
  );
}

function noMass(): AppError {
  const message = 'The model has no mass, so nothing can vibrate. Add a member or a mass.';
  return new AppError('unsolvable', message, { issues: [{ path: '', message }] });
}
