import type { Arena } from '../kernels/Arena.ts';
import type { PlacedClass } from './PlacedClass.ts';
import { inMemory, inX, inY, Program } from './Program.ts';

/** Chains worked on together: what they need stays in the second cache, and calls are few. */
const BATCH = 512;

/** What solves and products do for the chains of a pair; they follow each new factorisation by themselves. */
export interface ChainPrograms {
  /** y_joints −= Tᵀ Wᵀ x_inner. */
  readonly reduce: Program;
  /** y_inner = (K − σM)_ii⁻¹ x_inner: the ends held. */
  readonly held: Program;
  /** y_inner −= W T x_joints: following the ends. */
  readonly follow: Program;
  /** y += K x and y += M x, the chains' part. */
  readonly K: Program;
  readonly M: Program;
}

/** Classes, and scratch for a batch of their ends: displacements, and products of them. */
interface Room {
  readonly arena: Arena;
  readonly classes: readonly PlacedClass[];
  readonly ends: number;
  readonly products: number;
}

export function chainPrograms(arena: Arena, classes: readonly PlacedClass[]): ChainPrograms {
  const widest = classes.reduce((most, { chainClass }) => Math.max(most, chainClass.ends), 0);
  const ends = arena.numbers(BATCH * widest);
  const products = arena.numbers(BATCH * widest);
  const room = { arena, classes, ends, products };
  return {
    reduce: reduceProgram(room),
    held: heldProgram(room),
    follow: followProgram(room),
    K: productProgram(room, 'K'),
    M: productProgram(room, 'M'),
  };
}

function reduceProgram({ arena, classes, ends: B }: Room): Program {
  const program = new Program(arena);
  inBatches(classes, ({ chainClass: { inner, ends }, blocks, first, table }, from, count) => {
    if (inner === 0) return;
    const F = 8 * (first + from * inner);
    for (const { inner: inputs, ends: outputs, innerFrom, endsFrom, minusWT } of blocks) {
      program.multiply(
        count,
        minusWT,
        { inputs, outputs },
        [inX(F + 8 * innerFrom), inner],
        [inMemory(B + 8 * endsFrom), ends],
        false,
      );
    }
    program.scatter(count, table + 24 * from, ends, inMemory(B), inY(0));
  });
  return program.place();
}

function heldProgram({ arena, classes }: Room): Program {
  const program = new Program(arena);
  inBatches(classes, ({ chainClass: { inner }, blocks, first }, from, count) => {
    for (const { inner: size, innerFrom, inverse } of blocks) {
      const at = 8 * (first + from * inner + innerFrom);
      const sizes = { inputs: size, outputs: size };
      program.multiply(count, inverse, sizes, [inX(at), inner], [inY(at), inner], false);
    }
  });
  return program.place();
}

function followProgram({ arena, classes, ends: B }: Room): Program {
  const program = new Program(arena);
  inBatches(classes, ({ chainClass: { inner, ends }, blocks, first, table }, from, count) => {
    if (inner === 0) return;
    program.gather(count, table + 24 * from, ends, inX(0), inMemory(B));
    const Y = 8 * (first + from * inner);
    for (const { inner: outputs, ends: inputs, innerFrom, endsFrom, minusW } of blocks) {
      program.multiply(
        count,
        minusW,
        { inputs, outputs },
        [inMemory(B + 8 * endsFrom), ends],
        [inY(Y + 8 * innerFrom), inner],
        true,
      );
    }
  });
  return program.place();
}

function productProgram({ arena, classes, ends: B, products }: Room, which: 'K' | 'M'): Program {
  const program = new Program(arena);
  inBatches(classes, (placed, from, count) => {
    const { inner, ends } = placed.chainClass;
    const matrix = placed[which];
    const table = placed.table + 24 * from;
    const at = 8 * (placed.first + from * inner);
    program.gather(count, table, ends, inX(0), inMemory(B));
    if (matrix.kind === 'diagonal') {
      program.diagonal(count, inner, matrix.inner, inX(at), inY(at));
      program.diagonal(count, ends, matrix.ends, inMemory(B), inMemory(products));
    } else {
      for (const block of matrix.blocks) {
        const { inner: m, ends: e, innerFrom: i, endsFrom: o } = block;
        const x = [inX(at + 8 * i), inner] as const;
        const y = [inY(at + 8 * i), inner] as const;
        const b = [inMemory(B + 8 * o), ends] as const;
        const c = [inMemory(products + 8 * o), ends] as const;
        program.multiply(count, block.endsEnds, { inputs: e, outputs: e }, b, c, false);
        program.multiply(count, block.endsInner, { inputs: m, outputs: e }, x, c, true);
        program.multiply(count, block.innerInner, { inputs: m, outputs: m }, x, y, false);
        program.multiply(count, block.innerEnds, { inputs: e, outputs: m }, b, y, true);
      }
    }
    program.scatter(count, table, ends, inMemory(products), inY(0));
  });
  return program.place();
}

function inBatches(
  classes: readonly PlacedClass[],
  use: (placed: PlacedClass, from: number, count: number) => void,
): void {
  for (const placed of classes) {
    for (let from = 0; from < placed.count; from += BATCH) {
      use(placed, from, Math.min(BATCH, placed.count - from));
    }
  }
}
