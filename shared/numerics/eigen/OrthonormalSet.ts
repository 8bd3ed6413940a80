import { multiplySymmetric, type SymmetricCsc } from '../sparse/SymmetricCsc.ts';
import { normalise } from './normalise.ts';
import { projectOut } from './projectOut.ts';

/**
 * A vector that loses more than this share of its M-norm when it is orthogonalised is taken as
 * lying in the span: what is left of it is mostly rounding.
 */
const DEPENDENT_TOL = 1e-12;
/** Left over from a second orthogonalisation; less says that the first left only rounding. */
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
   *   coefficients  products with this set are added to it; null when they are not wanted
   * Returns its M-norm once orthogonal, or 0 when v depends on the sets: then it is left out.
   */
  add(v: Float64Array, others: OrthonormalSet | null, coefficients: Float64Array | null): number {
    const image = new Float64Array(v.length);
    multiplySymmetric(this.#M, v, image);
    const before = norm(v, image);
    if (before === 0) return 0;
    let once = 0;
    let twice = 0;
    for (let pass = 0; pass < 2; pass++) {
      once = twice;
      if (others !== null) projectOut(v, others.vectors, others.images, others.count, null);
      projectOut(v, this.vectors, this.images, this.count, coefficients);
      multiplySymmetric(this.#M, v, image);
      twice = norm(v, image);
    }
    if (twice <= DEPENDENT_TOL * before || twice < TWICE_TOL * once) return 0;
    normalise(v, image);
    this.vectors.push(v);
    this.images.push(image);
    return twice;
  }
}

function norm(v: Float64Array, image: Float64Array): number {
  let square = 0;
  for (let i = 0; i < v.length; i++) square += v[i]! * image[i]!;
  return square > 0 ? Math.sqrt(square) : 0;
}
