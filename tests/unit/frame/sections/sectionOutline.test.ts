import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { sectionOutline } from '#shared/frame/sectionOutline.ts';
import { sectionProperties } from '#shared/frame/sectionProperties.ts';
import type { SectionPoint } from '#shared/frame/sections/section.ts';
import type { SectionShape } from '#shared/schemas/frameDocument.ts';

/** Moments of a polygon by Green's theorem (textbook sums over its edges), anticlockwise positive. */
function polygonMoments(points: readonly SectionPoint[]) {
  const sums = { A: 0, Sy: 0, Sz: 0, Iy: 0, Iz: 0, Iyz: 0 };
  points.forEach(([y0, z0], i) => {
    const [y1, z1] = points[(i + 1) % points.length]!;
    const turn = y0 * z1 - y1 * z0;
    sums.A += turn / 2;
    sums.Sy += (turn * (y0 + y1)) / 6;
    sums.Sz += (turn * (z0 + z1)) / 6;
    sums.Iy += (turn * (z0 ** 2 + z0 * z1 + z1 ** 2)) / 12;
    sums.Iz += (turn * (y0 ** 2 + y0 * y1 + y1 ** 2)) / 12;
    sums.Iyz += (turn * (y0 * z1 + 2 * y0 * z0 + 2 * y1 * z1 + y1 * z0)) / 24;
  });
  return sums;
}

function outlineMoments(shape: SectionShape) {
  const { outer, holes } = sectionOutline(shape, 400);
  const total = polygonMoments(outer);
  for (const hole of holes) {
    const part = polygonMoments(hole);
    for (const key of Object.keys(total) as (keyof typeof total)[]) total[key] += part[key];
  }
  return total;
}

const size = fc.double({ min: 0.05, max: 0.4, noNaN: true });
const share = fc.double({ min: 0.05, max: 0.4, noNaN: true });
const arbShape: fc.Arbitrary<SectionShape> = fc
  .record({ width: size, height: size, a: share, b: share, c: share })
  .chain(({ width, height, a, b, c }) => {
    const least = Math.min(width, height);
    const open = {
      width,
      height,
      web: a * width,
      flange: b * height,
      radius: c * Math.min((width - a * width) / 2, height / 2 - b * height),
    };
    return fc.constantFrom<SectionShape>(
      { kind: 'solid-rectangle', width, height },
      { kind: 'solid-round', diameter: width },
      { kind: 'round-tube', diameter: width, wall: a * width },
      { kind: 'rectangular-tube', width, height, wall: a * least, radius: b * least },
      { kind: 'i-section', ...open },
      { kind: 'channel', ...open },
      { kind: 'tee', ...open },
      { kind: 'angle', width, height, wall: a * least, radius: c * least * (1 - a) },
    );
  });

describe('section outline', () => {
  it('encloses the area and moments of the formulas, about the centroid', () => {
    fc.assert(
      fc.property(arbShape, (shape) => {
        const drawn = outlineMoments(shape);
        const { A, Iy, Iz, Iyz } = sectionProperties(shape, 0.3);
        // 400 pieces per quarter circle leave out π²/(24·800²)·… ≈ 1e-6 of a round section.
        const slack = 2e-5;
        const reach = Math.sqrt((Iy + Iz) / A);
        expect(Math.abs(drawn.A / A - 1)).toBeLessThan(slack);
        expect(Math.abs(drawn.Sy) / (A * reach)).toBeLessThan(slack);
        expect(Math.abs(drawn.Sz) / (A * reach)).toBeLessThan(slack);
        expect(Math.abs(drawn.Iy / Iy - 1)).toBeLessThan(slack);
        expect(Math.abs(drawn.Iz / Iz - 1)).toBeLessThan(slack);
        expect(Math.abs(drawn.Iyz - Iyz) / (Iy + Iz)).toBeLessThan(slack);
      }),
      { seed: 1852, numRuns: 150 },
    );
  });

  it('stands for a custom section by its radii of gyration, and says so', () => {
    const outline = sectionOutline({
      kind: 'custom',
      A: 1e-3,
      Iy: 4e-6,
      Iz: 1e-6,
      Iyz: 0,
      J: 1e-6,
      ky: 0.5,
      kz: 0.5,
    });
    const drawn = polygonMoments(outline.outer);
    expect(outline.approximate).toBe(true);
    expect(Math.abs(drawn.Iy / drawn.A / 4e-3 - 1)).toBeLessThan(1e-12);
    expect(Math.abs(drawn.Iz / drawn.A / 1e-3 - 1)).toBeLessThan(1e-12);
  });
});
