import { cross, normalise } from '#shared/frame/vector3.ts';
import type { Displacement, Support, Vector3 } from '#shared/schemas/frameDocument.ts';
import type { Projection } from '../camera/projection.ts';
import type { Inks } from '../useInks.ts';
import { across, along, coil, hatchedLine, line, ring, type Pen, type Spot } from './pen.ts';

const TRANSLATIONS = ['u', 'v', 'w'] as const;
const ROTATIONS = ['rx', 'ry', 'rz'] as const;
/** Under this share of its length an axis is seen end on and its symbol left out. */
const END_ON = 0.3;

/**
 * Draws what a support does at its node: everything held, a hatched block; all translations held, a cone on
 * ground; single directions held, a stop across each; sprung directions, a coil along each; sprung rotations, an
 * open arc.
 *   size  px, to scale with the view within limits
 */
export function drawSupport(
  pen: Pen,
  support: Support,
  at: Vector3,
  projection: Projection,
  unknowns: readonly Displacement[],
  size: number,
  inks: Inks,
): void {
  const spot = projection.project(at);
  const held = new Set<Displacement>(support.fixed);
  const axes = supportAxes(support);
  const moves = TRANSLATIONS.filter((displacement) => unknowns.includes(displacement));
  const turns = ROTATIONS.filter((displacement) => unknowns.includes(displacement));
  const down = downwards(axes[2], projection);
  const holdsMoves = moves.length > 0 && moves.every((displacement) => held.has(displacement));
  const holdsTurns = turns.every((displacement) => held.has(displacement));

  pen.strokeStyle = inks.ink;
  pen.fillStyle = inks.sheet;
  pen.lineWidth = 1.25;
  if (holdsMoves && holdsTurns) block(pen, spot, down, size);
  else if (holdsMoves) cone(pen, spot, down, size);
  else {
    moves.forEach((displacement) => {
      const axis = seen(axes[TRANSLATIONS.indexOf(displacement)]!, projection);
      if (held.has(displacement) && axis) stop(pen, spot, axis, size);
    });
  }
  const upright = support.stiffness?.w !== undefined;
  for (const displacement of moves) {
    const axis = seen(axes[TRANSLATIONS.indexOf(displacement)]!, projection);
    if (support.stiffness?.[displacement] === undefined || !axis) continue;
    // Beside a coil under the foot those across it are drawn small, so that a foot reads as a foot.
    const share = upright && displacement !== 'w' ? 0.5 : 1;
    const start = along(spot, unit(axis), share < 1 ? 4 : 0);
    const end = along(start, axis, size * 1.6 * share);
    coil(pen, start, end, size * 0.6 * share);
    hatchedLine(pen, end, unit(axis), size * 0.8 * share);
  }
  if (turns.some((displacement) => support.stiffness?.[displacement] !== undefined)) {
    pen.beginPath();
    pen.arc(spot.x, spot.y, size * 0.55, 1.05 * Math.PI, 1.95 * Math.PI);
    pen.stroke();
  }
}

/** Axes of an inclined support, global ones otherwise: z is made perpendicular to x. */
function supportAxes(support: Support): readonly [Vector3, Vector3, Vector3] {
  if (!support.axes) {
    return [
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
    ];
  }
  const x = normalise(support.axes.x);
  const y = normalise(cross(support.axes.z, x));
  return [x, y, cross(x, y)];
}

/** Where −axis points on the paper, with its foreshortening; null when it is seen end on. */
function seen(axis: Vector3, { right, up }: Projection): Spot | null {
  const x = -(axis[0] * right[0] + axis[1] * right[1] + axis[2] * right[2]);
  const y = axis[0] * up[0] + axis[1] * up[1] + axis[2] * up[2];
  return Math.hypot(x, y) < END_ON ? null : { x, y };
}

function downwards(z: Vector3, projection: Projection): Spot {
  const axis = seen(z, projection);
  return axis ? unit(axis) : { x: 0, y: 1 };
}

function unit({ x, y }: Spot): Spot {
  const length = Math.hypot(x, y);
  return { x: x / length, y: y / length };
}

function block(pen: Pen, spot: Spot, down: Spot, size: number): void {
  const side = across(down);
  const far = along(spot, down, size);
  const corners = [
    along(spot, side, -size * 0.75),
    along(spot, side, size * 0.75),
    along(far, side, size * 0.75),
    along(far, side, -size * 0.75),
  ];
  pen.save();
  pen.beginPath();
  for (const corner of corners) pen.lineTo(corner.x, corner.y);
  pen.closePath();
  pen.fill();
  pen.stroke();
  pen.clip();
  pen.lineWidth = 0.9;
  for (let step = -2; step < 5; step += 1) {
    const from = along(spot, side, (step - 2) * size * 0.3);
    line(pen, from, along(along(from, down, size), side, size));
  }
  pen.restore();
}

function cone(pen: Pen, spot: Spot, down: Spot, size: number): void {
  const side = across(down);
  const foot = along(spot, down, size * 0.85);
  const left = along(foot, side, -size * 0.55);
  const right = along(foot, side, size * 0.55);
  pen.beginPath();
  pen.moveTo(spot.x, spot.y);
  pen.lineTo(left.x, left.y);
  pen.lineTo(right.x, right.y);
  pen.closePath();
  pen.fill();
  pen.stroke();
  hatchedLine(pen, foot, down, size * 1.5);
  ring(pen, spot, 3);
  pen.fill();
  pen.stroke();
}

/** A stop holds one direction: a short bar across it, with ground behind. */
function stop(pen: Pen, spot: Spot, axis: Spot, size: number): void {
  const end = along(spot, axis, size * 0.8);
  line(pen, spot, end);
  pen.save();
  pen.lineWidth = 2;
  hatchedLine(pen, end, unit(axis), size * 0.8);
  pen.restore();
}
