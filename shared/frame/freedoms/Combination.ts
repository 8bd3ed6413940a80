/**
 * A few displacements as linear combinations of a frame's free unknowns:  d = T x[dofs].
 *   T  rows × dofs.length, row by row
 */
export interface Combination {
  readonly rows: number;
  readonly dofs: Int32Array;
  readonly T: Float64Array;
}

/** d ← T x[dofs]; x over all free unknowns, d `rows` long from `at`, overwritten. */
export function displacements(
  { rows, dofs, T }: Combination,
  x: Float64Array,
  d: Float64Array,
  at = 0,
): void {
  const width = dofs.length;
  for (let i = 0; i < rows; i++) {
    let sum = 0;
    for (let j = 0; j < width; j++) sum += T[i * width + j]! * x[dofs[j]!]!;
    d[at + i] = sum;
  }
}

/** x[dofs] += Tᵀ f; f `rows` long, x over all free unknowns. */
export function addForces({ rows, dofs, T }: Combination, f: Float64Array, x: Float64Array): void {
  const width = dofs.length;
  for (let j = 0; j < width; j++) {
    let sum = 0;
    for (let i = 0; i < rows; i++) sum += T[i * width + j]! * f[i]!;
    x[dofs[j]!]! += sum;
  }
}

/** One displacement as terms `[unknown, coefficient]`. */
export type Terms = readonly (readonly [number, number])[];

/** The combination whose rows are the given lists of terms; terms of one unknown are added. */
export function combine(rows: readonly Terms[]): Combination {
  const column = new Map<number, number>();
  for (const row of rows) {
    for (const [dof] of row) if (!column.has(dof)) column.set(dof, column.size);
  }
  const T = new Float64Array(rows.length * column.size);
  rows.forEach((row, i) => {
    for (const [dof, coefficient] of row) T[i * column.size + column.get(dof)!]! += coefficient;
  });
  return { rows: rows.length, dofs: Int32Array.from(column.keys()), T };
}

/** The rows of a combination as terms, `from` to before `to`. */
export function termsOf({ dofs, T }: Combination, from: number, to: number): Terms[] {
  return Array.from({ length: to - from }, (_, row) =>
    Array.from(dofs, (dof, j) => [dof, T[(from + row) * dofs.length + j]!] as const).filter(
      ([, coefficient]) => coefficient !== 0,
    ),
  );
}

/** The rows of both, one combination after the other. */
export function stacked(a: Combination, b: Combination): Combination {
  for (const dof of b.dofs) {
    if (a.dofs.includes(dof)) return combine([...termsOf(a, 0, a.rows), ...termsOf(b, 0, b.rows)]);
  }
  const width = a.dofs.length + b.dofs.length;
  const dofs = new Int32Array(width);
  dofs.set(a.dofs);
  dofs.set(b.dofs, a.dofs.length);
  const T = new Float64Array((a.rows + b.rows) * width);
  for (let i = 0; i < a.rows; i++) {
    for (let j = 0; j < a.dofs.length; j++) T[i * width + j] = a.T[i * a.dofs.length + j]!;
  }
  for (let i = 0; i < b.rows; i++) {
    const from = (a.rows + i) * width + a.dofs.length;
    for (let j = 0; j < b.dofs.length; j++) T[from + j] = b.T[i * b.dofs.length + j]!;
  }
  return { rows: a.rows + b.rows, dofs, T };
}
