import type { SectionShape } from '../../schemas/frameDocument.ts';
import { addParts, rectanglePart, spandrelPart, type Part } from './parts.ts';
import type { SectionProperties } from './section.ts';

/**
 * Round tube; J = 2I; κ = 6(1+ν)(1+q)² / ((7+6ν)(1+q)² + (20+12ν)q), q = (r_i/r_o)² (Cowper 1966).
 * Lengths m, nu –.
 */
export function roundTube(
  shape: Extract<SectionShape, { kind: 'round-tube' }>,
  nu: number,
): SectionProperties {
  const outer = shape.diameter;
  const inner = shape.diameter - 2 * shape.wall;
  const I = (Math.PI * (outer ** 4 - inner ** 4)) / 64;
  const q = (inner / outer) ** 2;
  const kappa = (6 * (1 + nu) * (1 + q) ** 2) / ((7 + 6 * nu) * (1 + q) ** 2 + (20 + 12 * nu) * q);
  return {
    A: (Math.PI * (outer ** 2 - inner ** 2)) / 4,
    Iy: I,
    Iz: I,
    Iyz: 0,
    J: 2 * I,
    ky: kappa,
    kz: kappa,
    notes: [],
  };
}

/** Inner corner radius of a rectangular tube [m]: the one given, else outer radius − wall, not below 0. */
export function innerRadiusOf(shape: Extract<SectionShape, { kind: 'rectangular-tube' }>): number {
  return shape.innerRadius ?? Math.max(0, shape.radius - shape.wall);
}

/**
 * Rectangular tube with rounded corners: exact area and moments; torsion by EN 10219-2:2006 Annex B,
 * I_t = t³h/3 + 2 K A_h, h = 2(B+H−2t) − 2R_c(4−π), A_h = (B−t)(H−t) − R_c²(4−π), K = 2 A_h t/h,
 * R_c the mean corner radius; κ of a thin-walled box (Cowper 1966) on the wall's mid-line. Lengths m, nu –.
 */
export function rectangularTube(
  shape: Extract<SectionShape, { kind: 'rectangular-tube' }>,
  nu: number,
): SectionProperties {
  const { width: B, height: H, wall: t, radius } = shape;
  const innerRadius = innerRadiusOf(shape);
  const whole = addParts([
    ...roundedRectangle(B, H, radius, 1),
    ...roundedRectangle(B - 2 * t, H - 2 * t, innerRadius, -1),
  ]);
  const Rc = (radius + innerRadius) / 2;
  const perimeter = 2 * (B + H - 2 * t) - 2 * Rc * (4 - Math.PI);
  const enclosed = (B - t) * (H - t) - Rc ** 2 * (4 - Math.PI);
  const K = (2 * enclosed * t) / perimeter;
  return {
    A: whole.A,
    Iy: whole.Iy,
    Iz: whole.Iz,
    Iyz: 0,
    J: (t ** 3 * perimeter) / 3 + 2 * K * enclosed,
    ky: boxCoefficient(B - t, H - t, nu),
    kz: boxCoefficient(H - t, B - t, nu),
    notes: [],
  };
}

/** Four rounded corners cut off a rectangle about the origin; `sign` −1 for the hole. */
function roundedRectangle(width: number, height: number, radius: number, sign: 1 | -1): Part[] {
  const y = width / 2;
  const z = height / 2;
  const cut = sign === 1 ? -1 : 1;
  return [
    rectanglePart(-y, -z, y, z, sign),
    spandrelPart(-y, -z, 1, 1, radius, cut),
    spandrelPart(y, -z, -1, 1, radius, cut),
    spandrelPart(-y, z, 1, -1, radius, cut),
    spandrelPart(y, z, -1, -1, radius, cut),
  ];
}

/**
 * Cowper 1966, thin-walled box of one wall thickness, shear along h: m = n = b/h,
 * κ = 10(1+ν)(1+3m)² / [(12+72m+150m²+90m³) + ν(11+66m+135m²+90m³) + 10n²((3+ν)m+3m²)].
 */
function boxCoefficient(h: number, b: number, nu: number): number {
  const n = b / h;
  const m = n;
  return (
    (10 * (1 + nu) * (1 + 3 * m) ** 2) /
    (12 +
      72 * m +
      150 * m ** 2 +
      90 * m ** 3 +
      nu * (11 + 66 * m + 135 * m ** 2 + 90 * m ** 3) +
      10 * n ** 2 * ((3 + nu) * m + 3 * m ** 2))
  );
}
