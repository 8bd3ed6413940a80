/** First step over the size of the parameter, and how often it is halved. */
const FIRST_STEP = 1e-2;
const HALVINGS = 3;

/**
 * Derivatives of smooth functions of one number by central differences, extrapolated to step 0 (Richardson 1911;
 * Burden and Faires, Numerical Analysis, §4.2). With steps of 1e-2, 5e-3, 2.5e-3 and 1.25e-3 of the size the error is
 * of order (1e-2)⁸, so that rounding remains: about 1e-12 of value over size.
 *   f     values at a number, always as many
 *   at    where, and the size over which f changes by its own order
 */
export function differentiate(
  f: (p: number) => Float64Array,
  at: number,
  size: number,
): Float64Array {
  let row: Float64Array[] = [];
  for (let halving = 0; halving <= HALVINGS; halving++) {
    const step = (FIRST_STEP * size) / 2 ** halving;
    const [high, low] = [at + step, at - step];
    const above = f(high);
    const below = f(low);
    const next = [above.map((value, i) => (value - below[i]!) / (high - low))];
    for (let k = 1; k <= halving; k++) {
      const finer = next[k - 1]!;
      const coarser = row[k - 1]!;
      next.push(finer.map((value, i) => value + (value - coarser[i]!) / (4 ** k - 1)));
    }
    row = next;
  }
  return row[HALVINGS]!;
}
