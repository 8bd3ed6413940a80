import { buildModel } from '../frame/assembly/buildModel.ts';
import { chainedPair } from '../frame/assembly/chainedPair.ts';
import { divisionsOf } from '../frame/assembly/divisions.ts';
import type { MassKind, MemberPart } from '../frame/assembly/FrameModel.ts';
import { describeRigidMotions } from '../frame/freedoms/describeRigidMotions.ts';
import { massNormalised, rigidMotions } from '../frame/freedoms/rigidMotions.ts';
import { analyseChains } from '../numerics/chains/analyseChains.ts';
import { ChainedPencil } from '../numerics/chains/ChainedPencil.ts';
import { findModes } from '../numerics/eigen/lowestModes.ts';
import type { ModesResult } from '../numerics/eigen/ModesResult.ts';
import { ZeroPivotError } from '../numerics/factor/ZeroPivotError.ts';
import { withArena } from '../numerics/kernels/Arena.ts';
import type { Arena } from '../numerics/kernels/Arena.ts';
import type { FrameDocument } from '../schemas/frameDocument.ts';
import { DEFAULT_SOLVE_SETTINGS } from '../schemas/solveResult.ts';
import type { SolveSettings } from '../schemas/solveResult.ts';
import { attainableMass } from './attainableMass.ts';
import { CERTAIN_PIVOT, massOrRefuse, refuseMechanismsOf } from './checkMotion.ts';
import { matchHandChecks, staticChecks } from './handChecks.ts';
import type { StaticChecks } from './handChecks.ts';
import { chainInertia } from './massProperties.ts';
import { FrameEnergies } from './modeEnergies.ts';
import { shapesAtPoints } from './shapesAtPoints.ts';
import type { SharedWork } from './SharedWork.ts';
import type { SolvedFrame, SolveProgress } from './SolvedFrame.ts';
import { meshedDetails, summariseModes } from './summariseModes.ts';

export interface MeshedFrame extends SolvedFrame {
  /** Per mode its shape over the model's unknowns, φᵀMφ = 1. */
  readonly phi: readonly Float64Array[];
}

/** Seed of the eigen solver's start vectors: the same document gives the same bits. */
const SEED = 20_001;

/**
 * Solves K φ = λ M φ of a frame divided into elements; `document` with its operating state applied.
 * "auto" divisions are enough for the band asked for; where a number of modes is, a first solve tells how high they
 * reach.
 *   shared  what an earlier solve left; takes in what this one leaves
 */
export function solveMeshed(
  document: FrameDocument,
  massKind: MassKind,
  settings: SolveSettings,
  progress: SolveProgress,
  shared: SharedWork,
): MeshedFrame {
  const solve = (kind: MassKind, band: number | undefined, steps: SolveProgress): MeshedFrame =>
    withArena((arena) => solveIn(arena, document, kind, { settings, band }, steps, shared));
  if (!seeksBand(document, settings)) return solve(massKind, settings.upToHz, progress);
  // Consistent mass on few elements reads high, so the band is not too narrow.
  const first = solve('consistent', undefined, partOf(progress, 0, 0.5));
  const band = Math.max(...first.modes.map(({ frequencyHz }) => frequencyHz));
  const fits = first.model.parts.every(
    (part) => part.member.kind === 'bar' || divisionsOf(part, undefined, band) === part.divisions,
  );
  return fits && massKind === 'consistent'
    ? first
    : solve(massKind, band, partOf(progress, 0.5, 1));
}

/** Whether members are to be divided for a band that only a solve can tell: of the modes asked for. */
function seeksBand({ members }: FrameDocument, { upToHz, divisions }: SolveSettings): boolean {
  if (upToHz !== undefined || divisions !== undefined) return false;
  return members.some((member) => member.kind === 'beam' && member.divisions === 'auto');
}

/** Progress from `from` to `to` of a whole. */
function partOf(steps: SolveProgress, from: number, to: number): SolveProgress {
  const progress = (fraction: number, stage: string): void =>
    steps.progress(from + (to - from) * fraction, stage);
  return { ...steps, progress };
}

function solveIn(
  arena: Arena,
  document: FrameDocument,
  massKind: MassKind,
  { settings, band }: { settings: SolveSettings; band: number | undefined },
  { clock, progress, shouldStop, stopIfAsked }: SolveProgress,
  shared: SharedWork,
): MeshedFrame {
  const began = clock();
  const divide = (part: MemberPart) => divisionsOf(part, settings.divisions, band);
  const reused = shared.modelFor(document, massKind, divide);
  const model = reused?.model ?? buildModel(document, { massKind, divisionsOf: divide });
  const { totalMass, centre } = massOrRefuse(model);
  const pair = reused?.pair ?? chainedPair(model);
  const built = clock();
  const known = shared.analysisFor(pair);
  const analysis = known ?? analyseChains(pair, clock);
  const analysed = clock();
  const pencil = new ChainedPencil(arena, pair, analysis);
  const placed = clock();
  stopIfAsked();

  const motions = rigidMotions(model);
  const rigid = massNormalised(motions, massOperator(pencil), model, totalMass).map(({ x }) => x);
  const moved = clock();
  const resists = rigid.length === 0 && resistsEveryMotion(pencil);
  const factored = clock();
  const inertia = chainInertia(model, pencil, centre);
  const checks = resists ? staticChecks(model, pencil, inertia.forces) : noChecks(rigid.length);
  if (!resists) {
    progress(0.05, 'looking for mechanisms');
    refuseMechanismsOf(model);
  }
  const checked = clock();
  stopIfAsked();

  progress(0.1, 'finding modes');
  const energies = new FrameEnergies(model, pencil);
  const found = findModes(pencil, {
    ...modesWanted(settings),
    nullVectors: rigid,
    seed: SEED,
    clock,
    refineLambda: (phi) => energies.lambda(phi),
    onProgress: (fraction) => progress(0.1 + 0.8 * fraction, 'finding modes'),
    shouldStop,
  });
  stopIfAsked();

  progress(0.9, 'summing energies');
  const beforeSummary = clock();
  const shapes = shapesAtPoints(
    model,
    pencil,
    found.addresses.map(({ vector }) => vector),
  );
  const details = meshedDetails(pencil, energies, found, inertia.forces);
  const attainable = shared.attainableFor(pair) ?? attainableMass(pencil, inertia.forces);
  shared.keep({ model, pair, analysis, attainable });
  const summary = summariseModes({
    model,
    details,
    shapes,
    rigid: rigid.length,
    totalMass,
    total: inertia.total,
    attainable,
  });
  return {
    ...summary,
    model,
    phi: found.phi,
    rigidBodyModes: rigid.length,
    totalMass,
    centre,
    shapes,
    handChecks: matchHandChecks(checks, summary),
    count: countCheck(found),
    complete: found.complete && found.status === 'complete',
    warnings: describeRigidMotions(model, motions),
    timing: {
      ...found.timing,
      order: known ? 0 : analysis.symbolic.timing.order,
      symbolic: known ? 0 : analysis.symbolic.timing.symbolic,
      assemble: built - began + placed - analysed,
      factor: found.timing.factor + factored - moved,
      // Looking for mechanisms certifies the model, as the count check does the modes.
      certify: found.timing.certify + moved - placed + checked - factored + clock() - beforeSummary,
    },
  };
}

const noChecks = (rigidBodyModes: number): StaticChecks => ({
  none:
    rigidBodyModes > 0
      ? 'A hand check needs a frame that is held: this one, or a part of it, can move as a whole, so it does not sag.'
      : 'A support or joint is so soft that what the frame sags under its own weight is lost in rounding.',
});

/** Whether K is certainly regular; leaves the pencil factored at 0 if so. */
function resistsEveryMotion(pencil: ChainedPencil): boolean {
  try {
    return pencil.factorise(0) === 0 && pencil.smallestPivot() > CERTAIN_PIVOT;
  } catch (error) {
    if (error instanceof ZeroPivotError) return false;
    throw error;
  }
}

/** y ← M x for vectors outside the arena. */
function massOperator(pencil: ChainedPencil): (x: Float64Array, y: Float64Array) => void {
  const { arena, n } = pencil;
  return (x, y) => {
    const used = arena.used;
    const from = pencil.vector();
    const to = pencil.vector();
    arena.view(from, n).set(x);
    pencil.multiplyMass(from, to);
    y.set(arena.view(to, n));
    arena.rewind(used);
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
