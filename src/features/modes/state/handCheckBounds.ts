import type { HandCheck, ModeSummary } from '#shared/schemas/solveResult.ts';

/** Rayleigh's quotient is that of the whole mesh; what exceeds it by more than this is no rounding. */
const ABOVE = 1.05;
/** The checks of the axes along which a mode holds the most effective mass. */
export const checksOf = (checks: readonly HandCheck[], mode: ModeSummary): HandCheck[] =>
  checks.filter((check) => check.mode === mode.number);

/**
 * Whether the lowest frequency found lies above an axis' Rayleigh quotient, which bounds it whichever way it moves: a
 * mode below is missing, or the model is not what was meant. Dunkerley's sum judges nothing: where motions are coupled a
 * sound frequency may lie below it.
 */
export function outsideBounds(check: HandCheck, modes: readonly ModeSummary[]): boolean {
  const lowest = modes.find(({ kind }) => kind !== 'rigid');
  return lowest !== undefined && lowest.frequencyHz > ABOVE * check.rayleigh;
}
