import type { ModeSummary } from '#shared/schemas/solveResult.ts';

/** On screens no natural frequency deserves more digits than this: supports alone move it by more. */
const MOST_DIGITS = 5;

/** "47.212 Hz", with the digits that the accuracy of the solve supports, five at most. */
export function formatModeFrequency(mode: ModeSummary): string {
  if (mode.frequencyHz === 0) return '0 Hz';
  const digits = Math.max(2, Math.min(MOST_DIGITS, mode.digits));
  return `${withDigits(mode.frequencyHz, digits)} Hz`;
}

/** Like toPrecision, but never in powers of ten. */
export function withDigits(value: number, digits: number): string {
  const decimals = digits - 1 - Math.floor(Math.log10(Math.abs(value)));
  return value.toFixed(Math.max(0, Math.min(12, decimals)));
}

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
