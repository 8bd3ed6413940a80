import type { OrthonormalSet } from './OrthonormalSet.ts';
import type { RitzPairs } from './bandLanczos.ts';

/**
 * y ← V s, the Ritz vector of the eigenpair `index`.
 *   pairs  Krylov basis V (n × m) and coordinates s      y  n, overwritten
 */
export function ritzVector(pairs: RitzPairs, index: number, y: Float64Array): void {
  const basis: OrthonormalSet = pairs.basis;
  const m = pairs.eigen.values.length;
  const s = pairs.eigen.vectors.subarray(index * m, (index + 1) * m);
  const n = y.length;
  y.fill(0);
  for (let j = 0; j < m; j++) {
    const v = basis.vectors[j]!;
    const sj = s[j]!;
    for (let i = 0; i < n; i++) y[i]! += sj * v[i]!;
  }
}
