import { describe, expect, it } from 'vitest';
import { DISPLACEMENTS } from '#shared/schemas/frameDocument.ts';
import type { Displacement } from '#shared/schemas/frameDocument.ts';
import { aCantilever, aPortal, aRack, aStand } from '#tests/builders/aFrame.ts';
import type { FrameInput } from '#tests/builders/aFrame.ts';
import { solveFrame } from '#shared/analysis/solveFrame.ts';
import { accepted, aLine, frequencies, omegas, solved, worstError } from '#tests/builders/aLine.ts';

const METHODS = ['consistent', 'lumped'] as const;
const SAME = 1e-9;
const ANGULAR = { kind: 'solid-rectangle', width: 0.03, height: 0.07 } as const;

describe.each(METHODS)('reduced sets of unknowns (%s)', (method) => {
  /** The same frame in all six unknowns, with what the set leaves out fixed at every node. */
  function inSpace(frame: FrameInput, absent: readonly Displacement[]) {
    const supports = frame.nodes.map(({ id }) => {
      const own = frame.supports.find(({ node }) => node === id);
      return { ...own, node: id, fixed: [...new Set([...(own?.fixed ?? []), ...absent])] };
    });
    return { ...frame, unknowns: [...DISPLACEMENTS], supports };
  }

  it.each([0, Math.PI / 2, Math.PI])('u w ry is the frame held in its plane, roll %f', (roll) => {
    const frame = aPortal({ divisions: 1, shape: ANGULAR, width: 1.3 });
    frame.unknowns = ['u', 'w', 'ry'];
    frame.supports = [
      { node: 'left foot', fixed: ['u', 'w', 'ry'] },
      { node: 'right foot', fixed: ['w'], stiffness: { u: 2e6, ry: 3e4 } },
    ];
    const about = roll === Math.PI / 2 ? 'rz' : 'ry';
    frame.members = frame.members.map((member) => ({ ...member, roll }));
    frame.members[1] = {
      ...frame.members[1]!,
      joints: { start: { [about]: 2e4 } },
      endArm: [-0.05, 0, 0.04],
    };
    frame.masses = [
      {
        id: 'motor',
        name: 'Motor',
        node: 'right corner',
        mass: 20,
        offset: [0.1, 0, 0.2],
        inertia: { Ixx: 1, Iyy: 2, Izz: 2 },
      },
    ];
    const plane = frequencies(frame, method, { modes: 8 });
    const space = frequencies(inSpace(frame, ['v', 'rx', 'rz']), method, { modes: 8 });
    expect(plane).toHaveLength(space.length);
    expect(worstError(plane, space)).toBeLessThan(SAME);
  });

  it('ignores joints and supports on what it leaves out', () => {
    const plain = aPortal({ divisions: 2, shape: ANGULAR });
    plain.unknowns = ['u', 'w', 'ry'];
    plain.supports = ['left foot', 'right foot'].map((node) => ({ node, fixed: ['u', 'w', 'ry'] }));
    const more = structuredClone(plain);
    more.members[1]!.joints = { start: { v: 0, rx: 0, rz: 1e3 }, end: { rx: 0 } };
    more.supports[0] = { ...more.supports[0]!, stiffness: { v: 1e5, rx: 1 } };
    const [before, after] = [plain, more].map((frame) => solved(frame, method).summary);
    expect(after!.freeDof).toBe(before!.freeDof);
    const hz = [before!, after!].map(({ modes }) => modes.map((mode) => mode.frequencyHz));
    expect(worstError(hz[1]!, hz[0]!)).toBeLessThan(SAME);
  });

  it('w ry is bending alone, and u stretch alone', () => {
    const line = (unknowns: FrameInput['unknowns']) => {
      const frame = aCantilever({ divisions: 1, shape: ANGULAR });
      if (unknowns) frame.unknowns = unknowns;
      frame.nodes.push({ id: 'on', x: 1.7, y: 0, z: 0 });
      frame.members.push({ ...frame.members[0]!, id: 'second', start: 'tip', end: 'on' });
      frame.supports = [{ node: 'root', fixed: [...(unknowns ?? [])] }];
      return frame;
    };
    const bending = line(['w', 'ry']);
    expect(
      worstError(
        frequencies(bending, method),
        frequencies(inSpace(bending, ['u', 'v', 'rx', 'rz']), method),
      ),
    ).toBeLessThan(SAME);
    const stretch = line(['u']);
    expect(
      worstError(
        frequencies(stretch, method),
        frequencies(inSpace(stretch, ['v', 'w', 'rx', 'ry', 'rz']), method),
      ),
    ).toBeLessThan(SAME);
  });
});

describe('operating states', () => {
  function stand(): FrameInput {
    const frame = aStand({ divisions: 2 });
    frame.supports = frame.supports.map(({ node }, i) => ({
      node,
      fixed: ['u', 'v'],
      stiffness: { w: 1e7, rx: 1e5, ry: 1e5, rz: 1e5 },
      ...(i === 1 && { bracket: { soft: 0.25, stiff: 8 } }),
    }));
    frame.masses.push({ id: 'tank', name: 'Tank', node: 'front middle', mass: 60 });
    frame.states = [
      { id: 'empty', name: 'Empty', masses: { tank: { present: false } } },
      { id: 'half', name: 'Half full', masses: { tank: { mass: 30 } } },
      {
        id: 'left',
        name: 'Carriage left',
        masses: { motor: { node: 'front middle', offset: [0.1, 0, 0.4] } },
      },
      { id: 'soft', name: 'Soft feet', supports: 'soft' },
      {
        id: 'mixed',
        name: 'Mixed feet',
        supports: { 'front left foot': 'soft', 'front right foot': 'stiff' },
      },
    ];
    return frame;
  }

  /** The same change made by hand to the document as drawn. */
  const BY_HAND: Record<string, (frame: FrameInput) => void> = {
    empty: (frame) => frame.masses.pop(),
    half: (frame) => (frame.masses[1]!.mass = 30),
    left: (frame) => {
      frame.masses[0] = { ...frame.masses[0]!, node: 'front middle', offset: [0.1, 0, 0.4] };
    },
    soft: (frame) => frame.supports.forEach((_, i) => multiply(frame, i, i === 1 ? 0.25 : 0.5)),
    mixed: (frame) => {
      multiply(frame, 0, 0.5);
      multiply(frame, 1, 8);
    },
  };
  function multiply(frame: FrameInput, i: number, factor: number): void {
    const { w, rx, ry, rz } = frame.supports[i]!.stiffness!;
    frame.supports[i] = {
      ...frame.supports[i]!,
      stiffness: { w: w! * factor, rx: rx! * factor, ry: ry! * factor, rz: rz! * factor },
    };
  }

  it.each(Object.keys(BY_HAND))('“%s” solves what its words say', (state) => {
    const drawn = stand();
    const before = solved(drawn).summary.modes.map((mode) => mode.frequencyHz);
    drawn.states = [];
    BY_HAND[state]!(drawn);
    const expected = solved(drawn).summary;
    const { summary } = solved(stand(), 'consistent', { modes: 8 }, state);
    expect(summary.stateId).toBe(state);
    expect(summary.totalMassKg).toBe(expected.totalMassKg);
    const hz = summary.modes.map((mode) => mode.frequencyHz);
    expect(hz).toEqual(expected.modes.map((mode) => mode.frequencyHz));
    expect(worstError(hz, before)).toBeGreaterThan(1e-3);
  });
});

describe('automatic divisions up to a frequency', () => {
  // Thomson, Appendix D: the first five roots of a clamped-clamped and of a cantilever beam.
  const ROOTS = {
    clamped: [4.73004074, 7.85320462, 10.99560784, 14.13716549, 17.27875966],
    free: [1.87510407, 4.69409113, 7.85475744, 10.99554073, 14.13716839],
  };

  // Half a radian of the shortest wave per element: φ⁴/1440 = 4e-5, where an end is free lumped φ²/24 = 1e-2.
  it.each([
    ['clamped', 'consistent', 5e-5],
    ['free', 'consistent', 5e-5],
    ['clamped', 'lumped', 1e-4],
    ['free', 'lumped', 1e-2],
  ] as const)('resolve every mode, %s end, %s', (end, method, within) => {
    const line = aLine({ ends: ['clamped', end], divisions: 1 });
    line.members[0]!.divisions = 'auto';
    // Slender, so that bending is the shortest wave; EI stays 1.
    line.materials[0]!.E = 1e4;
    line.sections[0]!.shape = {
      kind: 'custom',
      A: 1,
      Iy: 1e-4,
      Iz: 1e-4,
      J: 2e-4,
      ky: 1,
      kz: 1,
    };
    const exact = ROOTS[end].map((root) => root ** 2);
    const highest = (1.02 * exact[4]!) / (2 * Math.PI);
    const found = omegas(line, method, { upToHz: highest });
    expect(found).toHaveLength(5);
    expect(worstError(found, exact)).toBeLessThan(within);
  });

  it.each([
    ['consistent', 5e-5],
    ['lumped', 1e-2],
  ] as const)('resolve as many modes as are asked for, %s', (method, within) => {
    const line = aLine({ ends: ['clamped', 'free'], divisions: 1 });
    line.members[0]!.divisions = 'auto';
    line.materials[0]!.E = 1e4;
    line.sections[0]!.shape = { kind: 'custom', A: 1, Iy: 1e-4, Iz: 1e-4, J: 2e-4, ky: 1, kz: 1 };
    const found = omegas(line, method, { modes: 5 });
    expect(
      worstError(
        found,
        ROOTS.free.map((root) => root ** 2),
      ),
    ).toBeLessThan(within);
  });

  it('report progress that never falls while they are sought', () => {
    const line = aLine({ ends: ['clamped', 'free'], divisions: 1 });
    line.members[0]!.divisions = 'auto';
    const seen: number[] = [];
    solveFrame(
      { document: accepted(line), method: 'consistent', stateId: null, settings: { modes: 8 } },
      { onProgress: (fraction) => seen.push(fraction) },
    );
    expect(seen).toEqual(seen.toSorted((a, b) => a - b));
    expect(seen.at(-1)).toBe(1);
  });
});

describe('digits', () => {
  it.each([1, 1e5])(
    'claimed hold when a tower’s parts are listed in another order, ×%f',
    (ratio) => {
      const tower = aRack({ bays: 1, storeys: 24, bay: 0.5, storey: 0.8, divisions: 1 });
      // Every third member is of a material stiffer by the ratio.
      tower.materials[0]!.E = 1e10;
      tower.materials.push({ ...tower.materials[0]!, id: 'hard', E: 1e10 * ratio });
      tower.members.forEach((member, i) => {
        if (i % 3 === 0) member.material = 'hard';
      });
      const shuffled = structuredClone(tower);
      const backwards = (id: string) => id.split('').reverse().join('');
      shuffled.nodes.sort((a, b) => backwards(a.id).localeCompare(backwards(b.id)));
      shuffled.members.reverse();
      for (const method of METHODS) {
        const [one, other] = [tower, shuffled].map(
          (frame) => solved(frame, method, { modes: 6 }).summary.modes,
        );
        one!.forEach((mode, i) => {
          const digits = Math.min(mode.digits, other![i]!.digits);
          expect(digits).toBeGreaterThanOrEqual(6);
          const difference = Math.abs(mode.frequencyHz / other![i]!.frequencyHz - 1);
          expect(difference).toBeLessThan(0.5 * 10 ** -(digits - 1));
        });
      }
    },
  );
});
