import { formatFrequency } from '#shared/units/formatFrequency.ts';
import type { FrequencyScale } from './frequencyScale.ts';

/** One previewed frequency on the line. */
export interface PreviewMark {
  readonly x: number;
  /** Empty where there is no room for it. */
  readonly label: string;
}

/** A label like "121 Hz" needs about this much. */
const LABEL_PX = 52;

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
      const fits = x - labelledUpTo >= LABEL_PX;
      if (fits) labelledUpTo = x;
      return { x, label: fits ? formatPreviewed(hz) : '' };
    });
}
