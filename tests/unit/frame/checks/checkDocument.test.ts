import { describe, expect, it } from 'vitest';

import { checkDocument } from '#shared/frame/checkDocument.ts';
import { aCantilever, aPortal, aRack, aStand, type FrameInput } from '#tests/builders/aFrame.ts';

const PLANE = ['u', 'w', 'ry'] as const;

function warningsOf(input: unknown): string[] {
  const { errors, warnings } = checkDocument(input);
  expect(errors).toEqual([]);
  return warnings.map(({ path, message }) => `${path} | ${message}`);
}

function refusalsOf(input: unknown): string[] {
  return checkDocument(input).errors.map(({ path, message }) => `${path} | ${message}`);
}

function flatPortal(change: (portal: FrameInput) => void = () => undefined): FrameInput {
  const portal = { ...aPortal(), unknowns: [...PLANE] };
  for (const support of portal.supports) support.fixed = [...PLANE];
  change(portal);
  return portal;
}

describe('a good document', () => {
  it.each([aCantilever(), aPortal(), aRack(), flatPortal()])(
    '$name passes without a word',
    (input) => {
      expect(warningsOf(input)).toEqual([]);
    },
  );

  it('comes back with every default filled in', () => {
    const { document } = checkDocument({ ...aStand(), format: undefined, version: undefined });
    expect(document).toMatchObject({ format: 'ringstead-frame', version: 1, springs: [] });
    expect(document?.supports[0]?.bracket).toEqual({ soft: 0.5, stiff: 2 });
  });
});

describe('refusals', () => {
  it('come all at once, of form and of meaning, in other entries and in the same list', () => {
    const stand = aStand();
    Object.assign(stand.members[0]!, { kind: 'rope' });
    stand.members[3]!.section = 'S9';
    stand.members[4]!.end = 'nowhere';
    stand.materials[0]!.density = -1;
    stand.masses[0]!.inertia = { Ixx: 1, Iyy: 1, Izz: 3 };
    const paths = checkDocument(stand).errors.map(({ path }) => path);
    expect(new Set(paths)).toEqual(
      new Set([
        'members.0.kind',
        'members.3.section',
        'members.4.end',
        'materials.0.density',
        'masses.0.inertia',
      ]),
    );
  });

  it('name the entry and the remedy', () => {
    const stand = aStand();
    stand.members[1]!.section = 'S9';
    expect(refusalsOf(stand)).toEqual([
      'members.1.section | Member “leg 2”: section “S9” does not exist. Choose one of the sections.',
    ]);
  });

  it.each([null, undefined, 7, 'frame', [], [{}]])('a value that is no object: %j', (input) => {
    expect(checkDocument(input).document).toBeNull();
    expect(checkDocument(input).errors).toHaveLength(1);
  });

  it('a frame with nothing in it cannot be solved, but can be drafted', () => {
    expect(refusalsOf({ name: 'Blank' }).join()).toContain('no mass');
    expect(checkDocument({ name: 'Blank' }, 'draft').document?.name).toBe('Blank');
  });
});

describe('warnings', () => {
  it('a heavy mass, or one off its node, without inertia', () => {
    expect(warningsOf(aStand()).join()).toMatch(/masses\.0\.inertia .*off its node.*50 kg/);
    expect(warningsOf(aStand({ mass: 20, massHeight: 0 })).join()).toMatch(/10 % of the whole/);
    expect(warningsOf(aStand({ mass: 5, massHeight: 0 }))).toEqual([]);
  });

  it('G more than 2 % away from E/2(1+ν), and not less', () => {
    const exact = 210e9 / 2.6;
    expect(warningsOf(aCantilever({ material: { G: exact * 1.03 } })).join()).toContain('3 % away');
    expect(warningsOf(aCantilever({ material: { G: exact * 1.01 } }))).toEqual([]);
  });

  it.each([
    [0, false],
    [5e-5, false],
    [5e-4, true],
    [5e-3, true],
    [5e-2, false],
  ])('a leg leaning by %d of its length: %s', (lean, warned) => {
    const portal = aPortal();
    portal.nodes[1]!.x = lean;
    expect(warningsOf(portal).some((line) => line.includes('upright'))).toBe(warned);
  });

  it('an angle, channel or tee, whose shear centre is left out', () => {
    const shape = { kind: 'angle', width: 0.06, height: 0.06, wall: 0.006 } as const;
    expect(warningsOf(aCantilever({ shape })).join()).toContain('shear centre');
  });

  it('a node that nothing is attached to, and a support that holds nothing', () => {
    const portal = aPortal();
    portal.nodes.push({ id: 'stray', x: 9, z: 9 });
    portal.supports.push({ node: 'left corner' });
    const lines = warningsOf(portal).join();
    expect(lines).toContain('nodes.4 | Node “stray”');
    expect(lines).toContain('supports.2 | Support at node “left corner”: it holds nothing');
  });
});

describe('in the X–Z plane', () => {
  it('refuses what couples out of it: an arm, a roll, inclined axes, an offset, a product of inertia', () => {
    const lines = refusalsOf(
      flatPortal((portal) => {
        portal.sections[0]!.shape = { kind: 'solid-rectangle', width: 0.02, height: 0.1 };
        portal.members[0]!.startArm = [0, 0.1, 0];
        portal.members[1]!.roll = 0.3;
        portal.supports[0]!.axes = { x: [1, 1, 0], z: [0, 0, 1] };
        portal.masses.push({
          id: 'motor',
          name: 'Motor',
          node: 'left corner',
          mass: 5,
          offset: [0, 0.1, 0],
          inertia: { Ixx: 1, Iyy: 1, Izz: 1, Ixy: 0.1 },
        });
      }),
    ).map((line) => line.split(' | ')[0]);
    expect(lines).toEqual([
      'members.0.startArm',
      'members.1.roll',
      'supports.0.axes',
      'masses.0.offset',
      'masses.0.inertia',
    ]);
  });

  it('allows a quarter turn, and any roll of a section alike in all directions', () => {
    const turned = flatPortal((portal) => {
      portal.sections[0]!.shape = { kind: 'solid-rectangle', width: 0.02, height: 0.1 };
      portal.members[1]!.roll = Math.PI / 2;
    });
    expect(refusalsOf(turned)).toEqual([]);
    expect(refusalsOf(flatPortal((portal) => (portal.members[1]!.roll = 0.3)))).toEqual([]);
  });

  it('allows support axes inclined within the plane', () => {
    const inclined = flatPortal((portal) => {
      portal.supports[0]!.axes = { x: [1, 0, 1], z: [0, 0, 1] };
    });
    expect(refusalsOf(inclined)).toEqual([]);
  });

  it('warns of joints and supports on what does not exist', () => {
    const lines = warningsOf(
      flatPortal((portal) => {
        portal.members[1]!.joints = { start: { rz: 0, ry: 0 } };
        portal.supports[0]!.fixed = ['u', 'v', 'w'];
      }),
    );
    expect(lines.join()).toMatch(/members\.1\.joints\.start .*joint on rz is ignored/);
    expect(lines.join()).toMatch(/supports\.0 .*does to v is ignored/);
  });

  it('asks a line along X to have y and z of 0', () => {
    const paths = checkDocument({ ...aPortal(), unknowns: ['w', 'ry'] }).errors.map((e) => e.path);
    expect(paths).toEqual(['nodes.1.z', 'nodes.2.z']);
  });
});

it('accepts a large frame whole', () => {
  const large = aRack({ bays: 20, storeys: 15 });
  expect(large.members.length).toBeGreaterThan(15_000);
  expect(checkDocument(large).errors).toEqual([]);
});
