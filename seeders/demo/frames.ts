import { boxInertia } from '#shared/frame/starters/construction.ts';
import { buildPortal, portalParameters } from '#shared/frame/starters/portal.ts';
import { buildSkid, skidParameters } from '#shared/frame/starters/skid.ts';
import { buildStand, standParameters } from '#shared/frame/starters/stand.ts';
import {
  frameDocument,
  type FrameDocument,
  type FrameDocumentInput,
} from '#shared/schemas/frameDocument.ts';

/** The five frames of the demo. Dimensions in m, masses in kg, stiffnesses in N/m and N·m/rad. */

const withParts = (base: FrameDocument, parts: Partial<FrameDocumentInput>): FrameDocument =>
  frameDocument.parse({ ...base, ...parts });

/** Feet as a designer draws them first: held by the floor in every direction. */
export function coolantPumpStandFixed(): FrameDocument {
  return buildStand(
    standParameters.parse({
      name: 'Coolant pump stand',
      section: 'SHS 80x5',
      machine: {
        name: 'Pump and motor',
        mass: 118,
        centreHeight: 0.26,
        length: 0.62,
        width: 0.3,
        height: 0.34,
      },
    }),
  );
}

/** The same stand on levelling feet, with what their stiffness rests on. */
export function coolantPumpStand(): FrameDocument {
  const fixed = coolantPumpStandFixed();
  return withParts(fixed, {
    supports: fixed.supports.map(({ node }) => ({
      node,
      stiffness: { u: 9e6, v: 9e6, w: 4.5e7, rx: 2.5e4, ry: 2.5e4 },
      basis: 'Levelling foot M20, figures of a comparable foot; not measured here.',
    })),
    states: [
      { id: 'feet as expected', name: 'Feet as expected' },
      { id: 'feet soft', name: 'Feet soft', supports: 'soft' },
      { id: 'feet stiff', name: 'Feet stiff', supports: 'stiff' },
    ],
  });
}

/** A fan on four elastomer mounts over a skid: rigid links, springs, a belt guard that is on or off. */
export function exhaustFanSkid(): FrameDocument {
  const base = buildSkid(
    skidParameters.parse({
      name: 'Exhaust fan skid',
      length: 2,
      width: 0.9,
      machine: {
        name: 'Motor 11 kW',
        mass: 96,
        centreHeight: 0.24,
        length: 0.5,
        width: 0.36,
        height: 0.36,
      },
    }),
  );
  const z = 0.15;
  const seats = [
    ['fan seat 1', 'front left', 0.35, 0.2],
    ['fan seat 2', 'front middle', 0.85, 0.2],
    ['fan seat 3', 'back left', 0.35, 0.7],
    ['fan seat 4', 'back middle', 0.85, 0.7],
  ] as const;
  const mount = { u: 3.2e5, v: 3.2e5, w: 9.5e5, rx: 400, ry: 400, rz: 400 };
  return withParts(base, {
    nodes: [
      ...base.nodes,
      { id: 'fan', name: 'fan casing', x: 0.6, y: 0.45, z: z + 0.35 },
      ...seats.map(([id, , x, y]) => ({ id, name: id, x, y, z })),
    ],
    rigidLinks: [
      {
        id: 'fan feet',
        name: 'fan casing and its feet',
        main: 'fan',
        others: seats.map(([id]) => id),
      },
    ],
    springs: seats.map(([seat, corner], i) => ({
      id: `mount ${i + 1}`,
      name: `elastomer mount ${i + 1}`,
      start: corner,
      end: seat,
      stiffness: mount,
    })),
    masses: [
      ...base.masses,
      {
        id: 'fan',
        name: 'Fan with casing',
        node: 'fan',
        mass: 142,
        offset: [0, 0.04, 0.02],
        inertia: boxInertia({ mass: 142, length: 0.7, width: 0.45, height: 0.75 }),
      },
      { id: 'guard', name: 'Belt guard', node: 'front middle', mass: 18, offset: [0, -0.08, 0.3] },
    ],
    states: [
      { id: 'guard on', name: 'Belt guard on' },
      { id: 'guard off', name: 'Belt guard off', masses: { guard: { present: false } } },
    ],
  });
}

/** A portal that carries a head on a carriage: three places along the spine. */
export function balancingRig(): FrameDocument {
  const base = buildPortal(
    portalParameters.parse({
      name: 'Balancing rig portal',
      length: 1.8,
      machine: {
        name: 'Balancing head',
        mass: 85,
        centreHeight: 0.22,
        length: 0.35,
        width: 0.4,
        height: 0.4,
      },
    }),
  );
  return withParts(base, {
    states: [
      { id: 'middle', name: 'Carriage in the middle' },
      { id: 'left', name: 'Carriage left', masses: { machine: { node: 'left middle' } } },
      { id: 'right', name: 'Carriage right', masses: { machine: { node: 'right middle' } } },
    ],
  });
}

/** A light stand with bolted cross-rail ends that give a little. */
export function feederStand(): FrameDocument {
  const base = buildStand(
    standParameters.parse({
      name: 'Press feeder stand',
      length: 1.4,
      width: 0.7,
      height: 0.95,
      section: 'RHS 80x40x4',
      machine: {
        name: 'Feeder gearmotor',
        mass: 64,
        centreHeight: 0.18,
        length: 0.42,
        width: 0.26,
        height: 0.26,
      },
    }),
  );
  const bolted = { ry: 1.6e5, rz: 1.2e5 };
  return withParts(base, {
    members: base.members.map((member) =>
      member.id === 'cross-rail front'
        ? { ...member, joints: { start: bolted } }
        : member.id === 'cross-rail back'
          ? { ...member, joints: { end: bolted } }
          : member,
    ),
  });
}

/** A filling station whose tank is full or empty; stiffer legs in its second issue. */
export function fillingStation(legs: 'SHS 100x5' | 'SHS 120x6', tankFull = 410): FrameDocument {
  const base = buildStand(
    standParameters.parse({
      name: 'Filling station frame',
      length: 1.6,
      width: 1,
      height: 1.1,
      section: legs,
      machine: {
        name: 'Agitator drive',
        mass: 72,
        centreHeight: 0.45,
        length: 0.3,
        width: 0.3,
        height: 0.6,
      },
    }),
  );
  return withParts(base, {
    masses: [
      ...base.masses,
      {
        id: 'tank',
        name: 'Tank',
        node: 'cross-rail middle',
        mass: tankFull,
        offset: [0, 0, -0.3],
        inertia: boxInertia({ mass: tankFull, length: 0.8, width: 0.8, height: 0.7 }),
      },
    ],
    states: [
      { id: 'tank full', name: 'Tank full' },
      { id: 'tank empty', name: 'Tank empty', masses: { tank: { mass: 62 } } },
    ],
  });
}
