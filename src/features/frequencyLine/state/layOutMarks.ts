import type { ModeSummary } from '#shared/schemas/solveResult.ts';
import type { FrequencyScale } from './frequencyScale.ts';

/** One mark on the line: a mode, or several that stand too close to be told apart by a finger. */
export interface FrequencyMark {
  readonly x: number;
  readonly modes: readonly ModeSummary[];
  /** Short text over the mark; empty where there is no room for it. */
  readonly label: string;
}

/** WCAG 2.2, success criterion 2.5.8: no target under 24 px, so closer marks become one. */
export const TARGET_PX = 24;
/** What a character of a label takes (11 px, fixed width), and the gap between two labels. */
const CHARACTER_PX = 6.6;
const GAP_PX = 6;

/** Room that a label over a mark needs. */
export const labelWidth = (text: string): number => text.length * CHARACTER_PX + GAP_PX;

/**
 * Marks for the elastic modes of one solve, left to right. Modes nearer than 24 px fold into one mark;
 * local modes are counted apart ("+14 local"). Nothing is left out: every mode is in exactly one mark.
 */
export function layOutMarks(
  modes: readonly ModeSummary[],
  scale: FrequencyScale,
  formatHz: (mode: ModeSummary) => string,
): FrequencyMark[] {
  const elastic = modes
    .filter((mode) => mode.kind !== 'rigid')
    .toSorted((a, b) => a.frequencyHz - b.frequencyHz);
  const groups: { modes: ModeSummary[]; x: number }[] = [];
  for (const mode of elastic) {
    const x = scale.toX(mode.frequencyHz);
    const last = groups.at(-1);
    if (last && x - last.x < TARGET_PX) last.modes.push(mode);
    else groups.push({ modes: [mode], x });
  }
  let labelledUpTo = -Infinity;
  return groups.map(({ modes: together, x }) => {
    const text = labelOf(together, formatHz);
    const half = labelWidth(text) / 2;
    const fits = x - half >= labelledUpTo;
    if (fits) labelledUpTo = x + half;
    return { x, modes: together, label: fits ? text : '' };
  });
}

function labelOf(modes: readonly ModeSummary[], formatHz: (mode: ModeSummary) => string): string {
  const global = modes.filter((mode) => mode.kind === 'global');
  const localCount = modes.length - global.length;
  const first = global[0] ?? modes[0];
  if (!first) return '';
  if (modes.length === 1) return formatHz(first);
  if (global.length === 0) return `+${localCount} local`;
  const more = global.length > 1 ? ` ×${global.length}` : '';
  return `${formatHz(first)}${more}${localCount > 0 ? ` +${localCount} local` : ''}`;
}
