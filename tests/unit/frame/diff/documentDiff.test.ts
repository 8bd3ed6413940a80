import { describe, expect, it } from 'vitest';

import { describeChanges, documentDiff } from '#shared/frame/documentDiff.ts';
import { frameDocument, type FrameDocument } from '#shared/schemas/frameDocument.ts';
import { aStand } from '#tests/builders/aFrame.ts';

function stand(change: (document: FrameDocument) => void = () => undefined): FrameDocument {
  const document = frameDocument.parse(aStand());
  change(document);
  return document;
}

describe('documentDiff', () => {
  it('finds nothing between equal documents, whatever the order of keys and entries', () => {
    const turned = stand((d) => {
      d.nodes.reverse();
      d.materials = d.materials.map((m) => ({
        density: m.density,
        nu: 0.3,
        E: m.E,
        name: m.name,
        id: m.id,
      }));
    });
    expect(documentDiff(stand(), turned)).toEqual([]);
  });

  it('names lists, ids and fields in document order', () => {
    const after = stand((d) => {
      d.name = 'Press stand';
      d.nodes[0]!.x = 0.1;
      d.members.splice(2, 1);
      d.supports[1]!.fixed = ['w'];
      d.masses.push({ id: 'guard', name: 'Guard', node: 'centre', mass: 8, offset: [0, 0, 0] });
    });
    expect(documentDiff(stand(), after)).toEqual([
      { list: 'frame', id: '', kind: 'changed', fields: ['name'] },
      { list: 'nodes', id: 'front left foot', kind: 'changed', fields: ['x'] },
      { list: 'members', id: 'leg 3', kind: 'removed', fields: [] },
      { list: 'supports', id: 'front right foot', kind: 'changed', fields: ['fixed'] },
      { list: 'masses', id: 'guard', kind: 'added', fields: [] },
    ]);
  });

  it('turns added into removed when the two documents change places', () => {
    const after = stand((d) => d.nodes.push({ id: 'extra', x: 0, y: 0, z: 9 }));
    expect(documentDiff(after, stand())).toEqual([
      { list: 'nodes', id: 'extra', kind: 'removed', fields: [] },
    ]);
  });
});

describe('describeChanges', () => {
  it('says one plain sentence and counts what it does not name', () => {
    const after = stand((d) => {
      d.members.forEach((member) => (member.divisions = 8));
      d.members[0]!.roll = 1;
    });
    expect(describeChanges(documentDiff(stand(), after))).toBe(
      'Member leg 1 changed (roll, divisions); member leg 2 changed (divisions); member leg 3 changed (divisions); and 9 more changes.',
    );
    expect(describeChanges([])).toBe('Nothing changed.');
  });
});
