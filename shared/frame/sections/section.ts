/**
 * What the section families share. Section axes: y along the width, z along the height, origin at the
 * centroid, seen along the member from its start. SI units.
 */

/** Properties of one cross-section about its centroid. */
export interface SectionProperties {
  /** Area [m²]. */
  readonly A: number;
  /** ∫z² dA [m⁴]: bends the member in its x–z plane (EN 1993 naming); pairs with `kz`. */
  readonly Iy: number;
  /** ∫y² dA [m⁴]: bends the member in its x–y plane; pairs with `ky`. */
  readonly Iz: number;
  /** ∫yz dA [m⁴]: couples the two planes where it is not zero. */
  readonly Iyz: number;
  /** St Venant torsion constant [m⁴]. */
  readonly J: number;
  /** Shear coefficient along y [–]. */
  readonly ky: number;
  /** Shear coefficient along z [–]. */
  readonly kz: number;
  /** Sentences that say what a figure rests on or leaves out. */
  readonly notes: readonly string[];
}

/** A point of a section, [y, z] in m. */
export type SectionPoint = readonly [number, number];

/** A section drawn as polygons about its centroid: `outer` anticlockwise, holes clockwise (y right, z up). */
export interface SectionOutline {
  readonly outer: readonly SectionPoint[];
  readonly holes: readonly (readonly SectionPoint[])[];
  /** True where the polygon only stands for a section whose shape is not known. */
  readonly approximate: boolean;
}

export const SHEAR_CENTRE_NOTE =
  'The shear centre does not lie in the centroid: its offset and warping are left out, so twisting of this section is less sure.';

/**
 * Shear coefficient where no published formula is used: 5/6 × area of the parts parallel to the shear ÷ A
 * (the value of a rectangle taken for those parts alone; common practice).
 *   parallelArea m², A m²
 */
export function parallelPartsCoefficient(parallelArea: number, A: number): number {
  return ((5 / 6) * Math.min(parallelArea, A)) / A;
}

/** The sentence that goes with `parallelPartsCoefficient`. */
export function parallelPartsNote(direction: 'width' | 'height' | 'width and height'): string {
  return `Shear coefficient along the ${direction}: 5/6 of the share of area that lies parallel to the shear.`;
}
