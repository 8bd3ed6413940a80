import type { SectionShape } from '../../schemas/frameDocument.ts';
import { addParts, rectanglePart, spandrelPart, type Part } from './parts.ts';
import {
  parallelPartsCoefficient,
  parallelPartsNote,
  SHEAR_CENTRE_NOTE,
  type SectionProperties,
} from './section.ts';

/**
 * Open profiles. Areas and moments are exact, root fillets included, toes sharp, flanges parallel.
 * Torsion is Σ b t³/3 less what the free ends lose, plus a term α D⁴ at each junction, D being the largest
 * circle inscribed there: El Darwish and Johnston, Torsion of structural shapes, J. Struct. Div. ASCE 91
 * (1965), in the form that handbooks of rolled sections print (from memory; held against tables and against
 * a numerical solution of the torsion problem in the tests). Lengths m, nu –.
 */

/** I-section; κ along the web by Cowper 1966 with mid-line dimensions. */
export function iSection(
  shape: Extract<SectionShape, { kind: 'i-section' }>,
  nu: number,
): SectionProperties {
  const { width: b, height: h, web: tw, flange: tf, radius: r } = shape;
  const whole = addParts(iParts(shape));
  const D = ((r + tw / 2) ** 2 + (r + tf) ** 2 - r ** 2) / (2 * r + tf);
  const alpha = (tw / tf) * (0.145 + (0.1 * r) / tf);
  return {
    A: whole.A,
    Iy: whole.Iy,
    Iz: whole.Iz,
    Iyz: 0,
    J: (2 / 3) * (b - 0.63 * tf) * tf ** 3 + (1 / 3) * (h - 2 * tf) * tw ** 3 + 2 * alpha * D ** 4,
    ky: parallelPartsCoefficient(2 * b * tf, whole.A),
    kz: webCoefficient(h - tf, b, tw, tf, nu),
    notes: ['Warping is left out.', parallelPartsNote('width')],
  };
}

/**
 * Cowper 1966, thin-walled I, shear along the web: m = 2 b t_f/(h t_w), n = b/h,
 * κ = 10(1+ν)(1+3m)² / [(12+72m+150m²+90m³) + ν(11+66m+135m²+90m³) + 30n²(m+m²) + 5νn²(8m+9m²)].
 */
function webCoefficient(h: number, b: number, tw: number, tf: number, nu: number): number {
  const m = (2 * b * tf) / (h * tw);
  const n = b / h;
  return (
    (10 * (1 + nu) * (1 + 3 * m) ** 2) /
    (12 +
      72 * m +
      150 * m ** 2 +
      90 * m ** 3 +
      nu * (11 + 66 * m + 135 * m ** 2 + 90 * m ** 3) +
      30 * n ** 2 * (m + m ** 2) +
      5 * nu * n ** 2 * (8 * m + 9 * m ** 2))
  );
}

/** Channel, web along z on the side of −y, flanges pointing to +y. */
export function channel(shape: Extract<SectionShape, { kind: 'channel' }>): SectionProperties {
  const { width: b, height: h, web: tw, flange: tf, radius: r } = shape;
  const whole = addParts(channelParts(shape));
  const D = 2 * (3 * r + tw + tf - Math.sqrt(2 * (2 * r + tw) * (2 * r + tf)));
  const alpha =
    -0.0908 +
    (0.2621 * tw) / tf +
    (0.1231 * r) / tf -
    (0.0752 * tw * r) / tf ** 2 -
    0.0945 * (tw / tf) ** 2;
  return {
    A: whole.A,
    Iy: whole.Iy,
    Iz: whole.Iz,
    Iyz: 0,
    J:
      (2 / 3) * b * tf ** 3 +
      (1 / 3) * (h - 2 * tf) * tw ** 3 +
      2 * alpha * D ** 4 -
      0.42 * tf ** 4,
    ky: parallelPartsCoefficient(2 * b * tf, whole.A),
    kz: parallelPartsCoefficient(h * tw, whole.A),
    notes: [SHEAR_CENTRE_NOTE, parallelPartsNote('width and height')],
  };
}

/** Tee, flange across the top (+z), web hanging down. */
export function tee(shape: Extract<SectionShape, { kind: 'tee' }>): SectionProperties {
  const { width: b, height: h, web: tw, flange: tf, radius: r } = shape;
  const whole = addParts(teeParts(shape));
  const D = ((tf + r) ** 2 + (r + tw / 4) * tw) / (2 * r + tf);
  const alpha =
    -0.042 +
    (0.2204 * tw) / tf +
    (0.1355 * r) / tf -
    (0.0865 * r * tw) / tf ** 2 -
    0.0725 * (tw / tf) ** 2;
  return {
    A: whole.A,
    Iy: whole.Iy,
    Iz: whole.Iz,
    Iyz: 0,
    J:
      (1 / 3) * b * tf ** 3 +
      (1 / 3) * (h - tf) * tw ** 3 +
      alpha * D ** 4 -
      0.21 * tf ** 4 -
      0.105 * tw ** 4,
    ky: parallelPartsCoefficient(b * tf, whole.A),
    kz: parallelPartsCoefficient(h * tw, whole.A),
    notes: [SHEAR_CENTRE_NOTE, parallelPartsNote('width and height')],
  };
}

/** Angle, heel at the side of −y and −z, one leg along z, the other along y. */
export function angle(shape: Extract<SectionShape, { kind: 'angle' }>): SectionProperties {
  const { width: b, height: h, wall: t, radius: r } = shape;
  const whole = addParts(angleParts(shape));
  const D = 2 * (3 * r + 2 * t - Math.SQRT2 * (2 * r + t));
  const alpha = 0.0768 + (0.0479 * r) / t;
  return {
    A: whole.A,
    Iy: whole.Iy,
    Iz: whole.Iz,
    Iyz: whole.Iyz,
    J: (1 / 3) * (b + h - t) * t ** 3 + alpha * D ** 4 - 0.21 * t ** 4,
    ky: parallelPartsCoefficient(b * t, whole.A),
    kz: parallelPartsCoefficient(h * t, whole.A),
    notes: [SHEAR_CENTRE_NOTE, parallelPartsNote('width and height')],
  };
}

type Profile<Kind extends SectionShape['kind']> = Extract<SectionShape, { kind: Kind }>;

/** An I-section about the middle of its web. */
function iParts({ width, height, web, flange, radius }: Profile<'i-section'>): Part[] {
  const y = width / 2;
  const z = height / 2;
  const inner = z - flange;
  return [
    rectanglePart(-y, inner, y, z),
    rectanglePart(-y, -z, y, -inner),
    rectanglePart(-web / 2, -inner, web / 2, inner),
    spandrelPart(web / 2, inner, 1, -1, radius, 1),
    spandrelPart(-web / 2, inner, -1, -1, radius, 1),
    spandrelPart(web / 2, -inner, 1, 1, radius, 1),
    spandrelPart(-web / 2, -inner, -1, 1, radius, 1),
  ];
}

/** A channel with the back of its web on y = 0 and its middle on z = 0. */
export function channelParts({ width, height, web, flange, radius }: Profile<'channel'>): Part[] {
  const z = height / 2;
  const inner = z - flange;
  return [
    rectanglePart(0, inner, width, z),
    rectanglePart(0, -z, width, -inner),
    rectanglePart(0, -inner, web, inner),
    spandrelPart(web, inner, 1, -1, radius, 1),
    spandrelPart(web, -inner, 1, 1, radius, 1),
  ];
}

/** A tee with the foot of its web on z = 0 and its middle on y = 0. */
export function teeParts({ width, height, web, flange, radius }: Profile<'tee'>): Part[] {
  const inner = height - flange;
  return [
    rectanglePart(-width / 2, inner, width / 2, height),
    rectanglePart(-web / 2, 0, web / 2, inner),
    spandrelPart(web / 2, inner, 1, -1, radius, 1),
    spandrelPart(-web / 2, inner, -1, -1, radius, 1),
  ];
}

/** An angle with its heel on the origin. */
export function angleParts({ width, height, wall, radius }: Profile<'angle'>): Part[] {
  return [
    rectanglePart(0, 0, width, wall),
    rectanglePart(0, wall, wall, height),
    spandrelPart(wall, wall, 1, 1, radius, 1),
  ];
}
