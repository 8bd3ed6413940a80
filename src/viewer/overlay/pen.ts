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

/** A coil from one spot to another: straight ends, loops between. */
export function coil(pen: Pen, from: Spot, to: Spot, width: number): void {
  const direction = directionOf(from, to);
  if (!direction) return;
  const side = across(direction);
  const length = Math.hypot(to.x - from.x, to.y - from.y);
  const lead = Math.min(length * 0.15, width);
  const turns = Math.max(2, Math.min(7, Math.round((length - 2 * lead) / (width * 0.7))));
  const pitch = (length - 2 * lead) / turns;
  pen.beginPath();
  pen.moveTo(from.x, from.y);
  let at = along(from, direction, lead);
  pen.lineTo(at.x, at.y);
  for (let turn = 0; turn < turns; turn += 1) {
    const out = along(along(at, direction, pitch * 0.75), side, width / 2);
    const back = along(along(at, direction, pitch * 0.25), side, -width / 2);
    const next = along(at, direction, pitch);
    pen.bezierCurveTo(out.x, out.y, out.x - direction.x * pitch, out.y, back.x, back.y);
    pen.lineTo(next.x, next.y);
    at = next;
  }
  pen.lineTo(to.x, to.y);
  pen.stroke();
}
