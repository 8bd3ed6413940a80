import type { ChainedPencil } from '../numerics/chains/ChainedPencil.ts';
import { ZeroPivotError } from '../numerics/factor/ZeroPivotError.ts';
import { multiplySymmetric } from '../numerics/sparse/SymmetricCsc.ts';
import type { SymmetricCsc } from '../numerics/sparse/SymmetricCsc.ts';
import { six } from './massProperties.ts';
import type { Six } from './massProperties.ts';

/** What keeps a singular mass matrix factorisable, relative to its diagonal; the sums feel its square. */
const SHIFTS = [1e-12, 1e-10, 1e-8];

/**
 * bᵀ M⁺ b for the six inertia forces b: what the effective masses of all modes add up to.
 *   pencil  of the frame; left factored at no shift
 *   forces  address of the six, vectors of the pencil one after the other, in the range of M
 * M is singular where unknowns carry no mass; with δ diag(M) added it can be factored, and b has no part in
 * what it lacks. The sum changes by −δ xᵀ diag(M) x in first order, which is given back.
 */
export function attainableMass(pencil: ChainedPencil, forces: number): Six {
  const { arena, n, size } = pencil;
  const shift = factoriseMass(pencil);
  const diagonal = pencil.diagonal('M');
  const used = arena.used;
  const x = pencil.vector();
  const result = six((direction) => {
    const b = forces + 8 * size * direction;
    pencil.solve(b, x);
    const found = arena.view(x, n);
    let given = 0;
    for (let i = 0; i < n; i++) given += diagonal[i]! * found[i]! * found[i]!;
    return arena.kernels.dot(size, b, x) + shift * given;
  });
  arena.rewind(used);
  return result;
}

/** Factors with the least shift that rounding allows, and returns it. */
function factoriseMass(pencil: ChainedPencil): number {
  for (let k = 0; ; k++) {
    const shift = SHIFTS[k]!;
    try {
      pencil.factoriseMass(shift);
      return shift;
    } catch (error) {
      if (!(error instanceof ZeroPivotError) || k + 1 === SHIFTS.length) throw error;
    }
  }
}

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
export function attainableMassOf(M: SymmetricCsc, b: Float64Array): number {
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
