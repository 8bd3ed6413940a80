import type { DynamicSystem, Evaluation } from './DynamicSystem.ts';
import { ritzBlock } from './ritzBlock.ts';

/** Relative width of a bracket from which the modes in it are tried for by iteration. */
const TRY_WIDTH = 0.1;
/** How many times narrower a bracket must be before the next try. */
const NEXT_TRY = 20;
/** Newton's steps of one try. */
const MOST_STEPS = 4;
/** Change of ω, over ω, after which the next step would change nothing: its error is the square. */
const SETTLED = 1e-8;
/** Frequencies closer than this, over ω, are refined as one cluster. */
const CLUSTER = 1e-8;
/** Relative half-widths within which counts must confirm a frequency, tried in turn. */
const CONFIRM = [1e-10, 1e-9, 1e-8] as const;
/** Where iteration fails, bisection on the count ends at this relative width. */
const FINEST = 1e-11;

/** A frequency with its count known: `below` natural frequencies lie under omega [rad/s]. */
export interface Counted {
  readonly omega: number;
  readonly below: number;
}

export interface BracketedMode {
  /** [rad/s] */
  readonly omega: number;
  readonly x: Float64Array;
  /** The natural frequency lies in omega (1 ± halfWidth): by two counts, or by the bound of Newton's last step. */
  readonly halfWidth: number;
}

/**
 * All natural frequencies between two counted ones, ascending, none missed: brackets are split until the count says
 * how many modes each holds and iteration finds that many inside; two more counts just below and above confirm them.
 * Where iteration fails, bisection goes on until the bracket itself is as narrow as the answer need be.
 *   evaluate  factors K_D and counts; reports progress and stops the solve
 *   known     modes whose frequencies are certain, ascending: where they are all that a bracket holds, it is done
 * Source: Wittrick and Williams 1971 for the count; Williams and Kennedy 1988, Int. J. Numer. Meth. Eng. 26,
 * 1825–1831, for safeguarded refinement in its brackets.
 */
export function* bracketModes(
  system: DynamicSystem,
  evaluate: (omega: number) => Evaluation,
  low: Counted,
  high: Counted,
  known: readonly BracketedMode[] = [],
  tryWidth = TRY_WIDTH,
): Generator<BracketedMode> {
  const count = high.below - low.below;
  if (count <= 0) return;
  const inside = known.filter(({ omega }) => omega > low.omega && omega < high.omega);
  if (inside.length === count) {
    yield* inside;
    return;
  }
  const width = (high.omega - low.omega) / high.omega;
  let split = width > 0.5 ? Math.sqrt(low.omega * high.omega) : 0.5 * (low.omega + high.omega);
  let next = tryWidth;
  if (width < tryWidth) {
    next = width / NEXT_TRY;
    const tried = refine(system, evaluate, low, high, count);
    if (Array.isArray(tried)) {
      yield* tried;
      return;
    }
    if (tried !== null) {
      split = tried;
      next = tryWidth;
    }
    if (width < FINEST) {
      yield* narrowest(system, evaluate, low, high, count);
      return;
    }
  }
  const middle = evaluate(split);
  yield* bracketModes(system, evaluate, low, middle, inside, next);
  yield* bracketModes(system, evaluate, middle, high, inside, next);
}

/** The modes of a bracket; or where to split it, since they are apart; or null. */
function refine(
  system: DynamicSystem,
  evaluate: (omega: number) => Evaluation,
  low: Counted,
  high: Counted,
  count: number,
): BracketedMode[] | number | null {
  let at = 0.5 * (low.omega + high.omega);
  let x: Float64Array[] | undefined;
  for (let step = 0; step < MOST_STEPS; step++) {
    const block = ritzBlock(system, evaluate(at), count, x);
    if (block === null) return null;
    const first = block.omega[0]!;
    const last = block.omega[count - 1]!;
    if (!(first > low.omega && last < high.omega)) return null;
    if (last - first > CLUSTER * last) {
      // Ritz values are good to the square of the distance: enough to see a gap, and the count settles it.
      return step === 0 ? widestGap(block.omega) : null;
    }
    const centre = 0.5 * (first + last);
    const change = Math.abs(centre - at);
    at = centre;
    x = block.x;
    if (change > SETTLED * centre) continue;
    for (const halfWidth of CONFIRM) {
      if (evaluate(first * (1 - halfWidth)).below !== low.below) continue;
      if (evaluate(last * (1 + halfWidth)).below !== high.below) continue;
      return block.omega.map((omega, i) => ({ omega, x: block.x[i]!, halfWidth }));
    }
    return null;
  }
  return null;
}

function widestGap(omega: readonly number[]): number {
  let best = 1;
  for (let i = 2; i < omega.length; i++) {
    if (omega[i]! - omega[i - 1]! > omega[best]! - omega[best - 1]!) best = i;
  }
  return 0.5 * (omega[best]! + omega[best - 1]!);
}

/** A bracket as narrow as bisection goes, with whatever shapes iteration gives there. */
function narrowest(
  system: DynamicSystem,
  evaluate: (omega: number) => Evaluation,
  low: Counted,
  high: Counted,
  count: number,
): BracketedMode[] {
  const omega = 0.5 * (low.omega + high.omega);
  const x = ritzBlock(system, evaluate(omega), count)?.x ?? [];
  return x.map((vector) => ({ omega, x: vector, halfWidth: FINEST }));
}
