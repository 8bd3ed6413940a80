import fc from 'fast-check';
import { describe, expect, it, vi } from 'vitest';
import { aPortal, aRack, aStand } from '#tests/builders/aFrame.ts';
import type { FrameInput } from '#tests/builders/aFrame.ts';
import { aLine, omegas, solved } from './meshFreeFrames.ts';

// Each case solves many frames; a busy machine takes its time.
vi.setConfig({ testTimeout: 60_000 });

function expectRelative(values: readonly number[], expected: readonly number[], tolerance: number) {
  expected.forEach((value, i) => {
    expect(Math.abs(values[i]! / value - 1), `${values[i]} for ${value}`).toBeLessThan(tolerance);
  });
}

const hertz = (frame: FrameInput, modes: number, method?: 'consistent' | 'mesh-free') =>
  omegas(frame, { modes }, method).map((omega) => omega / (2 * Math.PI));

/** Cross of `arms` arms of 5 m, 0.125 m square, E 200 GPa, ρ 8000, outer ends pinned, in its plane. */
function pinEndedCross(arms: number): FrameInput {
  const frame = aPortal({ theory: 'bernoulli' });
  frame.unknowns = ['u', 'w', 'ry'];
  frame.materials = [{ id: 'steel', name: 'Steel', E: 200e9, nu: 0.3, density: 8000 }];
  frame.sections[0]!.shape = { kind: 'solid-rectangle', width: 0.125, height: 0.125 };
  const beam = frame.members[0]!;
  const tips = Array.from({ length: arms }, (_, i) => {
    const angle = (2 * Math.PI * i) / arms;
    return { id: `tip ${i}`, x: 5 * Math.cos(angle), z: 5 * Math.sin(angle) };
  });
  frame.nodes = [{ id: 'hub', x: 0, z: 0 }, ...tips];
  frame.members = tips.map(({ id }, i) => ({ ...beam, id: `arm ${i}`, start: 'hub', end: id }));
  frame.supports = tips.map(({ id }) => ({ node: id, fixed: ['u', 'w'] }));
  return frame;
}

describe('frames, mesh-free', () => {
  // Inextensible members, ω√(mL⁴/EI) [computed independently]; six digits. With EA L²/EI = 1e9 the axial
  // flexibility takes off less than 1e-6.
  it.each([
    ['fixed', ['u', 'w', 'ry'] as const, [3.20457, 12.64806, 20.62916, 22.37339]],
    ['pinned', ['u', 'w'] as const, [1.46293, 9.86961, 14.85553, 18.46882]],
  ])('a portal of three equal members on %s feet', (_, fixed, expected) => {
    const frame = aPortal({ theory: 'bernoulli' });
    frame.unknowns = ['u', 'w', 'ry'];
    frame.materials = [{ id: 'steel', name: 'Unit', E: 1, nu: 0.3, density: 1 }];
    // m = ρA = 1, EI = 1e-9: ω√(mL⁴/EI) = ω / √1e-9.
    frame.sections[0]!.shape = { kind: 'custom', A: 1, Iy: 1e-9, Iz: 1e-9, J: 1, ky: 1, kz: 1 };
    frame.supports = ['left foot', 'right foot'].map((node) => ({ node, fixed: [...fixed] }));
    const omega = omegas(frame, { modes: 4 }).map((value) => value / Math.sqrt(1e-9));
    // One unit in the last digit of the lowest.
    expectRelative(omega, expected, 7e-6);
  });

  it('FV1 and FV2, pin-ended crosses: every one of the repeated modes', () => {
    // NAFEMS selected benchmarks [inputs and targets from memory; second figures computed with 20 elements an arm].
    const four = hertz(pinEndedCross(4), 8);
    expectRelative(
      four,
      [11.3363, 17.6808, 17.6808, 17.7094, 45.3453, 57.0752, 57.0752, 57.3904],
      2e-5,
    );
    const eight = hertz(pinEndedCross(8), 16);
    const five = (value: number) => Array<number>(5).fill(value);
    expectRelative(
      eight,
      [11.3363, 17.6808, 17.6808, ...five(17.7094), 45.3453, 57.0752, 57.0752, ...five(57.3904)],
      2e-5,
    );
    // The modes in which the hub stays at rest are those of a clamped-pinned arm: βL = 3.92660231 (Thomson, App. D).
    const unit = Math.sqrt((200e9 * 0.125 ** 2) / 12 / 8000) / (2 * Math.PI * 25);
    expectRelative(eight.slice(3, 8), five(3.926602312 ** 2 * unit), 1e-9);
  });

  it('FV5, deep pinned beam: 42.646 ×2, 77.522, 125.000, 148.16 ×2, 232.565, 283.5 ×2', () => {
    // NAFEMS selected benchmarks [mesh-free values of Timoshenko theory from memory, five digits; J = Ip].
    const I = 2 ** 4 / 12;
    const frame = aLine({ unknowns: ['u', 'v', 'w', 'rx', 'ry', 'rz'], theory: 'timoshenko' });
    frame.materials = [{ id: 'm', name: 'Steel', E: 200e9, nu: 0.3, density: 8000 }];
    frame.sections[0]!.shape = {
      ...{ kind: 'custom', A: 4, Iy: I, Iz: I, J: 2 * I, ky: 0.85, kz: 0.85 },
    };
    frame.nodes[1]!.x = 10;
    frame.supports = [
      { node: 'a', fixed: ['u', 'v', 'w', 'rx'] },
      { node: 'b', fixed: ['v', 'w'] },
    ];
    const f = hertz(frame, 9);
    expectRelative(f, [42.646, 42.646, 77.522, 125, 148.16, 148.16, 232.565, 283.5, 283.5], 2e-4);
    // Fixed-free shaft and rod: c/4L, 3c/4L.
    expectRelative(
      [f[2]!, f[6]!],
      [1, 3].map((n) => (n * Math.sqrt(200e9 / 2.6 / 8000)) / 40),
      1e-9,
    );
    expectRelative([f[3]!], [Math.sqrt(200e9 / 8000) / 40], 1e-9);
  });

  it('the machine frame, from which eight consistent divisions are h⁴ away', () => {
    // Mesh of 8 [computed independently]; modes 1 to 5, five to six digits.
    const stand = aStand({ theory: 'bernoulli', divisions: 8 });
    const exact = hertz(stand, 5);
    expectRelative(exact, [47.212, 54.198, 83.712, 121.161, 139.439], 2e-5);
    const error = (divisions: number) => {
      const meshed = hertz(aStand({ theory: 'bernoulli', divisions }), 3, 'consistent');
      return meshed.map((value, i) => value / exact[i]! - 1);
    };
    // Halving h divides the error of bending by 16; axial flexibility (h²) of the stiff legs takes a little off that.
    const [coarse, fine] = [error(2), error(4)];
    coarse.forEach((value, i) => {
      expect(fine[i]).toBeGreaterThan(0);
      expect(value / fine[i]!).toBeGreaterThan(3.5);
      expect(value / fine[i]!).toBeLessThan(16.5);
    });
  });

  it('two double modes 0.6 % apart, above which the first estimates err by as much', () => {
    // Refined one by one, both pairs can end at the upper one, and then the count alone is none the wiser.
    const rack = (divisions: number) =>
      aRack({ bays: 2, storeys: 3, bay: 1.1, storey: 0.9, divisions });
    const exact = hertz(rack(1), 14);
    const fine = hertz(rack(12), 14, 'consistent');
    // Bending at 12 divisions is a few 1e-6 away, stretching and twisting (h²) some 1e-4.
    expectRelative(fine, exact, 2e-4);
    fine.forEach((value, i) => expect(value).toBeGreaterThan(exact[i]! * (1 - 1e-9)));
    expect(exact[12]! / exact[11]! - 1).toBeGreaterThan(5e-3);
  });

  it('modes in which no joint moves', () => {
    // Every node of a triangle fixed: three clamped-clamped beams and nothing else, βL = 4.73004074, 7.85320462
    // (Thomson, App. D), each in two planes; L 1 twice, √2 once.
    const frame = aPortal({ theory: 'bernoulli', divisions: 4 });
    frame.nodes = frame.nodes.slice(0, 3);
    frame.members = frame.members.slice(0, 2);
    frame.members.push({ ...frame.members[0]!, id: 'brace', end: 'right corner' });
    const all = ['u', 'v', 'w', 'rx', 'ry', 'rz'] as const;
    frame.supports = frame.nodes.map(({ id }) => ({ node: id, fixed: [...all] }));
    frame.sections[0]!.shape = {
      kind: 'custom',
      A: 2e-3,
      Iy: 1e-6,
      Iz: 1e-6,
      J: 2e-6,
      ky: 1,
      kz: 1,
    };
    const { summary, shapes } = solved(frame, { modes: 8 });
    expect(summary.freeDof).toBe(0);
    expect(summary.complete).toBe(true);
    const unit = Math.sqrt((210e9 * 1e-6) / (7850 * 2e-3)) / (2 * Math.PI);
    const [one, two] = [4.730040745 ** 2 * unit, 7.853204624 ** 2 * unit];
    const expected = [one / 2, one / 2, one, one, one, one, two / 2, two / 2];
    expectRelative(
      summary.modes.map((mode) => mode.frequencyHz),
      expected,
      1e-9,
    );
    for (const mode of summary.modes) {
      const shares = [...mode.strainShares.members, ...mode.strainShares.joints];
      expect(shares.reduce((sum, { share }) => sum + share, 0)).toBeCloseTo(1, 12);
    }
    // Joints at rest, middles not.
    const nodesMove = shapes.shapes.subarray(0, shapes.nodes.length * 6).some((v) => v !== 0);
    expect(nodesMove).toBe(false);
    const middle = shapes.members[2]!.first + 2;
    const moved = Math.hypot(...shapes.shapes.subarray(middle * 6, middle * 6 + 3));
    // φᵀMφ = 1 in the clamped-clamped shape: the middle moves by 1.588/√(mL) (Thomson, App. D; [M]).
    expect(moved).toBeCloseTo(1.588 / Math.sqrt(7850 * 2e-3 * Math.SQRT2), 3);
  });

  it('all up to a frequency, rigid modes alone, and effective mass that adds up', () => {
    const free = aLine();
    const upTo = solved(free, { upToHz: 4 }).summary;
    expect(upTo.modes.map((mode) => mode.frequencyHz > 0)).toEqual([false, false, true]);
    const rigid = solved(free, { modes: 2 }).summary;
    expect(rigid.complete).toBe(true);
    expect(rigid.count).toMatchObject({ below: 2, found: 2, returned: 2 });
    // Effective masses of a cantilever's rod: 8/π²(2n − 1)² of the whole; they miss 4/π²N of it after N modes.
    const rod = solved(aLine({ unknowns: ['u'], start: ['u'] }), { modes: 100 }).summary;
    expect(rod.effectiveMass.attainable[0]).toBeCloseTo(1, 12);
    expect(rod.effectiveMass.sum[0]).toBeCloseTo(1 - 4 / Math.PI ** 2 / 100 / 2, 5);
    expect(rod.modes[0]!.effectiveMass[0]).toBeCloseTo(8 / Math.PI ** 2, 9);
  });
});

describe('random frames, mesh-free', () => {
  const arbitraryFrame = fc
    .record({
      width: fc.double({ min: 0.3, max: 3, noNaN: true }),
      height: fc.double({ min: 0.3, max: 3, noNaN: true }),
      mass: fc.double({ min: 0.1, max: 200, noNaN: true }),
      foot: fc.double({ min: 3, max: 9, noNaN: true }),
      free: fc.boolean(),
    })
    .map(({ width, height, mass, foot, free }) => (divisions: number): FrameInput => {
      const frame = aPortal({ theory: 'bernoulli', width, height, divisions });
      frame.masses = [{ id: 'm', name: 'Load', node: 'left corner', mass, offset: [0, 0.1, 0.2] }];
      if (free) frame.supports = [];
      else
        frame.supports[0] = {
          node: 'left foot',
          fixed: ['u', 'v', 'w'],
          stiffness: { rx: 10 ** foot, ry: 1, rz: 1 },
        };
      return frame;
    });

  it('consistent mass comes down on it as the mesh is refined (Rayleigh-Ritz)', () => {
    fc.assert(
      fc.property(arbitraryFrame, (frameOf) => {
        const modes = 9;
        const [exact, coarse, fine] = [
          hertz(frameOf(1), modes),
          hertz(frameOf(2), modes, 'consistent'),
          hertz(frameOf(8), modes, 'consistent'),
        ];
        exact.forEach((value, i) => {
          // 1e-9: the promise of either method.
          expect(value).toBeLessThanOrEqual(fine[i]! * (1 + 1e-9));
          expect(fine[i]).toBeLessThanOrEqual(coarse[i]! * (1 + 1e-9));
          // φ⁴/1440 of bending and φ²/24 of stretching and twisting stay under 1 % at 8 divisions here.
          if (value > 0) expect(fine[i]! / value).toBeLessThan(1.01);
        });
      }),
      { seed: 1971, numRuns: 15 },
    );
  });

  it('counts never fall as the frequency rises, and agree with the modes found', () => {
    fc.assert(
      fc.property(arbitraryFrame, fc.integer({ min: 1, max: 20 }), (frameOf, modes) => {
        const { summary } = solved(frameOf(1), { modes });
        expect(summary.complete).toBe(true);
        expect(summary.count.below).toBe(summary.count.found);
        const all = solved(frameOf(1), { upToHz: summary.count.shiftHz }).summary;
        expect(all.modes.length).toBe(summary.count.below);
      }),
      { seed: 1971, numRuns: 15 },
    );
  });
});
