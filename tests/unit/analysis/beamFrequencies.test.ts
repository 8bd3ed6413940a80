import { describe, expect, it } from 'vitest';
import { aLine, frequencies, omegas, worstError } from '#tests/builders/aLine.ts';
import type { End } from '#tests/builders/aLine.ts';

const TRANSLATION_ONLY = { modes: 3 } as const;

/** Half a unit of the last digit printed in a table. */
const printed = (digits: number) => 0.51 * 10 ** -digits;

describe('one beam against closed forms', () => {
  // Thomson, Theory of Vibration with Applications, Appendix D: roots βL of the frequency equations.
  it.each<[End, End, number, readonly number[]]>([
    ['clamped', 'free', 0, [1.87510407, 4.69409113, 7.85475744]],
    ['clamped', 'clamped', 0, [4.73004074, 7.85320462, 10.99560784]],
    ['free', 'free', 2, [4.73004074, 7.85320462, 10.99560784]],
    ['clamped', 'pinned', 0, [3.92660231, 7.06858275, 10.21017612]],
    ['pinned', 'free', 1, [3.92660231, 7.06858275, 10.21017612]],
    ['clamped', 'guided', 0, [2.36502037, 5.49780392, 8.63937983]],
    ['free', 'guided', 1, [2.36502037, 5.49780392, 8.63937983]],
    ['pinned', 'pinned', 0, [Math.PI, 2 * Math.PI, 3 * Math.PI]],
    ['pinned', 'guided', 0, [0.5 * Math.PI, 1.5 * Math.PI, 2.5 * Math.PI]],
  ])('%s-%s with consistent mass, from above', (start, end, rigid, roots) => {
    const line = aLine({ ends: [start, end], divisions: 40 });
    const omega = omegas(line, 'consistent', { modes: rigid + 3 });
    expect(omega.slice(0, rigid)).toEqual(new Array(rigid).fill(0));
    const expected = roots.map((root) => root ** 2);
    omega
      .slice(rigid)
      .forEach((value, i) => expect(value).toBeGreaterThan(expected[i]! * (1 - 1e-8)));
    // φ⁴/1440 at 40 elements (see the dispersion test) is at most 4e-6 here.
    expect(worstError(omega.slice(rigid), expected)).toBeLessThan(5e-6);
  });

  // Computed once with general-purpose numerical libraries from the textbook element matrices.
  it.each<[number, readonly number[], readonly number[]]>([
    [1, [3.53273, 34.80689], [2.44949]],
    [2, [3.51772, 22.22147, 75.15708, 218.13802], [3.15623, 16.25804]],
    [3, [3.51637, 22.10686, 62.46598], [3.34568, 18.88592, 47.02836]],
    [4, [3.51613, 22.06017, 62.17489], [3.41804, 20.09035, 53.20174]],
    [10, [3.51602, 22.03522, 61.71292], [3.49996, 21.68978, 60.12387]],
    [20, [3.51602, 22.03454, 61.69822], [3.51199, 21.94711, 61.29603]],
  ])('cantilever of %i elements, consistent and lumped', (divisions, consistent, lumped) => {
    const line = aLine({ ends: ['clamped', 'free'], divisions });
    omegas(line, 'consistent', { modes: consistent.length }).forEach((omega, i) =>
      expect(Math.abs(omega - consistent[i]!)).toBeLessThan(printed(5)),
    );
    const found = omegas(line, 'lumped', { modes: lumped.length });
    expect(found).toHaveLength(lumped.length);
    found.forEach((omega, i) => expect(Math.abs(omega - lumped[i]!)).toBeLessThan(printed(5)));
  });

  it('returns the modes that exist when more are asked for', () => {
    const line = aLine({ ends: ['clamped', 'free'], divisions: 1 });
    expect(omegas(line, 'consistent', { modes: 12 })).toHaveLength(2);
    expect(omegas(line, 'lumped', { modes: 12 })).toHaveLength(1);
  });

  // Same source as the cantilever table.
  it.each<[readonly [End, End], number, number, number, number]>([
    [['pinned', 'pinned'], 2, 0, 9.90856, 9.79796],
    [['pinned', 'pinned'], 4, 0, 9.87217, 9.86659],
    [['clamped', 'clamped'], 2, 0, 22.73594, 19.59592],
    [['clamped', 'clamped'], 4, 0, 22.40298, 22.30236],
    [['free', 'free'], 2, 2, 22.42325, 13.85641],
    [['free', 'free'], 10, 2, 22.37404, 21.7056],
  ])('%s of %i elements, first elastic mode', (ends, divisions, rigid, consistent, lumped) => {
    const line = aLine({ ends, divisions });
    const at = (method: 'consistent' | 'lumped') =>
      omegas(line, method, { modes: rigid + 1 })[rigid]!;
    expect(Math.abs(at('consistent') - consistent)).toBeLessThan(printed(5));
    expect(Math.abs(at('lumped') - lumped)).toBeLessThan(printed(5));
  });

  // Exact discrete dispersion of a chain of elements, φ = βh; a bar's is in Bathe, Finite Element Procedures, §9.3.
  it.each([4, 9])('stretching of %i elements follows the discrete dispersion', (divisions) => {
    const line = aLine({ ends: ['clamped', 'free'], divisions, unknowns: ['u'] });
    line.supports = [{ node: 'a', fixed: ['u'] }];
    const h = 1 / divisions;
    const phi = [1, 2, 3].map((n) => ((2 * n - 1) * Math.PI) / (2 * divisions));
    const lumped = phi.map((p) => (2 / h) * Math.sin(p / 2));
    const consistent = phi.map((p) =>
      Math.sqrt((6 / h ** 2) * ((1 - Math.cos(p)) / (2 + Math.cos(p)))),
    );
    expect(worstError(omegas(line, 'lumped', TRANSLATION_ONLY), lumped)).toBeLessThan(1e-12);
    expect(worstError(omegas(line, 'consistent', TRANSLATION_ONLY), consistent)).toBeLessThan(
      1e-12,
    );
  });

  it.each([4, 9])(
    'lumped bending of %i pinned elements follows the discrete dispersion',
    (divisions) => {
      const line = aLine({ ends: ['pinned', 'pinned'], divisions });
      const expected = [1, 2, 3].map((n) => {
        const cos = Math.cos((n * Math.PI) / divisions);
        return Math.sqrt(12 * divisions ** 4 * ((1 - cos) ** 2 / (2 + cos)));
      });
      expect(worstError(omegas(line, 'lumped', TRANSLATION_ONLY), expected)).toBeLessThan(1e-11);
    },
  );

  it('consistent bending of pinned elements errs by +φ⁴/1440', () => {
    for (const divisions of [8, 16]) {
      const [omega] = omegas(aLine({ ends: ['pinned', 'pinned'], divisions }), 'consistent', {
        modes: 1,
      });
      const error = omega! / Math.PI ** 2 - 1;
      const leading = (Math.PI / divisions) ** 4 / 1440;
      expect(error / leading).toBeCloseTo(1, 1);
    }
  });

  // Roots of the frequency equation of a cantilever with a point mass at its tip (Thomson §7), computed
  // with general-purpose numerical libraries.
  it.each([
    [0.1, 1.722742, 4.399523],
    [0.5, 1.419964, 4.111133],
    [1, 1.247917, 4.031139],
    [10, 0.735782, 3.938466],
  ])('tip mass of %f times the beam’s', (tipMass, first, second) => {
    const line = aLine({ ends: ['clamped', 'free'], divisions: 20, tipMass });
    const roots = omegas(line, 'consistent', { modes: 2 }).map(Math.sqrt);
    expect(worstError(roots, [first, second])).toBeLessThan(3e-6);
  });

  it.each([
    [1, 0.443],
    [5, 0.743],
    [10, 0.844],
    [50, 0.962],
    [100, 0.981],
  ])('a cantilever on a rotational spring of %i EI/L', (stiffness, ratio) => {
    const line = aLine({
      ends: ['pinned', 'free'],
      divisions: 8,
      startStiffness: { ry: stiffness },
    });
    const [omega] = omegas(line, 'consistent', { modes: 1 });
    expect(Math.abs(omega! / 1.87510407 ** 2 - ratio)).toBeLessThan(printed(3));
  });

  it.each([
    [1, [1.18428, 1.56415, 4.74889]],
    [100, [2.87675, 4.66378, 6.07617]],
  ])('a free beam on two end springs of %i EI/L³', (k, expected) => {
    const line = aLine({
      ends: ['free', 'free'],
      divisions: 40,
      startStiffness: { w: k },
      endStiffness: { w: k },
    });
    const roots = omegas(line, 'consistent', { modes: 3 }).map(Math.sqrt);
    roots.forEach((root, i) => expect(Math.abs(root - expected[i]!)).toBeLessThan(1e-5));
  });

  // Rectangular section, ν = 0.3, κ = 0.85: roots of the Timoshenko frequency equations (Huang 1961; Han, Benaroya
  // and Wei 1999), computed with general-purpose numerical libraries; ω √(ρAL⁴/EI).
  it.each<[number, End, End, number, readonly number[]]>([
    [0.05, 'pinned', 'pinned', 0, [9.82874, 38.8393]],
    [0.05, 'clamped', 'free', 0, [3.50913, 21.739]],
    [0.1, 'clamped', 'clamped', 0, [20.9955, 53.8602]],
    [0.1, 'free', 'free', 2, [21.6146, 56.2608]],
    [0.2, 'clamped', 'free', 0, [3.41129, 18.4059]],
    [0.2, 'pinned', 'pinned', 0, [9.28207, 32.2471]],
    [0.2, 'clamped', 'clamped', 0, [18.0535, 41.394]],
  ])('Timoshenko, h/L %f, %s-%s', (depth, start, end, rigid, expected) => {
    const line = aLine({ ends: [start, end], divisions: 100, theory: 'timoshenko' });
    line.materials = [{ id: 'unit', name: 'Unit', E: 1, nu: 0.3, density: 1 }];
    const [A, I] = [depth, depth ** 3 / 12];
    line.sections[0]!.shape = { kind: 'custom', A, Iy: I, Iz: I, J: 2 * I, ky: 0.85, kz: 0.85 };
    const omega = omegas(line, 'consistent', { modes: rigid + 2 }).slice(rigid);
    const scaled = omega.map((value) => value * Math.sqrt(A / I));
    // The tables print five or six digits; 100 elements err by less than 1e-4 of the second mode.
    expect(worstError(scaled, expected)).toBeLessThan(1e-4);
  });

  it('twists as a shaft with c = √(GJ/ρIp)', () => {
    const line = aLine({
      ends: ['free', 'free'],
      divisions: 40,
      unknowns: ['u', 'v', 'w', 'rx', 'ry', 'rz'],
    });
    line.supports = [{ node: 'a', fixed: ['u', 'v', 'w', 'rx', 'ry', 'rz'] }];
    line.sections[0]!.shape = { kind: 'custom', A: 1, Iy: 100, Iz: 100, J: 2, ky: 1, kz: 1 };
    const [first] = frequencies(line, 'consistent', { modes: 1 });
    const c = Math.sqrt((0.5 * 2) / 200);
    // Consistent errs by φ²/24 = (π/80)²/24.
    expect(first! / (c / 4)).toBeCloseTo(1 + (Math.PI / 80) ** 2 / 24, 8);
  });
});
