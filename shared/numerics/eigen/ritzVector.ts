import type { RitzPairs } from './bandLanczos.ts';

/**
 * y ← V s, the Ritz vector of the eigenpair `index`.
 *   pairs  Krylov basis V (n × m) and coordinates s      y  n, overwritten
 */
export function ritzVector(pairs: RitzPairs, index: number, y: Float64Array): void {
  const { basis } = pairs;
  const m = pairs.eigen.values.length;
  const s = pairs.eigen.vectors.subarray(index * m, (index + 1) * m);
  const n = y.length;
  y.fill(0);
  let j = 0;
  // Four vectors to one sweep of y.
  for (; j + 3 < m; j += 4) {
    const v0 = basis.vectors[j]!;
    const v1 = basis.vectors[j + 1]!;
    const v2 = basis.vectors[j + 2]!;
    const v3 = basis.vectors[j + 3]!;
    const s0 = s[j]!;
    const s1 = s[j + 1]!;
    const s2 = s[j + 2]!;
    const s3 = s[j + 3]!;
    for (let i = 0; i < n; i++) y[i]! += s0 * v0[i]! + s1 * v1[i]! + s2 * v2[i]! + s3 * v3[i]!;
  }
  for (; j < m; j++) {
    const v = basis.vectors[j]!;
    const sj = s[j]!;
    for (let i = 0; i < n; i++) y[i]! += sj * v[i]!;
  }
}
