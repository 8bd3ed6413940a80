import type { ChainClass } from './ChainedPair.ts';
import type { BlockRange } from './ChainMatrix.ts';

/** A class of chains at one shift with its inner unknowns eliminated. */
export interface Condensed {
  /** inner²: (K − σM)_ii⁻¹, row by row. */
  readonly inverse: Float64Array;
  /** inner × ends: inverse · (K − σM)_ie, row by row. */
  readonly W: Float64Array;
  /** ends²: (K − σM)_ee − (K − σM)_ei W, symmetric. */
  readonly S: Float64Array;
  /** Negative pivots of one chain. */
  readonly negative: number;
  /** Smallest |pivot| over its magnitude [–], Infinity without inner unknowns. */
  readonly smallestPivot: number;
}

/**
 * Condenses a chain's matrix A = K − σM to its ends (static condensation, exact since the shift is in it).
 * Inertia adds up over the elimination (Haynsworth 1968).
 *   A          (inner + ends)², row by row, inner unknowns first; symmetric
 *   magnitude  inner + ends: |K_kk| + |σ M_kk|, what a pivot is measured by
 */
export function condense(
  A: Float64Array,
  magnitude: Float64Array,
  inner: number,
  ends: number,
): Condensed {
  const n = inner + ends;
  // L D Lᵀ of the inner part, row by row in `L`; D on its diagonal.
  const L = new Float64Array(inner * inner);
  let negative = 0;
  let smallestPivot = Infinity;
  for (let i = 0; i < inner; i++) {
    const row = i * inner;
    for (let j = 0; j < i; j++) {
      let sum = A[i * n + j]!;
      const other = j * inner;
      // L holds L d below the diagonal until the row is done.
      for (let k = 0; k < j; k++) sum -= L[row + k]! * L[other + k]!;
      L[row + j] = sum;
    }
    let pivot = A[i * n + i]!;
    for (let k = 0; k < i; k++) {
      const scaled = L[row + k]!;
      const factor = scaled / L[k * inner + k]!;
      pivot -= scaled * factor;
      L[row + k] = factor;
    }
    L[row + i] = pivot;
    if (pivot < 0) negative += 1;
    const relative = magnitude[i]! > 0 ? Math.abs(pivot) / magnitude[i]! : 0;
    smallestPivot = Math.min(smallestPivot, relative);
  }
  const inverse = new Float64Array(inner * inner);
  const x = new Float64Array(inner);
  for (let c = 0; c < inner; c++) {
    x.fill(0);
    x[c] = 1;
    for (let i = c + 1; i < inner; i++) {
      let sum = 0;
      for (let k = c; k < i; k++) sum -= L[i * inner + k]! * x[k]!;
      x[i] = sum;
    }
    for (let i = c; i < inner; i++) x[i]! /= L[i * inner + i]!;
    for (let i = inner - 1; i >= 0; i--) {
      const xi = x[i]!;
      for (let k = 0; k < i; k++) x[k]! -= L[i * inner + k]! * xi;
    }
    for (let i = 0; i < inner; i++) inverse[i * inner + c] = x[i]!;
  }
  const W = new Float64Array(inner * ends);
  const S = new Float64Array(ends * ends);
  for (let i = 0; i < inner; i++) {
    for (let k = 0; k < inner; k++) {
      const share = inverse[i * inner + k]!;
      for (let e = 0; e < ends; e++) W[i * ends + e]! += share * A[k * n + inner + e]!;
    }
  }
  for (let a = 0; a < ends; a++) {
    for (let b = 0; b <= a; b++) {
      let sum = A[(inner + a) * n + inner + b]!;
      for (let i = 0; i < inner; i++) sum -= A[i * n + inner + a]! * W[i * ends + b]!;
      S[a * ends + b] = S[b * ends + a] = sum;
    }
  }
  return { inverse, W, S, negative, smallestPivot };
}

/**
 * kK + mM + δ diag(M) of one block of a chain, inner unknowns first; 1 on the diagonal of inner unknowns without
 * mass where δ is given.
 */
export function combined(
  { inner, ends, K, M }: ChainClass,
  block: BlockRange,
  k: number,
  m: number,
  delta: number,
): { A: Float64Array; magnitude: Float64Array } {
  const n = inner + ends;
  const size = block.inner + block.ends;
  const A = new Float64Array(size * size);
  const magnitude = new Float64Array(size);
  const place = (i: number) =>
    i < block.inner ? block.innerFrom + i : inner + block.endsFrom + i - block.inner;
  for (let i = 0; i < size; i++) {
    const row = place(i) * n;
    for (let j = 0; j < size; j++) {
      const at = row + place(j);
      A[i * size + j] = k * K[at]! + m * M[at]!;
    }
    const diagonal = row + place(i);
    const mass = M[diagonal]!;
    magnitude[i] = Math.abs(k * K[diagonal]!) + Math.abs(m * mass);
    // At the ends it is added to the joints, in whose axes the sum is regular.
    if (delta === 0 || i >= block.inner) continue;
    A[i * size + i]! += mass === 0 ? 1 : delta * mass;
    if (mass === 0) magnitude[i] = 1;
  }
  return { A, magnitude };
}
