import type { Vector3 } from '../../schemas/frameDocument.ts';

/** Cosine from which a direction counts as that of an axis. */
const ALONG_AXIS = 0.999;
/** Component, over the largest of what is described, that rounding explains. */
const NOTHING = 1e-6;

/** "Z", or components where the direction is along no axis; its sense is left out. */
export function direction(v: Vector3): string {
  const size = Math.hypot(...v);
  const axis = v.findIndex((component) => Math.abs(component) > ALONG_AXIS * size);
  if (axis >= 0) return 'XYZ'[axis]!;
  const sign = v.find((component) => Math.abs(component) > 1e-3 * size)! < 0 ? -1 : 1;
  return `(${v.map((component) => ((sign * component) / size).toFixed(2).replace('-0.00', '0.00')).join(', ')})`;
}

/**
 * The directions that span the same space as the given vectors, by Gauss-Jordan elimination with complete pivoting,
 * so that axes which lie in it come out as themselves: "X and Y", "(0.71, 0.00, 0.71)"; empty where all are zero.
 * Vectors are of about unit size or zero.
 */
export function directions(vectors: readonly Vector3[]): string {
  const rows = vectors.map(([x, y, z]): Vector3 => [x, y, z]);
  const spanning: Vector3[] = [];
  while (rows.length > 0) {
    let [row, column] = [0, 0];
    rows.forEach((v, r) => {
      v.forEach((value, c) => {
        if (Math.abs(value) > Math.abs(rows[row]![column]!) + NOTHING) [row, column] = [r, c];
      });
    });
    const pivot = rows.splice(row, 1)[0]!;
    if (Math.abs(pivot[column]!) <= NOTHING) break;
    const unit = pivot.map((value) => value / pivot[column]!);
    for (const other of [...rows, ...spanning]) {
      const share = other[column]!;
      for (let c = 0; c < 3; c++) other[c]! -= share * unit[c]!;
    }
    spanning.push([unit[0]!, unit[1]!, unit[2]!]);
  }
  return inWords(spanning.map(direction).sort());
}

/** "X", "X and Y", "X, Y and Z". */
export function inWords(parts: readonly string[]): string {
  if (parts.length < 2) return parts.join('');
  return `${parts.slice(0, -1).join(', ')} and ${parts.at(-1)!}`;
}
