import { describe, expect, it } from 'vitest';

import { checkDocument } from '#shared/frame/checkDocument.ts';
import { boxInertia } from '#shared/frame/starters/construction.ts';
import { STARTERS } from '#shared/frame/starters/starters.ts';
import { standardMaterials } from '#shared/frame/materials.ts';
import { sectionShelf } from '#shared/frame/shelf.ts';

const FEET = [
  { kind: 'fixed' as const },
  { kind: 'stiffness' as const, vertical: 2e7, horizontal: 1e7 },
];

describe.each(STARTERS)('$name', ({ parameters, build }) => {
  it.each(FEET)('is a document without refusals or warnings on feet of kind $kind', (feet) => {
    const checked = checkDocument(build(parameters.parse({ name: 'Conveyor drive', feet })));
    expect(checked.errors).toEqual([]);
    expect(checked.warnings).toEqual([]);
  });

  it('keeps the dimensions, the section and the machine asked for', () => {
    const document = build(
      parameters.parse({
        name: 'Pump',
        length: 3,
        width: 1.5,
        height: 0.6,
        section: 'HEA 160',
        machine: { mass: 300, centreHeight: 0.5 },
      }),
    );
    expect(Math.max(...document.nodes.map((node) => node.x))).toBe(3);
    expect(Math.max(...document.nodes.map((node) => node.y))).toBe(1.5);
    expect(Math.max(...document.nodes.map((node) => node.z))).toBe(0.6);
    expect(document.sections.map((section) => section.name)).toEqual(['HEA 160']);
    expect(document.masses).toMatchObject([{ mass: 300, offset: [0, 0, 0.5] }]);
  });

  it('names members by role, never by letter and number', () => {
    const document = build(parameters.parse({ name: 'Fan' }));
    for (const member of document.members) expect(member.name).toMatch(/^[a-z-]{3,}/);
  });
});

describe('the machine stand', () => {
  it('has the topology of the check frame: 4 legs, 6 rails, 2 halves of a cross-rail, 4 feet', () => {
    const stand = STARTERS.find(({ id }) => id === 'stand')!;
    const document = stand.build(stand.parameters.parse({ name: 'Stand' }));
    const roles = document.members.map(({ name = '' }) =>
      name.includes('leg') ? 'leg' : name.includes('cross') ? 'cross-rail' : 'rail',
    );
    const count = (role: string) => roles.filter((r) => r === role).length;
    expect([count('leg'), count('rail'), count('cross-rail')]).toEqual([4, 6, 2]);
    expect(document.supports).toHaveLength(4);
    expect(document.nodes).toHaveLength(11);
  });
});

it('an even cube of side a has m a²/6 about every axis (textbook)', () => {
  const cube = boxInertia({ mass: 12, length: 0.5, width: 0.5, height: 0.5 });
  for (const moment of [cube.Ixx, cube.Iyy, cube.Izz]) expect(moment).toBeCloseTo(0.5, 12);
});

it('everything on the shelf passes the checks, materials of the standards included', () => {
  const checked = checkDocument({
    name: 'Shelf',
    materials: standardMaterials(),
    sections: sectionShelf(),
    nodes: [{ id: 'point', x: 0, z: 0 }],
    masses: [
      { id: 'weight', name: 'Weight', node: 'point', mass: 1, inertia: { Ixx: 1, Iyy: 1, Izz: 1 } },
    ],
  });
  expect(checked.errors).toEqual([]);
});
