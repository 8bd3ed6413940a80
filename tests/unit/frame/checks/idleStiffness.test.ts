import { describe, expect, it } from 'vitest';

import { checkDocument } from '#shared/frame/checkDocument.ts';
import { aCantilever, type FrameInput } from '#tests/builders/aFrame.ts';
import { frequencies, worstError } from '#tests/builders/aLine.ts';

// Whether a stiffness does anything is settled by the solver: a thousand times more of it changes a frequency or not.

const IDLE = /carries nothing and stands on nothing|does nothing/;

function idleOf(input: FrameInput): string[] {
  const { errors, warnings } = checkDocument(input);
  expect(errors).toEqual([]);
  return warnings
    .filter(({ message }) => IDLE.test(message))
    .map(({ path, message }) => `${path} | ${message}`);
}

/** Largest relative change of six frequencies when `build` is given a thousand times the stiffness. */
function effect(build: (stiffness: number) => FrameInput, method?: 'lumped'): number {
  const [soft, stiff] = [build(1e3), build(1e6)].map((frame) =>
    frequencies(frame, method, { modes: 6 }),
  );
  return worstError(stiff!, soft!);
}

/** A spring from the cantilever’s tip to a node 0.2 m above it. */
function hung(change: (frame: FrameInput) => void = () => undefined) {
  return (k: number): FrameInput => {
    const frame = aCantilever({ tipMass: 1 });
    frame.nodes.push({ id: 'hook', x: 1, z: 0.2 });
    const stiffness = { u: k, v: k, w: k, rx: k, ry: k, rz: k };
    frame.springs = [{ id: 'hanger', start: 'tip', end: 'hook', stiffness }];
    change(frame);
    return frame;
  };
}

describe('a spring to a node', () => {
  it('that carries nothing does nothing, and is told so', () => {
    expect(effect(hung())).toBeLessThan(1e-9);
    expect(idleOf(hung()(1e3))).toEqual([
      'springs.0.end | Spring “hanger”: its end node “hook” carries nothing and stands on nothing, so the spring holds nothing. Support that node, or give it the mass that stands there.',
    ]);
  });

  it.each<[string, (frame: FrameInput) => void]>([
    ['on a support', (frame) => frame.supports.push({ node: 'hook', fixed: ['u', 'v', 'w'] })],
    [
      'with a mass',
      (frame) => frame.masses.push({ id: 'block', name: 'Block', node: 'hook', mass: 2 }),
    ],
    [
      'held by another spring',
      (frame) => {
        frame.nodes.push({ id: 'ceiling', x: 1, z: 0.4 });
        frame.supports.push({ node: 'ceiling', fixed: ['u', 'v', 'w', 'rx', 'ry', 'rz'] });
        const stiffness = { u: 1e5, v: 1e5, w: 1e5, rx: 1e5, ry: 1e5, rz: 1e5 };
        frame.springs.push({ id: 'upper', start: 'ceiling', end: 'hook', stiffness });
      },
    ],
    [
      'rigidly linked to a support',
      (frame) => {
        frame.nodes.push({ id: 'anchor', x: 1, z: 0.5 });
        frame.supports.push({ node: 'anchor', fixed: ['u', 'v', 'w', 'rx', 'ry', 'rz'] });
        frame.rigidLinks.push({ id: 'bracket', main: 'anchor', others: ['hook'] });
      },
    ],
  ])('%s does what it says, and passes', (_, change) => {
    expect(effect(hung(change))).toBeGreaterThan(1e-3);
    expect(idleOf(hung(change)(1e3))).toEqual([]);
  });

  it('that an operating state puts a mass on passes', () => {
    const moved = hung((frame) => {
      frame.states = [{ id: 'out', name: 'Out', masses: { load: { node: 'hook' } } }];
    });
    expect(idleOf(moved(1e3))).toEqual([]);
  });
});

/** The cantilever with a stiff joint in ry between its end and the tip. */
function jointed(change: (frame: FrameInput) => void = () => undefined) {
  return (k: number): FrameInput => {
    const frame = aCantilever();
    frame.members[0]!.joints = { end: { ry: k } };
    change(frame);
    return frame;
  };
}

/** What else stands at the tip: a bar to the wall, held in its line. */
function strut(frame: FrameInput, changes: Partial<FrameInput['members'][number]> = {}): void {
  frame.nodes.push({ id: 'wall', x: 2, z: 1 });
  frame.supports.push({ node: 'wall', fixed: ['u', 'v', 'w', 'rx', 'ry', 'rz'] });
  const bar = { ...frame.members[0]!, id: 'strut', start: 'tip', end: 'wall', joints: {} };
  frame.members.push({ ...bar, kind: 'bar', ...changes });
}

const tipMass = (more: Partial<FrameInput['masses'][number]>) => (frame: FrameInput) =>
  frame.masses.push({ id: 'load', name: 'Load', node: 'tip', mass: 3, ...more });

describe('a stiff joint', () => {
  it('at a node that carries nothing does nothing, and is told so', () => {
    expect(effect(jointed())).toBeLessThan(1e-9);
    expect(effect(jointed(), 'lumped')).toBeLessThan(1e-9);
    expect(idleOf(jointed()(1e3))).toEqual([
      'members.0.joints.end | Member “arm”: the stiffness of its end joint in ry does nothing, since nothing else at node “tip” resists or weighs in that motion. Remove it, or attach what the joint is to hold.',
    ]);
  });

  it.each<[string, (frame: FrameInput) => void]>([
    ['a bar', (frame) => strut(frame)],
    [
      'a hinged beam',
      (frame) => strut(frame, { kind: 'beam', joints: { start: { rx: 0, ry: 0, rz: 0 } } }),
    ],
    ['a mass without inertia', tipMass({})],
    ['an arm with nothing on it', (frame) => (frame.members[0]!.endArm = [0, 0, 0.2])],
    ['a pinned foot', (frame) => frame.supports.push({ node: 'tip', fixed: ['w'] })],
  ])('in a rotation that %s does not feel', (_, change) => {
    expect(effect(jointed(change))).toBeLessThan(1e-9);
    expect(idleOf(jointed(change)(1e3))).toHaveLength(1);
  });

  it.each<[string, (frame: FrameInput) => void]>([
    ['a beam', (frame) => strut(frame, { kind: 'beam' })],
    ['a bar on an arm', (frame) => strut(frame, { startArm: [0, 0, 0.1] })],
    ['a mass with inertia', tipMass({ inertia: { Ixx: 1, Iyy: 1, Izz: 1 } })],
    [
      'a mass on the member’s own arm',
      (frame) => {
        frame.members[0]!.endArm = [0, 0, 0.2];
        tipMass({})(frame);
      },
    ],
    ['a mass off the node', tipMass({ offset: [0, 0, 0.2] })],
    ['a foot that resists tilting', (frame) => frame.supports.push({ node: 'tip', fixed: ['ry'] })],
    [
      'a foot that a rigid link carries aside',
      (frame) => {
        frame.nodes.push({ id: 'foot', x: 1.2, z: 0 });
        frame.rigidLinks.push({ id: 'shoe', main: 'tip', others: ['foot'] });
        frame.supports.push({ node: 'foot', fixed: ['u', 'w'] });
      },
    ],
  ])('that holds %s passes', (_, change) => {
    expect(effect(jointed(change))).toBeGreaterThan(1e-3);
    expect(idleOf(jointed(change)(1e3))).toEqual([]);
  });

  it('in a translation is felt by any mass', () => {
    const pushed = (change: (frame: FrameInput) => void) => (k: number) => {
      const frame = aCantilever();
      frame.members[0]!.joints = { end: { w: k } };
      change(frame);
      return frame;
    };
    const nothing = pushed(() => undefined);
    expect(effect(nothing)).toBeLessThan(1e-9);
    expect(idleOf(nothing(1e3))).toHaveLength(1);
    expect(effect(pushed(tipMass({})))).toBeGreaterThan(1e-3);
    expect(idleOf(pushed(tipMass({}))(1e3))).toEqual([]);
  });

  it('that is free, or ignored, has no such warning', () => {
    const free = aCantilever();
    free.members[0]!.joints = { end: { rx: 0, ry: 0, rz: 0 } };
    expect(idleOf(free)).toEqual([]);
    const flat = jointed()(1e3);
    flat.unknowns = ['u', 'w', 'ry'];
    flat.members[0]!.joints = { end: { rz: 1e3 } };
    expect(idleOf(flat)).toEqual([]);
  });
});
