import { describe, expect, it } from 'vitest';

import { sectionOutline } from '#shared/frame/sectionOutline.ts';
import { sectionProperties } from '#shared/frame/sectionProperties.ts';
import type { SectionPoint } from '#shared/frame/sections/section.ts';
import type { SectionShape } from '#shared/schemas/frameDocument.ts';

/**
 * St Venant's torsion constant by Prandtl's stress function: ∇²φ = −2 inside, φ = 0 on the outline,
 * J = 2∫φ dA (Timoshenko and Goodier §104). Five-point differences on a grid of spacing h, over-relaxed.
 */
function prandtlTorsion(outer: readonly SectionPoint[], h: number): number {
  const ys = outer.map(([y]) => y);
  const zs = outer.map(([, z]) => z);
  const y0 = Math.min(...ys) - h / 2;
  const z0 = Math.min(...zs) - h / 2;
  const columns = Math.round((Math.max(...ys) - y0) / h + 0.5) + 1;
  const rows = Math.round((Math.max(...zs) - z0) / h + 0.5) + 1;
  const phi = new Float64Array(columns * rows);
  const inside: number[] = [];
  for (let j = 1; j < rows - 1; j += 1) {
    for (let i = 1; i < columns - 1; i += 1) {
      if (contains(outer, y0 + i * h, z0 + j * h)) inside.push(j * columns + i);
    }
  }
  const relaxation = 1.85;
  for (let sweep = 0; sweep < 6000; sweep += 1) {
    let largest = 0;
    for (const at of inside) {
      const around = phi[at - 1]! + phi[at + 1]! + phi[at - columns]! + phi[at + columns]!;
      const step = relaxation * ((around + 2 * h * h) / 4 - phi[at]!);
      phi[at]! += step;
      largest = Math.max(largest, Math.abs(step));
    }
    if (largest < 1e-6 * h * h) break;
  }
  return 2 * h * h * phi.reduce((sum, value) => sum + value, 0);
}

function contains(outline: readonly SectionPoint[], y: number, z: number): boolean {
  let inside = false;
  outline.forEach(([y0, z0], i) => {
    const [y1, z1] = outline[(i + 1) % outline.length]!;
    if (z0 > z !== z1 > z && y < y0 + ((z - z0) / (z1 - z0)) * (y1 - y0)) inside = !inside;
  });
  return inside;
}

/** φ at half a spacing outside the wall is taken as 0, so the wall is h too thick: two grids, extrapolated. */
function torsion(shape: SectionShape, h: number): number {
  const { outer } = sectionOutline(shape, 24);
  return 2 * prandtlTorsion(outer, h / 2) - prandtlTorsion(outer, h);
}

const open = { width: 0.08, height: 0.1, web: 0.008, flange: 0.012, radius: 0.01 };

describe('torsion constants of open profiles', () => {
  // The junction terms are fits to such solutions and to tests on models: 3 % for them, 1 % for this grid.
  it.each<SectionShape>([
    { kind: 'i-section', ...open },
    { kind: 'channel', ...open },
    { kind: 'tee', ...open },
    { kind: 'angle', width: 0.06, height: 0.08, wall: 0.01, radius: 0.01 },
  ])('$kind agrees with a numerical solution of the torsion problem', (shape) => {
    const J = sectionProperties(shape, 0.3).J;
    expect(Math.abs(J / torsion(shape, 0.001) - 1)).toBeLessThan(0.04);
  });

  it('the numerical solution itself gives a square 0.14058 a⁴', () => {
    const square: SectionShape = { kind: 'solid-rectangle', width: 0.02, height: 0.02 };
    expect(Math.abs(torsion(square, 0.001) / (0.14058 * 0.02 ** 4) - 1)).toBeLessThan(0.01);
  });
});
