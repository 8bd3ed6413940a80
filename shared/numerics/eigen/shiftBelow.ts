import type { ChainedPencil } from '../chains/ChainedPencil.ts';
import { ZeroPivotError } from '../factor/ZeroPivotError.ts';
import type { ModeSet } from './ModeSet.ts';
import { startVector } from './startVector.ts';

/** First guess of |σ| as a share of the lowest K_ii / M_ii, which lies above all lowest modes. */
const FIRST_SHARE = 1e-4;
/** The shift is good while |σ| lies between these shares of the lowest elastic λ … */
const LEAST_SHARE = 1e-4;
const MOST_SHARE = 1;
/** … and is else moved to this one. */
const AIM_SHARE = 0.1;
/** Inverse iterations that estimate the lowest elastic λ, to a factor of about two. */
const ESTIMATE_STEPS = 3;
/** Moves of the shift; each but the last comes a factor of a hundred or more closer. */
const MOST_MOVES = 5;

/**
 * Factors K − σM of a free body at a σ a little below zero in relation to its lowest elastic eigenvalue: K
 * itself is singular, and a shift far from zero would crowd the wanted θ together.
 *   pencil  K semidefinite; left factored at that σ      rigid   the null vectors of K
 *   random  state, 1 word, overwritten
 * Throws ZeroPivotError when K and M have a common null vector.
 * Source: Ericsson and Ruhe 1980, Math. Comp. 35, 1251–1268, section 2 (choice of the shift).
 */
export function shiftBelow(pencil: ChainedPencil, rigid: ModeSet, random: Uint32Array): void {
  let size = FIRST_SHARE * lowestDiagonalRatio(pencil);
  let good = 0;
  for (let move = 0; ; move++) {
    try {
      pencil.factorise(-size);
    } catch (error) {
      if (!(error instanceof ZeroPivotError) || move >= MOST_MOVES) throw error;
      if (good > 0) {
        pencil.factorise(-good);
        return;
      }
      // Too near zero for the pivots of the rigid-body motions: farther away they are certain.
      size *= 1e3;
      continue;
    }
    if (move >= MOST_MOVES) return;
    good = size;
    const lambda = estimateLowest(pencil, rigid, random);
    if (lambda === null || !(lambda > 0)) return;
    if (size >= LEAST_SHARE * lambda && size <= MOST_SHARE * lambda) return;
    size = AIM_SHARE * lambda;
  }
}

/** min K_ii / M_ii over unknowns with both; 1 if there is none. */
function lowestDiagonalRatio(pencil: ChainedPencil): number {
  const K = pencil.diagonal('K');
  const M = pencil.diagonal('M');
  let lowest = Infinity;
  for (let i = 0; i < pencil.n; i++) {
    if (K[i]! > 0 && M[i]! > 0 && K[i]! / M[i]! < lowest) lowest = K[i]! / M[i]!;
  }
  return lowest < Infinity ? lowest : 1;
}

/** An upper estimate of the lowest λ outside `rigid` by inverse iteration, null if there is none. */
function estimateLowest(pencil: ChainedPencil, rigid: ModeSet, random: Uint32Array): number | null {
  const { arena, size } = pencil;
  const { kernels } = arena;
  const used = arena.used;
  const v = arena.numbers(size);
  const image = arena.numbers(size);
  let lambda: number | null = null;
  if (startVector(pencil, rigid, random, v, image)) {
    let theta = 0;
    for (let step = 0; step < ESTIMATE_STEPS; step++) {
      pencil.solve(image, v);
      rigid.takeOut(v);
      pencil.multiplyMass(v, image);
      // ‖A v‖_M for ‖v‖_M = 1 is at most the largest θ.
      theta = Math.sqrt(Math.max(kernels.dot(size, v, image), 0));
      if (!(theta > 0)) break;
      kernels.multiply(size, 1 / theta, v);
      kernels.multiply(size, 1 / theta, image);
    }
    if (theta > 0) lambda = 1 / theta + pencil.sigma;
  }
  arena.rewind(used);
  return lambda;
}
