import type { FrameModel } from '../frame/assembly/FrameModel.ts';
import type { ChainedPencil } from '../numerics/chains/ChainedPencil.ts';
import { backwardError } from '../numerics/eigen/backwardError.ts';
import type { ModesResult } from '../numerics/eigen/ModesResult.ts';
import type { EnergyShare, ModeSummary, SolveSummary } from '../schemas/solveResult.ts';
import { six } from './massProperties.ts';
import type { Six } from './massProperties.ts';
import type { FrameEnergies, ModeEnergies } from './modeEnergies.ts';
import { nameModes } from './nameModes.ts';
import type { ModeCharacter } from './nameModes.ts';
import { VALUES_PER_POINT } from './shapesFile.ts';
import type { ModeShapes } from './shapesFile.ts';

/** Most digits shown: element properties are never known better. */
const MOST_DIGITS = 9;

/** What a summary holds of one mode before it is named and put into shares. */
export interface ModeDetail {
  /** ω² [rad²/s²] */
  readonly lambda: number;
  /** φᵀM r of the six rigid motions r. */
  readonly participation: Six;
  readonly energies: ModeEnergies;
  readonly backwardError: number;
  /** Significant digits of the frequency that its accuracy supports, not limited. */
  readonly digits: number;
}

export interface SolvedModes {
  readonly model: FrameModel;
  readonly details: readonly ModeDetail[];
  /** Of the same modes. */
  readonly shapes: ModeShapes;
  /** Number of rigid-body modes, which come first. */
  readonly rigid: number;
  readonly totalMass: number;
  /** Rigid inertia, and what all modes together reach of it. */
  readonly total: Six;
  readonly attainable: Six;
}

/**
 * Details of the modes of a divided frame, while they are in the pencil's arena.
 *   forces  address of the inertia forces of the six rigid motions
 */
export function meshedDetails(
  pencil: ChainedPencil,
  energies: FrameEnergies,
  { lambda, phi, addresses }: ModesResult,
  forces: number,
): ModeDetail[] {
  const { arena, n, size } = pencil;
  const used = arena.used;
  const image = arena.numbers(size);
  const products = arena.numbers(8);
  const diagonals = { K: pencil.diagonal('K'), M: pencil.diagonal('M') };
  const details = phi.map((shape, i) => {
    const address = addresses[i]!;
    pencil.multiplyStiffness(address.vector, image);
    const eta = backwardError(
      {
        phi: shape,
        Kphi: arena.view(image, n),
        Mphi: arena.view(address.image, n),
        lambda: lambda[i]!,
      },
      diagonals,
    );
    arena.kernels.dots(size, forces, 8 * size, 6, address.vector, products);
    const participation = arena.view(products, 6);
    return {
      lambda: lambda[i]!,
      participation: six((direction) => participation[direction]!),
      energies: energies.of(address.vector),
      backwardError: eta,
      digits: digitsOf(eta, n),
    };
  });
  arena.rewind(used);
  return details;
}

/** Names, participation, effective mass and energies of the modes found. */
export function summariseModes(solved: SolvedModes): Pick<SolveSummary, 'modes' | 'effectiveMass'> {
  const { model, total, attainable } = solved;
  const details = solved.details.map((detail) => ({
    ...detail,
    effectiveMass: six((direction) => detail.participation[direction]! ** 2),
  }));
  const names = nameModes(
    details.map(({ effectiveMass, energies }, i) => character(solved, i, effectiveMass, energies)),
  );
  const modes: ModeSummary[] = details.map(
    ({ lambda, participation, effectiveMass, energies, backwardError: eta, digits }, i) => ({
      number: i + 1,
      frequencyHz: Math.sqrt(Math.max(lambda, 0)) / (2 * Math.PI),
      digits: Math.min(Math.max(Math.floor(digits), 1), MOST_DIGITS),
      backwardError: eta,
      ...names[i]!,
      participation,
      effectiveMass,
      ...energyShares(model, energies, i < solved.rigid),
    }),
  );
  const onFixed = ([0, 1, 2] as const).map((direction) =>
    Math.max(0, total[direction] - attainable[direction]),
  );
  return {
    modes,
    effectiveMass: {
      sum: six((direction) =>
        details.reduce((sum, mode) => sum + mode.effectiveMass[direction]!, 0),
      ),
      attainable,
      total,
      onFixed: [onFixed[0]!, onFixed[1]!, onFixed[2]!],
    },
  };
}

/**
 * Significant digits of a frequency that its backward error η supports. λ is a Rayleigh quotient of element energies, whose error
 * is of second order in the shape's; 10 √n η bounds what orderings and machines were seen to change.
 */
export function digitsOf(eta: number, n: number): number {
  return -Math.log10(10 * Math.sqrt(n) * Math.max(eta, Number.EPSILON));
}

/** Shares of the strain and the kinetic energy; a rigid-body mode stores no strain, so its strain shares are empty. */
function energyShares(
  model: FrameModel,
  energies: ModeEnergies,
  rigid: boolean,
): Pick<ModeSummary, 'strainShares' | 'kineticShares'> {
  const { members, masses } = model.document;
  const byMember = (values: Float64Array, total: number) =>
    members.map(({ id }, i) => ({ id, share: values[i]! / total }));
  const ties = (owner: 'joint' | 'support' | 'spring'): EnergyShare[] => {
    const byId = new Map<string, number>();
    model.ties.forEach((tie, i) => {
      if (tie.owner !== owner) return;
      byId.set(tie.id, (byId.get(tie.id) ?? 0) + energies.ties[i]!);
    });
    return [...byId].map(([id, energy]) => ({ id, share: energy / energies.strain }));
  };
  return {
    strainShares: rigid
      ? { members: [], joints: [], supports: [], springs: [] }
      : {
          members: byMember(energies.members, energies.strain),
          joints: ties('joint'),
          supports: ties('support'),
          springs: ties('spring'),
        },
    kineticShares: {
      members: byMember(energies.kineticMembers, energies.kinetic),
      masses: masses.map(({ id }, i) => ({
        id,
        share: energies.kineticMasses[i]! / energies.kinetic,
      })),
    },
  };
}

function character(
  { model, shapes, rigid, totalMass, total }: SolvedModes,
  mode: number,
  effectiveMass: Six,
  energies: ModeEnergies,
): ModeCharacter {
  const meanSquares: [number, number, number] = [0, 0, 0];
  const meanTurns: [number, number, number] = [0, 0, 0];
  const size = model.scale * model.scale;
  const from = mode * shapes.points * VALUES_PER_POINT;
  for (let at = from; at < from + shapes.points * VALUES_PER_POINT; at += VALUES_PER_POINT) {
    for (const k of [0, 1, 2] as const) {
      meanSquares[k] += shapes.shapes[at + k]! ** 2;
      meanTurns[k] += size * shapes.shapes[at + 3 + k]! ** 2;
    }
  }
  return {
    rigid: mode < rigid,
    effectiveShares: six((direction) =>
      total[direction]! > 0 ? effectiveMass[direction]! / total[direction]! : 0,
    ),
    memberShares: model.parts.map(({ member, properties, axes, index }) => ({
      name: member.name ?? member.id,
      energy: energies.kineticMembers[index]! / energies.kinetic,
      mass: ((properties.rho * properties.A + properties.massPerLength) * axes.length) / totalMass,
    })),
    meanSquares,
    meanTurns,
  };
}
