import { solveFrame } from '#shared/analysis/solveFrame.ts';
import type { SolveOutcome } from '#shared/analysis/solveFrame.ts';
import { checkDocument } from '#shared/frame/checkDocument.ts';
import type { Displacement } from '#shared/schemas/frameDocument.ts';
import type { Method, SolveSettings } from '#shared/schemas/solveResult.ts';
import type { FrameInput } from '#tests/builders/aFrame.ts';

/** Solves a frame that must be accepted; mesh-free unless another method is named. */
export function solved(
  frame: FrameInput,
  settings: SolveSettings = { modes: 6 },
  method: Method = 'mesh-free',
): SolveOutcome {
  const { document, errors } = checkDocument(frame);
  if (document === null) throw new Error(errors.map((error) => error.message).join(' '));
  return solveFrame({ document, method, stateId: null, settings });
}

/** Circular frequencies [rad/s] of a complete solve. */
export function omegas(frame: FrameInput, settings?: SolveSettings, method?: Method): number[] {
  const { summary } = solved(frame, settings, method);
  if (!summary.complete) throw new Error('The count check is not complete.');
  return summary.modes.map((mode) => 2 * Math.PI * mode.frequencyHz);
}

export interface LineOptions {
  readonly unknowns?: Displacement[];
  readonly theory?: 'timoshenko' | 'bernoulli';
  readonly start?: Displacement[];
  readonly end?: Displacement[];
  readonly section?: { A?: number; Iy?: number; kz?: number };
  readonly nu?: number;
}

/** One beam of unit length along X with E = ρ = A = Iy = 1: ω √(mL⁴/EI) is ω itself. */
export function aLine(options: LineOptions = {}): FrameInput {
  const { start = [], end = [] } = options;
  return {
    name: 'Line',
    unknowns: options.unknowns ?? ['w', 'ry'],
    materials: [{ id: 'm', name: 'Unit', E: 1, nu: options.nu ?? 0.3, density: 1 }],
    sections: [
      {
        id: 's',
        name: 'Unit',
        shape: { kind: 'custom', A: 1, Iy: 1, Iz: 1, J: 1, ky: 1, kz: 1, ...options.section },
      },
    ],
    nodes: [
      { id: 'a', x: 0, z: 0 },
      { id: 'b', x: 1, z: 0 },
    ],
    members: [
      {
        id: 'beam',
        kind: 'beam',
        start: 'a',
        end: 'b',
        material: 'm',
        section: 's',
        theory: options.theory ?? 'bernoulli',
      },
    ],
    supports: [
      ...(start.length > 0 ? [{ node: 'a', fixed: start }] : []),
      ...(end.length > 0 ? [{ node: 'b', fixed: end }] : []),
    ],
    springs: [],
    rigidLinks: [],
    masses: [],
    states: [],
  };
}
