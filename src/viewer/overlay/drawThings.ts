import type { Joint, RigidLink, Spring } from '#shared/schemas/frameDocument.ts';
import { add, scale } from '#shared/frame/vector3.ts';
import type { Projection } from '../camera/projection.ts';
import type { FrameModel, PlacedMass, PlacedMember } from '../model/frameModel.ts';
import type { Inks } from '../useInks.ts';
import { across, along, coil, directionOf, line, ring, type Pen, type Spot } from './pen.ts';

const NODE_RADIUS = 2.6;
const JOINT_RADIUS = 4;
/** How far in from the end of a member its joint is drawn, px. */
const JOINT_INSET = 10;

export function drawNode(pen: Pen, spot: Spot, inks: Inks): void {
  pen.fillStyle = inks.sheet;
  pen.strokeStyle = inks.ink;
  pen.lineWidth = 1.25;
  ring(pen, spot, NODE_RADIUS);
  pen.fill();
  pen.stroke();
}

/** Rigid arms: two thin lines close together from the node to the member's end. */
export function drawArms(pen: Pen, placed: PlacedMember, projection: Projection, inks: Inks): void {
  pen.strokeStyle = inks.soft;
  pen.lineWidth = 0.9;
  for (const [node, end] of [
    [placed.startNode, placed.start],
    [placed.endNode, placed.end],
  ] as const) {
    if (node !== end) doubleLine(pen, projection.project(node), projection.project(end));
  }
}

/** Open circles at the ends of a member that can give: with a dot where a stiffness is stated. */
export function drawJoints(
  pen: Pen,
  placed: PlacedMember,
  projection: Projection,
  inks: Inks,
): void {
  const { joints } = placed.member;
  if (!joints) return;
  const start = projection.project(placed.start);
  const end = projection.project(placed.end);
  const towards = directionOf(start, end);
  if (!towards) return;
  const inset = Math.min(JOINT_INSET, Math.hypot(end.x - start.x, end.y - start.y) / 4);
  drawJoint(pen, joints.start, along(start, towards, inset), inks);
  drawJoint(pen, joints.end, along(end, towards, -inset), inks);
}

function drawJoint(pen: Pen, joint: Joint | undefined, at: Spot, inks: Inks): void {
  const values = Object.values(joint ?? {}).filter((value) => value !== undefined);
  if (values.length === 0) return;
  pen.fillStyle = inks.sheet;
  pen.strokeStyle = inks.ink;
  pen.lineWidth = 1.25;
  ring(pen, at, JOINT_RADIUS);
  pen.fill();
  pen.stroke();
  if (values.some((value) => value > 0)) {
    pen.fillStyle = inks.ink;
    ring(pen, at, 1.4);
    pen.fill();
  }
}

/** A mass: a circle as large as a steel ball of that mass, two opposite quarters filled, a leader to its node. */
export function drawMass(
  pen: Pen,
  placed: PlacedMass,
  projection: Projection,
  radius: number,
  inks: Inks,
): void {
  const centre = projection.project(placed.centre);
  pen.strokeStyle = inks.ink;
  pen.lineWidth = 1;
  pen.setLineDash([6, 2, 1, 2]);
  line(pen, projection.project(placed.node), centre);
  pen.setLineDash([]);
  pen.globalAlpha = 0.75;
  pen.fillStyle = inks.sheet;
  ring(pen, centre, radius);
  pen.fill();
  pen.globalAlpha = 1;
  pen.fillStyle = inks.ink;
  const mark = Math.min(radius, 8);
  for (const from of [0, Math.PI]) {
    pen.beginPath();
    pen.moveTo(centre.x, centre.y);
    pen.arc(centre.x, centre.y, mark, from, from + Math.PI / 2);
    pen.closePath();
    pen.fill();
  }
  ring(pen, centre, mark);
  pen.stroke();
  ring(pen, centre, radius);
  pen.stroke();
}

/** The radius a mass is drawn with, px. */
export function massRadius(placed: PlacedMass, pixelsPerMetre: number): number {
  return Math.min(60, Math.max(7, placed.radius * pixelsPerMetre));
}

export function drawSpring(
  pen: Pen,
  spring: Spring,
  model: FrameModel,
  projection: Projection,
  inks: Inks,
): void {
  const start = model.nodes.get(spring.start);
  const end = model.nodes.get(spring.end);
  if (!start || !end) return;
  pen.strokeStyle = inks.ink;
  pen.lineWidth = 1.25;
  const a = projection.project(start);
  const b = projection.project(end);
  if (Math.hypot(a.x - b.x, a.y - b.y) >= 6) coil(pen, a, b, 9);
  else {
    ring(pen, a, 7);
    pen.stroke();
  }
}

export function drawRigidLink(
  pen: Pen,
  link: RigidLink,
  model: FrameModel,
  projection: Projection,
  inks: Inks,
): void {
  const main = model.nodes.get(link.main);
  if (!main) return;
  pen.strokeStyle = inks.soft;
  pen.lineWidth = 1;
  pen.setLineDash([5, 3]);
  for (const id of link.others) {
    const other = model.nodes.get(id);
    if (other) doubleLine(pen, projection.project(main), projection.project(other));
  }
  pen.setLineDash([]);
}

function doubleLine(pen: Pen, a: Spot, b: Spot): void {
  const towards = directionOf(a, b);
  if (!towards) return;
  const side = across(towards);
  line(pen, along(a, side, 1.7), along(b, side, 1.7));
  line(pen, along(a, side, -1.7), along(b, side, -1.7));
}

/** The member's own axes at its middle: x along it, y and z of its section, lettered. */
export function drawMemberAxes(
  pen: Pen,
  placed: PlacedMember,
  projection: Projection,
  inks: Inks,
): void {
  const middle = scale(add(placed.start, placed.end), 0.5);
  const from = projection.project(middle);
  const reach = 26 / projection.pixelsPerMetre;
  pen.strokeStyle = inks.focus;
  pen.fillStyle = inks.focus;
  pen.lineWidth = 1.25;
  pen.font = "italic 12px 'Commissioner Variable', sans-serif";
  pen.textAlign = 'center';
  pen.textBaseline = 'middle';
  for (const letter of ['x', 'y', 'z'] as const) {
    const to = projection.project(add(middle, scale(placed.axes[letter], reach)));
    const towards = directionOf(from, to);
    if (!towards) continue;
    line(pen, from, to);
    const label = along(to, towards, 8);
    pen.fillText(letter, label.x, label.y);
  }
}
