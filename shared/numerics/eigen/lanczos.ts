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
 * A step may leave its vector to be made orthogonal together with the next one while its norm is at least this share
 * of the largest before: what rounding brings in is then some 1e-12 of it …
 */
const MAY_WAIT = 1e-4;
/** … and more than this would show in T: the next step is then taken anew. */
const MOST_LOST = 1e-10;

/**
 * Lanczos with full reorthogonalisation in M:  A V_m = V_m T_m + β v_{m+1} e_mᵀ,  Vᵀ M V = I.
 *   pencil  factored at σ, the operator A and M      locked  known eigenvectors; kept out of the space
 *   random  state of the start vector, 1 word, overwritten
 * The images M V are kept. Reading all of V and M V costs more than a solve once there are some tens of vectors, so
 * two vectors are made orthogonal in one pass: every second one waits for the next, which is orthogonal enough then
 * (Simon 1984: 1e-8 would do). Orthogonality is lost too fast to wait longer: θ falls so quickly that each step
 * multiplies what is lost by some hundreds. Residual norms are judged on T alone: ‖A y − θ y‖_M = β |s_m| for
 * y = V_m s. One more step of A, free of charge by y + (β s_m / θ) v_{m+1}, takes out what a singular M lets in
 * (purification).
 * Returns null when nothing with a finite eigenvalue is left outside `locked`.
 * Source: Ericsson and Ruhe 1980, Math. Comp. 35, 1251–1268; Parlett, The Symmetric Eigenvalue Problem, chapter
 * 13; Nour-Omid, Parlett, Ericsson and Jensen 1987, Math. Comp. 48, 663–673; Simon 1984, Linear Algebra Appl. 61,
 * 101–131.
 */
export function lanczos(
  pencil: ChainedPencil,
  locked: ModeSet,
  random: Uint32Array,
  settings: KrylovSettings,
): RitzPairs | null {
  const { maxDimension, accept, shouldStop } = settings;
  const space = new KrylovSpace(pencil, locked, maxDimension);
  if (!startVector(pencil, locked, random, space.at(0), space.imageAt(0))) return null;
  const { alpha, beta } = space;
  let nextCheck = settings.firstCheck;
  for (;;) {
    const invariant = space.step();
    const m = space.dimension;
    const stopped = shouldStop();
    if (m < nextCheck && m < maxDimension && !invariant && !stopped) continue;
    nextCheck = m + CHECK_EVERY;
    const { values: theta, vectors: last } = tridiagonalEigen(alpha, beta, m, 1);
    const residual = last.map((component) => Math.abs(beta[m - 1]! * component));
    if (invariant || stopped || m === maxDimension || accept(theta, residual)) {
      const { vectors } = tridiagonalEigen(alpha, beta, m, m);
      const coordinates = (index: number) => {
        const s = new Float64Array(m + 1);
        s.set(vectors.subarray(index * m, (index + 1) * m));
        s[m] = (beta[m - 1]! * s[m - 1]!) / theta[index]!;
        return s;
      };
      const beyond = invariant ? 0 : 1;
      const basis = space.at(0);
      return { basis, dimension: m, beyond, theta, residual, coordinates, invariant, stopped };
    }
  }
}

/** The basis while it grows. */
class KrylovSpace {
  readonly alpha: Float64Array;
  readonly beta: Float64Array;
  /** Steps taken; the basis has one vector more. */
  dimension = 0;
  readonly #pencil: ChainedPencil;
  readonly #locked: ModeSet;
  readonly #stride: number;
  readonly #basis: number;
  readonly #images: number;
  readonly #ofLast: number;
  readonly #ofNext: number;
  /** Whether the last vector is orthogonal to the two before it only. */
  #waits = false;
  #largest = 0;

  constructor(pencil: ChainedPencil, locked: ModeSet, maxDimension: number) {
    const { arena, size } = pencil;
    this.#pencil = pencil;
    this.#locked = locked;
    this.#stride = 8 * size;
    this.#basis = arena.numbers((maxDimension + 1) * size);
    this.#images = arena.numbers((maxDimension + 1) * size);
    this.#ofLast = arena.numbers(maxDimension + 4);
    this.#ofNext = arena.numbers(maxDimension + 4);
    this.alpha = new Float64Array(maxDimension);
    this.beta = new Float64Array(maxDimension);
  }

  /** Addresses of a vector of the basis and of its image under M. */
  at(j: number): number {
    return this.#basis + j * this.#stride;
  }

  imageAt(j: number): number {
    return this.#images + j * this.#stride;
  }

  /** Adds a vector. True where the space is invariant: there is none. */
  step(): boolean {
    const j = this.dimension;
    const { kernels } = this.#pencil.arena;
    const { size } = this.#pencil;
    const [w, image] = [this.at(j + 1), this.imageAt(j + 1)];
    let square = this.#recur(j);
    let taken: number;
    let waits = false;
    if (this.#waits) {
      const lost = this.#orthogonaliseBoth(j);
      if (lost === null) {
        // The vector that waited was rounding: the space ended before it.
        this.beta[j - 1] = 0;
        return true;
      }
      if (lost > MOST_LOST) {
        square = this.#recur(j);
        taken = this.#orthogonalise(0, j);
      } else {
        taken = this.#squareOf(this.#ofNext, j);
        taken += this.#orthogonalise(j, j);
      }
    } else {
      waits = j > 0;
      taken = this.#orthogonalise(waits ? j - 1 : 0, j);
    }
    let norm = this.#normOf(w, image);
    this.#largest = Math.max(this.#largest, Math.sqrt(square));
    if (waits && norm < MAY_WAIT * this.#largest) {
      waits = false;
      taken = this.#orthogonalise(0, j);
      norm = this.#normOf(w, image);
    }
    this.#waits = waits;
    this.dimension = j + 1;
    // Where the last pass took more than it left, what is left is rounding.
    const lost = norm * norm < TWICE_TOL * TWICE_TOL * (norm * norm + taken);
    if (norm <= EXHAUSTED * Math.sqrt(square) || lost) {
      this.beta[j] = 0;
      return true;
    }
    this.beta[j] = norm;
    kernels.multiply(size, 1 / norm, w);
    kernels.multiply(size, 1 / norm, image);
    return false;
  }

  /** v_{j+1} ← A v_j less its large parts, by the three-term recurrence, and those in `locked`. Returns ‖A v_j‖². */
  #recur(j: number): number {
    const { arena, size } = this.#pencil;
    const { kernels } = arena;
    const w = this.at(j + 1);
    this.#pencil.solve(this.imageAt(j), w);
    let square = 0;
    if (j > 0) {
      const before = this.beta[j - 1]!;
      kernels.addScaled(size, -before, this.at(j - 1), w);
      square += before ** 2;
    }
    const alpha = kernels.dot(size, w, this.imageAt(j));
    this.alpha[j] = alpha;
    kernels.addScaled(size, -alpha, this.at(j), w);
    this.#locked.takeOut(w);
    return square + alpha ** 2;
  }

  /** Takes out of v_{j+1} what it has of v_from … v_j. Returns the square of that. */
  #orthogonalise(from: number, j: number): number {
    const { arena, size } = this.#pencil;
    const { kernels } = arena;
    const w = this.at(j + 1);
    const count = j + 1 - from;
    const c = this.#ofNext;
    kernels.dots(size, this.imageAt(from), this.#stride, count, w, c);
    kernels.subtractCombination(size, this.at(from), this.#stride, count, c, w);
    this.alpha[j]! += arena.f64[c / 8 + count - 1]!;
    return this.#squareOf(c, count);
  }

  /**
   * Takes out of v_j, which waited, and of v_{j+1} what they have of those before v_j. Returns how much v_j had, null
   * if it had little else.
   */
  #orthogonaliseBoth(j: number): number | null {
    const { arena, size } = this.#pencil;
    const { kernels } = arena;
    const [v, w] = [this.at(j), this.at(j + 1)];
    const [ofV, ofW] = [this.#ofLast, this.#ofNext];
    kernels.dotsOfTwo(size, this.#images, this.#stride, j, v, w, ofV, ofW);
    kernels.subtractFromTwo(size, this.#basis, this.#stride, j, ofV, ofW, v, w);
    const taken = this.#squareOf(ofV, j);
    const norm = this.#normOf(v, this.imageAt(j));
    if (norm * norm < TWICE_TOL * TWICE_TOL * (norm * norm + taken)) return null;
    kernels.multiply(size, 1 / norm, v);
    kernels.multiply(size, 1 / norm, this.imageAt(j));
    this.beta[j - 1]! *= norm;
    return Math.sqrt(taken);
  }

  #squareOf(coefficients: number, count: number): number {
    let sum = 0;
    for (const c of this.#pencil.arena.view(coefficients, count)) sum += c * c;
    return sum;
  }

  /** ‖v‖_M; its image is worked out. */
  #normOf(v: number, image: number): number {
    const { arena, size } = this.#pencil;
    this.#pencil.multiplyMass(v, image);
    return Math.sqrt(Math.max(arena.kernels.dot(size, v, image), 0));
  }
}
