import { describe, expect, it } from 'vitest';
import { aLine, omegas, worstError } from '#tests/builders/aLine.ts';
import type { End } from '#tests/builders/aLine.ts';

/** Half a unit of the last digit printed in a table. */
const printed = (digits: number) => 0.51 * 10 ** -digits;

describe('one beam against closed forms', () => {
  // Thomson, Theory of Vibration with Applications, Appendix D: roots βL of the frequency equations.
  it.each<[End, End, number, readonly number[]]>([
    ['clamped', 'free', 0, [1.87510407, 4.69409113, 7.85475744, 10.99554073]],
    ['clamped', 'clamped', 0, [4.73004074, 7.85320462, 10.99560784, 14.13716549]],
    ['free', 'free', 2, [4.73004074, 7.85320462, 10.99560784, 14.13716549]],
    ['clamped', 'pinned', 0, [3.92660231, 7.06858275, 10.21017612, 13.35176878]],
    ['pinned', 'free', 1, [3.92660231, 7.06858275, 10.21017612, 13.35176878]],
    ['clamped', 'guided', 0, [2.36502037, 5.49780392, 8.63937983, 11.78097245]],
    ['free', 'guided', 1, [2.36502037, 5.49780392, 8.63937983, 11.78097245]],
    ['pinned', 'pinned', 0, [1, 2, 3, 4].map((n) => n * Math.PI)],
    ['guided', 'guided', 1, [1, 2, 3, 4].map((n) => n * Math.PI)],
    ['pinned', 'guided', 0, [0.5, 1.5, 2.5, 3.5].map((n) => n * Math.PI)],
  ])('%s-%s with consistent mass, from above', (start, end, rigid, roots) => {
    const line = aLine({ ends: [start, end], divisions: 60 });
    const omega = omegas(line, 'consistent', { modes: rigid + 4 });
    expect(omega.slice(0, rigid)).toEqual(new Array(rigid).fill(0));
    const expected = roots.map((root) => root ** 2);
    omega
      .slice(rigid)
      .forEach((value, i) => expect(value).toBeGreaterThan(expected[i]! * (1 - 1e-8)));
    // φ⁴/1440 at 60 elements (see the dispersion test) is at most 2.2e-6 here.
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

  // Rectangular section, ν = 0.3, κ = 0.85: roots of the Timoshenko frequency equations (Huang 1961; Han, Benaroya
  // and Wei 1999), computed with general-purpose numerical libraries; ω √(ρAL⁴/EI).
  it.each<[number, End, End, number, readonly number[]]>([
    [0.05, 'pinned', 'pinned', 0, [9.82874, 38.8393]],
    [0.05, 'clamped', 'free', 0, [3.50913, 21.739]],
    [0.05, 'clamped', 'clamped', 0, [22.002, 59.3825]],
    [0.05, 'free', 'free', 2, [22.1738, 60.1419]],
    [0.1, 'pinned', 'pinned', 0, [9.70982, 37.1283]],
    [0.1, 'clamped', 'free', 0, [3.48876, 20.9225]],
    [0.1, 'clamped', 'clamped', 0, [20.9955, 53.8602]],
    [0.1, 'free', 'free', 2, [21.6146, 56.2608]],
    [0.2, 'clamped', 'free', 0, [3.41129, 18.4059]],
    [0.2, 'pinned', 'pinned', 0, [9.28207, 32.2471]],
    [0.2, 'clamped', 'clamped', 0, [18.0535, 41.394]],
    [0.2, 'free', 'free', 2, [19.8161, 46.3879]],
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
});
