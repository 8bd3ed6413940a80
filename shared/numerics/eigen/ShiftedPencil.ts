import type { Ldlt } from '../factor/Ldlt.ts';
import { solveLdlt } from '../factor/solve.ts';
import type { SymmetricCsc } from '../sparse/SymmetricCsc.ts';

/**
 * What the eigen solver sees of K φ = λ M φ: the operator A = (K − σM)⁻¹ M, self-adjoint in M,
 * whose eigenvalues are θ = 1/(λ − σ), and M itself.
 */
export class ShiftedPencil {
  readonly n: number;
  readonly M: SymmetricCsc;
  readonly #ldlt: Ldlt;
  readonly #scratch: Float64Array;

  constructor(M: SymmetricCsc, ldlt: Ldlt) {
    this.n = M.n;
    this.M = M;
    this.#ldlt = ldlt;
    this.#scratch = new Float64Array(M.n);
  }

  get sigma(): number {
    return this.#ldlt.sigma;
  }

  /** w ← (K − σM)⁻¹ image, with image = M v: so w = A v. n each; w is not image. */
  apply(image: Float64Array, w: Float64Array): void {
    w.set(image);
    solveLdlt(this.#ldlt, w, this.#scratch);
  }
}
