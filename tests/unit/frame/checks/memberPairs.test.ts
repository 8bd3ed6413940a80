import { describe, expect, it } from 'vitest';

import { checkDocument } from '#shared/frame/checkDocument.ts';
import { aCantilever, aPortal, aRack, aStand, type FrameInput } from '#tests/builders/aFrame.ts';

function warningsOf(input: FrameInput): string[] {
  const { errors, warnings } = checkDocument(input);
  expect(errors).toEqual([]);
  return warnings.map(({ path, message }) => `${path} | ${message}`);
}

/** The portal with more nodes [x, z] and members [start, end] in its plane. */
function portalWith(
  nodes: Record<string, readonly [number, number]>,
  members: Record<string, readonly [string, string]>,
): FrameInput {
  const portal = aPortal();
  for (const [id, [x, z]] of Object.entries(nodes)) portal.nodes.push({ id, x, z });
  for (const [id, [start, end]] of Object.entries(members)) {
    portal.members.push({ ...portal.members[1]!, id, start, end });
  }
  return portal;
}

describe('members in the place of others', () => {
  it.each([
    ['left corner', 'right corner'],
    ['right corner', 'left corner'],
  ])('twice between the same nodes: %s to %s', (start, end) => {
    expect(warningsOf(portalWith({}, { twin: [start, end] }))).toEqual([
      'members.3 | Member “twin”: it joins the same two nodes as member “rail”, so both carry and weigh in the same place. Remove one, unless two profiles lie side by side there.',
    ]);
  });

  it('not where arms hold them apart, and again where the arms are the same', () => {
    const portal = portalWith({}, { twin: ['left corner', 'right corner'] });
    Object.assign(portal.members[3]!, { startArm: [0, 0, 0.1], endArm: [0, 0, 0.1] });
    expect(warningsOf(portal)).toEqual([]);
    Object.assign(portal.members[1]!, { startArm: [0, 0, 0.1], endArm: [0, 0, 0.1] });
    expect(warningsOf(portal)).toHaveLength(1);
  });

  it('overlapping along one line, by how much', () => {
    const portal = portalWith({ half: [0.4, 1] }, { stub: ['left corner', 'half'] });
    expect(warningsOf(portal)).toEqual([
      'members.3 | Member “stub”: it and member “rail” lie in one line and overlap for 0.4 m. Divide them at their nodes, or remove one.',
    ]);
  });

  it('not where one follows the other in line', () => {
    const portal = portalWith({ far: [2, 1] }, { next: ['right corner', 'far'] });
    expect(warningsOf(portal)).toEqual([]);
  });

  it.each([['u'], ['w', 'ry']] as const)('on a line with the unknowns %s %s', (...unknowns) => {
    const line = aCantilever();
    line.unknowns = [...unknowns];
    line.supports = [{ node: 'root', fixed: [...unknowns] }];
    line.nodes.push({ id: 'half', x: 0.5, z: 0 }, { id: 'far', x: 2, z: 0 });
    line.members.push({ ...line.members[0]!, id: 'next', start: 'tip', end: 'far' });
    expect(warningsOf(line).filter((text) => text.startsWith('members'))).toEqual([]);
    line.members.push({ ...line.members[0]!, id: 'over', start: 'half', end: 'far' });
    const lines = warningsOf(line);
    expect(lines).toHaveLength(2);
    expect(lines.join()).toMatch(/“over”: it and member “arm” .* overlap for 0\.5 m/);
    expect(lines.join()).toMatch(/“over”: it and member “next” .* overlap for 1 m/);
  });
});

describe('members that meet without being joined', () => {
  it('crossing braces, with the place', () => {
    const braced = portalWith(
      {},
      { 'brace 1': ['left foot', 'right corner'], 'brace 2': ['right foot', 'left corner'] },
    );
    expect(warningsOf(braced)).toEqual([
      'members.4 | Member “brace 2”: it crosses member “brace 1” at X 0.5, Y 0, Z 0.5 m without a common node, so neither holds the other there. If they are joined, divide both at a node there.',
    ]);
  });

  it('not braces that pass each other, or are joined by a node or a spring', () => {
    const passing = portalWith(
      {},
      { 'brace 1': ['left foot', 'right corner'], 'brace 2': ['right foot', 'left corner'] },
    );
    Object.assign(passing.members[4]!, { startArm: [0, 0.05, 0], endArm: [0, 0.05, 0] });
    expect(warningsOf(passing)).toEqual([]);
    const joined = portalWith(
      { middle: [0.5, 0.5] },
      {
        a: ['left foot', 'middle'],
        b: ['middle', 'right corner'],
        c: ['right foot', 'middle'],
        d: ['middle', 'left corner'],
      },
    );
    expect(warningsOf(joined)).toEqual([]);
  });

  it.each([
    [0, true],
    [0.0009, true],
    [0.0011, false],
  ])('an end %d m from another member’s length: %s', (gap, warned) => {
    // The frame measures 1 m, so places closer than a millimetre count as one.
    const frame = portalWith(
      { ground: [0.5, 0], under: [0.5, 1 - gap] },
      { post: ['ground', 'under'] },
    );
    frame.supports.push({ node: 'ground', fixed: ['u', 'v', 'w', 'rx', 'ry', 'rz'] });
    expect(warningsOf(frame)).toEqual(
      warned
        ? [
            'members.3 | Member “post”: its end at node “under” lies on member “rail” but is not joined to it. Divide that member at this node, or join them by a spring or a rigid link.',
          ]
        : [],
    );
  });

  it('not an end that a spring or a rigid link joins to the other', () => {
    const frame = portalWith({ ground: [0.5, 0], under: [0.5, 1] }, { post: ['under', 'ground'] });
    const free = structuredClone(frame);
    expect(warningsOf(free).join()).toContain('its start at node “under” lies on member “rail”');
    frame.rigidLinks = [{ id: 'bracket', main: 'left corner', others: ['under'] }];
    expect(warningsOf(frame)).toEqual([]);
    frame.rigidLinks = [];
    frame.springs = [{ id: 'pad', start: 'right corner', end: 'under', stiffness: { w: 1e6 } }];
    expect(warningsOf(frame)).toEqual([]);
  });

  it('goes by the true ends, arms included', () => {
    const frame = portalWith(
      { ground: [0.5, 0], beside: [0.7, 1.3] },
      { post: ['ground', 'beside'] },
    );
    frame.members[3]!.endArm = [-0.2, 0, -0.3];
    expect(warningsOf(frame).join()).toContain('its end at node “beside” lies on member “rail”');
  });

  it('names 20 and counts the rest', () => {
    const frame = aCantilever({ length: 50 });
    const { members, nodes } = frame;
    for (let i = 1; i <= 25; i++) {
      nodes.push({ id: `front ${i}`, x: i, y: -1, z: 0 }, { id: `back ${i}`, x: i, y: 1, z: 0 });
      members.push({ ...members[0]!, id: `bar ${i}`, start: `front ${i}`, end: `back ${i}` });
    }
    const lines = warningsOf(frame);
    expect(lines.filter((text) => text.includes('it crosses member “arm”'))).toHaveLength(20);
    expect(lines).toContain('members | 5 more members cross others without a common node.');
  });
});

describe('nodes in one place that nothing joins', () => {
  /** A post beside the portal’s right corner, `gap` m off it. */
  const beside = (gap: number) =>
    portalWith({ base: [1.5, 0], top: [1 + gap, 1] }, { prop: ['base', 'top'] });

  it.each([
    [0, 'it stands at the same place as node “right corner”'],
    [0.0004, 'it is only 0.4 mm from node “right corner”'],
  ])('%d m apart', (gap, words) => {
    expect(warningsOf(beside(gap))).toEqual([
      `nodes.5 | Node “top”: ${words}, but nothing joins the two. Make them one node, or join them by a spring or a rigid link.`,
    ]);
  });

  it('not where they are apart, or joined', () => {
    expect(warningsOf(beside(0.01))).toEqual([]);
    const linked = beside(0);
    linked.rigidLinks = [{ id: 'bolt', main: 'right corner', others: ['top'] }];
    expect(warningsOf(linked)).toEqual([]);
    const sprung = beside(0);
    const stiffness = { u: 1e8, v: 1e8, w: 1e8 };
    sprung.springs = [{ id: 'pad', start: 'top', end: 'right corner', stiffness }];
    expect(warningsOf(sprung)).toEqual([]);
  });

  it('not the ends of a very short member, nor a node with nothing attached', () => {
    const stub = beside(0.0004);
    stub.members.push({ ...stub.members[1]!, id: 'stub', start: 'right corner', end: 'top' });
    expect(warningsOf(stub)).toEqual([]);
    const stray = aPortal();
    stray.nodes.push({ id: 'stray', x: 1, z: 1 });
    expect(warningsOf(stray).join()).not.toContain('same place');
  });
});

it.each([aStand({ mass: 1, massHeight: 0 }), aRack({ bays: 3, storeys: 4, bay: 1.1 })])(
  '$name, well drawn, passes without a word',
  (frame) => {
    expect(warningsOf(frame)).toEqual([]);
  },
);
