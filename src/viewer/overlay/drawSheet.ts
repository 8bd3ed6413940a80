import type { Vector3 } from '#shared/schemas/frameDocument.ts';
import type { Projection, WorkPlane } from '../camera/projection.ts';
import type { FrameModel, PlacedMember } from '../model/frameModel.ts';
import type { MovedModel } from '../model/movedModel.ts';
import { sameThing, type Thing } from '../Selection.ts';
import type { Inks } from '../useInks.ts';
import { anchorOf } from './anchorOf.ts';
import { drawAxesMark, drawGrid, drawScaleBar } from './drawMarks.ts';
import { drawSupport } from './drawSupport.ts';
import {
  drawArms,
  drawJoints,
  drawMass,
  drawMemberAxes,
  drawNode,
  drawRigidLink,
  drawSpring,
  massRadius,
} from './drawThings.ts';
import { drawLabels, type Label } from './labels.ts';
import { line, ring, type Pen } from './pen.ts';

/** Placing a point: the grid it goes on, where a new member begins, where the pointer is. */
export interface Pointing {
  readonly plane: WorkPlane;
  /** Grid step, m. */
  readonly step: number;
  readonly from: Vector3 | null;
}

/** Everything one drawing of the view shows. */
export interface Sheet {
  readonly model: FrameModel;
  readonly projection: Projection;
  readonly inks: Inks;
  readonly selected: readonly Thing[];
  readonly hovered: Thing | null;
  readonly names: boolean;
  readonly memberAxes: boolean;
  /** Members are drawn with their section by the scene beneath; otherwise as lines, here. */
  readonly bodies: boolean;
  /** What moves in a mode besides the members, at this moment; the frame at rest is then a thin pencil line. */
  readonly moved: MovedModel | null;
  readonly pointing: Pointing | null;
  readonly pointer: Vector3 | null;
  readonly formatLength: (metres: number) => string;
}

/** Above this many nodes their dots would cover the drawing; those at supports and masses stay marked. */
const MOST_NODE_DOTS = 1500;
/** Share of the largest displacement under which a mass counts as standing. */
const HARDLY_MOVES = 0.2;

export function drawSheet(pen: Pen, sheet: Sheet): void {
  const { projection, inks } = sheet;
  pen.clearRect(0, 0, projection.size.width, projection.size.height);
  pen.lineCap = 'round';
  if (sheet.pointing) {
    drawGrid(pen, sheet.pointing.plane, sheet.pointing.step, sheet.model.bounds, projection, inks);
  }
  if (sheet.moved) {
    drawPencilFrame(pen, sheet);
    drawMoved(pen, sheet.moved, sheet);
  } else drawFrame(pen, sheet);
  drawPreview(pen, sheet);
  drawAxesMark(pen, projection, inks);
  drawScaleBar(pen, projection, inks, sheet.formatLength);
}

function drawPencilFrame(pen: Pen, { model, projection, inks, names }: Sheet): void {
  pen.strokeStyle = inks.pencil;
  pen.lineWidth = 0.8;
  strokeMembers(pen, model.members, projection);
  drawSupports(pen, { model, projection, inks: { ...inks, ink: inks.pencil } });
  if (!names) return;
  drawLabels(
    pen,
    model.members.map(({ member, start, end }) => ({
      text: member.name ?? member.id,
      at: middleOf(projection, start, end),
      colour: inks.soft,
    })),
    inks.sheet,
  );
}

/** Arms, links, springs and masses where the mode has them now; what hardly moves is drawn in pencil. */
function drawMoved(pen: Pen, moved: MovedModel, { projection, inks }: Sheet): void {
  for (const placed of moved.members) drawArms(pen, placed, projection, inks);
  for (const link of moved.document.rigidLinks) drawRigidLink(pen, link, moved, projection, inks);
  for (const spring of moved.document.springs) drawSpring(pen, spring, moved, projection, inks);
  for (const placed of moved.masses) {
    const ink = placed.amount < HARDLY_MOVES ? inks.pencil : inks.ink;
    const radius = massRadius(placed, projection.pixelsPerMetre);
    drawMass(pen, placed, projection, radius, { ...inks, ink });
  }
}

function drawFrame(pen: Pen, sheet: Sheet): void {
  const { model, projection, inks } = sheet;
  if (!sheet.bodies) {
    pen.strokeStyle = inks.ink;
    pen.lineWidth = model.members.length > 500 ? 0.8 : 1.5;
    strokeMembers(pen, model.members, projection);
  }
  for (const placed of model.members) {
    drawArms(pen, placed, projection, inks);
    drawJoints(pen, placed, projection, inks);
  }
  for (const link of model.document.rigidLinks) drawRigidLink(pen, link, model, projection, inks);
  for (const spring of model.document.springs) drawSpring(pen, spring, model, projection, inks);
  drawSupports(pen, sheet);
  if (model.nodes.size <= MOST_NODE_DOTS) {
    for (const at of model.nodes.values()) drawNode(pen, projection.project(at), inks);
  }
  for (const placed of model.masses) {
    drawMass(pen, placed, projection, massRadius(placed, projection.pixelsPerMetre), inks);
  }
  for (const thing of sheet.selected) drawHighlight(pen, sheet, thing, 3);
  if (sheet.hovered && !sheet.selected.some((thing) => sameThing(thing, sheet.hovered))) {
    drawHighlight(pen, sheet, sheet.hovered, 1.75);
  }
  drawAxesOfMembers(pen, sheet);
  drawLabels(pen, labelsOf(sheet), inks.sheet);
}

function strokeMembers(pen: Pen, members: readonly PlacedMember[], projection: Projection): void {
  pen.beginPath();
  for (const { start, end } of members) {
    const a = projection.project(start);
    const b = projection.project(end);
    pen.moveTo(a.x, a.y);
    pen.lineTo(b.x, b.y);
  }
  pen.stroke();
}

function drawSupports(
  pen: Pen,
  { model, projection, inks }: Pick<Sheet, 'model' | 'projection' | 'inks'>,
): void {
  const size = Math.min(20, Math.max(9, 0.05 * model.size * projection.pixelsPerMetre));
  for (const support of model.document.supports) {
    const at = model.nodes.get(support.node);
    if (at) drawSupport(pen, support, at, projection, model.document.unknowns, size, inks);
  }
}

function drawHighlight(pen: Pen, sheet: Sheet, thing: Thing, width: number): void {
  const { model, projection, inks } = sheet;
  pen.strokeStyle = inks.focus;
  pen.lineWidth = width;
  if (thing.list === 'members') {
    strokeMembers(
      pen,
      model.members.filter(({ member }) => member.id === thing.id),
      projection,
    );
    return;
  }
  if (thing.list === 'springs' || thing.list === 'rigidLinks') {
    drawLinkHighlight(pen, sheet, thing);
    return;
  }
  const at = anchorOf(model, thing);
  if (!at) return;
  const placed =
    thing.list === 'masses' ? model.masses.find(({ mass }) => mass.id === thing.id) : undefined;
  const radius = placed ? massRadius(placed, projection.pixelsPerMetre) + 3 : 8;
  ring(pen, projection.project(at), radius);
  pen.stroke();
}

function drawLinkHighlight(pen: Pen, { model, projection }: Sheet, thing: Thing): void {
  const spring = model.document.springs.find(({ id }) => id === thing.id);
  const link = model.document.rigidLinks.find(({ id }) => id === thing.id);
  const from = thing.list === 'springs' ? spring?.start : link?.main;
  const others = thing.list === 'springs' ? [spring?.end] : (link?.others ?? []);
  const start = model.nodes.get(from ?? '');
  for (const other of others) {
    const end = model.nodes.get(other ?? '');
    if (start && end) line(pen, projection.project(start), projection.project(end));
  }
}

function drawAxesOfMembers(pen: Pen, { model, projection, inks, memberAxes, selected }: Sheet) {
  const chosen = new Set(
    selected.filter(({ list }) => list === 'members').map((thing) => thing.id),
  );
  for (const placed of model.members) {
    if (memberAxes || chosen.has(placed.member.id)) {
      drawMemberAxes(pen, placed, projection, inks);
    }
  }
}

/** In order of importance: what is pointed at and selected, then masses, members, nodes. */
function labelsOf({ model, projection, inks, selected, hovered, names }: Sheet): Label[] {
  const labels: Label[] = [];
  const marked = hovered ? [hovered, ...selected] : selected;
  for (const thing of marked) {
    const at = anchorOf(model, thing);
    if (!at) continue;
    const text = nameIn(model, thing);
    labels.push({ text, at: projection.project(at), colour: inks.focus, strong: true });
  }
  if (!names) return labels;
  const isMarked = (list: string, id: string) =>
    marked.some((thing) => thing.list === list && thing.id === id);
  for (const { mass, centre } of model.masses) {
    if (isMarked('masses', mass.id)) continue;
    labels.push({ text: mass.name || mass.id, at: projection.project(centre), colour: inks.ink });
  }
  for (const { member, start, end } of model.members) {
    if (isMarked('members', member.id)) continue;
    const at = middleOf(projection, start, end);
    labels.push({ text: member.name ?? member.id, at, colour: inks.ink });
  }
  for (const { id, name } of model.document.nodes) {
    const at = model.nodes.get(id);
    if (at && !isMarked('nodes', id)) {
      labels.push({ text: name ?? id, at: projection.project(at), colour: inks.soft });
    }
  }
  return labels;
}

/** What people call a thing: “support at node 3”, “leg 2”. */
export function nameIn(model: FrameModel, thing: Thing): string {
  const { document } = model;
  const list = thing.list === 'supports' ? 'nodes' : thing.list;
  const entry = document[list].find(({ id }) => id === thing.id);
  const name = entry?.name === undefined || entry.name === '' ? thing.id : entry.name;
  return thing.list === 'supports' ? `support at ${name}` : name;
}

function middleOf(projection: Projection, a: Vector3, b: Vector3) {
  return projection.project([(a[0] + b[0]) / 2, (a[1] + b[1]) / 2, (a[2] + b[2]) / 2]);
}

function drawPreview(pen: Pen, { pointing, pointer, projection, inks }: Sheet): void {
  if (!pointing || !pointer) return;
  const at = projection.project(pointer);
  pen.strokeStyle = inks.focus;
  pen.lineWidth = 1.5;
  if (pointing.from) {
    pen.setLineDash([7, 4]);
    line(pen, projection.project(pointing.from), at);
    pen.setLineDash([]);
  }
  line(pen, { x: at.x - 7, y: at.y }, { x: at.x + 7, y: at.y });
  line(pen, { x: at.x, y: at.y - 7 }, { x: at.x, y: at.y + 7 });
}
