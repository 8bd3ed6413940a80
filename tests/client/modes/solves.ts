import type { ModeShapes } from '#shared/analysis/shapesFile.ts';
import type { HandCheck, Method, ModeSummary, SolveSummary } from '#shared/schemas/solveResult.ts';
import type { Solved } from '#src/features/modes/api/useMethodSolve.ts';

/** Made-up results: three points on one post, each mode a shape of its own. */
const SHAPES = [
  [0, 0.5, 1],
  [0, 1, -0.5],
] as const;

export const aMode = (number: number, frequencyHz: number): ModeSummary => ({
  ...{ number, frequencyHz, digits: 9, backwardError: 1e-15, kind: 'global' },
  name: number === 1 ? 'sways along X' : `motion ${number}`,
  participation: [1, 0, 0, 0, 0, 0],
  effectiveMass: [80, 0, 0, 0, 0, 0],
  strainShares: { members: [{ id: 'post', share: 1 }], joints: [], supports: [], springs: [] },
  kineticShares: { members: [{ id: 'post', share: 1 }], masses: [] },
});

export function aSummary(method: Method, modes: readonly ModeSummary[]): SolveSummary {
  return {
    ...{ method, stateId: null, settings: { modes: modes.length }, solverVersion: 'test' },
    ...{ freeDof: 12, totalMassKg: 100, centreOfMass: [0, 0, 1], rigidBodyModes: 0 },
    count: { shiftHz: 99, below: modes.length, found: modes.length, returned: 2, complete: true },
    complete: true,
    modes: [...modes],
    effectiveMass: {
      sum: [80, 0, 0, 0, 0, 0],
      attainable: [100, 0, 0, 0, 0, 0],
      total: [100, 100, 100, 0, 0, 0],
      onFixed: [0, 0, 0],
    },
    warnings: [],
    timing: {
      ...{ read: 0, assemble: 0, order: 0, symbolic: 0, factor: 0 },
      ...{ iterate: 0, finish: 0, certify: 0, total: 0 },
    },
  };
}

/** Modes of the given frequencies whose shapes are those of the given places in SHAPES. */
export function aSolve(
  method: Method,
  modes: readonly (readonly [frequencyHz: number, shape: 0 | 1])[],
  part: Partial<SolveSummary> = {},
): Solved {
  const points = 3;
  const shapes = new Float32Array(modes.length * points * 6);
  modes.forEach(([, shape], mode) => {
    for (let p = 0; p < points; p++) shapes[(mode * points + p) * 6] = SHAPES[shape][p] ?? 0;
  });
  const summary = aSummary(
    method,
    modes.map(([hz], i) => aMode(i + 1, hz)),
  );
  const all: ModeShapes = {
    ...{ points, modes: modes.length, nodes: ['foot'] },
    members: [{ id: 'post', first: 1, count: 2 }],
    positions: new Float32Array([0, 0, 0, 0, 0, 1, 0, 0, 2]),
    shapes,
  };
  return { summary: { ...summary, ...part }, shapes: all };
}

export const aCheck = (part: Partial<HandCheck> = {}): HandCheck => ({
  ...{ axis: 'X', mode: 1, share: 0.8 },
  ...{ deflectionAtNodes: 2.66e-5, deflectionAtMasses: 5.08e-5 },
  ...{ fromDeflectionAtNodes: 61.1, fromDeflectionAtMasses: 44.2 },
  ...{ rayleigh: 47.9, dunkerley: 40.1 },
  ...part,
});
