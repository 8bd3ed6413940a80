import { assembleSymmetric } from '../../numerics/sparse/SymmetricCsc.ts';
import type { SymmetricCsc } from '../../numerics/sparse/SymmetricCsc.ts';
import type { Combination } from '../freedoms/Combination.ts';

/** Widest element: between two groups, with all six displacements of both ends jointed. */
const SCRATCH = 12 * 24;

/** Collects a symmetric matrix as Σ Tᵀ k T over elements. */
export class SymmetricTriplets {
  #rows: Int32Array;
  #cols: Int32Array;
  #values: Float64Array;
  readonly #scratch = new Float64Array(SCRATCH);
  #length = 0;

  /** `motions`: of every element that will be added; they set the room needed. */
  constructor(motions: readonly { readonly motion: Combination }[]) {
    const capacity = motions.reduce(
      (sum, { motion }) => sum + (motion.dofs.length * (motion.dofs.length + 1)) / 2,
      0,
    );
    this.#rows = new Int32Array(capacity);
    this.#cols = new Int32Array(capacity);
    this.#values = new Float64Array(capacity);
  }

  /** Adds Tᵀ k T; k of the motion's rows, symmetric, row by row. */
  add({ rows, dofs, T }: Combination, k: Float64Array): void {
    const scratch = this.#scratch;
    const width = dofs.length;
    for (let i = 0; i < rows; i++) {
      for (let b = 0; b < width; b++) {
        let sum = 0;
        for (let j = 0; j < rows; j++) sum += k[i * rows + j]! * T[j * width + b]!;
        scratch[i * width + b] = sum;
      }
    }
    for (let a = 0; a < width; a++) {
      for (let b = 0; b <= a; b++) {
        let sum = 0;
        for (let i = 0; i < rows; i++) sum += T[i * width + a]! * scratch[i * width + b]!;
        this.#rows[this.#length] = dofs[a]!;
        this.#cols[this.#length] = dofs[b]!;
        this.#values[this.#length] = sum;
        this.#length += 1;
      }
    }
  }

  assemble(n: number): SymmetricCsc {
    return assembleSymmetric(n, this.#rows, this.#cols, this.#values, this.#length);
  }
}
