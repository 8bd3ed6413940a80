import { ChainedPencil } from '../../numerics/chains/ChainedPencil.ts';
import { findModes } from '../../numerics/eigen/lowestModes.ts';
import { ZeroPivotError } from '../../numerics/factor/ZeroPivotError.ts';
import { withArena } from '../../numerics/kernels/Arena.ts';
import type { DynamicSystem } from './DynamicSystem.ts';
import type { ModeEstimate } from './newtonModes.ts';

const SEED = 20_003;

/**
 * Lowest elastic modes, ascending, of K_D(0) and −∂K_D/∂ω²(0): one consistent element per piece. Their shapes are
 * those of static deflection, which the continuous frame can take too, so each ω is an upper bound of the same one of
 * the continuous frame (Rayleigh, Ritz). Fewer than asked for, or none, where the frame at rest has no more. Not
 * certified.
 *   rigid  motions that nothing resists, over the unknowns
 *   count  of modes, rigid ones included
 */
export function modesAtRest(
  system: DynamicSystem,
  rigid: readonly Float64Array[],
  count: number,
  shouldStop: () => boolean,
): ModeEstimate[] {
  if (system.n === 0) return [];
  return withArena((arena) => {
    const pencil = new ChainedPencil(arena, system.atRest(), system.analysis);
    try {
      const { lambda, phi } = findModes(pencil, {
        count: Math.min(count, system.n),
        nullVectors: [...rigid],
        seed: SEED,
        shouldStop,
      });
      const modes = phi.map((x, i) => ({ omega: Math.sqrt(lambda[i]!), x })).slice(rigid.length);
      return modes.filter(({ omega }) => omega > 0);
    } catch (error) {
      // Unknowns with neither stiffness nor mass at rest: bisection on the count does without estimates.
      if (error instanceof ZeroPivotError) return [];
      throw error;
    }
  });
}
