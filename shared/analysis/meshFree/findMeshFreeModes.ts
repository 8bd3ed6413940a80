import { CLEAR_GAP } from '../../numerics/eigen/clearGap.ts';
import { bracketModes } from './bracketModes.ts';
import type { BracketedMode, Counted } from './bracketModes.ts';
import type { DynamicSystem, Evaluation } from './DynamicSystem.ts';
import { newtonModes } from './newtonModes.ts';
import type { ModeEstimate } from './newtonModes.ts';

/** Steps of ω that look for a bracket around the wanted modes: down to the first, up to the last. */
const STEP_DOWN = 0.5;
const STEP_UP = 1.4;
const MOST_STEPS_DOWN = 200;
/** Over the frequency scale of a frame without members: above its last mode. */
const ABOVE_ALL = 1e7;
/** The top is raised by this where no clear gap is found below it. */
const RAISE = 1.05;
const MOST_RAISES = 20;
/** Estimates past the wanted ones among which to look for the gap. */
const SPARE_ESTIMATES = 4;
/** Distance over λ by which estimates must stand apart for a clear gap to be expected between them. */
const EXPECTED_GAP = 20 * CLEAR_GAP;
/** Room above the wanted frequencies in which to look for the gap. */
const ROOM = 2 * CLEAR_GAP;
/** The gap is CLEAR_GAP in λ = ω², and the shift stands in its middle. */
const SHIFT = 0.25 * CLEAR_GAP;

export interface MeshFreeSearch {
  /** The frame with one piece per member: its count is the certificate. */
  readonly joints: DynamicSystem;
  /** The frame with pieces short enough that none resonates, clamped, below omega [rad/s]. */
  readonly divided: (omega: number) => DynamicSystem;
  /** Elastic ones of the lowest `count` modes of a system estimated, ascending, as far as it has them. */
  readonly estimates: (system: DynamicSystem, count: number) => readonly ModeEstimate[];
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

/**
 * Finds the lowest modes of a frame up to the first clear gap above those wanted: estimates refined by Newton's
 * method, certified by the Wittrick-Williams count in that gap; where the count says that these are not all, the
 * missing are found by bisection on it.
 */
export function findMeshFreeModes(search: MeshFreeSearch): MeshFreeModes {
  const { joints, rigid, wanted, stopIfAsked } = search;
  const count = (omega: number): Evaluation => {
    stopIfAsked();
    return joints.evaluate(omega);
  };
  let target = 'upTo' in wanted ? count(wanted.upTo).below : wanted.count;
  const refined = refinedModes(search, Math.max(target, rigid));
  const certified = refined && certify(search, count, refined, Math.max(target, rigid));
  if (certified) return certified;

  const guess = joints.frequencyScale();
  const low = lowest(count, guess, rigid);
  // Masses and springs alone have a last mode.
  if (joints.pieces.length === 0) target = Math.min(target, count(guess * ABOVE_ALL).below);
  target = Math.max(target, rigid);
  let top = count(Math.max(low.omega / STEP_DOWN, 'upTo' in wanted ? wanted.upTo : 0));
  while (top.below < target) top = count(top.omega * STEP_UP);
  top = count(top.omega * (1 + ROOM));
  for (let raise = 0; ; raise++) {
    const last = raise === MOST_RAISES;
    const found = modesBelow(search, count, low, top, target, last, refined);
    if (found !== null) return found;
    top = count(top.omega * RAISE);
  }
}

/** Modes refined by Newton's method in a system without poles up to `omega`. */
interface RefinedModes {
  readonly system: DynamicSystem;
  readonly omega: number;
  readonly modes: readonly BracketedMode[];
}

/** Null where estimates are too few. */
function refinedModes(search: MeshFreeSearch, target: number): RefinedModes | null {
  const { joints, rigid, stopIfAsked, onProgress } = search;
  const needed = target - rigid;
  const count = target + SPARE_ESTIMATES;
  const first = upToGap(search.estimates(joints, count), needed);
  const top = first?.at(-1);
  if (first === null || top === undefined) return null;
  const system = search.divided(top.omega);
  // Shapes with members' own vibrations, and so lower estimates.
  const estimates = system === joints ? first : upToGap(search.estimates(system, count), needed);
  if (estimates === null) return null;
  const evaluate = (omega: number): Evaluation => {
    stopIfAsked();
    return system.evaluate(omega);
  };
  const modes = newtonModes(system, evaluate, estimates, (settled) => {
    onProgress(Math.min(1, (rigid + settled) / target));
  });
  return { system, omega: top.omega, modes };
}

/** The needed estimates and those up to the next gap; null where there are too few. */
function upToGap(
  estimates: readonly ModeEstimate[],
  needed: number,
): readonly ModeEstimate[] | null {
  if (estimates.length < needed) return null;
  const lambda = estimates.map(({ omega }) => omega * omega);
  let end = needed;
  while (
    end > 0 &&
    end < lambda.length &&
    lambda[end]! - lambda[end - 1]! < EXPECTED_GAP * lambda[end]!
  ) {
    end += 1;
  }
  return estimates.slice(0, end);
}

/** The refined modes where the count in a clear gap above the wanted ones says that they are all; else null. */
function certify(
  { rigid, wanted }: MeshFreeSearch,
  count: (omega: number) => Evaluation,
  { system, modes }: RefinedModes,
  target: number,
): MeshFreeModes | null {
  const floor = 'upTo' in wanted ? wanted.upTo : 0;
  for (let found = Math.max(target - rigid, 1); found <= modes.length; found++) {
    const shift = Math.max(modes[found - 1]!.omega, floor) * (1 + SHIFT);
    const clearTo = shift * (1 + SHIFT);
    if (found < modes.length && modes[found]!.omega <= clearTo) continue;
    if (count(clearTo).below !== rigid + found) return null;
    const { below } = count(shift);
    return { system, modes: modes.slice(0, found), shift, below, clear: below === rigid + found };
  }
  return null;
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
  refined: RefinedModes | null,
): MeshFreeModes | null {
  const { wanted, rigid, stopIfAsked, onProgress } = search;
  const floor = 'upTo' in wanted ? wanted.upTo : 0;
  const usable = refined !== null && top.omega <= refined.omega ? refined : null;
  const system = usable?.system ?? search.divided(top.omega);
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
  for (const mode of bracketModes(system, evaluate, low, top, usable?.modes)) {
    modes.push(mode);
    onProgress(Math.min(1, (rigid + modes.length) / target));
    if (rigid + modes.length < target) continue;
    const found = gapAbove(mode.omega);
    if (found !== null) return found;
  }
  if (!last) return null;
  return { system, modes, shift: top.omega, below: top.below, clear: false };
}
