import type { Arena } from '../kernels/Arena.ts';

/** An address that counts from the memory's start, or from the vector x or y that a program is run on. */
export interface Place {
  readonly at: number;
  readonly from: 'memory' | 'x' | 'y';
}

export const inMemory = (at: number): Place => ({ at, from: 'memory' });
export const inX = (at: number): Place => ({ at, from: 'x' });
export const inY = (at: number): Place => ({ at, from: 'y' });

const BASES = ['memory', 'x', 'y'];
const STEP = 12;

/** Steps over the chains of all classes, put down once and run often (`Kernels.run`). */
export class Program {
  readonly #arena: Arena;
  readonly #numbers: number[] = [];
  #address = 0;

  constructor(arena: Arena) {
    this.#arena = arena;
  }

  /** to ← displacements of the chains' ends, from the joint unknowns at `from`. */
  gather(count: number, table: number, ends: number, from: Place, to: Place): void {
    this.#add(0, count, from, to, table, ends);
  }

  /** Joint unknowns at `to` += what the chains' ends at `from` are. */
  scatter(count: number, table: number, ends: number, from: Place, to: Place): void {
    this.#add(1, count, from, to, table, ends);
  }

  diagonal(count: number, size: number, d: number, from: Place, to: Place): void {
    this.#add(2, count, from, to, d, size);
  }

  /** to (+)= G from, for `count` vectors `strides` numbers apart; nothing without inputs or outputs. */
  multiply(
    count: number,
    G: number,
    { inputs, outputs }: { inputs: number; outputs: number },
    [from, strideFrom]: readonly [Place, number],
    [to, strideTo]: readonly [Place, number],
    accumulate: boolean,
  ): void {
    if (outputs === 0 || (inputs === 0 && accumulate)) return;
    const rest = [outputs, 8 * strideFrom, 8 * strideTo, accumulate ? 1 : 0];
    this.#add(3, count, from, to, G, inputs, rest);
  }

  #add(
    kind: number,
    count: number,
    from: Place,
    to: Place,
    table: number,
    inputs: number,
    rest: readonly number[] = [0, 0, 0, 0],
  ): void {
    this.#numbers.push(kind, count, from.at, BASES.indexOf(from.from));
    this.#numbers.push(to.at, BASES.indexOf(to.from), table, inputs, ...rest);
  }

  /** Puts the steps into the arena; none can be added after. */
  place(): this {
    this.#address = this.#arena.placeIndices(Int32Array.from(this.#numbers));
    return this;
  }

  run(x: number, y: number): void {
    this.#arena.kernels.run(this.#numbers.length / STEP, this.#address, x, y);
  }
}
