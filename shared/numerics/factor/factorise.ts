import type { SymmetricCsc } from '../sparse/SymmetricCsc.ts';
import { eliminatePanel } from './eliminatePanel.ts';
import { entryDestinations } from './entryDestinations.ts';
import { extendAdd } from './extendAdd.ts';
import type { Ldlt } from './Ldlt.ts';
import { substituteBack } from './substituteBack.ts';
import { subtractUpdate } from './subtractUpdate.ts';
import type { SymbolicFactor } from './SymbolicFactor.ts';
import { ZeroPivotError } from './ZeroPivotError.ts';

/**
 * A pivot below this share of its diagonal entry K_kk + |σ| M_kk is rounding, not stiffness: the
 * sum that makes it has some tens of terms, each rounded to 2⁻⁵² of the diagonal. A slender tower
 * of a thousand members, the softest thing that is still a frame, stays above 1e-13.
 */
export const PIVOT_TOL = 2 ** -46;

/**
 * P (K − σM) Pᵀ = L D Lᵀ without pivoting.
 *   symbolic  from analyse(K, M)
 *   K, M      n×n; M null: K alone          sigma  [rad²/s²]
 *   reuse     a factorisation whose storage is overwritten (it is of no use afterwards)
 * Throws ZeroPivotError when K − σM is singular within rounding (PIVOT_TOL).
 * Source: Duff and Reid 1983, ACM Trans. Math. Softw. 9(3), 302–325 (multifrontal method).
 */
export function factorise(
  symbolic: SymbolicFactor,
  K: SymmetricCsc,
  M: SymmetricCsc | null,
  sigma: number,
  reuse?: Ldlt,
): Ldlt {
  const { n, supernodes, first, rowPtr, relative, panelPtr, parent } = symbolic;
  const reusable = reuse !== undefined && reuse.symbolic === symbolic;
  const values = reusable ? reuse.values.fill(0) : new Float64Array(panelPtr[supernodes]!);
  const pivots = reusable ? reuse.pivots : new Float64Array(n);
  const scale = new Float64Array(n);
  scatter(symbolic, K, 1, values, scale);
  if (M !== null && sigma !== 0) scatter(symbolic, M, -sigma, values, scale);

  const stack = new Float64Array(symbolic.stackSize);
  const work = new Float64Array(3 * symbolic.maxColumns);
  const updateAt = new Int32Array(supernodes); // where each waiting update matrix begins
  const firstChild = new Int32Array(supernodes).fill(-1);
  const sibling = new Int32Array(supernodes).fill(-1);
  let top = 0;
  let negativePivots = 0;
  for (let s = 0; s < supernodes; s++) {
    const columns = first[s + 1]! - first[s]!;
    const size = rowPtr[s + 1]! - rowPtr[s]!;
    const length = (size * (size + 1)) >> 1;
    const panel = panelPtr[s]!;
    stack.fill(0, top, top + length);
    let bottom = top;
    for (let c = firstChild[s]!; c >= 0; c = sibling[c]!) {
      const from = updateAt[c]!;
      const order = rowPtr[c + 1]! - rowPtr[c]!;
      extendAdd(stack, from, order, top, values, panel, columns, relative, rowPtr[c]!);
      if (from < bottom) bottom = from;
    }
    const failed = eliminatePanel(
      values,
      panel,
      columns + size,
      columns,
      pivots,
      scale,
      first[s]!,
      PIVOT_TOL,
      work,
    );
    if (failed >= 0) throw zeroPivot(symbolic, values, pivots, scale, sigma, s, first[s]! + failed);
    for (let k = first[s]!; k < first[s + 1]!; k++) if (pivots[k]! < 0) negativePivots += 1;
    if (size > 0) {
      const below = panel + columns * columns;
      subtractUpdate(stack, top, size, values, below, columns, pivots, first[s]!, work);
    }
    stack.copyWithin(bottom, top, top + length);
    updateAt[s] = bottom;
    top = bottom + length;
    const up = parent[s]!;
    if (up >= 0) {
      sibling[s] = firstChild[up]!;
      firstChild[up] = s;
    }
  }
  return { symbolic, values, pivots, sigma, negativePivots };
}

/** values += factor · A,  scale[k] += |factor · A_kk|. */
function scatter(
  symbolic: SymbolicFactor,
  A: SymmetricCsc,
  factor: number,
  values: Float64Array,
  scale: Float64Array,
): void {
  const destination = entryDestinations(symbolic, A);
  const { n, place } = symbolic;
  const { colPtr, rowIdx, values: a } = A;
  for (let j = 0; j < n; j++) {
    for (let q = colPtr[j]!; q < colPtr[j + 1]!; q++) {
      const value = factor * a[q]!;
      values[destination[q]!]! += value;
      if (rowIdx[q] === j) scale[place[j]!]! += Math.abs(value);
    }
  }
}

/** The motion x with L₁ᵀ x = e_k over the places up to k: (K − σM) x = d_k e_k there. */
function zeroPivot(
  symbolic: SymbolicFactor,
  values: Float64Array,
  pivots: Float64Array,
  scale: Float64Array,
  sigma: number,
  supernode: number,
  place: number,
): ZeroPivotError {
  const { n, perm } = symbolic;
  const x = new Float64Array(n);
  x[place] = 1;
  substituteBack(symbolic, values, x, supernode);
  const motion = new Float64Array(n);
  let largest = 0;
  for (let k = 0; k < n; k++) {
    motion[perm[k]!] = x[k]!;
    largest = Math.max(largest, Math.abs(x[k]!));
  }
  for (let i = 0; i < n; i++) motion[i]! /= largest;
  const relativePivot = scale[place]! > 0 ? pivots[place]! / scale[place]! : 0;
  return new ZeroPivotError({ unknown: perm[place]!, sigma, relativePivot, motion });
}
