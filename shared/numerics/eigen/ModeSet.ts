import type { ChainedPencil } from '../chains/ChainedPencil.ts';

/**
 * A vector that keeps less than this share of its M-norm when it is orthogonalised is a copy of what is
 * there: eigenvectors of different modes keep all of it.
 */
const COPY_TOL = 1e-4;

/** An M-orthonormal set of vectors in an arena that grows one by one, with their images under M. */
export class ModeSet {
  /** Addresses of the vectors and of their images; a vector follows the one before. */
  vectors = 0;
  images = 0;
  count = 0;
  readonly #pencil: ChainedPencil;
  #capacity = 0;
  #coefficients = 0;

  constructor(pencil: ChainedPencil) {
    this.#pencil = pencil;
  }

  /** Makes room for `more` vectors beyond those there are. */
  reserve(more: number): void {
    const { arena, size } = this.#pencil;
    const capacity = this.count + more;
    if (capacity <= this.#capacity) return;
    const vectors = arena.numbers(capacity * size);
    const images = arena.numbers(capacity * size);
    this.#coefficients = arena.numbers(capacity + 4);
    arena.view(vectors, this.count * size).set(arena.view(this.vectors, this.count * size));
    arena.view(images, this.count * size).set(arena.view(this.images, this.count * size));
    this.vectors = vectors;
    this.images = images;
    this.#capacity = capacity;
  }

  get stride(): number {
    return 8 * this.#pencil.size;
  }

  /** Address of where the next vector goes. */
  get next(): number {
    return this.vectors + this.count * this.stride;
  }

  /** The vector `index` over the unknowns, a copy. */
  vector(index: number): Float64Array {
    const { arena, n } = this.#pencil;
    return arena.view(this.vectors + index * this.stride, n).slice();
  }

  /** w −= the part of w in this set. */
  takeOut(w: number): void {
    if (this.count === 0) return;
    const { arena, size } = this.#pencil;
    const { kernels } = arena;
    kernels.dots(size, this.images, this.stride, this.count, w, this.#coefficients);
    kernels.subtractCombination(size, this.vectors, this.stride, this.count, this.#coefficients, w);
  }

  /**
   * Takes in what stands at `next` after orthogonalising it twice against the set (Parlett, The Symmetric
   * Eigenvalue Problem, section 6.9: twice is enough). Returns its M-norm once orthogonal, 0 when it
   * depends on the set, which then stays as it is.
   */
  add(): number {
    const { arena, size } = this.#pencil;
    const { kernels } = arena;
    const w = this.next;
    const image = this.images + this.count * this.stride;
    let taken = 0;
    for (let pass = 0; pass < 2 && this.count > 0; pass++) {
      const c = this.#coefficients;
      kernels.dots(size, this.images, this.stride, this.count, w, c);
      kernels.subtractCombination(size, this.vectors, this.stride, this.count, c, w);
      for (const product of arena.view(c, this.count)) taken += product * product;
    }
    this.#pencil.multiplyMass(w, image);
    const norm = Math.sqrt(Math.max(kernels.dot(size, w, image), 0));
    // Pythagoras gives the norm before.
    const before = Math.sqrt(norm * norm + taken);
    if (!(norm > COPY_TOL * before)) return 0;
    kernels.multiply(size, 1 / norm, w);
    kernels.multiply(size, 1 / norm, image);
    this.count += 1;
    return norm;
  }
}
