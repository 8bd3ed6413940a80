import { describe, expect, it } from 'vitest';
import type { HandCheck } from '#shared/schemas/solveResult.ts';
import type { FrameInput } from '#tests/builders/aFrame.ts';
import { aStand } from '#tests/builders/aFrame.ts';
import { aLine, solved } from '#tests/builders/aLine.ts';

/** SHS 100×100×5 with the figures the check values were computed from. */
const TUBE = {
  kind: 'custom',
  A: 18.356e-4,
  Iy: 271.1e-8,
  Iz: 271.1e-8,
  J: 440.52e-8,
  ky: 0.436,
  kz: 0.436,
} as const;
/** [rad/s] of a frequency in Hz: with EI = m = L = 1 the table's dimensionless number. */
const omega = (hz: number) => 2 * Math.PI * hz;

function checksOf(frame: FrameInput, modes = 8) {
  const { handChecks } = solved(frame, 'consistent', { modes }).summary;
  if (!handChecks) throw new Error('The summary has no hand checks.');
  return handChecks;
}
function along(frame: FrameInput, axis: HandCheck['axis']): HandCheck {
  const found = checksOf(frame).axes.find((check) => check.axis === axis);
  if (!found) throw new Error(`No check along ${axis}.`);
  return found;
}

/** ∫₀¹ of a polynomial, coefficients from the constant on. */
const integral = (p: readonly number[]) => p.reduce((sum, c, k) => sum + c / (k + 1), 0);
const product = (p: readonly number[], q: readonly number[]) => {
  const result = new Array<number>(p.length + q.length - 1).fill(0);
  p.forEach((a, i) => q.forEach((b, j) => (result[i + j]! += a * b)));
  return result;
};
const valueAtOne = (p: readonly number[]) => p.reduce((sum, c) => sum + c, 0);

describe('hand checks', () => {
  // Deflections of a cantilever under its weight and under a load at its tip, EI = 1: any beam table
  // (Timoshenko and Gere, Mechanics of Materials, appendix on deflections).
  const UNDER_WEIGHT = [0, 0, 6 / 24, -4 / 24, 1 / 24];
  const UNDER_TIP_LOAD = [0, 0, 3 / 6, -1 / 6];

  it.each([0, 0.25, 1, 5])('cantilever with %f of its mass at the tip', (tipMass) => {
    const line = aLine({ ends: ['clamped', 'free'], divisions: 60, ...(tipMass && { tipMass }) });
    const check = along(line, 'Z');
    const y = UNDER_WEIGHT.map((c, k) => c + tipMass * (UNDER_TIP_LOAD[k] ?? 0));
    const tip = valueAtOne(y);
    const rayleigh = (integral(y) + tipMass * tip) / (integral(product(y, y)) + tipMass * tip ** 2);
    // The polynomial is exact at the nodes of Hermite elements; between them the mass sees their cubics: h⁴.
    expect(omega(check.rayleigh)).toBeCloseTo(Math.sqrt(rayleigh), 6);
    expect(omega(check.fromDeflectionAtNodes!)).toBeCloseTo(1 / Math.sqrt(tip), 6);
    // Shapes at points are kept in single precision.
    expect(check.fromDeflectionAtMasses / check.fromDeflectionAtNodes!).toBeCloseTo(1, 6);
    // Dunkerley with the bare cantilever, ω 3.51602, and the mass on a massless one, ω² = 3 / M.
    const dunkerley = 1 / Math.sqrt(1 / 3.51602 ** 2 + tipMass / 3);
    expect(omega(check.dunkerley!)).toBeCloseTo(dunkerley, 4);
    expect(check.mode).toBe(1);
  });

  it('tip mass as heavy as the beam: exact 1.55730, Dunkerley 1.55375, Rayleigh above it by 0.1 %', () => {
    // Thomson, Theory of Vibration with Applications, §12.2, computed with general-purpose libraries. The table's
    // Rayleigh value 1.55812 is of the shape under the tip load alone; with the beam's weight it is 1.55846.
    const check = along(aLine({ ends: ['clamped', 'free'], divisions: 20, tipMass: 1 }), 'Z');
    expect(omega(check.dunkerley!).toFixed(5)).toBe('1.55375');
    expect(omega(check.rayleigh).toFixed(5)).toBe('1.55846');
  });

  it('one mass on a spring: all three say the same', () => {
    // Exact for one degree of freedom (common practice). Mass 1 on a beam of weight 1e-9 of it: ω² = 3 EI / L³.
    const line = aLine({ ends: ['clamped', 'free'], divisions: 4, tipMass: 1e9 });
    const check = along(line, 'Z');
    for (const hz of [check.fromDeflectionAtNodes!, check.rayleigh, check.dunkerley!]) {
      expect(omega(hz) / Math.sqrt(3e-9)).toBeCloseTo(1, 7);
    }
  });

  it('the machine frame: 61.1 Hz from nodes along X, 44.2 Hz with the mass’s own centre, 84.0 Hz along Z', () => {
    // Own scenario, computed independently with general-purpose numerical libraries.
    const stand = aStand({ divisions: 8, theory: 'bernoulli', shape: TUBE });
    const x = along(stand, 'X');
    expect(x.fromDeflectionAtNodes?.toFixed(1)).toBe('61.1');
    expect(x.fromDeflectionAtMasses.toFixed(1)).toBe('44.2');
    expect(along(stand, 'Z').rayleigh.toFixed(1)).toBe('84.0');
    // Of largest effective mass along each axis: the first sways along X, the second along Y, the third moves along Z.
    expect(checksOf(stand).axes.map(({ axis, mode }) => [axis, mode])).toEqual([
      ['X', 1],
      ['Y', 2],
      ['Z', 3],
    ]);
  });

  it('brackets the lowest frequency of the machine frame from both sides', () => {
    const stand = aStand({ divisions: 4 });
    const { modes } = solved(stand, 'consistent', { modes: 1 }).summary;
    const check = along(stand, 'X');
    expect(check.rayleigh).toBeGreaterThan(modes[0]!.frequencyHz);
    expect(check.dunkerley!).toBeLessThan(modes[0]!.frequencyHz);
  });

  it('takes a mass that turns about a node which stays where it is', () => {
    // ω² = kθ / m r², one degree of freedom: exact by all three.
    const frame = { ...aStand({ divisions: 1 }), members: [], rigidLinks: [], springs: [] };
    frame.nodes = [{ id: 'pivot', x: 0, y: 0, z: 0 }];
    frame.supports = [
      { node: 'pivot', fixed: ['u', 'v', 'w'], stiffness: { rx: 5e4, ry: 5e4, rz: 5e4 } },
    ];
    frame.masses = [{ id: 'arm', name: 'Arm', node: 'pivot', mass: 20, offset: [0, 0, 0.5] }];
    const check = along(frame, 'X');
    expect(check.fromDeflectionAtNodes).toBeNull();
    for (const hz of [check.fromDeflectionAtMasses, check.rayleigh, check.dunkerley!]) {
      expect(omega(hz)).toBeCloseTo(Math.sqrt(5e4 / (20 * 0.5 ** 2)), 9);
    }
  });

  it('says why there is none for a frame that nothing holds', () => {
    const free = aStand({ divisions: 2 });
    free.supports = [];
    const { none, axes } = checksOf(free);
    expect(none).toContain('needs a frame that is held');
    expect(axes).toEqual([]);
  });

  it('leaves out an axis along which nothing moves', () => {
    const line = aLine({ ends: ['clamped', 'free'], divisions: 4, unknowns: ['u'] });
    line.supports = [{ node: 'a', fixed: ['u'] }];
    const { axes } = checksOf(line);
    expect(axes.map(({ axis }) => axis)).toEqual(['X']);
  });

  it('names no mode where those found do not move along the axis', () => {
    // The two lowest modes of the machine frame sway along X and Y; the axis Z is the third's.
    const { axes } = checksOf(aStand({ divisions: 4 }), 2);
    expect(axes.find(({ axis }) => axis === 'Z')?.mode).toBeNull();
  });
});
