import { z } from 'zod';

/**
 * The frame document, version 1: the only definition of what a frame is. All values are SI base
 * units (m, kg, s, N, rad, Hz). This schema checks form; `shared/frame/checkDocument.ts` checks
 * meaning (references, fit of walls, planarity) and reports every refusal at once.
 */

/** The six displacements of a node, in this order wherever an array holds them. */
export const DISPLACEMENTS = ['u', 'v', 'w', 'rx', 'ry', 'rz'] as const;
export type Displacement = (typeof DISPLACEMENTS)[number];
export const displacement = z.enum(DISPLACEMENTS);

/** Limits that keep a document within what the product promises to solve; beyond them it is refused. */
export const DOCUMENT_LIMITS = {
  nodes: 20_000,
  members: 20_000,
  perList: 20_000,
  states: 50,
  text: 2_000,
  name: 200,
  id: 64,
  divisions: 200,
} as const;

const id = z
  .string()
  .min(1, 'An id must not be empty.')
  .max(DOCUMENT_LIMITS.id)
  .regex(/^[A-Za-z0-9][A-Za-z0-9 ._-]*$/, 'An id may hold letters, digits, spaces, . _ and -.');
const name = z.string().max(DOCUMENT_LIMITS.name);
const text = z.string().max(DOCUMENT_LIMITS.text);
/** Beyond these sizes a product of a few values leaves the range of a double; no machine comes near them. */
const LARGEST = 1e15;
const SMALLEST = 1e-25;
const finite = z
  .number({ error: 'Enter a number.' })
  .min(-LARGEST, 'This number is too large.')
  .max(LARGEST, 'This number is too large.');
const positive = finite
  .positive('Must be greater than zero.')
  .refine((value) => value <= 0 || value >= SMALLEST, 'This number is too small.');
const nonNegative = finite.nonnegative('Must not be negative.');
const vector3 = z.tuple([finite, finite, finite], 'This must be a list of three numbers.');
export type Vector3 = z.infer<typeof vector3>;

const perDisplacement = <T extends z.ZodType>(value: T) =>
  z.strictObject({
    u: value.optional(),
    v: value.optional(),
    w: value.optional(),
    rx: value.optional(),
    ry: value.optional(),
    rz: value.optional(),
  });

export const UNKNOWN_SETS = [
  ['u', 'v', 'w', 'rx', 'ry', 'rz'],
  ['u', 'w', 'ry'],
  ['w', 'ry'],
  ['u'],
] as const satisfies readonly (readonly Displacement[])[];

export const unknowns = z
  .array(displacement)
  .refine(
    (list) =>
      UNKNOWN_SETS.some((set) => set.length === list.length && set.every((d, i) => d === list[i])),
    'Unknowns must be one of: u v w rx ry rz; u w ry; w ry; u.',
  );

export const material = z.strictObject({
  id,
  name,
  E: positive,
  nu: finite
    .gt(-1, 'Poisson’s ratio must be above −1.')
    .lt(0.5, 'Poisson’s ratio must be below 0.5.')
    .optional(),
  G: positive.optional(),
  density: positive,
  dampingRatio: nonNegative.max(1, 'A damping ratio is at most 1.').optional(),
  basis: text.optional(),
});

const openProfile = {
  width: positive,
  height: positive,
  web: positive,
  flange: positive,
  radius: nonNegative.default(0),
};

export const sectionShape = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('solid-rectangle'), width: positive, height: positive }),
  z.strictObject({ kind: z.literal('solid-round'), diameter: positive }),
  z.strictObject({ kind: z.literal('round-tube'), diameter: positive, wall: positive }),
  z.strictObject({
    kind: z.literal('rectangular-tube'),
    width: positive,
    height: positive,
    wall: positive,
    radius: nonNegative,
    innerRadius: nonNegative.optional(),
  }),
  z.strictObject({ kind: z.literal('i-section'), ...openProfile }),
  z.strictObject({ kind: z.literal('channel'), ...openProfile }),
  z.strictObject({ kind: z.literal('tee'), ...openProfile }),
  z.strictObject({
    kind: z.literal('angle'),
    width: positive,
    height: positive,
    wall: positive,
    radius: nonNegative.default(0),
  }),
  z.strictObject({
    kind: z.literal('custom'),
    A: positive,
    Iy: positive,
    Iz: positive,
    Iyz: finite.default(0),
    J: positive,
    ky: positive,
    kz: positive,
  }),
]);

export const section = z.strictObject({ id, name, shape: sectionShape });

export const node = z.strictObject({
  id,
  name: name.optional(),
  x: finite,
  y: finite.default(0),
  z: finite,
});

/** 0 = free, positive = that stiffness [N/m or N·m/rad] in member axes, absent = rigid. */
export const joint = perDisplacement(nonNegative);

export const member = z.strictObject({
  id,
  name: name.optional(),
  kind: z.enum(['beam', 'bar']),
  start: id,
  end: id,
  material: id,
  section: id,
  roll: finite.default(0),
  divisions: z
    .union(
      [
        z
          .int('Divisions are a whole number or "auto".')
          .min(1, 'At least 1 division.')
          .max(DOCUMENT_LIMITS.divisions, `At most ${DOCUMENT_LIMITS.divisions} divisions.`),
        z.literal('auto'),
      ],
      'Divisions are a whole number from 1 to 200, or "auto".',
    )
    .default(4),
  theory: z.enum(['timoshenko', 'bernoulli']).default('timoshenko'),
  massPerLength: nonNegative.default(0),
  startArm: vector3.optional(),
  endArm: vector3.optional(),
  joints: z.strictObject({ start: joint.optional(), end: joint.optional() }).optional(),
});

export const support = z.strictObject({
  node: id,
  fixed: z.array(displacement).max(6).default([]),
  stiffness: perDisplacement(positive).optional(),
  damping: perDisplacement(nonNegative).optional(),
  bracket: z.strictObject({ soft: positive, stiff: positive }).default({ soft: 0.5, stiff: 2 }),
  axes: z.strictObject({ x: vector3, z: vector3 }).optional(),
  basis: text.optional(),
});

export const spring = z.strictObject({
  id,
  name: name.optional(),
  start: id,
  end: id,
  stiffness: perDisplacement(positive),
  damping: perDisplacement(nonNegative).optional(),
});

export const rigidLink = z.strictObject({
  id,
  name: name.optional(),
  main: id,
  others: z.array(id).min(1, 'A rigid link needs at least one other node.'),
});

export const inertia = z.strictObject({
  Ixx: nonNegative,
  Iyy: nonNegative,
  Izz: nonNegative,
  Ixy: finite.optional(),
  Ixz: finite.optional(),
  Iyz: finite.optional(),
});

export const pointMass = z.strictObject({
  id,
  name,
  node: id,
  mass: positive,
  offset: vector3.default([0, 0, 0]),
  inertia: inertia.optional(),
});

export const supportCondition = z.enum(['soft', 'expected', 'stiff']);
export type SupportCondition = z.infer<typeof supportCondition>;

export const operatingState = z.strictObject({
  id,
  name,
  masses: z
    .record(
      z.string(),
      z.strictObject({
        present: z.boolean().optional(),
        mass: positive.optional(),
        node: id.optional(),
        offset: vector3.optional(),
      }),
    )
    .default({}),
  supports: z
    .union(
      [supportCondition, z.record(z.string(), supportCondition)],
      'Supports are soft, expected or stiff: one word for all, or one by node.',
    )
    .default('expected'),
});

const list = <T extends z.ZodType>(item: T, most: number) =>
  z.array(item).max(most, `At most ${most} entries.`).default([]);

export const frameDocument = z.strictObject({
  format: z
    .literal('ringstead-frame', 'This is not a Ringstead frame: the format is “ringstead-frame”.')
    .default('ringstead-frame'),
  version: z.literal(1, 'Only version 1 of the document can be read here.').default(1),
  name,
  unknowns: unknowns.default(['u', 'v', 'w', 'rx', 'ry', 'rz']),
  materials: list(material, DOCUMENT_LIMITS.perList),
  sections: list(section, DOCUMENT_LIMITS.perList),
  nodes: list(node, DOCUMENT_LIMITS.nodes),
  members: list(member, DOCUMENT_LIMITS.members),
  supports: list(support, DOCUMENT_LIMITS.perList),
  springs: list(spring, DOCUMENT_LIMITS.perList),
  rigidLinks: list(rigidLink, DOCUMENT_LIMITS.perList),
  masses: list(pointMass, DOCUMENT_LIMITS.perList),
  states: list(operatingState, DOCUMENT_LIMITS.states),
});

/** A frame document as it is stored: every default filled in. */
export type FrameDocument = z.infer<typeof frameDocument>;
/** A frame document as people and programs may write it: defaults may be left out. */
export type FrameDocumentInput = z.input<typeof frameDocument>;
export type Material = z.infer<typeof material>;
export type Section = z.infer<typeof section>;
export type SectionShape = z.infer<typeof sectionShape>;
export type SectionKind = SectionShape['kind'];
export type FrameNode = z.infer<typeof node>;
export type Member = z.infer<typeof member>;
export type Joint = z.infer<typeof joint>;
export type Support = z.infer<typeof support>;
export type Spring = z.infer<typeof spring>;
export type RigidLink = z.infer<typeof rigidLink>;
export type PointMass = z.infer<typeof pointMass>;
export type Inertia = z.infer<typeof inertia>;
export type OperatingState = z.infer<typeof operatingState>;
