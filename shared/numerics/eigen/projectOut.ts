/**
 * w ← w − Σ_j v_j (M v_j)ᵀ w  for part of an M-orthonormal set.
 *   w             n, overwritten
 *   vectors       v_j, n each            images   M v_j, n each
 *   from, to      j runs from … to − 1
 *   coefficients  at least `to`, the products (M v_j)ᵀ w are added to it; null when not wanted
 * Returns the sum of the squares of the products: by so much ‖w‖²_M has fallen.
 * Four vectors at a time, the next four against what is left (block Gram-Schmidt): one sweep of w
 * serves four products.
 */
export function projectOut(
  w: Float64Array,
  vectors: readonly Float64Array[],
  images: readonly Float64Array[],
  from: number,
  to: number,
  coefficients: Float64Array | null,
): number {
  const n = w.length;
  let taken = 0;
  for (let j = from; j < to; j += 4) {
    const here = to - j < 4 ? to - j : 4;
    // Short of four, the last vector stands in with a product of zero.
    const j1 = here > 1 ? j + 1 : j;
    const j2 = here > 2 ? j + 2 : j1;
    const j3 = here > 3 ? j + 3 : j2;
    const m0 = images[j]!;
    const m1 = images[j1]!;
    const m2 = images[j2]!;
    const m3 = images[j3]!;
    let h0 = 0;
    let h1 = 0;
    let h2 = 0;
    let h3 = 0;
    for (let i = 0; i < n; i++) {
      const wi = w[i]!;
      h0 += m0[i]! * wi;
      h1 += m1[i]! * wi;
      h2 += m2[i]! * wi;
      h3 += m3[i]! * wi;
    }
    if (here < 2) h1 = 0;
    if (here < 3) h2 = 0;
    if (here < 4) h3 = 0;
    const v0 = vectors[j]!;
    const v1 = vectors[j1]!;
    const v2 = vectors[j2]!;
    const v3 = vectors[j3]!;
    for (let i = 0; i < n; i++) {
      w[i]! -= h0 * v0[i]! + h1 * v1[i]! + h2 * v2[i]! + h3 * v3[i]!;
    }
    taken += h0 * h0 + h1 * h1 + h2 * h2 + h3 * h3;
    if (coefficients !== null) {
      coefficients[j]! += h0;
      if (here > 1) coefficients[j + 1]! += h1;
      if (here > 2) coefficients[j + 2]! += h2;
      if (here > 3) coefficients[j + 3]! += h3;
    }
  }
  return taken;
}
