import type { SolveSummary } from '#shared/schemas/solveResult.ts';
import { significant, table } from './table.ts';

/** The one object that `--json` prints; rigid-body modes stand first with 0 Hz. */
export function solveJson(summary: SolveSummary): string {
  const { modes, freeDof, totalMassKg, rigidBodyModes, warnings, count, timing } = summary;
  const report = {
    frequenciesHz: modes.map((mode) => mode.frequencyHz),
    rigidBodyModes,
    backwardErrors: modes.map((mode) => mode.backwardError),
    freeDof,
    totalMassKg,
    warnings,
    count,
    timing,
  };
  return `${JSON.stringify(report)}\n`;
}

/** Modes, effective mass along X, Y, Z as a share of the whole, the count check and the warnings, for reading. */
export function solveTable(summary: SolveSummary): string {
  const { modes, method, freeDof, totalMassKg, effectiveMass, count, warnings, timing } = summary;
  const rows = modes.map((mode) => [
    String(mode.number),
    frequencyText(mode.frequencyHz, mode.digits),
    ...([0, 1, 2] as const).map((direction) =>
      share(mode.effectiveMass[direction], effectiveMass.total[direction]),
    ),
    mode.name,
  ]);
  const lines = [
    `${method === 'mesh-free' ? method : `${method} mass`}, ${freeDof} free unknowns, ${significant(totalMassKg, 6)} kg`,
    '',
    ...table([['mode', 'Hz', 'X %', 'Y %', 'Z %', 'motion'], ...rows]),
    '',
    countSentence(summary),
    `Solved in ${timing.total.toFixed(0)} ms; ${count.returned} modes returned.`,
    ...warnings.map(({ path, message }) => `Warning: ${path === '' ? '' : `${path}: `}${message}`),
  ];
  return `${lines.join('\n')}\n`;
}

function countSentence({ count, complete }: SolveSummary): string {
  const counted = `${count.below} modes lie below ${significant(count.shiftHz, 5)} Hz and ${count.found} were found`;
  return complete ? `${counted}: none is missed.` : `INCOMPLETE: ${counted}.`;
}

/** The digits that the accuracy supports, at most six in a table. */
function frequencyText(hz: number, digits: number): string {
  return hz === 0 ? '0' : significant(hz, Math.min(digits, 6));
}

function share(part: number, whole: number): string {
  return whole > 0 ? ((100 * part) / whole).toFixed(1) : '–';
}
