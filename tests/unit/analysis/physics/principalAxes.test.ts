import { describe, expect, it } from 'vitest';
import { memberAxes } from '#shared/frame/memberAxes.ts';
import { sectionOutline } from '#shared/frame/sectionOutline.ts';
import { sectionProperties } from '#shared/frame/sectionProperties.ts';
import type { SectionShape, Vector3 } from '#shared/schemas/frameDocument.ts';
import { aCantilever } from '#tests/builders/aFrame.ts';
import { solved } from '#tests/builders/aLine.ts';

const ANGLE = { kind: 'angle', width: 0.06, height: 0.09, wall: 0.008, radius: 0.008 } as const;

/** ∫a² dA, ∫ab dA, ∫b² dA of a polygon about its centroid by Green's theorem, and its area. */
function polygonMoments(points: readonly (readonly [number, number])[]) {
  const sums = { A: 0, aa: 0, ab: 0, bb: 0 };
  points.forEach(([a0, b0], i) => {
    const [a1, b1] = points[(i + 1) % points.length]!;
    const turn = a0 * b1 - a1 * b0;
    sums.A += turn / 2;
    sums.aa += (turn * (a0 * a0 + a0 * a1 + a1 * a1)) / 12;
    sums.bb += (turn * (b0 * b0 + b0 * b1 + b1 * b1)) / 12;
    sums.ab += (turn * (a0 * b1 + 2 * a0 * b0 + 2 * a1 * b1 + a1 * b0)) / 24;
  });
  return sums;
}

const combined = (e1: Vector3, p: number, e2: Vector3, q: number): Vector3 => [
  e1[0] * p + e2[0] * q,
  e1[1] * p + e2[1] * q,
  e1[2] * p + e2[2] * q,
];
const dot = (a: Vector3, b: Vector3) => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];

/**
 * A cantilever of an angle from the origin to `tip`. `y` and `z` are its section axes without roll, worked out by
 * hand from the definition: z is the part of Z (of X for an upright member) across x, y = z × x.
 */
const CASES: readonly { name: string; tip: Vector3; y: Vector3; z: Vector3 }[] = [
  { name: 'along X', tip: [2, 0, 0], y: [0, 1, 0], z: [0, 0, 1] },
  { name: 'along −X', tip: [-2, 0, 0], y: [0, -1, 0], z: [0, 0, 1] },
  { name: 'along Y', tip: [0, 2, 0], y: [-1, 0, 0], z: [0, 0, 1] },
  { name: 'upwards', tip: [0, 0, 2], y: [0, -1, 0], z: [1, 0, 0] },
  { name: 'downwards', tip: [0, 0, -2], y: [0, 1, 0], z: [1, 0, 0] },
  { name: 'inclined', tip: [1.2, 0, 1.6], y: [0, 1, 0], z: [-0.8, 0, 0.6] },
];
const ROLLS = [0, 0.4, -1.1, Math.PI / 2];

describe('principal directions of a rolled angle', () => {
  it('the outline has ∫yz dA < 0 with its heel at −y −z, as the section states', () => {
    const drawn = polygonMoments(sectionOutline(ANGLE, 100).outer);
    const { Iyz } = sectionProperties(ANGLE, 0.3);
    expect(drawn.ab).toBeLessThan(0);
    expect(Iyz / drawn.ab).toBeCloseTo(1, 4);
  });

  it.each(CASES.flatMap((place) => ROLLS.map((roll) => ({ ...place, roll }))))(
    '$name, roll $roll: swings along the principal axes of its outline',
    ({ tip, y: y0, z: z0, roll }) => {
      const y = combined(y0, Math.cos(roll), z0, Math.sin(roll));
      const z = combined(y0, -Math.sin(roll), z0, Math.cos(roll));
      const { outer } = sectionOutline(ANGLE, 100);
      const { A, aa, ab, bb } = polygonMoments(outer);
      // Weakest direction s of ∫s² dA in the section's plane.
      const radius = Math.hypot((aa - bb) / 2, ab);
      const weakest = (aa + bb) / 2 - radius;
      const turn = 0.5 * Math.atan2(2 * ab, aa - bb) + Math.PI / 2;
      const weak = combined(y, Math.cos(turn), z, Math.sin(turn));

      const frame = aCantilever({ shape: ANGLE, theory: 'bernoulli', divisions: 6 });
      frame.nodes = [
        { id: 'root', x: 0, y: 0, z: 0 },
        { id: 'tip', x: tip[0], y: tip[1], z: tip[2] },
      ];
      frame.members[0]!.roll = roll;
      const { summary, shapes } = solved(frame, 'consistent', { modes: 2 });
      const [first, second] = [0, 1].map((mode): Vector3 => {
        const at = mode * shapes.points * 6 + 6;
        return [shapes.shapes[at]!, shapes.shapes[at + 1]!, shapes.shapes[at + 2]!];
      });
      const along = (v: Vector3) => Math.abs(dot(v, weak)) / Math.sqrt(dot(v, v));
      // Shapes are kept in single precision; 100 pieces of fillet turn the axes by less.
      expect(along(first!)).toBeCloseTo(1, 6);
      expect(along(second!)).toBeLessThan(1e-3);
      const omega = (1.87510407 ** 2 * Math.sqrt((210e9 * weakest) / (7850 * A))) / 4;
      expect((2 * Math.PI * summary.modes[0]!.frequencyHz) / omega).toBeCloseTo(1, 4);
    },
  );

  it.each<[string, Vector3, Vector3]>([
    ['just upright', [0.9e-3, 0, 1], [1, 0, 0]],
    ['just not upright', [0, 1.1e-3, 1], [0, -1, 0]],
  ])('%s: z turns at a slope of 1e-3', (_, tip, z) => {
    const axes = memberAxes([0, 0, 0], tip, 0);
    expect(dot(axes.z, z)).toBeGreaterThan(0.999);
    expect(axes.nearlyUpright).toBe(true);
  });

  it('a height lies along z: a flat post sways across its flat side first', () => {
    const flat: SectionShape = { kind: 'solid-rectangle', width: 0.02, height: 0.1 };
    const post = aCantilever({ shape: flat });
    post.nodes[1] = { id: 'tip', x: 0, y: 0, z: 1 };
    expect(solved(post).summary.modes[0]!.name).toBe('sways along Y');
    post.members[0]!.roll = Math.PI / 2;
    expect(solved(post).summary.modes[0]!.name).toBe('sways along X');
  });

  it('shear along z goes with bending in x–z: kz tiny slows only that', () => {
    const shape = (ky: number, kz: number): SectionShape => ({
      kind: 'custom',
      A: 1e-3,
      Iy: 1e-6,
      Iz: 1e-6,
      Iyz: 0,
      J: 1e-6,
      ky,
      kz,
    });
    const name = (ky: number, kz: number) =>
      solved(aCantilever({ shape: shape(ky, kz) })).summary.modes[0]!.name;
    expect(name(0.8, 1e-4)).toBe('bounces along Z');
    expect(name(1e-4, 0.8)).toBe('sways along Y');
  });
});
