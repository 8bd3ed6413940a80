import { factorise } from '../factor/factorise.ts';
import type { Ldlt } from '../factor/Ldlt.ts';
import type { SymbolicFactor } from '../factor/SymbolicFactor.ts';
import { ZeroPivotError } from '../factor/ZeroPivotError.ts';
import type { SymmetricCsc } from '../sparse/SymmetricCsc.ts';
import { fillRandom } from './fillRandom.ts';
import { OrthonormalSet } from './OrthonormalSet.ts';
import { ShiftedPencil } from './ShiftedPencil.ts';

/** First guess of |σ| as a share of the lowest K_ii / M_ii, which lies above all lowest modes. */
const FIRST_SHARE = 1e-4;
/** The shift is good while |σ| lies between these shares of the lowest elastic λ … */
const LEAST_SHARE = 1e-4;
const MOST_SHARE = 1;
/** … and is else moved to this one. */
const AIM_SHARE = 0.1;
/** Inverse iterations that estimate the lowest elastic λ, to a factor of about two. */
const ESTIMATE_STEPS = 4;
/** Moves of the shift; each but the last comes a factor of a hundred or more closer. */
const MOST_MOVES = 5;

/**
 * Factors K − σM for a free body at a σ a little below zero in relation to its lowest elastic
 * eigenvalue: K itself is singular, and a shift far from zero would crowd the wanted θ together.
 *   K, M        n×n, K semidefinite         rigid   its null vectors, M-orthonormal
 *   random      state, 1 word, overwritten
 * Throws ZeroPivotError when K and M have a common null vector.
 * Source: Ericsson and Ruhe 1980, Math. Comp. 35, 1251–1268, section 2 (choice of the shift).
 */
export function shiftBelow(
  symbolic: SymbolicFactor,
  K: SymmetricCsc,
  M: SymmetricCsc,
  rigid: OrthonormalSet,
  random: Uint32Array,
): Ldlt {
  let size = FIRST_SHARE * lowestDiagonalRatio(K, M);
  let good = 0;
  let ldlt: Ldlt | undefined;
  for (let move = 0; ; move++) {
    try {
      ldlt = factorise(symbolic, K, M, -size, ldlt);
    } catch (error) {
      if (!(error instanceof ZeroPivotError) || move >= MOST_MOVES) throw error;
      if (good > 0) return factorise(symbolic, K, M, -good);
      // Too near zero for the pivots of the rigid-body motions: farther away they are certain.
      ldlt = undefined;
      size *= 1e3;
      continue;
    }
    if (move >= MOST_MOVES) return ldlt;
    good = size;
    const pencil = new ShiftedPencil(M, ldlt);
    const lambda = estimateLowest(pencil, rigid, random);
    if (lambda === null || !(lambda > 0)) return ldlt;
    if (size >= LEAST_SHARE * lambda && size <= MOST_SHARE * lambda) return ldlt;
    size = AIM_SHARE * lambda;
  }
}

/** min K_ii / M_ii over unknowns with both; 1 if there is none. */
function lowestDiagonalRatio(K: SymmetricCsc, M: SymmetricCsc): number {
  let lowest = Infinity;
  for (let i = 0; i < K.n; i++) {
    const k = K.values[K.colPtr[i]!]!;
    const m = M.values[M.colPtr[i]!]!;
    if (k > 0 && m > 0 && k / m < lowest) lowest = k / m;
  }
  return lowest < Infinity ? lowest : 1;
}

/** An upper estimate of the lowest λ outside `rigid` by inverse iteration, null if there is none. */
function estimateLowest(
  pencil: ShiftedPencil,
  rigid: OrthonormalSet,
  random: Uint32Array,
): number | null {
  let v = new Float64Array(pencil.n);
  fillRandom(v, random);
  let theta = 0;
  for (let step = 0; step <= ESTIMATE_STEPS; step++) {
    const set = new OrthonormalSet(pencil.M);
    // ‖A v‖_M for ‖v‖_M = 1 is at most the largest θ.
    theta = set.add(v, rigid);
    if (theta === 0) return null;
    if (step === ESTIMATE_STEPS) break;
    v = new Float64Array(pencil.n);
    pencil.apply(set.images[0]!, v);
  }
  return 1 / theta + pencil.sigma;
}
