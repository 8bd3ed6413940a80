import { describe, expect, it } from 'vitest';
import { aLine, omegas, worstError } from '#tests/builders/aLine.ts';
import type { End } from '#tests/builders/aLine.ts';

/** Half a unit of the last digit printed in a table. */
const printed = (digits: number) => 0.51 * 10 ** -digits;

/** The tables below were computed with general-purpose numerical libraries from the frequency equations. */
describe('a beam with masses and springs', () => {
  // Cantilever with a point mass at its tip (Thomson, Theory of Vibration with Applications, §7).
  it.each([
    [0.1, 1.722742, 4.399523],
    [0.25, 1.573751, 4.225113],
    [0.5, 1.419964, 4.111133],
    [1, 1.247917, 4.031139],
    [2, 1.076196, 3.982573],
    [5, 0.870021, 3.94998],
    [10, 0.735782, 3.938466],
  ])('tip mass of %f times the beam’s', (tipMass, first, second) => {
    const line = aLine({ ends: ['clamped', 'free'], divisions: 80, tipMass });
    const roots = omegas(line, 'consistent', { modes: 2 }).map(Math.sqrt);
    // Six decimals printed; 80 elements err by less than 2e-8 of the second root.
    expect(Math.abs(roots[0]! - first)).toBeLessThan(printed(6));
    expect(Math.abs(roots[1]! - second)).toBeLessThan(printed(6));
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
    [0, 3.1416],
    [1, 3.3988],
    [5, 3.8974],
    [10, 4.1557],
    [50, 4.5629],
    [100, 4.6413],
  ])('rotational springs of %i EI/L at both ends', (stiffness, root) => {
    const springs = stiffness > 0 ? { ry: stiffness } : {};
    const line = aLine({
      ends: ['pinned', 'pinned'],
      divisions: 40,
      startStiffness: springs,
      endStiffness: springs,
    });
    const [omega] = omegas(line, 'consistent', { modes: 1 });
    expect(Math.abs(Math.sqrt(omega!) - root)).toBeLessThan(printed(4));
  });

  it.each([
    [1, [1.18428, 1.56415, 4.74889]],
    [10, [2.03234, 2.76661, 4.91338]],
    [100, [2.87675, 4.66378, 6.07617]],
    [1000, [3.11106, 6.03706, 8.56559]],
  ])('a free beam on two end springs of %i EI/L³', (k, expected) => {
    const line = aLine({
      ends: ['free', 'free'],
      divisions: 60,
      startStiffness: { w: k },
      endStiffness: { w: k },
    });
    const roots = omegas(line, 'consistent', { modes: 3 }).map(Math.sqrt);
    roots.forEach((root, i) => expect(Math.abs(root - expected[i]!)).toBeLessThan(1e-5));
  });

  it('a bar with a mass as large as its own: x tan x = 1', () => {
    const bar = (divisions: number) =>
      aLine({ ends: ['clamped', 'free'], divisions, unknowns: ['u'], tipMass: 1 });
    for (const method of ['consistent', 'lumped'] as const) {
      const [coarse, fine] = [60, 120].map((divisions) => {
        const line = bar(divisions);
        line.supports = [{ node: 'a', fixed: ['u'] }];
        return omegas(line, method, { modes: 3 });
      });
      // The error goes as h²: extrapolated (Richardson), what is left goes as h⁴, 2e-7 here.
      const omega = fine!.map((value, i) => (4 * value - coarse![i]!) / 3);
      expect(worstError(omega, [0.860334, 3.425618, 6.437298])).toBeLessThan(1e-6);
      const from = method === 'consistent' ? 1 : -1;
      fine!.forEach((value, i) => expect(Math.sign(value - omega[i]!)).toBe(from));
    }
  });

  /**
   * Under a mass M far heavier than the beam, ω² = k / (M + c mL) with c of the static deflection's shape
   * (Rayleigh; Thomson §2.3); M = 10⁴ mL leaves 1e-5 of c.
   */
  it.each<[string, End, boolean, number, number]>([
    ['cantilever, tip', 'free', false, 3, 33 / 140],
    ['pinned, mid-span', 'pinned', true, 48, 17 / 35],
    ['clamped, mid-span', 'clamped', true, 192, 13 / 35],
  ])('effective mass of a %s', (_, end, middle, stiffness, fraction) => {
    const heavy = 1e4;
    const line = aLine({
      ends: [end === 'free' ? 'clamped' : end, end],
      divisions: 4,
      ...(!middle && { tipMass: heavy }),
    });
    if (middle) {
      line.nodes.push({ id: 'middle', x: 0.5, z: 0 });
      const half = line.members[0]!;
      line.members = [
        { ...half, id: 'left', end: 'middle' },
        { ...half, id: 'right', start: 'middle' },
      ];
      line.masses = [{ id: 'load', name: 'Load', node: 'middle', mass: heavy }];
    }
    const [omega] = omegas(line, 'consistent', { modes: 1 });
    expect((stiffness / omega! ** 2 - heavy) / fraction).toBeCloseTo(1, 4);
  });

  it('effective mass of a rod is a third', () => {
    const heavy = 1e4;
    const line = aLine({
      ends: ['clamped', 'free'],
      divisions: 1,
      unknowns: ['u'],
      tipMass: heavy,
    });
    line.supports = [{ node: 'a', fixed: ['u'] }];
    const [omega] = omegas(line, 'consistent', { modes: 1 });
    expect((1 / omega! ** 2 - heavy) * 3).toBeCloseTo(1, 4);
  });

  it.each([
    ['consistent', 2 / 3],
    ['lumped', 1],
  ] as const)('two bars at right angles carry by hand, %s: %f of one’s mass', (method, share) => {
    const frame = aLine({ ends: ['free', 'free'], divisions: 1, unknowns: ['u', 'w', 'ry'] });
    const bar = { ...frame.members[0]!, kind: 'bar' as const, massPerLength: 3 };
    frame.nodes = [
      { id: 'a', x: -1, z: 0 },
      { id: 'b', x: 1, z: 0 },
      { id: 'top', x: 0, z: 1 },
    ];
    frame.members = [
      { ...bar, id: 'left', start: 'a', end: 'top' },
      { ...bar, id: 'right', start: 'b', end: 'top' },
    ];
    frame.supports = ['a', 'b'].map((node) => ({ node, fixed: ['u', 'w'] }));
    frame.masses = [{ id: 'load', name: 'Load', node: 'top', mass: 5 }];
    // K = EA/L in every direction; M = 5 kg + share × (ρA + 3) L.
    const omega = Math.sqrt(1 / Math.SQRT2 / (5 + share * 4 * Math.SQRT2));
    expect(worstError(omegas(frame, method, { modes: 2 }), [omega, omega])).toBeLessThan(1e-12);
  });

  it('mass carried along slows bending and stretching as density does, and leaves twist alone', () => {
    const beam = (massPerLength: number, density: number) => {
      const line = aLine({
        ends: ['free', 'free'],
        divisions: 6,
        unknowns: ['u', 'v', 'w', 'rx', 'ry', 'rz'],
      });
      line.materials[0]!.density = density;
      line.members[0]!.massPerLength = massPerLength;
      line.supports = [{ node: 'a', fixed: ['u', 'v', 'w', 'rx', 'ry', 'rz'] }];
      return line;
    };
    for (const method of ['consistent', 'lumped'] as const) {
      // A = 1: three more kg/m quadruple the mass per length, so translation halves its frequencies.
      const [bare, laden] = [beam(0, 1), beam(3, 1)].map((line) => {
        line.sections[0]!.shape = { kind: 'custom', A: 1, Iy: 1, Iz: 2, J: 7, ky: 1, kz: 1 };
        return omegas(line, method, { modes: 40 });
      });
      const twist = Math.sqrt((0.5 * 7) / 3);
      const h = 1 / 6;
      const sines = [1, 3, 5, 7, 9, 11].map((n) => (n * Math.PI) / 12);
      const twists = sines.map((phi) =>
        method === 'lumped'
          ? (2 / h) * Math.sin(phi / 2)
          : Math.sqrt((6 / h ** 2) * ((1 - Math.cos(phi)) / (2 + Math.cos(phi)))),
      );
      const isTwist = (omega: number) =>
        twists.some((value) => Math.abs(omega / (value * twist) - 1) < 1e-9);
      expect(laden!.filter(isTwist)).toHaveLength(6);
      const rest = (list: readonly number[]) => list.filter((omega) => !isTwist(omega));
      expect(rest(laden!)).toHaveLength(rest(bare!).length);
      expect(
        worstError(
          rest(laden!),
          rest(bare!).map((omega) => omega / 2),
        ),
      ).toBeLessThan(1e-9);
    }
  });
});
