import type { PlacedMember } from '../model/frameModel.ts';

/**
 * One 4×4 matrix per member, column by column, that carries a prism of length 1 to the member's place:
 * x along it and scaled to its length, y and z its own axes, the origin its start.
 *   returns members × 16
 */
export function memberPlaces(members: readonly PlacedMember[]): Float32Array {
  const places = new Float32Array(members.length * 16);
  members.forEach(({ start, axes }, index) => {
    const at = 16 * index;
    for (const row of [0, 1, 2] as const) {
      places[at + row] = axes.x[row] * axes.length;
      places[at + 4 + row] = axes.y[row];
      places[at + 8 + row] = axes.z[row];
      places[at + 12 + row] = start[row];
    }
    places[at + 15] = 1;
  });
  return places;
}
