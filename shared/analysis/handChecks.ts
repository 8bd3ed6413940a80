import type { FrameModel } from '../frame/assembly/FrameModel.ts';
import { addForces, displacements } from '../frame/freedoms/Combination.ts';
import type { ChainedPencil } from '../numerics/chains/ChainedPencil.ts';
import type { HandCheck, HandChecks, SolveSummary } from '../schemas/solveResult.ts';
import { shapesAtPoints } from './shapesAtPoints.ts';
import { VALUES_PER_POINT } from './shapesFile.ts';
import type { ModeShapes } from './shapesFile.ts';

/** Standard gravity [m/s²] (BIPM, The International System of Units, 9th edition). */
const GRAVITY = 9.80665;
/** More masses than this are nobody's hand check: each costs one solve along each axis. */
const MOST_MASSES = 100;
/** Inverse iterations for the frame without its masses; each shrinks what is not its lowest mode along the axis. */
const ALONE_STEPS = 4;
/** A mode with less of what moves along an axis is not what the axis' check speaks of. */
const LEAST_SHARE = 0.01;

const AXES = ['X', 'Y', 'Z'] as const;

/** What 1 g along one axis says of a frame, before it is held against the modes. Frequencies in Hz. */
type AxisCheck = Omit<HandCheck, 'mode' | 'share'>;

/** Either the checks of every axis there is, or why there is none. */
export type StaticChecks = { readonly axes: AxisCheck[] } | { readonly none: string };

/**
 * Hand checks of a frame, axis by axis: what its deflection under 1 g along X, Y and Z says of its frequencies.
 *   pencil  factored at 0, K being certainly regular
 *   forces  address of the inertia forces (M r)_free of translation along X, Y, Z, vectors of the pencil
 *
 * - g/δ: √(g/δ) / 2π, δ the largest deflection along the axis; exact for one degree of freedom (common practice).
 *   Taken at the nodes alone and with the masses' own centres of gravity.
 * - Rayleigh's quotient of the deflected shape, g ΣWδ / ΣWδ² with the whole motion in it: the lowest frequency is
 *   never higher (Thomson, Theory of Vibration with Applications, section on Rayleigh's method).
 * - Dunkerley by component systems: 1/ω² = 1/ω₀² + Σ m f, ω₀ of the frame without its masses, f the deflection at
 *   each mass alone under a unit force there (Thomson §12.2): from below if all moved along this axis alone. No bound of
 *   a frame whose motions are coupled.
 */
export function staticChecks(
  model: FrameModel,
  pencil: ChainedPencil,
  forces: number,
): StaticChecks {
  const { arena, size } = pencil;
  const { kernels } = arena;
  const used = arena.used;
  const image = pencil.vector();
  const sags = [0, 1, 2].flatMap((direction) => {
    if (!model.exists[direction]) return [];
    const b = forces + 8 * size * direction;
    const u = pencil.vector();
    pencil.solve(b, u);
    const work = kernels.dot(size, b, u);
    // Without work all of the mass stands on what is fixed along this axis.
    return work > 0 ? [{ direction, b, u, work }] : [];
  });
  const points = shapesAtPoints(
    model,
    pencil,
    sags.map(({ u }) => u),
  );
  const axes = sags.map(({ direction, b, u, work }, i): AxisCheck => {
    const atNodes = GRAVITY * largestAtPoints(points, i, direction);
    const atMasses = Math.max(atNodes, GRAVITY * largestAtMasses(model, pencil, u, direction));
    pencil.multiplyMass(u, image);
    return {
      axis: AXES[direction]!,
      deflectionAtNodes: atNodes,
      deflectionAtMasses: atMasses,
      fromDeflectionAtNodes: atNodes > 0 ? hertz(GRAVITY / atNodes) : null,
      fromDeflectionAtMasses: hertz(GRAVITY / atMasses),
      rayleigh: hertz(work / kernels.dot(size, u, image)),
      dunkerley: dunkerley(model, pencil, b, direction),
    };
  });
  arena.rewind(used);
  if (axes.length > 0) return { axes };
  return { none: 'No mass of this frame can move along an axis, so it does not sag.' };
}

/** The checks of a solve, each beside the mode that holds the most effective mass along its axis. */
export function matchHandChecks(
  checks: StaticChecks,
  { modes, effectiveMass }: Pick<SolveSummary, 'modes' | 'effectiveMass'>,
): HandChecks {
  if ('none' in checks) return { none: checks.none, axes: [] };
  const axes = checks.axes.map((check): HandCheck => {
    const direction = AXES.indexOf(check.axis);
    const attainable = effectiveMass.attainable[direction]!;
    let mode: number | null = null;
    let share = 0;
    for (const one of modes) {
      const part = attainable > 0 ? one.effectiveMass[direction]! / attainable : 0;
      if (part > Math.max(share, LEAST_SHARE)) [mode, share] = [one.number, part];
    }
    return { ...check, mode, share };
  });
  return { none: null, axes };
}

/** Largest deflection along an axis of one shape over nodes and stations. */
function largestAtPoints({ shapes, points }: ModeShapes, shape: number, direction: number): number {
  const from = shape * points * VALUES_PER_POINT;
  let largest = 0;
  for (let at = from; at < from + points * VALUES_PER_POINT; at += VALUES_PER_POINT) {
    largest = Math.max(largest, Math.abs(shapes[at + direction]!));
  }
  return largest;
}

function largestAtMasses(
  { bodies }: FrameModel,
  { arena, n }: ChainedPencil,
  u: number,
  direction: number,
): number {
  const x = arena.view(u, n);
  const d = new Float64Array(6);
  let largest = 0;
  for (const { motion } of bodies) {
    displacements(motion, x, d);
    largest = Math.max(largest, Math.abs(d[direction]!));
  }
  return largest;
}

/** [Hz]; null for a frame with more masses than anybody would add up. */
function dunkerley(
  { document, bodies }: FrameModel,
  pencil: ChainedPencil,
  b: number,
  direction: number,
): number | null {
  if (bodies.length > MOST_MASSES) return null;
  const { arena, n, size } = pencil;
  const { kernels } = arena;
  const force = pencil.vector();
  const x = pencil.vector();
  const view = arena.view(force, n);
  const d = new Float64Array(6);
  const f = new Float64Array(6);
  let sum = 0;

  // The frame alone: its inertia force, and inverse iterations with M less the masses.
  view.set(arena.view(b, n));
  for (const { index, motion } of bodies) {
    f.fill(0);
    f[direction] = -document.masses[index]!.mass;
    addForces(motion, f, view);
  }
  let scale = Math.sqrt(kernels.dot(size, force, force));
  const whole = Math.sqrt(kernels.dot(size, b, b));
  // Masses on members without weight leave only rounding.
  for (let step = 0; step < ALONE_STEPS && scale > Number.EPSILON * whole; step++) {
    kernels.multiply(size, 1 / scale, force);
    pencil.solve(force, x);
    const work = kernels.dot(size, force, x);
    pencil.multiplyMass(x, force);
    for (const { motion, mass } of bodies) {
      displacements(motion, arena.view(x, n), d);
      for (let i = 0; i < 6; i++) {
        f[i] = 0;
        for (let j = 0; j < 6; j++) f[i]! -= mass[i * 6 + j]! * d[j]!;
      }
      addForces(motion, f, view);
    }
    const kinetic = kernels.dot(size, force, x);
    sum = work > 0 && kinetic > 0 ? kinetic / work : 0;
    scale = Math.sqrt(kernels.dot(size, force, force));
  }

  for (const { index, motion } of bodies) {
    view.fill(0);
    f.fill(0);
    f[direction] = 1;
    addForces(motion, f, view);
    pencil.solve(force, x);
    sum += document.masses[index]!.mass * kernels.dot(size, force, x);
  }
  return sum > 0 ? hertz(1 / sum) : null;
}

/** Frequency of ω² [rad²/s²] in Hz. */
const hertz = (lambda: number): number => Math.sqrt(lambda) / (2 * Math.PI);
