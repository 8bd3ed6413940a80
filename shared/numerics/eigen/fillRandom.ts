/**
 * x ← numbers even in (−1, 1), from the state onward; the same seed gives the same numbers.
 *   x      any length, overwritten
 *   state  1 word, not 0; overwritten by the next state
 * Source: Marsaglia 2003, Xorshift RNGs, J. Statistical Software 8(14), triple (13, 17, 5). Start
 * vectors need no more than directions without pattern.
 */
export function fillRandom(x: Float64Array, state: Uint32Array): void {
  let word = state[0]!;
  for (let i = 0; i < x.length; i++) {
    word ^= word << 13;
    word ^= word >>> 17;
    word ^= word << 5;
    x[i] = word / 2147483648;
  }
  state[0] = word;
}
