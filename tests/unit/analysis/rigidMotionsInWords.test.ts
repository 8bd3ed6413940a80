import { describe, expect, it } from 'vitest';
import type { Displacement } from '#shared/schemas/frameDocument.ts';
import { aCantilever, aPortal, aStand } from '#tests/builders/aFrame.ts';
import type { FrameInput } from '#tests/builders/aFrame.ts';
import { solved } from '#tests/builders/aLine.ts';

// What is free follows from statics alone: six motions less those that supports hold.

const METHODS = ['consistent', 'lumped', 'mesh-free'] as const;
const FREE = 'moves along X, Y and Z and turns about X, Y and Z, which gives 6 modes of 0 Hz';

function heldAt(frame: FrameInput, fixed: Record<string, readonly Displacement[]>): FrameInput {
  frame.supports = Object.entries(fixed).map(([node, list]) => ({ node, fixed: [...list] }));
  return frame;
}

describe.each(METHODS)('rigid motion in words (%s)', (method) => {
  const warningsOf = (frame: FrameInput) => solved(frame, method, { modes: 12 }).summary.warnings;

  it('a frame on no supports', () => {
    expect(warningsOf(heldAt(aPortal(), {}))).toEqual([
      {
        path: 'supports',
        message: `The frame stands on nothing that holds it: it ${FREE}. Give it supports, unless it is meant to float.`,
      },
    ]);
  });

  it('a frame that stands firm, with a node that plays no part', () => {
    const frame = aPortal();
    frame.nodes.push({ id: 'stray', x: 3, z: 0 });
    expect(warningsOf(frame)).toEqual([]);
  });

  it('a part of its own beside the frame', () => {
    const frame = aPortal();
    frame.nodes.push({ id: 'near', x: 5, y: 1, z: 0 }, { id: 'far', x: 6, y: 2, z: 1 });
    frame.members.push({ ...frame.members[1]!, id: 'loose', start: 'near', end: 'far' });
    expect(warningsOf(frame)).toEqual([
      {
        path: 'nodes.4',
        message:
          'Nodes “near” and “far” (member “loose”) stand apart from the rest, and nothing holds that part: ' +
          `it ${FREE}. Hold it, or join it to the rest, unless it is meant to float.`,
      },
    ]);
  });
});

describe('what supports leave free', () => {
  const motionOf = (frame: FrameInput) => {
    const { summary } = solved(frame, 'consistent', { modes: 8 });
    expect(summary.warnings).toHaveLength(1);
    expect(summary.warnings[0]!.message).toContain('do not hold the frame in every direction');
    return /: it (.*), which/.exec(summary.warnings[0]!.message)?.[1];
  };
  const feet = ['front left foot', 'front right foot', 'back right foot', 'back left foot'];
  const each = (fixed: Displacement[]) => Object.fromEntries(feet.map((node) => [node, fixed]));

  it('feet that only carry', () => {
    expect(motionOf(heldAt(aStand(), each(['w'])))).toBe('moves along X and Y and turns about Z');
  });

  it('feet that slide along a rail', () => {
    expect(motionOf(heldAt(aStand(), each(['v', 'w'])))).toBe('moves along X');
  });

  it('a pin at one end', () => {
    expect(motionOf(heldAt(aCantilever(), { root: ['u', 'v', 'w'] }))).toBe(
      'turns about X, Y and Z',
    );
  });

  it('pins at two corners across a diagonal of the base: the line through both', () => {
    const held: Displacement[] = ['u', 'v', 'w'];
    const frame = heldAt(aStand(), { [feet[0]!]: held, [feet[2]!]: held });
    // 1.2 m along X, 0.8 m along Y: (3, 2, 0) / √13.
    expect(motionOf(frame)).toBe('turns about (0.83, 0.55, 0.00)');
  });

  it('a guide on an inclined plane', () => {
    const frame = aCantilever();
    frame.supports = [
      { node: 'root', fixed: ['w', 'v', 'rx', 'ry', 'rz'], axes: { x: [1, 0, 1], z: [-1, 0, 1] } },
    ];
    expect(motionOf(frame)).toBe('moves along (0.71, 0.00, 0.71)');
  });

  it('in the plane, only what the plane has', () => {
    const frame = { ...aPortal(), unknowns: ['u', 'w', 'ry'] satisfies Displacement[] };
    expect(motionOf(heldAt(frame, { 'left foot': ['u', 'w'] }))).toBe('turns about Y');
  });
});

it('counts the parts and nodes that it does not name', () => {
  const frame = aCantilever({ divisions: 1 });
  frame.supports = [];
  for (let i = 0; i < 24; i++) {
    frame.nodes.push({ id: `a${i}`, x: 0, y: i + 1, z: 0 }, { id: `b${i}`, x: 1, y: i + 1, z: 0 });
    frame.members.push({ ...frame.members[0]!, id: `m${i}`, start: `a${i}`, end: `b${i}` });
  }
  for (let i = 1; i < 6; i++) {
    frame.nodes.push({ id: `tip ${i}`, x: 1 + i, y: 0, z: 0 });
    const start = i === 1 ? 'tip' : `tip ${i - 1}`;
    frame.members.push({ ...frame.members[0]!, id: `arm ${i}`, start, end: `tip ${i}` });
  }
  const { warnings } = solved(frame, 'consistent', { modes: 1 }).summary;
  expect(warnings).toHaveLength(21);
  expect(warnings[0]!.message).toContain(
    'Nodes “root”, “tip”, “tip 1”, “tip 2” and 3 more (members “arm”, “arm 1”, “arm 2”, “arm 3” and 2 more)',
  );
  expect(warnings[20]!.message).toBe('5 more parts move freely as well.');
});
