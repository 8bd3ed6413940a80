import type { Ldlt } from './Ldlt.ts';

/** x ← (K − σM)⁻¹ x; n, right-hand side, overwritten by the solution. */
export function solveLdlt({ elimination, arena, x: address }: Ldlt, x: Float64Array): void {
  const room = arena.view(address, x.length);
  room.set(x);
  elimination.solve(address, address);
  x.set(arena.view(address, x.length));
}
