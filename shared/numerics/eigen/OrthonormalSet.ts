import { multiplySymmetric, type SymmetricCsc } from '../sparse/SymmetricCsc.ts';
import { normalise } from './normalise.ts';
import { projectOut } from './projectOut.ts';

/**
 * A vector that loses more than this share of its M-norm when it is orthogonalised is taken as
 * lying in the span: what is left of it is mostly rounding.
 */
const DEPENDENT_TOL = 1e-12;
/** Share left over by the second pass; less says that the first has left only rounding. */
const TWICE_TOL = 0.5;

/** An M-orthonormal set of vectors that grows one by one, with their images under M. */
export class OrthonormalSet {
  readonly vectors: Float64Array[] = [];
  readonly images: Float64Array[] = [];
  readonly #M: SymmetricCsc;

  constructor(M: SymmetricCsc) {
    this.#M = M;
  }

  get count(): number {
    return this.vectors.length;
  }

  /**
   * Takes in v after orthogonalising it against `others` and this set.
   *   v             n; becomes part of the set (the caller gives it away), or is scratch if refused
   *   first         the last `first` vectors of this set are those that v has large components in:
   *                 they are taken out in a pass of their own, then all of them in a second one
   *   coefficients  products with this set are added to it; null when they are not wanted
   * Returns its M-norm once orthogonal, or 0 when v depends on the sets: then it is left out.
   * Source: Parlett, The Symmetric Eigenvalue Problem, sections 6.9 (twice is enough) and 13.7.
   */
  add(
    v: Float64Array,
    others: OrthonormalSet | null,
    first: number = this.count,
    coefficients: Float64Array | null = null,
  ): number {
    const { vectors, images, count } = this;
    let rough = 0;
    if (others !== null && first === count) {
      rough += projectOut(v, others.vectors, others.images, 0, others.count, null);
    }
    rough += projectOut(v, vectors, images, Math.max(0, count - first), count, coefficients);
    let fine = 0;
    if (others !== null) {
      fine += projectOut(v, others.vectors, others.images, 0, others.count, null);
    }
    fine += projectOut(v, vectors, images, 0, count, coefficients);
    const image = new Float64Array(v.length);
    multiplySymmetric(this.#M, v, image);
    const norm = normalise(v, image);
    // Pythagoras gives the norms before the last pass and before both.
    const once = Math.sqrt(norm * norm + fine);
    const before = Math.sqrt(norm * norm + fine + rough);
    if (norm <= DEPENDENT_TOL * before || norm < TWICE_TOL * once) return 0;
    vectors.push(v);
    images.push(image);
    return norm;
  }
}
