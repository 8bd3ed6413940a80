import { describe, expect, it } from 'vitest';
import type { Vector3 } from '#shared/schemas/frameDocument.ts';
import { aCantilever, aStand } from '#tests/builders/aFrame.ts';
import type { FrameInput } from '#tests/builders/aFrame.ts';
import { frequencies, solved, worstError } from '#tests/builders/aLine.ts';

const METHODS = ['consistent', 'lumped'] as const;
const SAME = 1e-9;
const ROUND = { kind: 'round-tube', diameter: 0.06, wall: 0.004 } as const;
const EI = (210e9 * Math.PI * (0.06 ** 4 - 0.052 ** 4)) / 64;

describe('joints act in member axes', () => {
  const bare = () => aCantilever({ shape: ROUND, theory: 'bernoulli', divisions: 8 });

  // kθL/EI = 5: f/f_clamped = 0.743, computed from the frequency equation.
  it.each<[string, Vector3, number, 'ry' | 'rz', string]>([
    ['along X, ry', [1, 0, 0], 0, 'ry', 'Z'],
    ['along X, rz', [1, 0, 0], 0, 'rz', 'Y'],
    ['along Y, ry', [0, 1, 0], 0, 'ry', 'Z'],
    ['along Y, rz', [0, 1, 0], 0, 'rz', 'X'],
    ['upwards, ry', [0, 0, 1], 0, 'ry', 'X'],
    ['upwards, rz', [0, 0, 1], 0, 'rz', 'Y'],
    ['along X rolled a quarter, ry', [1, 0, 0], Math.PI / 2, 'ry', 'Y'],
    ['along X rolled a quarter, rz', [1, 0, 0], Math.PI / 2, 'rz', 'Z'],
  ])('%s', (_, [x, y, z], roll, rotation, swings) => {
    const clamped = frequencies(bare(), 'consistent', { modes: 1 })[0]!;
    const frame = bare();
    frame.nodes[1] = { id: 'tip', x, y, z };
    frame.members[0] = {
      ...frame.members[0]!,
      roll,
      joints: { start: { [rotation]: 5 * EI } },
    };
    const { modes } = solved(frame, 'consistent', { modes: 2 }).summary;
    expect(modes[0]!.frequencyHz / clamped).toBeCloseTo(0.743, 3);
    expect(modes[0]!.name).toContain(`along ${swings}`);
    expect(modes[1]!.frequencyHz / clamped).toBeCloseTo(1, 6);
    expect(modes[0]!.strainShares.joints.map(({ id }) => id)).toEqual(['arm start']);
  });

  it.each(METHODS)('a joint lies behind the arm: the arm stays with the node (%s)', (method) => {
    const frame = bare();
    frame.nodes[0] = { id: 'root', x: -0.3, y: 0.2, z: 0.1 };
    frame.members[0] = {
      ...frame.members[0]!,
      startArm: [0.3, -0.2, -0.1],
      joints: { start: { rx: 4e3, ry: 2e4, w: 3e6 } },
    };
    const direct = bare();
    direct.members[0] = {
      ...direct.members[0]!,
      joints: { start: { rx: 4e3, ry: 2e4, w: 3e6 } },
    };
    expect(worstError(frequencies(frame, method), frequencies(direct, method))).toBeLessThan(SAME);
  });

  it.each(METHODS)('a joint at a clamped root is a support of its stiffness (%s)', (method) => {
    const joint = bare();
    const stiffness = { u: 4e7, v: 2e6, w: 3e6, rx: 4e3, ry: 2e4, rz: 7e3 };
    joint.members[0] = { ...joint.members[0]!, joints: { start: stiffness } };
    const support = bare();
    support.supports = [{ node: 'root', fixed: [], stiffness }];
    expect(worstError(frequencies(joint, method), frequencies(support, method))).toBeLessThan(SAME);
  });
});

type Matrix = readonly [Vector3, Vector3, Vector3];

/** Rotation about a unit axis (Rodrigues). */
function rotation([x, y, z]: Vector3, angle: number): Matrix {
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  const t = 1 - c;
  return [
    [t * x * x + c, t * x * y - s * z, t * x * z + s * y],
    [t * x * y + s * z, t * y * y + c, t * y * z - s * x],
    [t * x * z - s * y, t * y * z + s * x, t * z * z + c],
  ];
}
const turned = (R: Matrix, v: Vector3): Vector3 =>
  R.map((row) => row[0] * v[0] + row[1] * v[1] + row[2] * v[2]) as unknown as Vector3;

/** Section alike in every direction, so that a roll does not show; feet stiff in three unlike ways. */
function sprungStand(): FrameInput {
  const frame = aStand({ divisions: 2, shape: ROUND });
  frame.supports = frame.supports.map(({ node }, i) => ({
    node,
    fixed: i === 0 ? ['w', 'ry'] : ['w'],
    stiffness: { u: 2e5, v: 3e6, rx: 1e3, ...(i > 0 && { ry: 4e4 }) },
    axes: { x: [1, 0, 0], z: [0, 0, 1] },
  }));
  frame.members[5] = { ...frame.members[5]!, startArm: [0.05, 0, 0.02] };
  frame.springs = [
    {
      id: 'mount',
      start: 'centre',
      end: 'front left corner',
      stiffness: { u: 1e6, v: 1e6, w: 1e6, rx: 2e4, ry: 2e4, rz: 2e4 },
    },
  ];
  return frame;
}

describe('inclined supports', () => {
  it.each(METHODS)('turn with the whole frame, by any angle about any axis (%s)', (method) => {
    const R = rotation([2 / 3, -1 / 3, 2 / 3], 0.7);
    const frame = sprungStand();
    const other: FrameInput = {
      ...frame,
      nodes: frame.nodes.map((node) => {
        const [x, y, z] = turned(R, [node.x, node.y ?? 0, node.z]);
        return { ...node, x, y, z };
      }),
      members: frame.members.map((member) => ({
        ...member,
        ...(member.startArm && { startArm: turned(R, member.startArm) }),
      })),
      supports: frame.supports.map((support) => ({
        ...support,
        // A z that is not across x is made so.
        axes: { x: turned(R, [1, 0, 0]), z: turned(R, [0.3, 0, 2]) },
      })),
      masses: frame.masses.map((mass) => ({ ...mass, offset: turned(R, mass.offset!) })),
    };
    const before = solved(frame, method, { modes: 8 }).summary;
    const after = solved(other, method, { modes: 8 }).summary;
    const hz = (summary: typeof before) => summary.modes.map((mode) => mode.frequencyHz);
    expect(worstError(hz(after), hz(before))).toBeLessThan(SAME);
    expect(worstError(turned(R, before.centreOfMass), after.centreOfMass)).toBeLessThan(SAME);
  });

  it('of the global axes are none, and y is z × x', () => {
    const stated = sprungStand();
    const global = sprungStand();
    global.supports = global.supports.map(({ node, fixed, stiffness }) => ({
      node,
      ...(fixed && { fixed }),
      ...(stiffness && { stiffness }),
    }));
    const expected = frequencies(global);
    expect(worstError(frequencies(stated), expected)).toBeLessThan(SAME);
    // x along Y, z along X: y is X × Y = Z.
    stated.supports = stated.supports.map(({ node, fixed, stiffness }) => {
      const { u, v, rx, ry } = stiffness!;
      return {
        node,
        fixed: fixed!.includes('ry') ? ['v', 'rx'] : ['v'],
        stiffness: { w: u!, u: v!, rz: rx!, ...(ry !== undefined && { rx: ry }) },
        axes: { x: [0, 1, 0], z: [1, 0, 0] },
      };
    });
    expect(worstError(frequencies(stated), expected)).toBeLessThan(SAME);
  });

  it('a foot that slides along its own x lets the frame slide just there', () => {
    const frame = aCantilever();
    const [cos, sin] = [Math.cos(0.5), Math.sin(0.5)];
    frame.supports = [
      {
        node: 'root',
        fixed: ['v', 'w', 'rx', 'ry', 'rz'],
        axes: { x: [cos, 0, sin], z: [-sin, 0, cos] },
      },
    ];
    const { summary, shapes } = solved(frame, 'consistent', { modes: 2 });
    expect(summary.rigidBodyModes).toBe(1);
    expect(shapes.shapes[2]! / shapes.shapes[0]!).toBeCloseTo(Math.tan(0.5), 5);
  });
});

describe('a spring between two bodies', () => {
  const [mass, I, L] = [3, 0.2, 0.8];
  const k = { u: 5e4, v: 2e4, w: 3e4, rx: 700, ry: 900, rz: 400 };

  it.each(METHODS)('acts at the mid-point of its nodes (%s)', (method) => {
    const body = (node: string) => ({
      id: node,
      name: 'Body',
      node,
      mass,
      inertia: { Ixx: I, Iyy: I, Izz: I },
    });
    const frame: FrameInput = {
      ...aCantilever(),
      nodes: [
        { id: 'p', x: 0, y: 0, z: 0 },
        { id: 'q', x: L, y: 0, z: 0 },
      ],
      members: [],
      supports: [],
      masses: [body('p'), body('q')],
      springs: [{ id: 's', start: 'p', end: 'q', stiffness: k }],
    };
    const { summary } = solved(frame, method, { modes: 12 });
    expect(summary.rigidBodyModes).toBe(6);
    // By hand: stretch and turns against each other; across, δ = w₂ − w₁ + (ry₁ + ry₂)L/2.
    const across = (stiffness: number) => stiffness * (2 / mass + (L * L) / (2 * I));
    const expected = [
      (2 * k.u) / mass,
      across(k.v),
      across(k.w),
      (2 * k.rx) / I,
      (2 * k.ry) / I,
      (2 * k.rz) / I,
    ]
      .map((lambda) => Math.sqrt(lambda) / (2 * Math.PI))
      .sort((a, b) => a - b);
    const hz = summary.modes.slice(6).map((mode) => mode.frequencyHz);
    expect(worstError(hz, expected)).toBeLessThan(1e-11);
  });
});
