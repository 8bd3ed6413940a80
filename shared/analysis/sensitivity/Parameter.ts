import type { FrameDocument } from '../../schemas/frameDocument.ts';

/** One number of a frame document that a mode may depend on; its list, the entry (a support by its node), its field. */
export interface Parameter {
  readonly list: 'sections' | 'materials' | 'members' | 'supports' | 'springs' | 'masses' | 'nodes';
  readonly id: string;
  /** As in the document: `wall`, `E`, `joints.start.ry`, `stiffness.rx`, `offset.2`, `inertia.Ixx`, `x`. */
  readonly field: string;
  /** In SI, in the operating state: a soft foot's stiffness is the soft one. */
  readonly value: number;
}

const numbers = (entry: object, prefix = ''): [string, number][] =>
  Object.entries(entry).flatMap(([name, value]: [string, unknown]) =>
    typeof value === 'number' ? [[`${prefix}${name}`, value]] : [],
  );

/**
 * Every number of a frame that its modes may depend on.
 *   document  accepted by `checkDocument`, with an operating state applied
 */
export function parametersOf(document: FrameDocument): Parameter[] {
  const translations = (['u', 'v', 'w'] as const).map((d) => document.unknowns.includes(d));
  // In bending along a line the nodes stand apart along X, though no displacement goes there.
  const moves = { x: true, y: translations[1]!, z: translations[2]! && translations[0]! };
  const found: Parameter[] = [];
  const add = (list: Parameter['list'], id: string, fields: readonly [string, number][]) => {
    for (const [field, value] of fields) found.push({ list, id, field, value });
  };
  for (const { id, shape } of document.sections) {
    add('sections', id, numbers(shape));
  }
  for (const { id, ...material } of document.materials) {
    const { E, nu, G, density } = material;
    add('materials', id, numbers({ E, nu, G, density }));
  }
  for (const { id, massPerLength, joints } of document.members) {
    add('members', id, numbers({ massPerLength }));
    for (const end of ['start', 'end'] as const) {
      const sprung = numbers(joints?.[end] ?? {}, `joints.${end}.`);
      add(
        'members',
        id,
        sprung.filter(([, value]) => value > 0),
      );
    }
  }
  for (const { node, stiffness } of document.supports) {
    add('supports', node, numbers(stiffness ?? {}, 'stiffness.'));
  }
  for (const { id, stiffness } of document.springs) {
    add('springs', id, numbers(stiffness, 'stiffness.'));
  }
  for (const { id, mass, offset, inertia } of document.masses) {
    const offsets = numbers(offset, 'offset.').filter((_, axis) => translations[axis]);
    add('masses', id, [...numbers({ mass }), ...offsets, ...numbers(inertia ?? {}, 'inertia.')]);
  }
  for (const { id, x, y, z } of document.nodes) {
    const places = numbers({ x, y, z });
    add(
      'nodes',
      id,
      places.filter(([axis]) => moves[axis as 'x' | 'y' | 'z']),
    );
  }
  return found;
}

/** The document with one of its numbers replaced. */
export function withParameter(
  document: FrameDocument,
  { list, id, field }: Omit<Parameter, 'value'>,
  value: number,
): FrameDocument {
  const entries: readonly object[] = document[list];
  return {
    ...document,
    [list]: entries.map((entry) => {
      if (('node' in entry && list === 'supports' ? entry.node : idOf(entry)) !== id) return entry;
      return list === 'sections' && 'shape' in entry
        ? { ...entry, shape: withNumber(entry.shape as object, field, value) }
        : withNumber(entry, field, value);
    }),
  };
}

const idOf = (entry: object): unknown => ('id' in entry ? entry.id : undefined);

/** A copy of one entry of a document with the number at `field` replaced. */
export function withNumber<Entry extends object>(
  entry: Entry,
  field: string,
  value: number,
): Entry {
  const [name = '', ...rest] = field.split('.');
  const inner = (entry as Record<string, unknown>)[name];
  const replaced =
    rest.length > 0 && typeof inner === 'object' && inner !== null
      ? withNumber(inner, rest.join('.'), value)
      : value;
  if (!Array.isArray(entry)) return { ...entry, [name]: replaced };
  return entry.map((own: unknown, i) => (String(i) === name ? replaced : own)) as unknown as Entry;
}
