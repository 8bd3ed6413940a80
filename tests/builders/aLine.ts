import { solveFrame } from '#shared/analysis/solveFrame.ts';
import type { SolveOutcome } from '#shared/analysis/solveFrame.ts';
import { checkDocument } from '#shared/frame/checkDocument.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { Method, SolveSettings } from '#shared/schemas/solveResult.ts';
import type { FrameInput } from './aFrame.ts';

export type End = 'free' | 'pinned' | 'clamped' | 'guided';

/** One beam of unit length, mass per length, EI and (in Timoshenko theory) stated shear stiffness. */
export interface LineOptions {
  readonly ends: readonly [End, End];
  readonly divisions: number;
  readonly unknowns?: FrameInput['unknowns'];
  readonly theory?: 'timoshenko' | 'bernoulli';
  readonly tipMass?: number;
  /** At the start [N/m, N·m/rad]; replaces the end's own support. */
  readonly startStiffness?: NonNullable<FrameInput['supports'][number]['stiffness']>;
  readonly endStiffness?: NonNullable<FrameInput['supports'][number]['stiffness']>;
}

const FIXED = {
  free: [],
  pinned: ['w'],
  clamped: ['w', 'ry'],
  guided: ['ry'],
} as const;

/** A line along X that bends in X–Z: EI = ρA = L = 1, so that ω is the table's dimensionless number. */
export function aLine(options: LineOptions): FrameInput {
  const { ends, divisions, unknowns = ['w', 'ry'], theory = 'bernoulli' } = options;
  const supports = (['a', 'b'] as const).flatMap((node, i) => {
    const stiffness = i === 0 ? options.startStiffness : options.endStiffness;
    const fixed = FIXED[ends[i]!].filter((displacement) => unknowns.includes(displacement));
    if (fixed.length === 0 && !stiffness) return [];
    return [{ node, fixed: [...fixed], ...(stiffness && { stiffness }) }];
  });
  return {
    name: 'Line',
    unknowns,
    materials: [{ id: 'unit', name: 'Unit', E: 1, nu: 0, density: 1 }],
    sections: [
      {
        id: 'unit',
        name: 'Unit',
        shape: { kind: 'custom', A: 1, Iy: 1, Iz: 1, J: 2, ky: 1, kz: 1 },
      },
    ],
    nodes: [
      { id: 'a', x: 0, z: 0 },
      { id: 'b', x: 1, z: 0 },
    ],
    members: [
      {
        id: 'line',
        kind: 'beam',
        start: 'a',
        end: 'b',
        material: 'unit',
        section: 'unit',
        divisions,
        theory,
      },
    ],
    supports,
    springs: [],
    rigidLinks: [],
    masses:
      options.tipMass === undefined
        ? []
        : [{ id: 'tip', name: 'Tip', node: 'b', mass: options.tipMass }],
    states: [],
  };
}

/** The stored form of a document that must be acceptable. */
export function accepted(input: unknown): FrameDocument {
  const { document, errors } = checkDocument(input);
  if (document === null) throw new Error(errors.map(({ message }) => message).join(' '));
  return document;
}

/** Solves a frame as written; a complete result is demanded, so no test passes by not converging. */
export function solved(
  input: unknown,
  method: Method = 'consistent',
  settings: SolveSettings = { modes: 8 },
  stateId: string | null = null,
): SolveOutcome {
  const outcome = solveFrame({ document: accepted(input), method, stateId, settings });
  if (!outcome.summary.complete) throw new Error('The solve is not complete.');
  return outcome;
}

/** Natural frequencies in Hz. */
export function frequencies(
  input: unknown,
  method: Method = 'consistent',
  settings: SolveSettings = { modes: 8 },
): number[] {
  return solved(input, method, settings).summary.modes.map((mode) => mode.frequencyHz);
}

/** Circular natural frequencies in rad/s. */
export function omegas(
  input: unknown,
  method: Method = 'consistent',
  settings: SolveSettings = { modes: 8 },
): number[] {
  return frequencies(input, method, settings).map((hz) => 2 * Math.PI * hz);
}

/** Largest relative difference of the first values of `actual` from `expected`. */
export function worstError(actual: readonly number[], expected: readonly number[]): number {
  return Math.max(
    ...expected.map((value, i) => Math.abs((actual[i] ?? Infinity) - value) / Math.abs(value)),
  );
}
