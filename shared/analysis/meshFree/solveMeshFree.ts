import { assembleMatrices } from '../../frame/assembly/assembleMatrices.ts';
import { buildModel } from '../../frame/assembly/buildModel.ts';
import { refuseTooManyStations } from '../../frame/assembly/chains.ts';
import { divisionsOf } from '../../frame/assembly/divisions.ts';
import type { MemberPart } from '../../frame/assembly/FrameModel.ts';
import { partDivider } from '../../frame/assembly/memberParts.ts';
import { displacements } from '../../frame/freedoms/Combination.ts';
import { describeRigidMotions } from '../../frame/freedoms/describeRigidMotions.ts';
import { massNormalised, rigidMotions } from '../../frame/freedoms/rigidMotions.ts';
import { backwardError } from '../../numerics/eigen/backwardError.ts';
import { multiplySymmetric } from '../../numerics/sparse/SymmetricCsc.ts';
import type { SymmetricCsc } from '../../numerics/sparse/SymmetricCsc.ts';
import type { FrameDocument } from '../../schemas/frameDocument.ts';
import { DEFAULT_SOLVE_SETTINGS } from '../../schemas/solveResult.ts';
import type { ModelWarning, SolveSettings } from '../../schemas/solveResult.ts';
import { massOrRefuse, refuseMechanismsOf } from '../checkMotion.ts';
import type { SolvedFrame, SolveProgress } from '../SolvedFrame.ts';
import { digitsOf, summariseModes } from '../summariseModes.ts';
import type { ModeDetail } from '../summariseModes.ts';
import { continuousInertia } from './continuousInertia.ts';
import { dividedSystem } from './dividedSystem.ts';
import { DynamicSystem } from './DynamicSystem.ts';
import { findMeshFreeModes } from './findMeshFreeModes.ts';
import { integrateMode, leversOf } from './integrateMode.ts';
import type { IntegratedMode } from './integrateMode.ts';
import { crossShear, memberPieces } from './memberPieces.ts';
import { meshFreeShapes } from './meshFreeShapes.ts';
import { modesAtRest } from './modesAtRest.ts';

/**
 * Natural frequencies and shapes of a frame of continuous members: transcendental dynamic stiffness, frequencies
 * bracketed by the Wittrick-Williams count on the joints, free of mesh error. Divisions only say at how many
 * stations shapes are drawn. `document` with its operating state applied.
 *
 * Backward error of a mode: that of the pair (K_D(0), [K_D(0) − K_D(ω)] / ω²), whose residual is K_D(ω)φ, in the
 * diagonal scaling of `backwardError`. The digits of a frequency are also limited by the half-width within which two
 * counts confirm it (1e-10 of itself, where counts are clear).
 */
export function solveMeshFree(
  document: FrameDocument,
  settings: SolveSettings,
  { clock, progress, shouldStop, stopIfAsked }: SolveProgress,
): SolvedFrame {
  const began = clock();
  const model = buildModel(document, { massKind: 'consistent', divisionsOf: () => 1 });
  const divide = partDivider('consistent');
  const drawn = model.parts.map((part) =>
    divide(part, divisionsOf(part, settings.divisions, settings.upToHz)),
  );
  refuseTooManyStations(drawn);
  const { totalMass, centre } = massOrRefuse(model);
  const joints = new DynamicSystem(
    model,
    memberPieces(model, () => 1),
    clock,
  );
  const assembled = clock();
  stopIfAsked();

  progress(0.1, 'finding modes');
  const rigidOfJoints = rigidModes(joints, totalMass);
  const rigid = rigidOfJoints.length;
  const upTo = settings.upToHz === undefined ? undefined : 2 * Math.PI * settings.upToHz;
  const most = settings.modes ?? DEFAULT_SOLVE_SETTINGS.modes!;
  if (rigid > 0 || !joints.resistsEveryMotion()) refuseMechanismsOf(model);
  const checked = clock();
  stopIfAsked();

  const found = findMeshFreeModes({
    joints,
    divided: (omega) => dividedSystem(joints, omega, clock),
    estimates: (system, count) => {
      const motions = system === joints ? rigidOfJoints : rigidModes(system, totalMass);
      return modesAtRest(system, motions, count, shouldStop);
    },
    rigid,
    wanted: upTo === undefined ? { count: most } : { upTo },
    onProgress: (fraction) => progress(0.1 + 0.8 * fraction, 'finding modes'),
    stopIfAsked,
  });
  const searched = clock();

  progress(0.9, 'summing energies');
  const { system } = found;
  const levers = leversOf(system, centre);
  const integrate = (omega: number, x: Float64Array) =>
    integrateMode(system, centre, levers, omega, x);
  const all: FoundMode[] = [
    ...rigidModes(system, totalMass).map((x) => ({ ...integrate(0, x), lambda: 0, halfWidth: 0 })),
    ...found.modes
      .map(({ omega, x, halfWidth }) => ({ ...integrate(omega, x), halfWidth }))
      .sort((a, b) => a.lambda - b.lambda),
  ];
  const returned = all
    .filter(({ lambda }) => upTo === undefined || lambda <= upTo * upTo)
    .slice(0, upTo === undefined ? most : undefined);
  const shapes = meshFreeShapes(
    system,
    drawn,
    returned.map(({ lambda, x }) => ({ omega: Math.sqrt(lambda), x })),
  );
  const integrated = clock();
  const { total, attainable } = continuousInertia(joints, centre);
  const summary = summariseModes({
    model,
    details: detailsOf(system, returned),
    shapes,
    rigid,
    totalMass,
    total,
    attainable,
  });
  const complete = found.clear && found.below === all.length;
  return {
    ...summary,
    model,
    rigidBodyModes: rigid,
    totalMass,
    centre,
    shapes,
    count: {
      shiftHz: found.shift / (2 * Math.PI),
      below: found.below,
      found: all.length,
      returned: returned.length,
      complete,
    },
    complete,
    warnings: [
      ...describeRigidMotions(model, rigidMotions(model)),
      ...crossShear(model).map(crossShearWarning),
    ],
    timing: {
      order: joints.analysis.symbolic.timing.order,
      symbolic: joints.analysis.symbolic.timing.symbolic,
      factor: 0,
      assemble: assembled - began,
      iterate: searched - checked,
      finish: integrated - searched,
      certify: checked - assembled + (clock() - integrated),
    },
  };
}

interface FoundMode extends IntegratedMode {
  readonly halfWidth: number;
}

/** Rigid-body modes over the unknowns of a system, those inside bars included. */
function rigidModes(system: DynamicSystem, totalMass: number): Float64Array[] {
  const { model, pieces, n } = system;
  const motions = rigidMotions(model);
  if (motions.length === 0) return [];
  const { M } = assembleMatrices(model);
  const d = new Float64Array(2);
  const multiplyMass = (from: Float64Array, to: Float64Array) => {
    multiplySymmetric(M, from, to);
  };
  return massNormalised(motions, multiplyMass, model, totalMass).map((motion) => {
    const x = new Float64Array(n);
    x.set(motion.x);
    for (const { element, motion: ends } of pieces) {
      const inner = ends.dofs.find((dof) => dof >= model.free && x[dof] === 0);
      if (element.rows !== 2 || inner === undefined) continue;
      // A bar moves as one along its axis: each station inside as the one before it.
      displacements(ends, x, d);
      x[inner] = d[0]!;
    }
    return x;
  });
}

function detailsOf(system: DynamicSystem, modes: readonly FoundMode[]): ModeDetail[] {
  const { K: K0 } = system.stiffness(0);
  const diagonalOf = (A: SymmetricCsc) =>
    Float64Array.from({ length: A.n }, (_, j) => A.values[A.colPtr[j]!]!);
  const diagonalK = diagonalOf(K0);
  return modes.map(({ lambda, x, participation, energies, halfWidth }) => {
    const { K } = system.stiffness(Math.sqrt(lambda));
    const values = new Float64Array(K.values.length);
    if (lambda > 0) {
      for (let i = 0; i < values.length; i++) values[i] = (K0.values[i]! - K.values[i]!) / lambda;
    }
    const M = { ...K0, values };
    const Kphi = new Float64Array(system.n);
    const Mphi = new Float64Array(system.n);
    multiplySymmetric(K0, x, Kphi);
    multiplySymmetric(M, x, Mphi);
    const eta = backwardError({ phi: x, Kphi, Mphi, lambda }, { K: diagonalK, M: diagonalOf(M) });
    const digits = Math.min(digitsOf(eta, system.n), -Math.log10(halfWidth));
    return { lambda, participation, energies, backwardError: eta, digits };
  });
}

function crossShearWarning({ index, member }: MemberPart): ModelWarning {
  return {
    path: `members.${index}.theory`,
    message:
      `Member “${member.name ?? member.id}”: mesh-free leaves out the shear flexibility that couples the principal ` +
      'planes of its section (ky and kz differ and Iyz is not 0). Compare it with consistent mass.',
  };
}
