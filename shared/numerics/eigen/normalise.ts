/**
 * v ← v / ‖v‖_M, image ← image / ‖v‖_M with image = M v.  Returns ‖v‖_M = √(vᵀMv); for a norm of
 * zero (or below, by rounding) it returns 0 and leaves both as they are.
 */
export function normalise(v: Float64Array, image: Float64Array): number {
  const n = v.length;
  let square = 0;
  for (let i = 0; i < n; i++) square += v[i]! * image[i]!;
  if (!(square > 0)) return 0;
  const norm = Math.sqrt(square);
  const inverse = 1 / norm;
  for (let i = 0; i < n; i++) {
    v[i]! *= inverse;
    image[i]! *= inverse;
  }
  return norm;
}
