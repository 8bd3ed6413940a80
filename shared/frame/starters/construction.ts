import type {
  FrameDocument,
  FrameDocumentInput,
  Inertia,
  OperatingState,
  Support,
  Vector3,
} from '../../schemas/frameDocument.ts';
import { frameDocument } from '../../schemas/frameDocument.ts';
import { standardMaterials } from '../materials.ts';
import { sectionShelf } from '../shelf.ts';
import type { Feet, Machine, StarterParameters } from './parameters.ts';

/** A starter's own part: its nodes by place, its members by role, which nodes are feet, what carries the machine. */
export interface Layout {
  readonly places: Readonly<Record<string, Vector3>>;
  /** [name by role, start place, end place] */
  readonly members: readonly (readonly [string, string, string])[];
  readonly feet: readonly string[];
  readonly carrier: string;
}

/** Puts a layout and the parameters together into a whole document. */
export function construct(parameters: StarterParameters, layout: Layout): FrameDocument {
  const material = standardMaterials().filter((entry) => entry.id === parameters.material);
  const section = sectionShelf().filter((entry) => entry.id === parameters.section);
  return frameDocument.parse({
    name: parameters.name,
    materials: material,
    sections: section,
    nodes: Object.entries(layout.places).map(([place, [x, y, z]]) => ({
      id: place,
      name: place,
      x,
      y,
      z,
    })),
    members: layout.members.map(([name, start, end]) => ({
      id: name,
      name,
      kind: 'beam',
      start,
      end,
      material: parameters.material,
      section: parameters.section,
    })),
    supports: layout.feet.map((node) => supportAt(node, parameters.feet)),
    masses: [
      {
        id: 'machine',
        name: parameters.machine.name,
        node: layout.carrier,
        mass: parameters.machine.mass,
        offset: [0, 0, parameters.machine.centreHeight],
        inertia: boxInertia(parameters.machine),
      },
    ],
    states: parameters.feet.kind === 'stiffness' ? feetStates() : [],
  } satisfies FrameDocumentInput);
}

function supportAt(node: string, feet: Feet): Partial<Support> & { node: string } {
  if (feet.kind === 'fixed') return { node, fixed: ['u', 'v', 'w', 'rx', 'ry', 'rz'] };
  const tilting = feet.tilting > 0 ? { rx: feet.tilting, ry: feet.tilting } : {};
  return {
    node,
    stiffness: { u: feet.horizontal, v: feet.horizontal, w: feet.vertical, ...tilting },
  };
}

/** Feet are the least known stiffness of a frame: the expected value and both ends of its range, from the start. */
function feetStates(): OperatingState[] {
  return [
    { id: 'feet as expected', name: 'Feet as expected', masses: {}, supports: 'expected' },
    { id: 'feet soft', name: 'Feet soft', masses: {}, supports: 'soft' },
    { id: 'feet stiff', name: 'Feet stiff', masses: {}, supports: 'stiff' },
  ];
}

/** Moments of inertia of an even box about its centre, m(a² + b²)/12 [kg·m²]. */
export function boxInertia(box: Pick<Machine, 'mass' | 'length' | 'width' | 'height'>): Inertia {
  const { mass, length, width, height } = box;
  return {
    Ixx: (mass * (width ** 2 + height ** 2)) / 12,
    Iyy: (mass * (length ** 2 + height ** 2)) / 12,
    Izz: (mass * (length ** 2 + width ** 2)) / 12,
  };
}
