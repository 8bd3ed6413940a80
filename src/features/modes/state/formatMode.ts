import type { ModeSummary } from '#shared/schemas/solveResult.ts';
import { displayUnit, toDisplay, type UnitSystem } from '#shared/units/displayUnits.ts';
import { formatFrequency } from '#shared/units/formatFrequency.ts';
import { formatNumber } from '#shared/units/formatQuantity.ts';

/** On screens no natural frequency deserves more digits than this: supports alone move it by more. */
const MOST_DIGITS = 5;

/** "47.212 Hz", with the digits that the accuracy of the solve supports, five at most. */
export const formatModeFrequency = (mode: ModeSummary): string =>
  formatFrequency(mode.frequencyHz, Math.max(2, Math.min(MOST_DIGITS, mode.digits)));

/** "+0.38 %", "−1.20 %", "0.00 %": a difference with its sign. */
export function formatDifference(share: number): string {
  const percent = (share * 100).toFixed(2);
  if (Number(percent) === 0) return '0.00 %';
  return `${share > 0 ? '+' : '−'}${percent.replace('-', '')} %`;
}

/** A share of one as whole per cent; "<1 %" where it would read as nothing. */
export function formatShare(share: number): string {
  const percent = share * 100;
  if (percent > 0 && percent < 1) return '<1 %';
  return `${percent.toFixed(0)} %`;
}

/** A hand check is worth no more digits. */
const CHECK_DIGITS = 3;

/** "44.2 Hz" */
export const formatCheck = (hz: number): string => formatFrequency(hz, CHECK_DIGITS);

/** A deflection in the person's units, small ones of metric systems in micrometres: "50.8 µm", "1.2 mm", "0.002 in". */
export function formatDeflection(metres: number, system: UnitSystem): string {
  const { symbol } = displayUnit('sectionLength', system);
  if (symbol === 'mm' && metres < 1e-3) return `${formatNumber(metres * 1e6, CHECK_DIGITS)} µm`;
  const shown = toDisplay(metres, 'sectionLength', system);
  return `${formatNumber(shown, CHECK_DIGITS)} ${symbol}`;
}
