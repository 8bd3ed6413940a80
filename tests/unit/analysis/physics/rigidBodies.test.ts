import { describe, expect, it } from 'vitest';
import type { Vector3 } from '#shared/schemas/frameDocument.ts';
import { aCantilever, aStand, squareTube100x5 } from '#tests/builders/aFrame.ts';
import { frequencies, solved, worstError } from '#tests/builders/aLine.ts';

const METHODS = ['consistent', 'lumped'] as const;
/** Two models of one and the same thing differ by rounding alone. */
const SAME = 1e-9;

/** Point masses that share no plane of symmetry: [kg, m from the tip]. */
const POINTS: readonly (readonly [number, Vector3])[] = [
  [20, [0.1, 0.2, 0.3]],
  [35, [-0.2, 0.1, 0.15]],
  [10, [0.3, -0.25, 0.4]],
  [25, [0.05, 0.3, -0.2]],
];

function bodyOf(points: typeof POINTS) {
  const mass = points.reduce((sum, [m]) => sum + m, 0);
  const centre = [0, 1, 2].map((k) => points.reduce((sum, [m, r]) => sum + m * r[k]!, 0) / mass);
  const second = (i: number, j: number) =>
    points.reduce((sum, [m, r]) => sum + m * (r[i]! - centre[i]!) * (r[j]! - centre[j]!), 0);
  return {
    mass,
    offset: centre as Vector3,
    // Elements of the tensor: products enter as −∫xy dm.
    inertia: {
      Ixx: second(1, 1) + second(2, 2),
      Iyy: second(0, 0) + second(2, 2),
      Izz: second(0, 0) + second(1, 1),
      Ixy: -second(0, 1),
      Ixz: -second(0, 2),
      Iyz: -second(1, 2),
    },
  };
}

describe.each(METHODS)('a rigid body (%s)', (method) => {
  const plain = () => aCantilever({ length: 1.5 });

  function asOneMass() {
    const frame = plain();
    frame.masses = [{ id: 'body', name: 'Body', node: 'tip', ...bodyOf(POINTS) }];
    return frame;
  }

  it('is the same as one mass with inertia, as offset masses, and as linked nodes', () => {
    const expected = frequencies(asOneMass(), method, { modes: 10 });

    const offsets = plain();
    offsets.masses = POINTS.map(([mass, offset], i) => ({
      id: `m${i}`,
      name: 'Part',
      node: 'tip',
      mass,
      offset,
    }));
    expect(worstError(frequencies(offsets, method, { modes: 10 }), expected)).toBeLessThan(SAME);

    const linked = plain();
    POINTS.forEach(([mass, [x, y, z]], i) => {
      linked.nodes.push({ id: `p${i}`, x: 1.5 + x, y, z });
      linked.masses.push({ id: `m${i}`, name: 'Part', node: `p${i}`, mass });
    });
    // A chain of links, joined by their followers, in no order.
    linked.rigidLinks = [
      { id: 'link 1', main: 'p0', others: ['p1'] },
      { id: 'link 2', main: 'p2', others: ['p3', 'p1'] },
      { id: 'link 3', main: 'p3', others: ['tip'] },
    ];
    expect(worstError(frequencies(linked, method, { modes: 10 }), expected)).toBeLessThan(SAME);
  });

  it('cares for the sign of a product of inertia', () => {
    const frame = asOneMass();
    const { inertia } = frame.masses[0]!;
    frame.masses[0]!.inertia = { ...inertia!, Ixy: -inertia!.Ixy! };
    const other = frequencies(frame, method, { modes: 10 });
    expect(worstError(other, frequencies(asOneMass(), method, { modes: 10 }))).toBeGreaterThan(
      1e-3,
    );
  });

  it('may be reached by a member’s arm instead of by an offset', () => {
    const arm = asOneMass();
    arm.nodes[1] = { id: 'tip', x: 1.7, y: 0.1, z: -0.2 };
    arm.members[0]!.endArm = [-0.2, -0.1, 0.2];
    const [x, y, z] = arm.masses[0]!.offset!;
    arm.masses[0]!.offset = [x - 0.2, y - 0.1, z + 0.2];
    const expected = frequencies(asOneMass(), method, { modes: 10 });
    expect(worstError(frequencies(arm, method, { modes: 10 }), expected)).toBeLessThan(SAME);
  });

  it('takes arms from linked nodes for the same', () => {
    const armed = aStand({ divisions: 2, shape: squareTube100x5() });
    const linked = structuredClone(armed);
    // Leg 1 ends 0.05 m below the corner and 0.03 m beside it, once by an arm and once by a linked node.
    armed.members[0]!.endArm = [0.03, 0, -0.05];
    linked.nodes.push({ id: 'head', x: 0.03, y: 0, z: 0.75 });
    linked.members[0]!.end = 'head';
    linked.rigidLinks = [{ id: 'plate', main: 'front left corner', others: ['head'] }];
    expect(worstError(frequencies(linked, method), frequencies(armed, method))).toBeLessThan(SAME);
  });
});

describe('rigid motion', () => {
  it.each([1, 2, 3, 4, 5, 6, 7, 8])('%i separate free frames have six each', (count) => {
    for (const method of METHODS) {
      const frame = aCantilever({ divisions: 2 });
      frame.nodes = [];
      frame.members = [];
      frame.supports = [];
      const beam = aCantilever({ divisions: 2 }).members[0]!;
      for (let i = 0; i < count; i++) {
        const at = 3 * i;
        frame.nodes.push(
          { id: `a${i}`, x: at, y: 0, z: 0 },
          { id: `b${i}`, x: at + 1, y: 0.2, z: 0.1 },
          { id: `c${i}`, x: at + 1, y: 0.5, z: 0.9 },
        );
        frame.members.push(
          { ...beam, id: `p${i}`, start: `a${i}`, end: `b${i}` },
          { ...beam, id: `q${i}`, start: `b${i}`, end: `c${i}` },
        );
      }
      const { summary } = solved(frame, method, { modes: 6 * count + 1 });
      expect(summary.rigidBodyModes).toBe(6 * count);
      const hz = summary.modes.map((mode) => mode.frequencyHz);
      expect(hz.slice(0, 6 * count)).toEqual(new Array(6 * count).fill(0));
      expect(hz[6 * count]).toBeGreaterThan(10);
    }
  });
});

describe('effective mass of one element by hand', () => {
  // A rod about its centre, mL²/12 + ρIL; with half its mass at each end, mL²/4.
  it.each([
    ['consistent', 1 / 12, 1],
    ['lumped', 1 / 4, 0],
  ] as const)('%s: moments of inertia, which rigid modes take up whole', (method, share, own) => {
    const [L, d, rho] = [1.4, 0.08, 7850];
    const frame = aCantilever({
      length: L,
      divisions: 1,
      shape: { kind: 'solid-round', diameter: d },
    });
    frame.supports = [];
    const { summary } = solved(frame, method, { modes: 6 });
    const m = rho * (Math.PI / 4) * d ** 2 * L;
    const I = (Math.PI / 64) * d ** 4;
    const across = share * m * L * L + own * rho * I * L;
    const expected = [m, m, m, 2 * rho * I * L, across, across];
    const { total, sum } = summary.effectiveMass;
    // Spinning about its own axis, a round rod of lumped mass keeps ρ(Iy + Iz)L.
    expect(worstError(total, expected)).toBeLessThan(1e-12);
    expect(worstError(sum, expected)).toBeLessThan(SAME);
  });

  /** A bar of 1 kg, fixed at one end: consistent (½)²/(⅓) = ¾ can be reached, lumped ½. */
  it.each([
    ['consistent', 0.75],
    ['lumped', 0.5],
  ] as const)('%s: %f kg', (method, reached) => {
    const frame = aCantilever({ divisions: 1, shape: { kind: 'solid-round', diameter: 0.05 } });
    frame.unknowns = ['u'];
    frame.supports = [{ node: 'root', fixed: ['u'] }];
    frame.materials[0]!.density = 1 / ((Math.PI / 4) * 0.05 ** 2);
    const { summary } = solved(frame, method, { modes: 1 });
    const { sum, attainable, total, onFixed } = summary.effectiveMass;
    expect([sum[0], attainable[0], total[0], onFixed[0]]).toEqual(
      [reached, reached, 1, 1 - reached].map((kg) => expect.closeTo(kg, 12) as number),
    );
    expect([sum[1], attainable[1], total[1]]).toEqual([0, 0, 0]);
  });
});
