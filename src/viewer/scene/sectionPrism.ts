import {
  BufferGeometry,
  ExtrudeGeometry,
  Float32BufferAttribute,
  Path,
  Shape,
  Vector2,
} from 'three';
import type { SectionOutline, SectionPoint } from '#shared/frame/sections/section.ts';

/** Sides of an outline longer than this share of its reach are flat faces; shorter ones belong to a rounding. */
const FLAT_SHARE = 0.3;

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
  return { faces, edges: drawnEdges([outline.outer, ...outline.holes]) };
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

/** The outline at both ends and, along the member, where flat faces meet a corner or a rounding. */
function drawnEdges(rings: readonly (readonly SectionPoint[])[]): BufferGeometry {
  const points: number[] = [];
  for (const ring of rings) {
    const reach = Math.max(...ring.flatMap(([y, z]) => [Math.abs(y), Math.abs(z)]));
    const long = ring.map(([y, z], i) => {
      const [y1, z1] = ring[(i + 1) % ring.length]!;
      return Math.hypot(y1 - y, z1 - z) > FLAT_SHARE * reach;
    });
    const isRound = !long.some(Boolean);
    ring.forEach(([y, z], i) => {
      const [y1, z1] = ring[(i + 1) % ring.length]!;
      points.push(0, y, z, 0, y1, z1, 1, y, z, 1, y1, z1);
      const before = long[(i + ring.length - 1) % ring.length];
      // A round has no faces to meet: lines at its quarters stand for its outline.
      const quarter = isRound && i % Math.max(1, Math.round(ring.length / 4)) === 0;
      if (long[i] || before || quarter) points.push(0, y, z, 1, y, z);
    });
  }
  const geometry = new BufferGeometry();
  geometry.setAttribute('position', new Float32BufferAttribute(points, 3));
  return geometry;
}
