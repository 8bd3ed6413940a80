import type { Vector3 } from '#shared/schemas/frameDocument.ts';
import { cross, dot, subtract } from '#shared/frame/vector3.ts';
import type { CameraState, ViewSize } from './cameraStore.ts';

export interface ViewDirections {
  /** From the target towards the eye. */
  readonly towards: Vector3;
  readonly right: Vector3;
  readonly up: Vector3;
}

export function viewDirections({
  azimuth,
  elevation,
}: Pick<CameraState, 'azimuth' | 'elevation'>): ViewDirections {
  const flat = Math.cos(elevation);
  const towards: Vector3 = [
    Math.sin(azimuth) * flat,
    -Math.cos(azimuth) * flat,
    Math.sin(elevation),
  ];
  const right: Vector3 = [Math.cos(azimuth), Math.sin(azimuth), 0];
  return { towards, right, up: cross(towards, right) };
}

/** A point on the view: px from its upper left corner; a larger depth lies nearer to the eye (m). */
export interface ViewPoint {
  readonly x: number;
  readonly y: number;
  readonly depth: number;
}

/** The plane new nodes are put on: all points whose `axis` coordinate is `at`. */
export interface WorkPlane {
  readonly axis: 0 | 1 | 2;
  /** m */
  readonly at: number;
}

/** The parallel projection of one view, both ways. */
export interface Projection extends ViewDirections {
  readonly size: ViewSize;
  readonly pixelsPerMetre: number;
  project(point: Vector3): ViewPoint;
  /** The point of a plane under a view position; null where the plane is seen edge on. */
  onPlane(x: number, y: number, plane: WorkPlane): Vector3 | null;
}

/** Cosine between view and plane under which a plane counts as seen edge on. */
const EDGE_ON = 0.02;

export function makeProjection(camera: CameraState, size: ViewSize): Projection {
  const directions = viewDirections(camera);
  const { right, up, towards } = directions;
  const pixelsPerMetre = Math.min(size.width, size.height) / camera.span;
  return {
    ...directions,
    size,
    pixelsPerMetre,
    project: (point) => {
      const from = subtract(point, camera.target);
      return {
        x: size.width / 2 + dot(from, right) * pixelsPerMetre,
        y: size.height / 2 - dot(from, up) * pixelsPerMetre,
        depth: dot(from, towards),
      };
    },
    onPlane: (x, y, { axis, at }) => {
      const facing = towards[axis];
      if (Math.abs(facing) < EDGE_ON) return null;
      const a = (x - size.width / 2) / pixelsPerMetre;
      const b = (size.height / 2 - y) / pixelsPerMetre;
      const point = (i: 0 | 1 | 2) => camera.target[i] + right[i] * a + up[i] * b;
      const start: Vector3 = [point(0), point(1), point(2)];
      const travel = (at - start[axis]) / facing;
      const hit = (i: 0 | 1 | 2) => (i === axis ? at : start[i] + towards[i] * travel);
      return [hit(0), hit(1), hit(2)];
    },
  };
}
