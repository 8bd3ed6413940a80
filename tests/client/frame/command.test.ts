import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { frameDocument, type FrameDocument } from '#shared/schemas/frameDocument.ts';
import { apply, type FrameCommand } from '#src/features/frame/state/command.ts';
import { createFrameStore } from '#src/features/frame/state/frameStore.ts';
import { describeRemoval } from '#src/features/frame/state/removeEntry.ts';

function aDocument(): FrameDocument {
  return frameDocument.parse({
    name: 'Saw stand',
    materials: [{ id: 'steel', name: 'Steel', E: 210e9, nu: 0.3, density: 7850 }],
    sections: [
      {
        id: 'tube',
        name: 'Tube 60×4',
        shape: { kind: 'rectangular-tube', width: 0.06, height: 0.06, wall: 0.004, radius: 0.008 },
      },
    ],
    nodes: [1, 2, 3, 4].map((n) => ({ id: `n${n}`, x: n, z: n % 2 })),
    members: [
      { id: 'leg 1', kind: 'beam', start: 'n1', end: 'n2', material: 'steel', section: 'tube' },
      { id: 'rail', kind: 'beam', start: 'n2', end: 'n3', material: 'steel', section: 'tube' },
      { id: 'leg 2', kind: 'bar', start: 'n3', end: 'n4', material: 'steel', section: 'tube' },
    ],
    supports: [
      { node: 'n1', fixed: ['u', 'v', 'w'] },
      { node: 'n4', stiffness: { w: 1e6 } },
    ],
    springs: [{ id: 's1', start: 'n2', end: 'n4', stiffness: { u: 1e5 } }],
    rigidLinks: [
      { id: 'l1', main: 'n2', others: ['n3', 'n4'] },
      { id: 'l2', main: 'n1', others: ['n3'] },
    ],
    masses: [
      { id: 'motor', name: 'Motor', node: 'n3', mass: 40 },
      { id: 'tank', name: 'Tank', node: 'n2', mass: 80 },
    ],
    states: [
      {
        id: 'full',
        name: 'Tank full',
        masses: { tank: { mass: 120, node: 'n3' }, motor: { present: false } },
        supports: { n4: 'soft' },
      },
      { id: 'stiff', name: 'Stiff feet', supports: 'stiff' },
    ],
  });
}

const ID = fc.constantFrom('n1', 'n2', 'n3', 'n4');
const NEW_ID = fc.constantFrom('n5', 'post', 'Z 9');
const coordinate = fc.double({ min: -5, max: 5, noNaN: true });

const node = fc.record(
  { id: fc.oneof(ID, NEW_ID), x: coordinate, y: coordinate, z: coordinate },
  { noNullPrototype: true },
);
const mass = fc.record(
  {
    id: fc.constantFrom('motor', 'tank', 'pump'),
    name: fc.string({ maxLength: 8 }),
    node: ID,
    mass: fc.double({ min: 1, max: 99, noNaN: true }),
    offset: fc.tuple(coordinate, coordinate, coordinate),
  },
  { noNullPrototype: true },
);

const command: fc.Arbitrary<FrameCommand> = fc.letrec<{ command: FrameCommand }>((tie) => ({
  command: fc.oneof(
    { depthSize: 'small' },
    node.map((entry): FrameCommand => ({ kind: 'add', list: 'nodes', entry })),
    mass.map((entry): FrameCommand => ({ kind: 'add', list: 'masses', entry })),
    fc
      .tuple(ID, node)
      .map(([id, entry]): FrameCommand => ({ kind: 'update', list: 'nodes', id, entry })),
    fc
      .tuple(fc.constantFrom('motor', 'tank'), mass)
      .map(([id, entry]): FrameCommand => ({ kind: 'update', list: 'masses', id, entry })),
    ID.map((id): FrameCommand => ({ kind: 'remove', list: 'nodes', id })),
    ID.map((id): FrameCommand => ({ kind: 'remove', list: 'supports', id })),
    fc
      .constantFrom('leg 1', 'rail', 'leg 2')
      .map((id): FrameCommand => ({ kind: 'remove', list: 'members', id })),
    fc
      .constantFrom('motor', 'tank')
      .map((id): FrameCommand => ({ kind: 'remove', list: 'masses', id })),
    fc
      .constantFrom<FrameDocument['unknowns'][]>(['u', 'w', 'ry'], ['u'])
      .map((unknowns): FrameCommand => ({ kind: 'set', fields: { unknowns } })),
    fc
      .array(tie('command'), { maxLength: 3 })
      .map((commands): FrameCommand => ({ kind: 'batch', commands })),
  ),
})).command;

/** Commands that do not fit (an id taken, a thing that is gone) are refused whole and left out here. */
function applied(frame: FrameDocument, change: FrameCommand) {
  try {
    return apply(frame, change);
  } catch {
    return null;
  }
}

describe('apply', () => {
  it('is taken back exactly by its inverse, and never alters its argument', () => {
    fc.assert(
      fc.property(fc.array(command, { minLength: 1, maxLength: 8 }), (commands) => {
        let frame = aDocument();
        for (const change of commands) {
          const before = structuredClone(frame);
          const result = applied(frame, change);
          expect(frame).toEqual(before);
          if (!result) continue;
          expect(apply(result.frame, result.inverse).frame).toStrictEqual(before);
          frame = result.frame;
        }
      }),
      { seed: 1852, numRuns: 100 },
    );
  });

  it('leaves no reference to a removed node', () => {
    const { frame } = apply(aDocument(), { kind: 'remove', list: 'nodes', id: 'n3' });
    expect(JSON.stringify(frame)).not.toContain('"n3"');
    expect(frame.members.map(({ id }) => id)).toEqual(['leg 1']);
    expect(frame.masses.map(({ id }) => id)).toEqual(['tank']);
    expect(frame.rigidLinks).toEqual([{ id: 'l1', main: 'n2', others: ['n4'] }]);
    expect(frame.states[0]?.masses).toEqual({ tank: { mass: 120 } });
    expect(describeRemoval(aDocument(), 'nodes', 'n3')).toBe('2 members, 1 rigid link, 1 mass');
  });

  it('takes what operating states say about a removed support along', () => {
    const { frame } = apply(aDocument(), { kind: 'remove', list: 'supports', id: 'n4' });
    expect(frame.states.map(({ supports }) => supports)).toEqual(['expected', 'stiff']);
  });

  it('keeps every reference when a thing is renamed', () => {
    const before = aDocument();
    const nodeEntry = { ...before.nodes[2]!, id: 'corner' };
    const { frame } = apply(before, {
      kind: 'update',
      list: 'nodes',
      id: 'n3',
      entry: nodeEntry,
    });
    expect(JSON.parse(JSON.stringify(before).replaceAll('"n3"', '"corner"'))).toEqual(frame);
    const section = { ...before.sections[0]!, id: 'box' };
    const renamed = apply(before, { kind: 'update', list: 'sections', id: 'tube', entry: section });
    expect(renamed.frame.members.every((member) => member.section === 'box')).toBe(true);
    const massEntry = { ...before.masses[1]!, id: 'vessel' };
    const moved = apply(before, { kind: 'update', list: 'masses', id: 'tank', entry: massEntry });
    expect(Object.keys(moved.frame.states[0]!.masses)).toEqual(['vessel', 'motor']);
  });

  it('refuses an id that is taken and a section in use, in words', () => {
    const frame = aDocument();
    expect(() => apply(frame, { kind: 'add', list: 'nodes', entry: frame.nodes[0]! })).toThrow(
      'There is a node “n1” already: choose another id.',
    );
    expect(() => apply(frame, { kind: 'remove', list: 'sections', id: 'tube' })).toThrow(
      'The section “tube” is used by 3 members: give them another section first.',
    );
  });
});

describe('createFrameStore', () => {
  const moveTo = (x: number): FrameCommand => ({
    kind: 'update',
    list: 'nodes',
    id: 'n1',
    entry: { id: 'n1', x, y: 0, z: 1 },
  });

  it('undoes and redoes step by step, a group being one step', () => {
    const start = aDocument();
    const store = createFrameStore(start);
    const { run, closeGroup, undo, redo } = store.getState();
    run(moveTo(5), 'move n1', 'drag');
    run(moveTo(6), 'move n1', 'drag');
    closeGroup();
    run(moveTo(7), 'move n1', 'drag');
    const end = store.getState().frame;
    expect(store.getState().past).toHaveLength(2);
    undo();
    expect(store.getState().frame.nodes[0]?.x).toBe(6);
    undo();
    expect(store.getState().frame).toStrictEqual(start);
    redo();
    redo();
    expect(store.getState().frame).toStrictEqual(end);
  });

  it('forgets what was undone once something else is done', () => {
    const store = createFrameStore(aDocument());
    const { run, undo } = store.getState();
    run(moveTo(5), 'move n1');
    undo();
    run(moveTo(9), 'move n1');
    expect(store.getState().future).toEqual([]);
  });

  it('takes an open drag back without a trace', () => {
    const start = aDocument();
    const store = createFrameStore(start);
    const { run, cancelGroup } = store.getState();
    run(moveTo(5), 'move n1', 'drag');
    cancelGroup('drag');
    expect(store.getState().frame).toStrictEqual(start);
    expect(store.getState().past).toEqual([]);
  });

  it('changes nothing when a command is refused', () => {
    const start = aDocument();
    const store = createFrameStore(start);
    expect(() =>
      store.getState().run({ kind: 'remove', list: 'sections', id: 'tube' }, 'remove tube'),
    ).toThrow();
    expect(store.getState().frame).toBe(start);
    expect(store.getState().past).toEqual([]);
  });
});
