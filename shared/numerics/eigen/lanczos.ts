import type { ChainedPencil } from '../chains/ChainedPencil.ts';
import type { ModeSet } from './ModeSet.ts';
import type { KrylovSettings, RitzPairs } from './RitzPairs.ts';
import { startVector } from './startVector.ts';
import { tridiagonalEigen } from './tridiagonalEigen.ts';

/** Steps between two looks at the Ritz values. */
const CHECK_EVERY = 2;
/** What is left of a vector, over its norm, when the space is exhausted. */
const EXHAUSTED = 1e-12;
/** Share that a vector keeps when made orthogonal once more; less says that it was rounding. */
const TWICE_TOL = 0.5;

/**
 * Lanczos with full reorthogonalisation in M:  A V_m = V_m T_m + β v_{m+1} e_mᵀ,  Vᵀ M V = I.
 *   pencil  factored at σ, the operator A and M      locked  known eigenvectors; kept out of the space
 *   random  state of the start vector, 1 word, overwritten
 * The images M V are kept: a step costs one solve, one product with M and one pass over V and M V. Orthogonality
 * to all of V is lost too fast for less: θ falls so quickly that each step multiplies what is lost by some
 * hundreds. Residual norms are judged on T alone: ‖A y − θ y‖_M = β |s_m| for y = V_m s. One more step of A, free
 * of charge by y + (β s_m / θ) v_{m+1}, takes out what a singular M lets in (purification).
 * Returns null when nothing with a finite eigenvalue is left outside `locked`.
 * Source: Ericsson and Ruhe 1980, Math. Comp. 35, 1251–1268; Parlett, The Symmetric Eigenvalue Problem, chapter
 * 13; Nour-Omid, Parlett, Ericsson and Jensen 1987, Math. Comp. 48, 663–673.
 */
export function lanczos(
  pencil: ChainedPencil,
  locked: ModeSet,
  random: Uint32Array,
  settings: KrylovSettings,
): RitzPairs | null {
  const { arena, size } = pencil;
  const { kernels } = arena;
  const { maxDimension, accept, shouldStop } = settings;
  const stride = 8 * size;
  const basis = arena.numbers((maxDimension + 1) * size);
  const images = arena.numbers((maxDimension + 1) * size);
  const coefficients = arena.numbers(maxDimension + 4);
  const at = (j: number) => basis + j * stride;
  const imageAt = (j: number) => images + j * stride;

  if (!startVector(pencil, locked, random, at(0), imageAt(0))) return null;
  const alpha = new Float64Array(maxDimension);
  const beta = new Float64Array(maxDimension);
  let nextCheck = settings.firstCheck;
  for (let j = 0; ; j++) {
    const w = at(j + 1);
    const image = imageAt(j + 1);
    pencil.solve(imageAt(j), w);
    // The three-term recurrence takes out what is large, the pass over all what rounding brings back.
    let square = 0;
    if (j > 0) {
      kernels.addScaled(size, -beta[j - 1]!, at(j - 1), w);
      square += beta[j - 1]! ** 2;
    }
    alpha[j] = kernels.dot(size, w, imageAt(j));
    square += alpha[j]! ** 2;
    kernels.addScaled(size, -alpha[j]!, at(j), w);
    locked.takeOut(w);
    kernels.dots(size, images, stride, j + 1, w, coefficients);
    kernels.subtractCombination(size, basis, stride, j + 1, coefficients, w);
    let taken = 0;
    for (const c of arena.view(coefficients, j + 1)) taken += c * c;
    alpha[j]! += arena.f64[coefficients / 8 + j]!;
    pencil.multiplyMass(w, image);
    const norm = Math.sqrt(Math.max(kernels.dot(size, w, image), 0));
    const m = j + 1;
    // Where the last pass took more than it left, what is left is rounding.
    const lost = norm * norm < TWICE_TOL * TWICE_TOL * (norm * norm + taken);
    const invariant = norm <= EXHAUSTED * Math.sqrt(square) || lost;
    beta[j] = invariant ? 0 : norm;
    if (!invariant) {
      kernels.multiply(size, 1 / norm, w);
      kernels.multiply(size, 1 / norm, image);
    }
    const stopped = shouldStop();
    if (m < nextCheck && m < maxDimension && !invariant && !stopped) continue;
    nextCheck = m + CHECK_EVERY;
    const { values: theta, vectors: last } = tridiagonalEigen(alpha, beta, m, 1);
    const residual = last.map((component) => Math.abs(beta[j]! * component));
    if (invariant || stopped || m === maxDimension || accept(theta, residual)) {
      const { vectors } = tridiagonalEigen(alpha, beta, m, m);
      const coordinates = (index: number) => {
        const s = new Float64Array(m + 1);
        s.set(vectors.subarray(index * m, (index + 1) * m));
        s[m] = (beta[j]! * s[m - 1]!) / theta[index]!;
        return s;
      };
      const beyond = invariant ? 0 : 1;
      return { basis, dimension: m, beyond, theta, residual, coordinates, invariant, stopped };
    }
  }
}
