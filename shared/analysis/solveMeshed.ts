import { assembleMatrices } from '../frame/assembly/assembleMatrices.ts';
import { buildModel } from '../frame/assembly/buildModel.ts';
import { divisionsOf } from '../frame/assembly/divisions.ts';
import type { MassKind } from '../frame/assembly/FrameModel.ts';
import { massNormalised, rigidMotions } from '../frame/freedoms/rigidMotions.ts';
import { lowestModes } from '../numerics/eigen/lowestModes.ts';
import type { ModesResult } from '../numerics/eigen/ModesResult.ts';
import type { FrameDocument } from '../schemas/frameDocument.ts';
import { DEFAULT_SOLVE_SETTINGS } from '../schemas/solveResult.ts';
import type { SolveSettings } from '../schemas/solveResult.ts';
import { attainableMass } from './attainableMass.ts';
import { massOrRefuse, refuseMechanismsOf } from './checkMotion.ts';
import { rigidInertia } from './massProperties.ts';
import { lambdaFromEnergies } from './modeEnergies.ts';
import { shapesAtPoints } from './shapesAtPoints.ts';
import type { SolvedFrame, SolveProgress } from './SolvedFrame.ts';
import { meshedDetails, six, summariseModes } from './summariseModes.ts';

/** Seed of the eigen solver's start vectors: the same document gives the same bits. */
const SEED = 20_001;

/** Solves K φ = λ M φ of a frame divided into elements; `document` with its operating state applied. */
export function solveMeshed(
  document: FrameDocument,
  massKind: MassKind,
  settings: SolveSettings,
  { clock, progress, shouldStop, stopIfAsked }: SolveProgress,
): SolvedFrame {
  const began = clock();
  const model = buildModel(document, {
    massKind,
    divisionsOf: (part) => divisionsOf(part, settings.divisions, settings.upToHz),
  });
  const { totalMass, centre } = massOrRefuse(model);
  const { K, M } = assembleMatrices(model);
  const assembled = clock();
  stopIfAsked();

  progress(0.05, 'looking for mechanisms');
  const rigid = massNormalised(rigidMotions(model), M, model, totalMass).map(({ x }) => x);
  refuseMechanismsOf(model);
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
    shouldStop,
  });
  stopIfAsked();

  progress(0.9, 'summing energies');
  const beforeSummary = clock();
  const shapes = shapesAtPoints(model, found.phi);
  const inertia = rigidInertia(model, centre);
  const summary = summariseModes({
    model,
    details: meshedDetails(model, { K, M }, found, inertia),
    shapes,
    rigid: rigid.length,
    totalMass,
    total: inertia.total,
    attainable: six((direction) => attainableMass(M, inertia.forces[direction]!)),
  });
  return {
    ...summary,
    model,
    rigidBodyModes: rigid.length,
    totalMass,
    centre,
    shapes,
    count: countCheck(found),
    complete: found.complete && found.status === 'complete',
    warnings: [],
    timing: {
      ...found.timing,
      assemble: assembled - began,
      // Looking for mechanisms certifies the model, as the count check does the modes.
      certify: found.timing.certify + (checked - assembled) + (clock() - beforeSummary),
    },
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
