import type { BufferGeometry } from 'three';
import {
  EdgesGeometry,
  ExtrudeGeometry,
  Float32BufferAttribute,
  Path,
  Shape,
  Vector2,
} from 'three';
import type { SectionOutline, SectionPoint } from '#shared/frame/sections/section.ts';

/** Edges between faces flatter than this to each other are roundings and are not drawn, degrees. */
const CREASE = 24;

/** A section drawn out over a length of 1 along x, y and z being the section's own: faces and drawn edges. */
export interface SectionPrism {
  readonly faces: BufferGeometry;
  readonly edges: BufferGeometry;
}

export function sectionPrism(outline: SectionOutline): SectionPrism {
  const shape = new Shape(toVectors(outline.outer));
  shape.holes = outline.holes.map((hole) => new Path(toVectors(hole)));
  const faces = new ExtrudeGeometry(shape, { depth: 1, bevelEnabled: false, steps: 1 });
  // Drawn in (y, z) and drawn out along the third axis: turn the axes round to (x, y, z).
  cycleAxes(faces, 'position');
  cycleAxes(faces, 'normal');
  faces.deleteAttribute('uv');
  return { faces, edges: new EdgesGeometry(faces, CREASE) };
}

function toVectors(points: readonly SectionPoint[]): Vector2[] {
  return points.map(([y, z]) => new Vector2(y, z));
}

function cycleAxes(geometry: BufferGeometry, name: 'position' | 'normal'): void {
  const old = geometry.getAttribute(name);
  const values = new Float32Array(old.count * 3);
  for (let i = 0; i < old.count; i += 1) {
    values[3 * i] = old.getZ(i);
    values[3 * i + 1] = old.getX(i);
    values[3 * i + 2] = old.getY(i);
  }
  geometry.setAttribute(name, new Float32BufferAttribute(values, 3));
}
