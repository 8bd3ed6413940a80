/**
 * Modal assurance criterion of two real shapes at the same points: (aᵀb)² / (aᵀa bᵀb), 0 … 1 [–].
 * 1 where one is a multiple of the other; 0 where either is zero everywhere.
 * Source: Allemang 2003, The Modal Assurance Criterion: twenty years of use and abuse, Sound and Vibration 37(8).
 */
export function mac(a: Float64Array, b: Float64Array): number {
  let ab = 0;
  let aa = 0;
  let bb = 0;
  for (let i = 0; i < a.length; i++) {
    ab += a[i]! * b[i]!;
    aa += a[i]! * a[i]!;
    bb += b[i]! * b[i]!;
  }
  return aa > 0 && bb > 0 ? Math.min(1, (ab * ab) / (aa * bb)) : 0;
}

/** Part of a vector outside those before it under which it adds no direction. */
const DEPENDENT = 1e-6;

/**
 * How much of `a` lies in the space that `others` span: ‖P a‖² / ‖a‖², 0 … 1 [–]; with one other it is the MAC.
 * Modes of one frequency may be mixed at will, so single shapes of them say nothing, while their space does.
 */
export function macWithSpace(a: Float64Array, others: readonly Float64Array[]): number {
  const basis: Float64Array[] = [];
  for (const other of others) {
    const rest = other.slice();
    const before = dot(rest, rest);
    for (const q of basis) subtract(rest, q, dot(rest, q));
    const left = dot(rest, rest);
    if (left > DEPENDENT * before) {
      const factor = 1 / Math.sqrt(left);
      basis.push(rest.map((value) => value * factor));
    }
  }
  const size = dot(a, a);
  if (!(size > 0)) return 0;
  const inside = basis.reduce((sum, q) => sum + dot(a, q) ** 2, 0);
  return Math.min(1, inside / size);
}

function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i]! * b[i]!;
  return sum;
}

function subtract(from: Float64Array, q: Float64Array, factor: number): void {
  for (let i = 0; i < from.length; i++) from[i]! -= factor * q[i]!;
}
