import type { Hold, UnknownMeaning } from '../assembly/FrameModel.ts';
import type { Vector3 } from '../../schemas/frameDocument.ts';
import type { Combination, Terms } from './Combination.ts';
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
  /** Groups that members resist in every displacement there is. */
  readonly #usedWhole: Uint8Array;
  readonly #absent: number;
  #basis: (readonly Row[])[] = [];
  #first: number[] = [];

  /** `exists`: 6, global order, 1 where the displacement exists in the model. */
  constructor(groups: number, exists: Uint8Array) {
    const absent = [0, 1, 2, 3, 4, 5].filter((axis) => !exists[axis]).map(unitRow);
    this.#fixed = Array.from({ length: groups }, () => [...absent]);
    this.#used = Array.from({ length: groups }, () => []);
    this.#usedWhole = new Uint8Array(groups);
    this.#absent = absent.length;
  }

  fix({ group, row }: GroupDisplacement): void {
    this.#fixed[group]!.push(row);
  }

  use({ group, row }: GroupDisplacement): void {
    this.#used[group]!.push(row);
  }

  /** All six displacements of a group are used. */
  useWhole(group: number): void {
    this.#usedWhole[group] = 1;
  }

  /** Numbers the unknowns of the groups; nothing is fixed or used after this. */
  number(): void {
    this.#basis = this.#fixed.map((rows, group) => {
      const whole = this.#usedWhole[group] === 1;
      // Most nodes: whole, and nothing fixed.
      if (whole && rows.length === this.#absent && this.#absent === 0) return UNIT_ROWS;
      const fixed = extendBasis([], rows);
      const used = extendBasis(fixed, whole ? UNIT_ROWS : this.#used[group]!);
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

  /**
   * Displacements of a point that the group carries rigidly, along `axes` and then, with six rows, about them.
   *   offset  from the group's reference to the point [m]     length  as in `translationRow` [m]
   */
  carried(
    group: number,
    axes: readonly [Vector3, Vector3, Vector3],
    offset: Vector3,
    length: number,
    rows: 3 | 6,
  ): Combination {
    const basis = this.#basis[group]!;
    const width = basis.length;
    const first = this.#first[group]!;
    const T = new Float64Array(rows * width);
    for (let i = 0; i < rows; i++) {
      const axis = axes[i % 3]!;
      for (let k = 0; k < width; k++) {
        const b = basis[k]!;
        const turning = (axis[0] * b[3]! + axis[1] * b[4]! + axis[2] * b[5]!) / length;
        if (i >= 3) {
          T[i * width + k] = turning;
          continue;
        }
        // axis · (t + ω × offset), with ω held as length × angle
        const x = b[0]! + (b[4]! * offset[2] - b[5]! * offset[1]) / length;
        const y = b[1]! + (b[5]! * offset[0] - b[3]! * offset[2]) / length;
        const z = b[2]! + (b[3]! * offset[1] - b[4]! * offset[0]) / length;
        T[i * width + k] = axis[0] * x + axis[1] * y + axis[2] * z;
      }
    }
    const dofs = new Int32Array(width);
    for (let k = 0; k < width; k++) dofs[k] = first + k;
    return { rows, dofs, T };
  }
}

const UNIT_ROWS: readonly Row[] = [0, 1, 2, 3, 4, 5].map(unitRow);
