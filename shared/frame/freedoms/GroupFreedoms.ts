import type { Hold, UnknownMeaning } from '../assembly/FrameModel.ts';
import type { Terms } from './Combination.ts';
import { complement, extendBasis, unitRow } from './rowSpace.ts';
import type { Row } from './rowSpace.ts';

/** One of a rigid group's displacements, as a row over its six. */
export type GroupDisplacement = Hold;

/**
 * Chooses the unknowns of every rigid group and numbers all unknowns of a frame.
 *
 * First each support fixes, and each thing with stiffness or mass uses, displacements of groups; then
 * `number` gives each group an orthonormal set of unknowns that spans what is used and not fixed. An
 * ordinary node keeps its own displacements; an inclined support turns them; a motion to which nothing with
 * stiffness or mass is attached becomes no unknown.
 */
export class GroupFreedoms {
  readonly meanings: UnknownMeaning[] = [];
  /** Number of the block of each: a group, or what was added since `beginBlock`. */
  readonly blockOf: number[] = [];
  #block = 0;
  readonly #fixed: Row[][];
  readonly #used: Row[][];
  #basis: Row[][] = [];
  #first: number[] = [];

  /** `exists`: 6, global order, 1 where the displacement exists in the model. */
  constructor(groups: number, exists: Uint8Array) {
    const absent = [0, 1, 2, 3, 4, 5].filter((axis) => !exists[axis]).map(unitRow);
    this.#fixed = Array.from({ length: groups }, () => [...absent]);
    this.#used = Array.from({ length: groups }, () => []);
  }

  fix({ group, row }: GroupDisplacement): void {
    this.#fixed[group]!.push(row);
  }

  use({ group, row }: GroupDisplacement): void {
    this.#used[group]!.push(row);
  }

  /** Numbers the unknowns of the groups; nothing is fixed or used after this. */
  number(): void {
    this.#basis = this.#fixed.map((rows, group) => {
      const fixed = extendBasis([], rows);
      const used = extendBasis(fixed, this.#used[group]!);
      const inert = complement([...fixed, ...used]);
      return complement([...fixed, ...inert]);
    });
    this.#first = this.#basis.map((basis, group) => {
      const first = this.meanings.length;
      this.beginBlock();
      for (const row of basis) this.add({ group, row });
      return first;
    });
  }

  /** What is added from here on stands at another place than what was. */
  beginBlock(): void {
    const last = this.blockOf.at(-1);
    this.#block = last === undefined ? 0 : last + 1;
  }

  /** An unknown of its own that would move as `displacement` does if the group carried it rigidly. */
  add(displacement: GroupDisplacement): number {
    this.blockOf.push(this.#block);
    return this.meanings.push(displacement) - 1;
  }

  /** The displacement in terms of the group's unknowns, times `factor`. */
  terms({ group, row }: GroupDisplacement, factor = 1): Terms {
    const first = this.#first[group]!;
    const terms: [number, number][] = [];
    this.#basis[group]!.forEach((basis, k) => {
      let coefficient = 0;
      for (let i = 0; i < 6; i++) coefficient += row[i]! * basis[i]!;
      if (coefficient !== 0) terms.push([first + k, factor * coefficient]);
    });
    return terms;
  }
}
