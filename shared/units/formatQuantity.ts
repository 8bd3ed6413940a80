import { displayUnit, toDisplay, type UnitSystem } from './displayUnits.ts';
import type { QuantityKind } from './quantities.ts';

/** Outside of these sizes a number is written with a power of ten. */
const PLAIN_FROM = 1e-3;
const PLAIN_TO = 1e7;

const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/**
 * A number with at most so many significant digits, no trailing zeros, a true minus sign, and a power of ten
 * where it would be unreadable without: 1234.5, −0.02, 2.1 × 10⁹. What is no number is a dash.
 */
export function formatNumber(value: number, digits: number): string {
  if (!Number.isFinite(value)) return '–';
  const rounded = Number(value.toPrecision(digits));
  const size = Math.abs(rounded);
  const sign = rounded < 0 ? '−' : '';
  if (size === 0) return '0';
  if (size >= PLAIN_FROM && size < PLAIN_TO) return `${sign}${size}`;
  const [mantissa = '', exponent = ''] = size.toExponential().split('e');
  return `${sign}${mantissa} × 10${superscript(Number(exponent))}`;
}

function superscript(exponent: number): string {
  const raised = [...String(Math.abs(exponent))].map((digit) => SUPERSCRIPTS.charAt(Number(digit)));
  return `${exponent < 0 ? '⁻' : ''}${raised.join('')}`;
}

/** A stored SI value as a person reads it, with its unit: `2711000 mm⁴`, `0.8 m`, `210 GPa`. */
export function formatQuantity(valueSi: number, kind: QuantityKind, system: UnitSystem): string {
  const { symbol, digits } = displayUnit(kind, system);
  const number = formatNumber(toDisplay(valueSi, kind, system), digits);
  if (symbol === '' || symbol === '°') return `${number}${symbol}`;
  return `${number} ${symbol}`;
}
