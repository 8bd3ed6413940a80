import type { Vector3 } from '#shared/schemas/frameDocument.ts';
import type { Projection } from './camera/projection.ts';
import type { FrameModel } from './model/frameModel.ts';
import type { Pointing } from './overlay/drawSheet.ts';
import { pick } from './pick.ts';

/** What a click chose: a node that is there, or a new point on the grid. */
export interface PointedAt {
  readonly at: Vector3;
  readonly node: string | null;
}

/** The node under a view position, else the grid point of the work plane; null where the plane is edge on. */
export function pointUnder(
  model: FrameModel,
  projection: Projection,
  x: number,
  y: number,
  { plane, step }: Pointing,
): PointedAt | null {
  const thing = pick(model, projection, x, y, 'nodes');
  const there = thing && model.nodes.get(thing.id);
  if (there) return { at: there, node: thing.id };
  const hit = projection.onPlane(x, y, plane);
  if (!hit) return null;
  const snapped = (axis: 0 | 1 | 2) =>
    axis === plane.axis ? plane.at : Number((Math.round(hit[axis] / step) * step).toFixed(9));
  return { at: [snapped(0), snapped(1), snapped(2)], node: null };
}
