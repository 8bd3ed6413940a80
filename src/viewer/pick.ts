import type { Vector3 } from '#shared/schemas/frameDocument.ts';
import type { Projection, ViewPoint } from './camera/projection.ts';
import type { FrameModel } from './model/frameModel.ts';
import { massRadius } from './overlay/drawThings.ts';
import type { Thing } from './Selection.ts';

/** Everything can be hit within this many px of it: a target of 24 px however thin it is drawn. */
export const REACH_PX = 12;
/** Supports are drawn below their node; they are hit there. */
const SUPPORT_OFFSET_PX = 14;

/**
 * The thing under a view position, or null. Points (nodes, masses, supports) win over lines (members,
 * springs, links) that pass through them; among equals the nearest on the paper wins, then the nearest to the eye.
 */
export function pick(
  model: FrameModel,
  projection: Projection,
  x: number,
  y: number,
  only?: Thing['list'],
): Thing | null {
  return (
    nearest(pointCandidates(model, projection, x, y), only) ??
    nearest(lineCandidates(model, projection, x, y), only)
  );
}

interface Candidate {
  readonly thing: Thing;
  readonly distance: number;
  readonly depth: number;
}

function nearest(candidates: Iterable<Candidate>, only?: Thing['list']): Thing | null {
  let best: Candidate | null = null;
  for (const candidate of candidates) {
    if (only !== undefined && candidate.thing.list !== only) continue;
    if (
      best === null ||
      candidate.distance < best.distance - 0.5 ||
      (candidate.distance < best.distance + 0.5 && candidate.depth > best.depth)
    ) {
      best = candidate;
    }
  }
  return best?.thing ?? null;
}

function* pointCandidates(
  model: FrameModel,
  projection: Projection,
  x: number,
  y: number,
): Generator<Candidate> {
  for (const placed of model.masses) {
    const spot = projection.project(placed.centre);
    const radius = massRadius(placed, projection.pixelsPerMetre);
    const distance = Math.hypot(spot.x - x, spot.y - y);
    if (distance <= Math.max(REACH_PX, radius)) {
      yield {
        thing: { list: 'masses', id: placed.mass.id },
        // Inside its circle a mass yields to a node that is nearer to the pointer.
        distance: Math.min(distance, REACH_PX),
        depth: spot.depth,
      };
    }
  }
  for (const [id, at] of model.nodes) {
    const spot = projection.project(at);
    const distance = Math.hypot(spot.x - x, spot.y - y);
    if (distance <= REACH_PX) yield { thing: { list: 'nodes', id }, distance, depth: spot.depth };
  }
  for (const support of model.document.supports) {
    const at = model.nodes.get(support.node);
    if (!at) continue;
    const spot = projection.project(at);
    const distance = Math.hypot(spot.x - x, spot.y + SUPPORT_OFFSET_PX - y);
    if (distance <= REACH_PX) {
      yield { thing: { list: 'supports', id: support.node }, distance, depth: spot.depth };
    }
  }
}

function* lineCandidates(
  model: FrameModel,
  projection: Projection,
  x: number,
  y: number,
): Generator<Candidate> {
  const near = (thing: Thing, start: Vector3, end: Vector3): Candidate | null => {
    const hit = toSegment(x, y, projection.project(start), projection.project(end));
    return hit.distance <= REACH_PX ? { thing, ...hit } : null;
  };
  const between = (thing: Thing, a: string, b: string): Candidate | null => {
    const start = model.nodes.get(a);
    const end = model.nodes.get(b);
    return start && end ? near(thing, start, end) : null;
  };
  for (const { member, start, end } of model.members) {
    const hit = near({ list: 'members', id: member.id }, start, end);
    if (hit) yield hit;
  }
  for (const spring of model.document.springs) {
    const hit = between({ list: 'springs', id: spring.id }, spring.start, spring.end);
    if (hit) yield hit;
  }
  for (const link of model.document.rigidLinks) {
    for (const other of link.others) {
      const hit = between({ list: 'rigidLinks', id: link.id }, link.main, other);
      if (hit) yield hit;
    }
  }
}

function toSegment(x: number, y: number, a: ViewPoint, b: ViewPoint) {
  const dx = b.x - a.x;
  const dy = b.y - a.y;
  const square = dx * dx + dy * dy;
  const share = square > 0 ? ((x - a.x) * dx + (y - a.y) * dy) / square : 0;
  const t = Math.min(1, Math.max(0, share));
  return {
    distance: Math.hypot(x - a.x - t * dx, y - a.y - t * dy),
    depth: a.depth + t * (b.depth - a.depth),
  };
}
