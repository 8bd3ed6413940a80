/** A point on the paper, px. */
export interface Spot {
  readonly x: number;
  readonly y: number;
}

export type Pen = CanvasRenderingContext2D;

export function line(pen: Pen, a: Spot, b: Spot): void {
  pen.beginPath();
  pen.moveTo(a.x, a.y);
  pen.lineTo(b.x, b.y);
  pen.stroke();
}

export function along(from: Spot, direction: Spot, distance: number): Spot {
  return { x: from.x + direction.x * distance, y: from.y + direction.y * distance };
}

/** The direction from one spot to another, of length 1; null where they coincide. */
export function directionOf(from: Spot, to: Spot): Spot | null {
  const length = Math.hypot(to.x - from.x, to.y - from.y);
  return length < 1e-6 ? null : { x: (to.x - from.x) / length, y: (to.y - from.y) / length };
}

/** A quarter turn on the paper. */
export const across = (direction: Spot): Spot => ({ x: -direction.y, y: direction.x });

export function ring(pen: Pen, at: Spot, radius: number): void {
  pen.beginPath();
  pen.arc(at.x, at.y, radius, 0, 2 * Math.PI);
}

/** A ground line with short slanted strokes on its far side. `towards` points into the ground. */
export function hatchedLine(pen: Pen, middle: Spot, towards: Spot, width: number): void {
  const side = across(towards);
  line(pen, along(middle, side, -width / 2), along(middle, side, width / 2));
  const strokes = Math.max(3, Math.round(width / 5));
  const reach = width / 5;
  for (let i = 0; i < strokes; i += 1) {
    const at = along(middle, side, -width / 2 + ((i + 0.7) * width) / strokes);
    line(pen, at, along(along(at, towards, reach), side, -reach * 0.8));
  }
}

/** Points on one turn of a coil as it is drawn. */
const COIL_STEPS = 10;

/** A coil from one spot to another, seen from the side: straight ends, an even wave between. */
export function coil(pen: Pen, from: Spot, to: Spot, width: number): void {
  const direction = directionOf(from, to);
  if (!direction) return;
  const side = across(direction);
  const length = Math.hypot(to.x - from.x, to.y - from.y);
  const lead = length * 0.14;
  const turns = Math.max(2, Math.min(8, Math.round((length - 2 * lead) / (width * 0.55))));
  const steps = turns * COIL_STEPS;
  pen.beginPath();
  pen.moveTo(from.x, from.y);
  for (let step = 0; step <= steps; step += 1) {
    const middle = along(from, direction, lead + ((length - 2 * lead) * step) / steps);
    const at = along(middle, side, (width / 2) * Math.sin((2 * Math.PI * step) / COIL_STEPS));
    pen.lineTo(at.x, at.y);
  }
  pen.lineTo(to.x, to.y);
  pen.stroke();
}
