import type { FrameDocumentInput } from '#shared/schemas/frameDocument.ts';

/**
 * Frames for tests, as people and programs write them (defaults left out). Every call returns fresh objects;
 * pass them through `checkDocument` for the stored form.
 */

type Lists =
  | 'materials'
  | 'sections'
  | 'nodes'
  | 'members'
  | 'supports'
  | 'springs'
  | 'rigidLinks'
  | 'masses'
  | 'states';

/** A frame document as it may be written, with every list there. */
export type FrameInput = FrameDocumentInput & {
  [List in Lists]: NonNullable<FrameDocumentInput[List]>;
};
type MaterialInput = FrameInput['materials'][number];
type NodeInput = FrameInput['nodes'][number];
type MemberInput = FrameInput['members'][number];
type SupportInput = FrameInput['supports'][number];
type ShapeInput = FrameInput['sections'][number]['shape'];

export interface FrameOptions {
  readonly divisions?: number;
  readonly theory?: 'timoshenko' | 'bernoulli';
  readonly shape?: ShapeInput;
  readonly material?: Partial<MaterialInput>;
}

const ALL = ['u', 'v', 'w', 'rx', 'ry', 'rz'] as const;

/** Square tube 100×100×5 with the corner radii of EN 10219-2 (outer 2T, inner T). */
export function squareTube100x5(): ShapeInput {
  return { kind: 'rectangular-tube', width: 0.1, height: 0.1, wall: 0.005, radius: 0.01 };
}

/** Structural steel, E 210 GPa, ν 0.3, 7850 kg/m³ (EN 1993-1-1 §3.2.6, G left to E and ν). */
export function steel(changes: Partial<MaterialInput> = {}): MaterialInput {
  return { id: 'steel', name: 'Structural steel', E: 210e9, nu: 0.3, density: 7850, ...changes };
}

function base(name: string, options: FrameOptions): FrameInput {
  return {
    name,
    materials: [steel(options.material)],
    sections: [{ id: 'tube', name: 'Tube', shape: options.shape ?? squareTube100x5() }],
    nodes: [],
    members: [],
    supports: [],
    springs: [],
    rigidLinks: [],
    masses: [],
    states: [],
  };
}

function beam(id: string, start: string, end: string, options: FrameOptions): MemberInput {
  return {
    id,
    kind: 'beam',
    start,
    end,
    material: 'steel',
    section: 'tube',
    divisions: options.divisions ?? 4,
    theory: options.theory ?? 'timoshenko',
  };
}

function fixedAt(node: string): SupportInput {
  return { node, fixed: [...ALL] };
}

/** A cantilever along X, clamped at `root`, free at `tip`, with `tipMass` kg there if asked for. */
export function aCantilever(
  options: FrameOptions & { readonly length?: number; readonly tipMass?: number } = {},
): FrameInput {
  return {
    ...base('Cantilever', options),
    nodes: [
      { id: 'root', x: 0, y: 0, z: 0 },
      { id: 'tip', x: options.length ?? 1, y: 0, z: 0 },
    ],
    members: [beam('arm', 'root', 'tip', options)],
    supports: [fixedAt('root')],
    masses:
      options.tipMass === undefined
        ? []
        : [{ id: 'load', name: 'Load', node: 'tip', mass: options.tipMass }],
  };
}

/** A portal in the X–Z plane: two legs and a rail, feet fixed. */
export function aPortal(
  options: FrameOptions & { readonly width?: number; readonly height?: number } = {},
): FrameInput {
  const width = options.width ?? 1;
  const height = options.height ?? 1;
  return {
    ...base('Portal', options),
    nodes: [
      { id: 'left foot', x: 0, y: 0, z: 0 },
      { id: 'left corner', x: 0, y: 0, z: height },
      { id: 'right corner', x: width, y: 0, z: height },
      { id: 'right foot', x: width, y: 0, z: 0 },
    ],
    members: [
      beam('leg 1', 'left foot', 'left corner', options),
      beam('rail', 'left corner', 'right corner', options),
      beam('leg 2', 'right foot', 'right corner', options),
    ],
    supports: [fixedAt('left foot'), fixedAt('right foot')],
  };
}

/**
 * The machine frame of the check values: four legs of 0.8 m, feet fixed, top 1.2 × 0.8 m, a cross-rail
 * between the midpoints of the long rails, and `mass` kg rigidly `massHeight` m above its midpoint.
 */
export function aStand(
  options: FrameOptions & { readonly mass?: number; readonly massHeight?: number } = {},
): FrameInput {
  const corners = [
    ['front left', 0, 0],
    ['front right', 1.2, 0],
    ['back right', 1.2, 0.8],
    ['back left', 0, 0.8],
  ] as const;
  const foot = (place: string): string => `${place} foot`;
  const corner = (place: string): string => `${place} corner`;
  const nodes: NodeInput[] = [
    ...corners.map(([place, x, y]) => ({ id: foot(place), x, y, z: 0 })),
    ...corners.map(([place, x, y]) => ({ id: corner(place), x, y, z: 0.8 })),
    { id: 'front middle', x: 0.6, y: 0, z: 0.8 },
    { id: 'back middle', x: 0.6, y: 0.8, z: 0.8 },
    { id: 'centre', x: 0.6, y: 0.4, z: 0.8 },
  ];
  const rails = [
    ['front left corner', 'front middle'],
    ['front middle', 'front right corner'],
    ['front right corner', 'back right corner'],
    ['back right corner', 'back middle'],
    ['back middle', 'back left corner'],
    ['back left corner', 'front left corner'],
  ] as const;
  return {
    ...base('Machine stand', options),
    nodes,
    members: [
      ...corners.map(([place], i) => beam(`leg ${i + 1}`, foot(place), corner(place), options)),
      ...rails.map(([start, end], i) => beam(`rail ${i + 1}`, start, end, options)),
      beam('cross-rail 1', 'front middle', 'centre', options),
      beam('cross-rail 2', 'centre', 'back middle', options),
    ],
    supports: corners.map(([place]) => fixedAt(foot(place))),
    masses: [
      {
        id: 'motor',
        name: 'Motor',
        node: 'centre',
        mass: options.mass ?? 120,
        offset: [0, 0, options.massHeight ?? 0.3],
      },
    ],
  };
}

/**
 * A 3D rack: `bays` × `bays` bays in plan, `storeys` high, posts and rails along X and Y, feet fixed.
 * Free unknowns with d divisions: 6 per joint above the ground plus 6(d − 1) per member.
 */
export function aRack(
  options: FrameOptions & {
    readonly bays?: number;
    readonly storeys?: number;
    readonly bay?: number;
    readonly storey?: number;
  } = {},
): FrameInput {
  const { bays = 2, storeys = 3, bay = 1, storey = 1 } = options;
  const at = (i: number, j: number, k: number): string => `joint ${i}-${j}-${k}`;
  const nodes: NodeInput[] = [];
  const members: MemberInput[] = [];
  const supports: SupportInput[] = [];
  const join = (role: string, start: string, end: string): void => {
    members.push(beam(`${role} ${members.length + 1}`, start, end, options));
  };
  for (let k = 0; k <= storeys; k += 1) {
    for (let j = 0; j <= bays; j += 1) {
      for (let i = 0; i <= bays; i += 1) {
        nodes.push({ id: at(i, j, k), x: i * bay, y: j * bay, z: k * storey });
        if (k === 0) {
          supports.push(fixedAt(at(i, j, k)));
          continue;
        }
        join('post', at(i, j, k - 1), at(i, j, k));
        if (i > 0) join('rail', at(i - 1, j, k), at(i, j, k));
        if (j > 0) join('beam', at(i, j - 1, k), at(i, j, k));
      }
    }
  }
  return { ...base('Rack', options), nodes, members, supports };
}
