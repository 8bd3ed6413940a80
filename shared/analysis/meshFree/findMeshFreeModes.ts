import { CLEAR_GAP } from '../../numerics/eigen/clearGap.ts';
import { bracketModes } from './bracketModes.ts';
import type { BracketedMode, Counted } from './bracketModes.ts';
import type { DynamicSystem, Evaluation } from './DynamicSystem.ts';

/** Steps of ω that look for a bracket around the wanted modes: down to the first, up to the last. */
const STEP_DOWN = 0.5;
const STEP_UP = 1.4;
const MOST_STEPS_DOWN = 200;
/** Over the frequency scale of a frame without members: above its last mode. */
const ABOVE_ALL = 1e7;
/** The top is raised by this where no clear gap is found below it. */
const RAISE = 1.05;
const MOST_RAISES = 20;
/** Room above the wanted frequencies in which to look for the gap. */
const ROOM = 2 * CLEAR_GAP;
/** The gap is CLEAR_GAP in λ = ω², and the shift stands in its middle. */
const SHIFT = 0.25 * CLEAR_GAP;

export interface MeshFreeSearch {
  /** The frame with one piece per member: its count is the certificate. */
  readonly joints: DynamicSystem;
  /** The frame with pieces short enough that none resonates, clamped, below omega [rad/s]. */
  readonly divided: (omega: number) => DynamicSystem;
  /** Rigid-body modes, which lie at 0. */
  readonly rigid: number;
  /** How many modes are wanted, rigid ones included; or all up to a frequency [rad/s]. */
  readonly wanted: { readonly count: number } | { readonly upTo: number };
  readonly onProgress: (fraction: number) => void;
  /** Throws to end the search. */
  readonly stopIfAsked: () => void;
}

export interface MeshFreeModes {
  readonly system: DynamicSystem;
  /** Elastic modes below the shift, ascending; may be more than wanted. */
  readonly modes: readonly BracketedMode[];
  /** Shift of the count check in a clear gap [rad/s], and the joints' count there. */
  readonly shift: number;
  readonly below: number;
  readonly clear: boolean;
}

/** Finds the lowest modes of a frame by the Wittrick-Williams count, up to the first clear gap above those wanted. */
export function findMeshFreeModes(search: MeshFreeSearch): MeshFreeModes {
  const { joints, rigid, wanted, stopIfAsked } = search;
  const count = (omega: number): Evaluation => {
    stopIfAsked();
    return joints.evaluate(omega);
  };
  const guess = joints.frequencyScale();
  const low = lowest(count, guess, rigid);
  let target = 'upTo' in wanted ? count(wanted.upTo).below : wanted.count;
  // Masses and springs alone have a last mode.
  if (joints.pieces.length === 0) target = Math.min(target, count(guess * ABOVE_ALL).below);
  target = Math.max(target, rigid);
  let top = count(Math.max(low.omega / STEP_DOWN, 'upTo' in wanted ? wanted.upTo : 0));
  while (top.below < target) top = count(top.omega * STEP_UP);
  top = count(top.omega * (1 + ROOM));
  for (let raise = 0; ; raise++) {
    const last = raise === MOST_RAISES;
    const found = modesBelow(search, count, low, top, target, last);
    if (found !== null) return found;
    top = count(top.omega * RAISE);
  }
}

/** A frequency above 0 and below every elastic one. */
function lowest(count: (omega: number) => Evaluation, guess: number, rigid: number): Counted {
  let low = count(guess);
  for (let step = 0; low.below > rigid && step < MOST_STEPS_DOWN; step++) {
    low = count(low.omega * STEP_DOWN);
  }
  return low;
}

/** Modes up to the first clear gap that lies above those wanted and below `top`; null where there is none. */
function modesBelow(
  search: MeshFreeSearch,
  count: (omega: number) => Evaluation,
  low: Counted,
  top: Counted,
  target: number,
  last: boolean,
): MeshFreeModes | null {
  const { wanted, rigid, stopIfAsked, onProgress } = search;
  const floor = 'upTo' in wanted ? wanted.upTo : 0;
  const system = search.divided(top.omega);
  const evaluate = (omega: number): Evaluation => {
    stopIfAsked();
    return system.evaluate(omega);
  };
  const modes: BracketedMode[] = [];
  const gapAbove = (omega: number): MeshFreeModes | null => {
    const shift = Math.max(omega, floor) * (1 + SHIFT);
    const next = count(shift * (1 + SHIFT));
    if (next.below !== rigid + modes.length) return null;
    const { below } = count(shift);
    return { system, modes, shift, below, clear: below === next.below };
  };
  if (rigid >= target) {
    const found = gapAbove(low.omega);
    if (found !== null) return found;
  }
  for (const mode of bracketModes(system, evaluate, low, top)) {
    modes.push(mode);
    onProgress(Math.min(1, (rigid + modes.length) / target));
    if (rigid + modes.length < target) continue;
    const found = gapAbove(mode.omega);
    if (found !== null) return found;
  }
  if (!last) return null;
  return { system, modes, shift: top.omega, below: top.below, clear: false };
}
