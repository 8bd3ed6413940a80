import { describe, expect, it } from 'vitest';
import { AppError } from '#shared/errors/AppError.ts';
import { solveFrame } from '#shared/analysis/solveFrame.ts';
import { aCantilever, aPortal, aStand } from '#tests/builders/aFrame.ts';
import type { FrameInput } from '#tests/builders/aFrame.ts';
import { accepted, solved } from '#tests/builders/aLine.ts';

const METHODS = ['consistent', 'lumped'] as const;

function refusal(input: FrameInput, method: 'consistent' | 'lumped'): AppError {
  try {
    solveFrame({ document: accepted(input), method, stateId: null, settings: { modes: 4 } });
  } catch (error) {
    if (error instanceof AppError) return error;
    throw error;
  }
  throw new Error('The frame was not refused.');
}

/** Two bars in line between two fixed nodes: the node between them is held by nothing across them. */
function twoBars(): FrameInput {
  const frame = aCantilever();
  frame.unknowns = ['u', 'w', 'ry'];
  frame.nodes = [
    { id: 'left', x: 0, z: 0 },
    { id: 'middle', x: 1, z: 0 },
    { id: 'right', x: 2, z: 0 },
  ];
  const bar = { ...frame.members[0]!, kind: 'bar' as const, divisions: 1 };
  frame.members = [
    { ...bar, id: 'bar 1', start: 'left', end: 'middle' },
    { ...bar, id: 'bar 2', start: 'middle', end: 'right' },
  ];
  frame.supports = ['left', 'right'].map((node) => ({ node, fixed: ['u', 'w'] }));
  return frame;
}

/** A cantilever along X with two more beams in line behind a hinge; the tip turns with them. */
function aHingedTail(): FrameInput {
  const frame = aCantilever({ divisions: 2 });
  frame.unknowns = ['u', 'w', 'ry'];
  frame.supports = [{ node: 'root', fixed: ['u', 'w', 'ry'] }];
  frame.nodes.push({ id: 'near', x: 2, z: 0 }, { id: 'far', x: 4, z: 0 });
  const arm = frame.members[0]!;
  frame.members = [
    { ...arm, joints: { end: { ry: 0 } } },
    { ...arm, id: 'inner', start: 'tip', end: 'near' },
    { ...arm, id: 'outer', start: 'near', end: 'far' },
  ];
  return frame;
}

describe.each(METHODS)('mechanisms and rigid motion (%s)', (method) => {
  it('names a node held by nothing across its bars', () => {
    const error = refusal(twoBars(), method);
    expect(error.code).toBe('mechanism');
    expect(error.details.issues).toHaveLength(1);
    expect(error.details.issues![0]).toMatchObject({ path: 'nodes.1' });
    expect(error.message).toContain('“middle” moves along Z');
    expect(error.message).toContain('“bar 1”, “bar 2”');
  });

  it('tells members free to spin about their own axes apart', () => {
    const frame = aStand({ divisions: 2 });
    for (const i of [4, 6]) {
      frame.members[i] = { ...frame.members[i]!, joints: { start: { rx: 0 }, end: { rx: 0 } } };
    }
    const { details } = refusal(frame, method);
    expect(details.issues!.map(({ path }) => path).sort()).toEqual(['members.4', 'members.6']);
    for (const { message } of details.issues!)
      expect(message).toContain('spins about its own axis');
  });

  it('names what moves in a pinned chain', () => {
    const frame = aPortal({ divisions: 2 });
    frame.unknowns = ['u', 'w', 'ry'];
    const pins = { start: { ry: 0 }, end: { ry: 0 } };
    frame.members = frame.members.map((member) => ({ ...member, joints: pins }));
    frame.supports = ['left foot', 'right foot'].map((node) => ({ node, fixed: ['u', 'w', 'ry'] }));
    const { details, message } = refusal(frame, method);
    expect(details.issues).toHaveLength(1);
    expect(message).toContain('nodes “left corner”, “right corner” move along X; members');
    expect(message).toContain('members “leg 1”, “leg 2” move along X and turn about Y;');
    expect(message).toContain('member “rail” moves along X:');
  });

  it('says that a node both moves and turns, and what moves most first', () => {
    const { details } = refusal(aHingedTail(), method);
    expect(details.issues).toEqual([
      {
        path: 'nodes.3',
        message:
          'nodes “far”, “near” move along Z and turn about Y; node “tip” turns about Y; ' +
          'members “outer”, “inner” move along Z and turn about Y: nothing resists this motion.',
      },
    ]);
  });

  it('takes springs 1e-9 as stiff as the frame for what they are', () => {
    const frame = aStand({ divisions: 1 });
    frame.supports = frame.supports.map(({ node }) => ({
      node,
      fixed: [],
      stiffness: { u: 0.1, v: 0.1, w: 0.1 },
    }));
    const { summary } = solved(frame, method, { modes: 6 });
    expect(summary.rigidBodyModes).toBe(0);
    // Bouncing on 4 × 0.1 N/m; the frame itself is a billion times stiffer.
    const bounce = Math.sqrt(0.4 / summary.totalMassKg) / (2 * Math.PI);
    const found = summary.modes.find((mode) => mode.name === 'bounces along Z');
    expect(found!.frequencyHz / bounce).toBeCloseTo(1, 6);
  });

  it('counts the rigid motions of every separate part', () => {
    const frame = aPortal({ divisions: 2 });
    frame.nodes.push({ id: 'near', x: 5, y: 1, z: 0 }, { id: 'far', x: 6, y: 2, z: 1 });
    frame.members.push({ ...frame.members[1]!, id: 'loose', start: 'near', end: 'far' });
    const { summary } = solved(frame, method, { modes: 8 });
    expect(summary.rigidBodyModes).toBe(6);
    expect(summary.modes.slice(0, 6).map((mode) => mode.frequencyHz)).toEqual([0, 0, 0, 0, 0, 0]);
    expect(summary.modes.slice(0, 6).every((mode) => mode.kind === 'rigid')).toBe(true);
    expect(summary.modes[6]!.frequencyHz).toBeGreaterThan(1);
  });

  it('lets a beam turn about the pin at its end', () => {
    const frame = aCantilever();
    frame.supports = [{ node: 'root', fixed: ['u', 'v', 'w'] }];
    const { summary } = solved(frame, method, { modes: 4 });
    expect(summary.rigidBodyModes).toBe(3);
    expect(
      summary.modes
        .slice(0, 3)
        .map((mode) => mode.name)
        .sort(),
    ).toEqual(['rigid: turns about X', 'rigid: turns about Y', 'rigid: turns about Z']);
  });

  it('refuses a loose part that moves without mass', () => {
    const frame = aCantilever();
    frame.nodes.push({ id: 'p', x: 3, z: 0 }, { id: 'q', x: 4, z: 0 });
    frame.springs = [{ id: 's', start: 'p', end: 'q', stiffness: { u: 1000, v: 1000, w: 1000 } }];
    const error = refusal(frame, method);
    expect(error.code).toBe('mechanism');
    expect(error.message).toContain('“p”');
  });
});

it('finds no mode in a frame that cannot move', () => {
  const frame = twoBars();
  frame.supports.push({ node: 'middle', fixed: ['u', 'w'] });
  const { summary } = solved(frame, 'consistent', { modes: 4 });
  expect(summary.modes).toEqual([]);
  expect(summary.effectiveMass.onFixed[0]).toBeCloseTo(summary.totalMassKg, 9);
});

it('refuses a model without mass', () => {
  const document = { ...accepted(aCantilever()), members: [] };
  const solve = () =>
    solveFrame({ document, method: 'consistent', stateId: null, settings: { modes: 1 } });
  expect(solve).toThrow(expect.objectContaining({ code: 'unsolvable' }));
  expect(solve).toThrow('no mass');
});
