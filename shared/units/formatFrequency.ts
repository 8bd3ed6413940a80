/** More decimals than these say nothing about a machine. */
const MOST_DECIMALS = 4;

/**
 * A frequency with exactly the significant digits its accuracy supports, trailing zeros kept, and its unit:
 * `47.21 Hz`, `120 Hz`. A rigid-body mode is `0 Hz`.
 *   hz  Hz     digits  significant digits, 1 or more
 */
export function formatFrequency(hz: number, digits: number): string {
  if (!Number.isFinite(hz)) return '–';
  if (hz === 0) return '0 Hz';
  // The exponent after rounding: 9.996 to three digits is 10.0.
  const before = Number(hz.toExponential(Math.max(1, digits) - 1).split('e')[1]) + 1;
  const decimals = Math.min(MOST_DECIMALS, Math.max(0, digits - before));
  return `${hz.toFixed(decimals)} Hz`;
}
