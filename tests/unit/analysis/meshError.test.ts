import { describe, expect, it } from 'vitest';
import { aStand } from '#tests/builders/aFrame.ts';
import type { FrameInput } from '#tests/builders/aFrame.ts';
import { aLine, frequencies, omegas, worstError } from '#tests/builders/aLine.ts';
import type { End } from '#tests/builders/aLine.ts';

const METHODS = ['consistent', 'lumped'] as const;
const THREE = { modes: 3 } as const;

function stretched(divisions: number): FrameInput {
  const line = aLine({ ends: ['clamped', 'free'], divisions, unknowns: ['u'] });
  line.supports = [{ node: 'a', fixed: ['u'] }];
  return line;
}

/** A shaft with J = 2, G = ½, Ip = 200, so that c = √(GJ/ρIp) = √(1/200); bending lies far above. */
function twisted(divisions: number): FrameInput {
  const all = ['u', 'v', 'w', 'rx', 'ry', 'rz'] as const;
  const line = aLine({ ends: ['free', 'free'], divisions, unknowns: [...all] });
  line.supports = [{ node: 'a', fixed: [...all] }];
  line.sections[0]!.shape = { kind: 'custom', A: 1, Iy: 100, Iz: 100, J: 2, ky: 1, kz: 1 };
  return line;
}

/**
 * Exact discrete dispersion of a chain of equal elements, φ = βh, computed by hand from the element matrices (for
 * bars it is in Bathe, Finite Element Procedures, §9.3). Tolerances 1e-11: rounding of small solves.
 */
describe('what a mesh does', () => {
  it.each([4, 9, 16])('stretch and twist of %i elements follow the dispersion', (divisions) => {
    const h = 1 / divisions;
    const phi = [1, 2, 3].map((n) => ((2 * n - 1) * Math.PI) / (2 * divisions));
    const expected = {
      lumped: phi.map((p) => (2 / h) * Math.sin(p / 2)),
      consistent: phi.map((p) => Math.sqrt((6 / h ** 2) * ((1 - Math.cos(p)) / (2 + Math.cos(p))))),
    };
    for (const method of METHODS) {
      expect(
        worstError(omegas(stretched(divisions), method, THREE), expected[method]),
      ).toBeLessThan(1e-11);
      const twist = omegas(twisted(divisions), method, THREE).map(
        (omega) => omega * Math.sqrt(200),
      );
      expect(worstError(twist, expected[method])).toBeLessThan(1e-11);
    }
  });

  it('four elements of a bar: −0.6413 % lumped, +0.6437 % consistent', () => {
    const error = METHODS.map((method) => {
      const [omega] = omegas(stretched(4), method, { modes: 1 });
      return (100 * (omega! / (Math.PI / 2) - 1)).toFixed(4);
    });
    expect(error).toEqual(['0.6437', '-0.6413']);
  });

  it.each([4, 9, 16])(
    'lumped bending of %i pinned elements follows the dispersion',
    (divisions) => {
      const line = aLine({ ends: ['pinned', 'pinned'], divisions });
      const expected = [1, 2, 3].map((n) => {
        const cos = Math.cos((n * Math.PI) / divisions);
        return Math.sqrt(12 * divisions ** 4 * ((1 - cos) ** 2 / (2 + cos)));
      });
      expect(worstError(omegas(line, 'lumped', THREE), expected)).toBeLessThan(1e-11);
    },
  );

  it.each([8, 16, 32])('leading errors of %i elements have the sign and size of theory', (N) => {
    const pinned = aLine({ ends: ['pinned', 'pinned'], divisions: N });
    for (const method of METHODS) {
      const sign = method === 'consistent' ? 1 : -1;
      const [bar] = omegas(stretched(N), method, { modes: 1 });
      const [beam] = omegas(pinned, method, { modes: 1 });
      const phi = Math.PI / N;
      // The next term is φ²/100 of the leading one or less.
      expect((bar! / (Math.PI / 2) - 1) / ((sign * (phi / 2) ** 2) / 24)).toBeCloseTo(1, 1);
      expect((beam! / Math.PI ** 2 - 1) / ((sign * phi ** 4) / 1440)).toBeCloseTo(1, 1);
    }
  });
});

describe('what a comparison of consistent and lumped may say', () => {
  it('consistent mass is an upper bound of the same continuous frame, and falls as the mesh is halved', () => {
    const exact = [1.87510407, 4.69409113, 7.85475744].map((root) => root ** 2);
    let before = [Infinity, Infinity, Infinity];
    for (const divisions of [2, 4, 8, 16]) {
      const line = aLine({ ends: ['clamped', 'free'], divisions });
      const found = omegas(line, 'consistent', THREE);
      found.forEach((omega, i) => {
        expect(omega).toBeGreaterThan(exact[i]!);
        expect(omega).toBeLessThan(before[i]!);
      });
      before = found;
    }
  });

  it('lumped mass is no lower bound: mode 3 of the machine frame comes from above', () => {
    const shape = {
      kind: 'custom',
      A: 18.356e-4,
      Iy: 271.1e-8,
      Iz: 271.1e-8,
      J: 440.52e-8,
      ky: 0.436,
      kz: 0.436,
    } as const;
    const third = (divisions: number, method: (typeof METHODS)[number]) =>
      frequencies(aStand({ divisions, theory: 'bernoulli', shape }), method, THREE)[2]!;
    // 83.712 Hz: eight divisions and twice as many agree in five digits.
    const limit = third(16, 'consistent');
    expect(limit).toBeCloseTo(83.712, 3);
    for (const divisions of [1, 2, 8]) expect(third(divisions, 'lumped')).toBeGreaterThan(limit);
  });

  it.each<[End, End, number, number, number]>([
    ['clamped', 'free', 0, 1.87510407, 2],
    ['free', 'free', 2, 4.73004074, 2],
    ['pinned', 'pinned', 0, Math.PI, 4],
    ['clamped', 'clamped', 0, 4.73004074, 4],
    ['clamped', 'guided', 0, 2.36502037, 4],
  ])('lumped bending, %s-%s: the order of its error', (start, end, rigid, root, order) => {
    const [coarse, fine] = [8, 16].map((divisions) => {
      const line = aLine({ ends: [start, end], divisions });
      return omegas(line, 'lumped', { modes: rigid + 1 })[rigid]! / root ** 2 - 1;
    });
    // h² where an end is free, h⁴ elsewhere; the next power leaves up to 0.3 of the order here.
    expect(Math.abs(Math.log2(coarse! / fine!) - order)).toBeLessThan(0.35);
  });
});
