import type { BracketedMode } from './bracketModes.ts';
import type { DynamicSystem, Evaluation } from './DynamicSystem.ts';
import { ritzBlock } from './ritzBlock.ts';

/** Inverse iterations with the first factor, to mend the shapes of estimates, and with each later one. */
const FIRST_STEPS = 2;
const LATER_STEPS = 1;
/** Factors of one mode or cluster; Newton's steps square the error, so three settle what can be settled. */
const MOST_FACTORS = 5;
/**
 * Estimates closer than this, over λ, share a factor at first: estimates at rest err by up to some per cent, and alone
 * each would go to the mode nearest to it.
 */
const NEIGHBOURS = 0.03;
/** λ closer than this, over λ, stay one cluster. */
const CLUSTER = 1e-6;
/** Error of λ, over λ, that the last step may leave: half of what is promised of ω. */
const SETTLED = 1e-9;
/** Residual, over λ, whose square leaves less than that where the next mode is a thousandth away. */
const SETTLED_RESIDUAL = 1e-6;
/** Ritz vectors settle what is near by so much, over λ, whatever the poles. */
const NEAR = 3e-6;
/** Error of Newton's step over the square of its change, both over λ, by one pole at 1.21 λ: see `curvature`. */
const MOST_CURVATURE = 5;
/**
 * Modes of two clusters closer than this, over λ, may be one mode found twice: both are left out. Residuals, which
 * can be smaller than the rounding of λ, do not tell them apart.
 */
const SAME = 0.5 * CLUSTER;
/** Half-width, over ω, past which a mode is left to bisection. */
const WIDEST = 1e-9;

/** An estimated mode over the unknowns of a system. */
export interface ModeEstimate {
  /** [rad/s] */
  readonly omega: number;
  readonly x: Float64Array;
}

interface Settled extends ModeEstimate {
  /** Radius around λ, over λ, in which there certainly is a frequency. */
  readonly radius: number;
  /** M⁻¹ norm of the residual and error of Newton's step, over λ. */
  readonly residual: number;
  readonly step: number;
  /** Number that modes of one cluster share. */
  readonly cluster: number;
}

/**
 * Modes from estimates by Newton's method with inverse iteration, ascending: λ_i ← λ + θ_i with the Ritz values θ of
 * K_D(ω) in M = −∂K_D/∂ω² (Newton's step, as ∂θ/∂λ = −1), once per mode or cluster with a factor of its own, until
 * θ is so small that its square is nothing. Neighbouring modes come as distinct: the intervals in which residuals
 * prove a frequency do not overlap, or the modes are orthogonal in one block. Modes that do not settle so are left
 * out, so a count decides whether these are all.
 *   estimates  elastic modes, ascending   evaluate  factors K_D; stops the solve
 * Source: Parlett, The Symmetric Eigenvalue Problem, §4.5, §11.5 (residual intervals), theorem 11.7.1 (gap).
 */
export function newtonModes(
  system: DynamicSystem,
  evaluate: (omega: number) => Evaluation,
  estimates: readonly ModeEstimate[],
  onSettled: (modes: number) => void,
): BracketedMode[] {
  const settled: Settled[] = [];
  const groups = split(estimates, NEIGHBOURS);
  const clampedAbove = system.clampedAbove(estimates.at(-1)?.omega ?? 0);
  for (const group of groups) {
    settle(system, evaluate, group, 1, clampedAbove, settled);
    onSettled(settled.length);
  }
  settled.sort((a, b) => a.omega - b.omega);
  return settled.flatMap((mode, i): BracketedMode[] => {
    const others = [before(settled, i, -1), before(settled, i, 1)];
    let gap = Infinity;
    for (const other of others) {
      if (other === undefined) continue;
      const distance = Math.abs(other.omega ** 2 / mode.omega ** 2 - 1);
      if (distance <= Math.max(mode.radius + other.radius, SAME)) return [];
      gap = Math.min(gap, distance);
    }
    const halfWidth = 0.5 * (mode.step + Math.min(mode.residual, mode.residual ** 2 / gap));
    return halfWidth > WIDEST ? [] : [{ omega: mode.omega, x: mode.x, halfWidth }];
  });
}

/**
 * Bound on the error of Newton's step over the square of its change, both over λ. Ritz vectors are orthogonal in
 * M = −K_D′, so only the poles of K_D, the clamped pieces' own λ_j, bend an eigenvalue's path:
 * K_D = K₀ − λM₀ − λ² Σ m_j m_jᵀ / (λ_j − λ), where Σ m_j m_jᵀ ≤ M₀ (Bessel) gives r²/(r − 1)³ with the lowest
 * r = λ_j/λ. By one pole alone it is r²/((r − 1)(2r − 1)), 4.9 for the nearest that a divided system leaves
 * (`dividedSystem`).
 */
function curvature(omega: number, clampedAbove: number): number {
  const r = (clampedAbove / omega) ** 2;
  return r > 1 ? Math.min(MOST_CURVATURE, (r * r) / (r - 1) ** 3) : MOST_CURVATURE;
}

/** The nearest mode of another cluster, downwards (−1) or upwards. */
function before(modes: readonly Settled[], i: number, step: -1 | 1): Settled | undefined {
  for (let j = i + step; j >= 0 && j < modes.length; j += step) {
    if (modes[j]!.cluster !== modes[i]!.cluster) return modes[j];
  }
  return undefined;
}

/** Adds the modes of a group of neighbours that settle. */
function settle(
  system: DynamicSystem,
  evaluate: (omega: number) => Evaluation,
  group: readonly ModeEstimate[],
  factors: number,
  clampedAbove: number,
  into: Settled[],
): void {
  const centre = 0.5 * (group[0]!.omega + group.at(-1)!.omega);
  const evaluation = evaluate(centre);
  const start = group.map(({ x }) => x);
  const block = ritzBlock(
    system,
    evaluation,
    group.length,
    start,
    factors === 1 ? FIRST_STEPS : LATER_STEPS,
  );
  if (block === null || !(block.omega[0]! > 0)) return;
  const at = evaluation.omega ** 2;
  const changes = block.omega.map((omega) => Math.abs(at / omega ** 2 - 1));
  const change = Math.max(...changes);
  const bend = curvature(block.omega.at(-1)!, clampedAbove);
  // Of a block, the norm of all residuals together bounds each distance.
  const residual = Math.hypot(...block.residual) / block.omega[0]! ** 2;
  const near = change <= NEAR || spread(block.omega) <= CLUSTER;
  if (near && bend * change ** 2 <= SETTLED && residual <= SETTLED_RESIDUAL) {
    const cluster = into.length;
    block.omega.forEach((omega, i) => {
      const step = bend * changes[i]! ** 2;
      into.push({ omega, x: block.x[i]!, radius: residual + step, residual, step, cluster });
    });
    return;
  }
  if (factors === MOST_FACTORS) return;
  const next = block.omega.map((omega, i): ModeEstimate => ({ omega, x: block.x[i]! }));
  for (const part of split(next, Math.max(CLUSTER, 2 * bend * change * change))) {
    settle(system, evaluate, part, factors + 1, clampedAbove, into);
  }
}

/** Distance of the last from the first, over λ. */
function spread(omega: readonly number[]): number {
  return 1 - (omega[0]! / omega.at(-1)!) ** 2;
}

/** Runs of modes each closer than `distance`, over λ, to the next. */
function split(modes: readonly ModeEstimate[], distance: number): ModeEstimate[][] {
  const runs: ModeEstimate[][] = [];
  let last = -Infinity;
  for (const mode of modes) {
    if (mode.omega ** 2 - last > distance * mode.omega ** 2) runs.push([]);
    runs.at(-1)!.push(mode);
    last = mode.omega ** 2;
  }
  return runs;
}
