import type { ChainedPencil } from '../chains/ChainedPencil.ts';
import { fillRandom } from './fillRandom.ts';
import type { ModeSet } from './ModeSet.ts';

/** What is left of a random vector outside the known ones, over its norm, when there is nothing left. */
const NOTHING_LEFT = 1e-12;

/**
 * A random vector of M-norm 1 in the range of A, where eigenvectors with finite λ lie even if M is
 * singular, orthogonal to those known; they are taken out first too: A would make them drown the rest.
 *   v, image  addresses; image becomes M v
 * Returns false where nothing is left outside `locked`.
 */
export function startVector(
  pencil: ChainedPencil,
  locked: ModeSet,
  random: Uint32Array,
  v: number,
  image: number,
): boolean {
  const { arena, n, size } = pencil;
  const { kernels } = arena;
  arena.view(v, size).fill(0);
  fillRandom(arena.view(v, n), random);
  const normOutside = (): { before: number; after: number } => {
    pencil.multiplyMass(v, image);
    const before = Math.sqrt(Math.max(kernels.dot(size, v, image), 0));
    if (locked.count > 0) {
      for (let pass = 0; pass < 2; pass++) locked.takeOut(v);
      pencil.multiplyMass(v, image);
    }
    return { before, after: Math.sqrt(Math.max(kernels.dot(size, v, image), 0)) };
  };
  const first = normOutside();
  if (!(first.after > NOTHING_LEFT * first.before)) return false;
  kernels.multiply(size, 1 / first.after, image);
  pencil.solve(image, v);
  const second = normOutside();
  if (!(second.after > NOTHING_LEFT * second.before)) return false;
  kernels.multiply(size, 1 / second.after, v);
  kernels.multiply(size, 1 / second.after, image);
  return true;
}
