import type { Vector3 } from '#shared/schemas/frameDocument.ts';
import type { Projection, WorkPlane } from '../camera/projection.ts';
import type { Bounds } from '../model/bounds.ts';
import type { Inks } from '../useInks.ts';
import { along, line, type Pen } from './pen.ts';

const AXES: readonly { letter: string; axis: Vector3 }[] = [
  { letter: 'X', axis: [1, 0, 0] },
  { letter: 'Y', axis: [0, 1, 0] },
  { letter: 'Z', axis: [0, 0, 1] },
];
const REACH = 26;
const INSET = 44;

/** The directions of the global axes, small, in one ink, in the lower left corner. */
export function drawAxesMark(pen: Pen, { right, up, size }: Projection, inks: Inks): void {
  const origin = { x: INSET, y: size.height - INSET };
  pen.strokeStyle = inks.soft;
  pen.fillStyle = inks.soft;
  pen.lineWidth = 1;
  pen.font = "500 12px 'Commissioner Variable', sans-serif";
  pen.textAlign = 'center';
  pen.textBaseline = 'middle';
  for (const { letter, axis } of AXES) {
    const x = axis[0] * right[0] + axis[1] * right[1] + axis[2] * right[2];
    const y = -(axis[0] * up[0] + axis[1] * up[1] + axis[2] * up[2]);
    const length = Math.hypot(x, y);
    if (length < 0.12) continue;
    const tip = along(origin, { x, y }, REACH);
    line(pen, origin, tip);
    const label = along(tip, { x: x / length, y: y / length }, 9);
    pen.fillText(letter, label.x, label.y);
  }
}

/** A length bar of a round length, right of the axes mark. */
export function drawScaleBar(
  pen: Pen,
  { pixelsPerMetre, size }: Projection,
  inks: Inks,
  formatLength: (metres: number) => string,
): void {
  const metres = roundLength(110 / pixelsPerMetre);
  const x = INSET + REACH + 34;
  const y = size.height - 22;
  const width = metres * pixelsPerMetre;
  pen.strokeStyle = inks.soft;
  pen.fillStyle = inks.soft;
  pen.lineWidth = 1;
  line(pen, { x, y }, { x: x + width, y });
  line(pen, { x, y: y - 4 }, { x, y: y + 4 });
  line(pen, { x: x + width, y: y - 4 }, { x: x + width, y: y + 4 });
  pen.font = "11px 'JetBrains Mono Variable', monospace";
  pen.textAlign = 'center';
  pen.textBaseline = 'bottom';
  pen.fillText(formatLength(metres), x + width / 2, y - 3);
}

/** The largest of 1, 2, 5 × 10ⁿ that is not above a length. */
export function roundLength(length: number): number {
  const power = 10 ** Math.floor(Math.log10(length));
  const lead = length / power;
  return (lead >= 5 ? 5 : lead >= 2 ? 2 : 1) * power;
}

/** More grid lines than this to a side would be a grey tone. */
const MOST_LINES = 80;

/** The grid of the plane that new nodes are put on, a little larger than the frame. */
export function drawGrid(
  pen: Pen,
  plane: WorkPlane,
  step: number,
  bounds: Bounds,
  projection: Projection,
  inks: Inks,
): void {
  const [first, second] = ([0, 1, 2] as const).filter((axis) => axis !== plane.axis) as [
    0 | 1 | 2,
    0 | 1 | 2,
  ];
  const reach = (axis: 0 | 1 | 2): [number, number] => {
    const margin = Math.max(4 * step, 0.15 * (bounds.max[axis] - bounds.min[axis]));
    return [
      Math.floor((bounds.min[axis] - margin) / step) * step,
      Math.ceil((bounds.max[axis] + margin) / step) * step,
    ];
  };
  const point = (a: number, b: number): Vector3 => {
    const at: Vector3 = [0, 0, 0];
    at[plane.axis] = plane.at;
    at[first] = a;
    at[second] = b;
    return at;
  };
  const [a0, a1] = reach(first);
  const [b0, b1] = reach(second);
  pen.strokeStyle = inks.rule;
  pen.lineWidth = 1;
  const lines = (from: number, to: number, draw: (value: number) => void) => {
    const every = step * Math.max(1, Math.ceil((to - from) / step / MOST_LINES));
    for (let i = 0; from + i * every <= to + step / 2; i += 1) draw(from + i * every);
  };
  lines(a0, a1, (a) =>
    line(pen, projection.project(point(a, b0)), projection.project(point(a, b1))),
  );
  lines(b0, b1, (b) =>
    line(pen, projection.project(point(a0, b)), projection.project(point(a1, b))),
  );
}
