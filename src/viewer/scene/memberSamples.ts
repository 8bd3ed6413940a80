import {
  VALUES_PER_POINT,
  type MemberStations,
  type ModeShapes,
} from '#shared/analysis/shapesFile.ts';
import { cross, norm, scale as scaled, subtract } from '#shared/frame/vector3.ts';
import type { Vector3 } from '#shared/schemas/frameDocument.ts';

/** Points along one member for drawing, each with its displacement and rotation at full amplitude. */
export interface MemberSamples {
  readonly count: number;
  /** count × 3, m */
  readonly position: Float32Array;
  /** count × 3, m as drawn */
  readonly swing: Float32Array;
  /** count × 3, rad as drawn */
  readonly turn: Float32Array;
}

/** A member is drawn with at least this many pieces, so that a bent one looks bent. */
const LEAST_PIECES = 10;

/**
 * Samples one member between its stations. Along the member displacements go straight from station to
 * station; across it they follow the cubic (Hermite) through the displacements and slopes there, the slope of
 * a station being rotation × x: the shape functions of the Bernoulli-Euler beam.
 *   scale  what the shape is multiplied by, m as drawn per unit of shape
 */
export function sampleMember(
  shapes: ModeShapes,
  mode: number,
  { first, count }: MemberStations,
  scale: number,
): MemberSamples {
  const perPiece = Math.max(1, Math.ceil(LEAST_PIECES / Math.max(1, count - 1)));
  const samples = (count - 1) * perPiece + 1;
  const position = new Float32Array(samples * 3);
  const swing = new Float32Array(samples * 3);
  const turn = new Float32Array(samples * 3);
  const base = mode * shapes.points * VALUES_PER_POINT;
  const place = (p: number): Vector3 => [
    shapes.positions[3 * p]!,
    shapes.positions[3 * p + 1]!,
    shapes.positions[3 * p + 2]!,
  ];
  const values = (p: number, from: 0 | 3): Vector3 => {
    const at = base + p * VALUES_PER_POINT + from;
    return [
      shapes.shapes[at]! * scale,
      shapes.shapes[at + 1]! * scale,
      shapes.shapes[at + 2]! * scale,
    ];
  };

  for (let s = 0; s < samples; s += 1) {
    const station = first + Math.min(Math.floor(s / perPiece), Math.max(0, count - 2));
    const next = Math.min(station + 1, first + count - 1);
    const t = (s - (station - first) * perPiece) / perPiece;
    const [a, b] = [place(station), place(next)];
    const chord = subtract(b, a);
    const length = norm(chord);
    const x: Vector3 = length > 0 ? scaled(chord, 1 / length) : [1, 0, 0];
    const [ua, ub] = [values(station, 0), values(next, 0)];
    const [ra, rb] = [values(station, 3), values(next, 3)];
    const [slopeA, slopeB] = [cross(ra, x), cross(rb, x)];
    const stretch = (ub[0] - ua[0]) * x[0] + (ub[1] - ua[1]) * x[1] + (ub[2] - ua[2]) * x[2];
    for (const axis of [0, 1, 2] as const) {
      position[3 * s + axis] = a[axis] + t * chord[axis];
      turn[3 * s + axis] = ra[axis] + t * (rb[axis] - ra[axis]);
      // The cubic without its axial part, which is straight: both end slopes get the axial rate added.
      const axial = stretch * x[axis];
      const h00 = 1 - 3 * t * t + 2 * t * t * t;
      const h10 = t - 2 * t * t + t * t * t;
      const h11 = t * t * t - t * t;
      swing[3 * s + axis] =
        h00 * ua[axis] +
        (1 - h00) * ub[axis] +
        h10 * (length * slopeA[axis] + axial) +
        h11 * (length * slopeB[axis] + axial);
    }
  }
  return { count: samples, position, swing, turn };
}
