/** A horizontal frequency scale: from Hz to the pixel across, with its ticks. */
export interface FrequencyScale {
  readonly kind: ScaleKind;
  readonly lowHz: number;
  readonly highHz: number;
  readonly width: number;
  toX(hz: number): number;
  readonly ticksHz: readonly number[];
}

export type ScaleKind = 'log' | 'linear';

/** Room left of the lowest and right of the highest frequency, as a factor on a log and a share on a linear scale. */
const HEADROOM = 1.25;
/** Fewer pixels than this between two tick labels and they run into each other. */
const TICK_SPACING_PX = 64;

/**
 * A scale that holds every positive frequency given, with ticks at 1, 2 and 5 times powers of ten (log) or at
 * an even step (linear).
 *   frequenciesHz  Hz; zeros (rigid-body modes) have no place on a log scale and are left out
 *   width          px
 */
export function frequencyScale(
  kind: ScaleKind,
  frequenciesHz: readonly number[],
  width: number,
): FrequencyScale {
  const positive = frequenciesHz.filter((hz) => hz > 0);
  const lowest = positive.length > 0 ? Math.min(...positive) : 10;
  const highest = positive.length > 0 ? Math.max(...positive) : 100;
  const lowHz = kind === 'log' ? lowest / HEADROOM : 0;
  const highHz = highest * HEADROOM;
  const span = kind === 'log' ? Math.log(highHz / lowHz) : highHz - lowHz;
  const toX = (hz: number): number =>
    (width * (kind === 'log' ? Math.log(hz / lowHz) : hz - lowHz)) / span;
  const most = Math.max(2, Math.floor(width / TICK_SPACING_PX));
  const ticksHz =
    kind === 'log' ? logTicks(lowHz, highHz, most, toX) : linearTicks(lowHz, highHz, most);
  return { kind, lowHz, highHz, width, toX, ticksHz };
}

/** 1, 1.5, 2, 3, 5, 7 × 10ⁿ between two frequencies, thinned so that no two labels touch. */
function logTicks(
  lowHz: number,
  highHz: number,
  most: number,
  toX: (hz: number) => number,
): number[] {
  const candidates: number[] = [];
  for (let decade = Math.floor(Math.log10(lowHz)); decade <= Math.log10(highHz); decade += 1) {
    for (const digit of [1, 1.5, 2, 3, 5, 7]) {
      const hz = digit * 10 ** decade;
      if (hz >= lowHz && hz <= highHz) candidates.push(hz);
    }
  }
  const kept: number[] = [];
  for (const hz of candidates) {
    const last = kept.at(-1);
    if (last === undefined || toX(hz) - toX(last) >= TICK_SPACING_PX) kept.push(hz);
  }
  return kept.slice(0, most + 1);
}

/** Multiples of 1, 2 or 5 × 10ⁿ, as many as fit. */
function linearTicks(lowHz: number, highHz: number, most: number): number[] {
  const rough = (highHz - lowHz) / most;
  const power = 10 ** Math.floor(Math.log10(rough));
  const step = [1, 2, 5, 10].map((digit) => digit * power).find((s) => s >= rough) ?? rough;
  const ticks: number[] = [];
  for (let k = Math.ceil(lowHz / step); k * step <= highHz; k += 1) ticks.push(k * step);
  return ticks;
}
