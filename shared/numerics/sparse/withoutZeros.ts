import type { SymmetricCsc } from './SymmetricCsc.ts';

/**
 * The same matrix without stored zeros off the diagonal, for products only: a lumped mass matrix
 * assembled on the topology's pattern shrinks to a tenth. The diagonal is kept whole.
 */
export function withoutZeros(A: SymmetricCsc): SymmetricCsc {
  const { n, colPtr, rowIdx, values } = A;
  const ptr = new Int32Array(n + 1);
  const rows = new Int32Array(rowIdx.length);
  const kept = new Float64Array(rowIdx.length);
  let write = 0;
  for (let j = 0; j < n; j++) {
    for (let p = colPtr[j]!; p < colPtr[j + 1]!; p++) {
      if (values[p] === 0 && rowIdx[p] !== j) continue;
      rows[write] = rowIdx[p]!;
      kept[write] = values[p]!;
      write += 1;
    }
    ptr[j + 1] = write;
  }
  return { n, colPtr: ptr, rowIdx: rows.slice(0, write), values: kept.slice(0, write) };
}
