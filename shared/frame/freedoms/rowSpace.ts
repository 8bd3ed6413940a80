/** Part of a unit row outside the rows before it, under which it counts as one of their combinations. */
const DEPENDENT = 1e-9;

/** A row over the six scaled displacements of a rigid group. */
export type Row = Float64Array;
const SIZE = 6;

function dot(a: Row, b: Row): number {
  let sum = 0;
  for (let i = 0; i < SIZE; i++) sum += a[i]! * b[i]!;
  return sum;
}

function scaled(row: Row, factor: number): Row {
  return row.map((value) => value * factor);
}

/** What is left of `row` outside an orthonormal set; taken out twice, so that rounding stays at eps. */
function outside(row: Row, basis: readonly Row[]): Row {
  const rest = row.slice();
  for (let pass = 0; pass < 2; pass++) {
    for (const q of basis) {
      const along = dot(rest, q);
      for (let i = 0; i < SIZE; i++) rest[i]! -= along * q[i]!;
    }
  }
  return rest;
}

/**
 * Orthonormal rows that extend `basis` (orthonormal, unchanged) to span `rows` too; only the new ones are
 * returned. A row that lies within 1e-9 of the span, as an angle, adds nothing.
 */
export function extendBasis(basis: readonly Row[], rows: readonly Row[]): Row[] {
  const all = [...basis];
  for (const row of rows) {
    const length = Math.sqrt(dot(row, row));
    if (length === 0 || all.length === SIZE) continue;
    const rest = outside(scaled(row, 1 / length), all);
    const left = Math.sqrt(dot(rest, rest));
    if (left > DEPENDENT) all.push(scaled(rest, 1 / left));
  }
  return all.slice(basis.length);
}

/**
 * Orthonormal rows spanning what is perpendicular to the orthonormal `basis`. Axes of the group that lie
 * wholly outside `basis` are taken as they are, so that an ordinary node keeps its own displacements.
 */
export function complement(basis: readonly Row[]): Row[] {
  const axes = Array.from({ length: SIZE }, (_, axis) => unitRow(axis));
  const sizeOutside = axes.map((axis) => dot(outside(axis, basis), axis));
  const order = axes.map((_, i) => i).sort((a, b) => sizeOutside[b]! - sizeOutside[a]! || a - b);
  return extendBasis(
    basis,
    order.map((i) => axes[i]!),
  );
}

/** The row that is 1 at one of the six displacements. */
export function unitRow(axis: number): Row {
  const row = new Float64Array(SIZE);
  row[axis] = 1;
  return row;
}
