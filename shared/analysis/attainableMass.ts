import { multiplySymmetric } from '../numerics/sparse/SymmetricCsc.ts';
import type { SymmetricCsc } from '../numerics/sparse/SymmetricCsc.ts';

/** Residual over right-hand side at which the iteration ends: the sum's error is of its square. */
const TOLERANCE = 1e-7;
/** Diagonally scaled element mass matrices are so well conditioned that some tens of steps suffice. */
const MOST_STEPS = 1000;

/**
 * bᵀ M⁺ b: what the effective masses of all modes add up to for the inertia force b.
 *   M  n×n, symmetric positive semidefinite [kg]; singular where unknowns carry no mass
 *   b  n, in the range of M
 * Conjugate gradients with the diagonal as preconditioner (Saad, Iterative Methods for Sparse Linear Systems,
 * 2nd ed., algorithm 9.1): on a consistent singular system they stay in the range and give the pseudo-inverse's
 * value. The condition number of a diagonally scaled consistent mass matrix is bounded by that of its elements
 * (Wathen 1987).
 */
export function attainableMass(M: SymmetricCsc, b: Float64Array): number {
  const n = M.n;
  const inverseDiagonal = new Float64Array(n);
  for (let j = 0; j < n; j++) {
    const diagonal = M.values[M.colPtr[j]!]!;
    inverseDiagonal[j] = diagonal > 0 ? 1 / diagonal : 0;
  }
  const x = new Float64Array(n);
  const r = b.slice();
  const p = new Float64Array(n);
  const Mp = new Float64Array(n);
  let rz = 0;
  for (let i = 0; i < n; i++) {
    p[i] = inverseDiagonal[i]! * r[i]!;
    rz += r[i]! * p[i]!;
  }
  const target = TOLERANCE * TOLERANCE * rz;
  for (let step = 0; step < MOST_STEPS && rz > target; step++) {
    multiplySymmetric(M, p, Mp);
    let pMp = 0;
    for (let i = 0; i < n; i++) pMp += p[i]! * Mp[i]!;
    if (!(pMp > 0)) break;
    const alpha = rz / pMp;
    let next = 0;
    for (let i = 0; i < n; i++) {
      x[i]! += alpha * p[i]!;
      r[i]! -= alpha * Mp[i]!;
      next += r[i]! * r[i]! * inverseDiagonal[i]!;
    }
    const beta = next / rz;
    rz = next;
    for (let i = 0; i < n; i++) p[i] = inverseDiagonal[i]! * r[i]! + beta * p[i]!;
  }
  let sum = 0;
  for (let i = 0; i < n; i++) sum += b[i]! * x[i]!;
  return sum;
}
