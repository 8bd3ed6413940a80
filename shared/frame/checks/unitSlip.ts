import { formatNumber } from '../../units/formatQuantity.ts';

/** A unit in which a value may have been typed by mistake. */
export interface Slip {
  /** As it follows "typed in": "mm", "Pa where GPa are shown". */
  readonly unit: string;
  /** What makes the value right. */
  readonly factor: number;
}

export interface Range {
  readonly least: number;
  readonly most: number;
}

export const isWithin = (value: number, { least, most }: Range): boolean =>
  value >= least && value <= most;

/** The slips that would bring a value into the usual range. */
export function likelySlips(value: number, slips: readonly Slip[], usual: Range): Slip[] {
  return slips.filter(({ factor }) => isWithin(value * factor, usual));
}

/**
 * "Was it typed in GPa? Then enter 210 GPa.", with every unit that would make sense of the value; "Check its unit."
 * where none does.
 *   show  a value in SI with a unit
 */
export function askUnit(
  value: number,
  likely: readonly Slip[],
  show: (value: number) => string,
  question = 'Was it typed',
): string {
  if (likely.length === 0) return 'Check its unit.';
  const units = likely.map(({ unit }) => unit).join(' or in ');
  const values = likely.map(({ factor }) => show(value * factor)).join(' or ');
  return `${question} in ${units}? Then enter ${values}.`;
}

/** Lengths from 1 m on in m, shorter ones in mm. */
export function showLength(metres: number): string {
  return metres >= 1 ? `${formatNumber(metres, 4)} m` : `${formatNumber(metres * 1e3, 4)} mm`;
}
