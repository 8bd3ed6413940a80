import { AppError } from '../errors/AppError.ts';
import type { MassKind } from '../frame/assembly/FrameModel.ts';
import { DOCUMENT_LIMITS } from '../schemas/frameDocument.ts';
import type { FrameDocument } from '../schemas/frameDocument.ts';
import type { ModelWarning, SolveSettings } from '../schemas/solveResult.ts';
import { pairModes } from './pairModes.ts';
import type { ComparableModes } from './pairModes.ts';
import { solveFrame } from './solveFrame.ts';
import type { SolveHooks, SolveOutcome } from './solveFrame.ts';

const DIVISIONS = [1, 2, 4, 8, 16] as const;
/** Modes solved past those asked for, since the order of modes may change with the mesh. */
const SPARE_MODES = 4;
/** Difference of lumped and consistent frequencies taken as agreement: common practice, no source. */
const AGREEMENT = 0.01;
/** Errors, relative, below which an order cannot be told: ten times what either method promises. */
const LEAST_ERROR = 1e-8;

export interface RefineRequest {
  /** Accepted by `checkDocument`. */
  readonly document: FrameDocument;
  readonly stateId: string | null;
  /** How many modes to look at, rigid ones included. */
  readonly modes: number;
  readonly supports?: NonNullable<SolveSettings['supports']>;
  /** Largest relative difference of the two mass kinds that counts as agreement. */
  readonly tolerance?: number;
}

/** One mass kind over the divisions. */
export interface KindRefinement {
  /** Per division: frequencies [Hz], ascending; fewer than asked for where the mesh has no more. */
  readonly frequenciesHz: readonly (readonly number[])[];
  /** Per mode of the mesh-free column, per division: the frequency of the mode of that shape [Hz]; null where none is. */
  readonly followedHz: readonly (readonly (number | null)[])[];
  /**
   * Per mode: p in error ~ h^p between the two finest divisions whose errors against mesh-free can be told from
   * rounding; null where there are no two, or the error does not fall.
   */
  readonly order: readonly (number | null)[];
}

export interface Refinement {
  readonly divisions: readonly number[];
  /** [Hz], ascending. */
  readonly meshFreeHz: readonly number[];
  readonly consistent: KindRefinement;
  readonly lumped: KindRefinement;
  /**
   * Smallest of the divisions at which both mass kinds have every mode and agree on it within `tolerance`; null where
   * none does. It tells that the mesh is fine enough, nothing of the model.
   */
  readonly agreement: { readonly tolerance: number; readonly divisions: number | null };
  /** Whether the count certified every one of the solves. */
  readonly complete: boolean;
  readonly warnings: readonly ModelWarning[];
}

/**
 * A frame solved with every beam in 1, 2, 4 … elements with consistent and lumped mass, and mesh-free.
 * Modes are followed by shape, from mesh-free to the finest mesh and from each mesh to the next coarser.
 * Throws AppError `invalid-request` for divisions that do not ascend from 1 to 200, and what `solveFrame` throws.
 * Source of the observed order: Roache, Verification and Validation in Computational Science and Engineering, ch. 5
 * [from memory], with the exact solution in place of the extrapolated one.
 */
export function refineFrame(
  request: RefineRequest,
  divisions: readonly number[] = DIVISIONS,
  hooks: SolveHooks = {},
): Refinement {
  refuseDivisions(divisions);
  const { modes, tolerance = AGREEMENT } = request;
  const solves = 2 * divisions.length + 1;
  let begun = 0;
  const outcomes: SolveOutcome[] = [];
  const solve = (method: MassKind | 'mesh-free', count: number): SolveOutcome => {
    const { document, stateId, supports } = request;
    const part = begun++;
    const settings: SolveSettings = {
      modes: Math.min(modes + SPARE_MODES, 200),
      divisions: count,
      ...(supports === undefined ? {} : { supports }),
    };
    const outcome = solveFrame(
      { document, method, stateId, settings },
      {
        ...hooks,
        onProgress: (fraction, stage) => hooks.onProgress?.((part + fraction) / solves, stage),
      },
    );
    outcomes.push(outcome);
    return outcome;
  };

  const exact = solve('mesh-free', divisions.at(-1)!);
  const meshFreeHz = frequenciesOf(exact).slice(0, modes);
  const refine = (kind: MassKind): KindRefinement => {
    const meshes = divisions.map((count) => solve(kind, count));
    const followedHz = followed(exact, meshes).slice(0, modes);
    return {
      frequenciesHz: meshes.map((mesh) => frequenciesOf(mesh).slice(0, modes)),
      followedHz,
      order: followedHz.map((row, mode) => observedOrder(row, meshFreeHz[mode]!, divisions)),
    };
  };
  const consistent = refine('consistent');
  const lumped = refine('lumped');
  const agrees = (at: number) =>
    meshFreeHz.every((_, mode) => {
      const a = consistent.followedHz[mode]![at] ?? null;
      const b = lumped.followedHz[mode]![at] ?? null;
      return a !== null && b !== null && Math.abs(a - b) <= tolerance * Math.max(a, b);
    });
  return {
    divisions,
    meshFreeHz,
    consistent,
    lumped,
    agreement: { tolerance, divisions: divisions.find((_, at) => agrees(at)) ?? null },
    complete: outcomes.every(({ summary }) => summary.complete),
    // Those of the document come with every solve.
    warnings: exact.summary.warnings,
  };
}

function refuseDivisions(divisions: readonly number[]): void {
  const most = DOCUMENT_LIMITS.divisions;
  const wellFormed = divisions.every(
    (count, i) =>
      Number.isInteger(count) && count >= 1 && count <= most && count > (divisions[i - 1] ?? 0),
  );
  if (divisions.length > 0 && wellFormed) return;
  const message = `Give ascending whole numbers of divisions from 1 to ${most}.`;
  throw new AppError('invalid-request', message, { issues: [{ path: 'divisions', message }] });
}

function frequenciesOf({ summary }: SolveOutcome): number[] {
  return summary.modes.map(({ frequencyHz }) => frequencyHz);
}

function comparable(outcome: SolveOutcome): ComparableModes {
  return { shapes: outcome.shapes, frequenciesHz: frequenciesOf(outcome) };
}

/** Per mode of the exact solve, per mesh: the frequency of the mode that it pairs with, from the finest mesh on. */
function followed(exact: SolveOutcome, meshes: readonly SolveOutcome[]): (number | null)[][] {
  const rows = exact.summary.modes.map((): (number | null)[] => meshes.map(() => null));
  let finer = comparable(exact);
  let placeOf = new Map(rows.map((_, mode) => [mode, mode]));
  for (let at = meshes.length - 1; at >= 0; at--) {
    const mesh = comparable(meshes[at]!);
    const next = new Map<number, number>();
    for (const { a, b } of pairModes(finer, mesh).pairs) {
      const mode = placeOf.get(a);
      if (mode === undefined) continue;
      rows[mode]![at] = mesh.frequenciesHz[b]!;
      next.set(b, mode);
    }
    finer = mesh;
    placeOf = next;
  }
  return rows;
}

function observedOrder(
  row: readonly (number | null)[],
  exact: number,
  divisions: readonly number[],
): number | null {
  if (exact === 0) return null;
  const errors = row.flatMap((value, at) => {
    const error = value === null ? 0 : Math.abs(value / exact - 1);
    return error > LEAST_ERROR ? [{ error, divisions: divisions[at]! }] : [];
  });
  const [coarse, fine] = errors.slice(-2);
  if (coarse === undefined || fine === undefined || fine.error >= coarse.error) return null;
  return Math.log(coarse.error / fine.error) / Math.log(fine.divisions / coarse.divisions);
}
