import type { HandCheck, ModeSummary } from '#shared/schemas/solveResult.ts';

/** Rayleigh's quotient is that of the whole mesh; what exceeds it by more than this is no rounding. */
const ABOVE = 1.05;
/** One degree of freedom meets Dunkerley's sum exactly, so rounding must not put it outside. */
const BELOW = 1 - 1e-3;

/** The checks of the axes along which a mode holds the most effective mass. */
export const checksOf = (checks: readonly HandCheck[], mode: ModeSummary): HandCheck[] =>
  checks.filter((check) => check.mode === mode.number);

/**
 * Whether a mode lies outside what its hand check allows: below Dunkerley's sum, or, where it is the lowest
 * elastic mode, above Rayleigh's quotient, which bounds that one only.
 */
export function outsideBounds(
  check: HandCheck,
  mode: ModeSummary,
  modes: readonly ModeSummary[],
): boolean {
  const lowest = modes.find(({ kind }) => kind !== 'rigid');
  if (mode.number === lowest?.number && mode.frequencyHz > ABOVE * check.rayleigh) return true;
  return check.dunkerley !== null && mode.frequencyHz < BELOW * check.dunkerley;
}
