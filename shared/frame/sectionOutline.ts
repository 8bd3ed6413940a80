import type { SectionShape } from '../schemas/frameDocument.ts';
import { angleParts, channelParts, teeParts } from './sections/openProfiles.ts';
import { addParts } from './sections/parts.ts';
import type { SectionOutline, SectionPoint } from './sections/section.ts';
import { innerRadiusOf } from './sections/tubes.ts';

/** Straight pieces that stand for a quarter of a circle, unless told otherwise. */
const ARC_PIECES = 6;

/**
 * The true outline of a section as polygons about its centroid, [y, z] in m, y to the right and z up:
 * `outer` anticlockwise, holes clockwise. Arcs are inscribed polygons. A `custom` section, whose shape is
 * not known, is the rectangle of the same radii of gyration and is marked `approximate`.
 *   arcPieces  straight pieces per quarter circle
 */
export function sectionOutline(shape: SectionShape, arcPieces = ARC_PIECES): SectionOutline {
  const corner = corners(arcPieces);
  switch (shape.kind) {
    case 'solid-rectangle':
      return exact(rectangle(shape.width, shape.height, 0, corner));
    case 'solid-round':
      return exact(circle(shape.diameter, corner));
    case 'round-tube':
      return exact(circle(shape.diameter, corner), circle(shape.diameter - 2 * shape.wall, corner));
    case 'rectangular-tube': {
      const { width, height, wall, radius } = shape;
      return exact(
        rectangle(width, height, radius, corner),
        rectangle(width - 2 * wall, height - 2 * wall, innerRadiusOf(shape), corner),
      );
    }
    case 'i-section':
      return exact(iOutline(shape, corner));
    case 'channel':
      return exact(centred(channelOutline(shape, corner), addParts(channelParts(shape))));
    case 'tee':
      return exact(centred(teeOutline(shape, corner), addParts(teeParts(shape))));
    case 'angle':
      return exact(centred(angleOutline(shape, corner), addParts(angleParts(shape))));
    case 'custom': {
      const width = Math.sqrt((12 * shape.Iz) / shape.A);
      const height = Math.sqrt((12 * shape.Iy) / shape.A);
      return { ...exact(rectangle(width, height, 0, corner)), approximate: true };
    }
  }
}

/**
 * The arc that rounds the corner (y, z) with radius r, its centre r towards (toY, toZ), run from the face
 * along y to the face along z (`'y'`) or the other way (`'z'`); the bare corner where r is 0.
 */
type Corner = (
  y: number,
  z: number,
  toY: 1 | -1,
  toZ: 1 | -1,
  r: number,
  from: 'y' | 'z',
) => SectionPoint[];

function corners(pieces: number): Corner {
  return (y, z, toY, toZ, r, from) => {
    if (r === 0) return [[y, z]];
    const points = Array.from({ length: pieces + 1 }, (_, i): SectionPoint => {
      const turn = (i / pieces) * (Math.PI / 2);
      return [y + toY * r * (1 - Math.sin(turn)), z + toZ * r * (1 - Math.cos(turn))];
    });
    return from === 'y' ? points : points.reverse();
  };
}

function exact(outer: SectionPoint[], ...inner: SectionPoint[][]): SectionOutline {
  return { outer, holes: inner.map((hole) => [...hole].reverse()), approximate: false };
}

function centred(
  points: SectionPoint[],
  centroid: { readonly y: number; readonly z: number },
): SectionPoint[] {
  return points.map(([y, z]) => [y - centroid.y, z - centroid.z]);
}

function rectangle(width: number, height: number, radius: number, corner: Corner): SectionPoint[] {
  const y = width / 2;
  const z = height / 2;
  return [
    ...corner(-y, -z, 1, 1, radius, 'z'),
    ...corner(y, -z, -1, 1, radius, 'y'),
    ...corner(y, z, -1, -1, radius, 'z'),
    ...corner(-y, z, 1, -1, radius, 'y'),
  ];
}

/** A circle as four rounded corners of its square, the shared points left out. */
function circle(diameter: number, corner: Corner): SectionPoint[] {
  const r = diameter / 2;
  return [
    ...corner(-r, -r, 1, 1, r, 'z').slice(1),
    ...corner(r, -r, -1, 1, r, 'y').slice(1),
    ...corner(r, r, -1, -1, r, 'z').slice(1),
    ...corner(-r, r, 1, -1, r, 'y').slice(1),
  ];
}

type Profile<Kind extends SectionShape['kind']> = Extract<SectionShape, { kind: Kind }>;

function iOutline(
  { width, height, web, flange, radius }: Profile<'i-section'>,
  corner: Corner,
): SectionPoint[] {
  const y = width / 2;
  const z = height / 2;
  const inner = z - flange;
  return [
    [-y, -z],
    [y, -z],
    [y, -inner],
    ...corner(web / 2, -inner, 1, 1, radius, 'y'),
    ...corner(web / 2, inner, 1, -1, radius, 'z'),
    [y, inner],
    [y, z],
    [-y, z],
    [-y, inner],
    ...corner(-web / 2, inner, -1, -1, radius, 'y'),
    ...corner(-web / 2, -inner, -1, 1, radius, 'z'),
    [-y, -inner],
  ];
}

function channelOutline(
  { width, height, web, flange, radius }: Profile<'channel'>,
  corner: Corner,
): SectionPoint[] {
  const z = height / 2;
  const inner = z - flange;
  return [
    [0, -z],
    [width, -z],
    [width, -inner],
    ...corner(web, -inner, 1, 1, radius, 'y'),
    ...corner(web, inner, 1, -1, radius, 'z'),
    [width, inner],
    [width, z],
    [0, z],
  ];
}

function teeOutline(
  { width, height, web, flange, radius }: Profile<'tee'>,
  corner: Corner,
): SectionPoint[] {
  const inner = height - flange;
  return [
    [-web / 2, 0],
    [web / 2, 0],
    ...corner(web / 2, inner, 1, -1, radius, 'z'),
    [width / 2, inner],
    [width / 2, height],
    [-width / 2, height],
    [-width / 2, inner],
    ...corner(-web / 2, inner, -1, -1, radius, 'y'),
  ];
}

function angleOutline(
  { width, height, wall, radius }: Profile<'angle'>,
  corner: Corner,
): SectionPoint[] {
  return [
    [0, 0],
    [width, 0],
    [width, wall],
    ...corner(wall, wall, 1, 1, radius, 'y'),
    [wall, height],
    [0, height],
  ];
}
