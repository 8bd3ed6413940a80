import { formatFrequency } from '#shared/units/formatFrequency.ts';
import { labelWidth } from './layOutMarks.ts';
import type { FrequencyScale } from './frequencyScale.ts';

/** One previewed frequency on the line. */
export interface PreviewMark {
  readonly x: number;
  /** Empty where there is no room for it. */
  readonly label: string;
}

/** A preview is good to about this on a screen; the stored result states its own digits. */
const DIGITS = 3;

export const formatPreviewed = (hz: number): string => formatFrequency(hz, DIGITS);

/** Marks of previewed frequencies, left to right; what is at 0 Hz has no place on the line. */
export function layOutPreview(
  frequenciesHz: readonly number[],
  scale: FrequencyScale,
): PreviewMark[] {
  let labelledUpTo = -Infinity;
  return frequenciesHz
    .filter((hz) => hz > 0)
    .toSorted((a, b) => a - b)
    .map((hz) => {
      const x = scale.toX(hz);
      const text = formatPreviewed(hz);
      const half = labelWidth(text) / 2;
      const fits = x - half >= labelledUpTo;
      if (fits) labelledUpTo = x + half;
      return { x, label: fits ? text : '' };
    });
}
