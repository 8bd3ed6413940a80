/** Gauss-Legendre points and weights of order 8 on 0 … 1 (Abramowitz and Stegun, table 25.4). */
const HALF = [
  [0.1834346424956498, 0.362683783378362],
  [0.525532409916329, 0.3137066458778873],
  [0.7966664774136267, 0.2223810344533745],
  [0.9602898564975363, 0.1012285362903763],
] as const;
const POINTS = HALF.flatMap(([x, weight]) => [
  { at: 0.5 * (1 - x), weight: 0.5 * weight },
  { at: 0.5 * (1 + x), weight: 0.5 * weight },
]);
/**
 * Most phase of a wave in one panel [rad]. The square of a wave then turns by 2 rad: order 8 integrates that
 * to 1e-16 of its largest value.
 */
const PHASE_PER_PANEL = 1;

/**
 * ∫ from 0 to `length` by panels of eight Gauss points.
 *   phase  of the shortest wave along that length [rad]
 *   use    is handed each point and its weight, in the unit of `length`
 */
export function integrate(
  length: number,
  phase: number,
  use: (x: number, weight: number) => void,
): void {
  const panels = Math.max(1, Math.ceil(phase / PHASE_PER_PANEL));
  const width = length / panels;
  for (let panel = 0; panel < panels; panel++) {
    for (const { at, weight } of POINTS) use((panel + at) * width, weight * width);
  }
}
