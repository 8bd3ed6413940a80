/** One part of a section: its area and moments about its own centroid, and where that centroid lies. */
export interface Part {
  /** Area [m²], negative for what is cut away. */
  readonly A: number;
  readonly y: number;
  readonly z: number;
  /** ∫z² dA, ∫y² dA, ∫yz dA about the part's own centroid [m⁴], negative for what is cut away. */
  readonly Iy: number;
  readonly Iz: number;
  readonly Iyz: number;
}

/** Area, centroid and moments about that centroid of several parts together. */
export interface Whole {
  readonly A: number;
  readonly y: number;
  readonly z: number;
  readonly Iy: number;
  readonly Iz: number;
  readonly Iyz: number;
}

/** A rectangle from corner (y0, z0) to corner (y1, z1) [m]; `sign` −1 cuts it away. */
export function rectanglePart(
  y0: number,
  z0: number,
  y1: number,
  z1: number,
  sign: 1 | -1 = 1,
): Part {
  const width = y1 - y0;
  const height = z1 - z0;
  return {
    A: sign * width * height,
    y: (y0 + y1) / 2,
    z: (z0 + z1) / 2,
    Iy: (sign * width * height ** 3) / 12,
    Iz: (sign * height * width ** 3) / 12,
    Iyz: 0,
  };
}

/**
 * The spandrel between two perpendicular faces and the circular arc of radius r that touches both: a fillet
 * in a re-entrant corner (sign +1), or what rounding takes off an outer corner (sign −1).
 * About the arc's centre a square of side r has r⁴/3, r⁴/4 and its quarter circle πr⁴/16, r⁴/8; the difference
 * is moved to the spandrel's centroid by the parallel-axis theorem.
 *   (y, z)  m, the corner where the faces meet
 *   toY, toZ  +1 or −1: the side of the corner on which the arc's centre lies
 *   r  m
 */
export function spandrelPart(
  y: number,
  z: number,
  toY: 1 | -1,
  toZ: 1 | -1,
  r: number,
  sign: 1 | -1,
): Part {
  const A = (1 - Math.PI / 4) * r * r;
  const fromCorner = ((5 / 6 - Math.PI / 4) / (1 - Math.PI / 4)) * r;
  const fromCentre = r - fromCorner;
  const I = (1 / 3 - Math.PI / 16) * r ** 4 - A * fromCentre ** 2;
  const product = r ** 4 / 8 - A * fromCentre ** 2;
  return {
    A: sign * A,
    y: y + toY * fromCorner,
    z: z + toZ * fromCorner,
    Iy: sign * I,
    Iz: sign * I,
    Iyz: sign * toY * toZ * product,
  };
}

/** Adds parts up: area, common centroid, and the moments about it (parallel-axis theorem). */
export function addParts(parts: readonly Part[]): Whole {
  let A = 0;
  let Sy = 0;
  let Sz = 0;
  for (const part of parts) {
    A += part.A;
    Sy += part.A * part.y;
    Sz += part.A * part.z;
  }
  const y = Sy / A;
  const z = Sz / A;
  let Iy = 0;
  let Iz = 0;
  let Iyz = 0;
  for (const part of parts) {
    Iy += part.Iy + part.A * (part.z - z) ** 2;
    Iz += part.Iz + part.A * (part.y - y) ** 2;
    Iyz += part.Iyz + part.A * (part.y - y) * (part.z - z);
  }
  return { A, y, z, Iy, Iz, Iyz };
}
