import type { DocumentList } from '#shared/frame/documentDiff.ts';
import { sectionProperties } from '#shared/frame/sectionProperties.ts';
import type { Displacement, Vector3 } from '#shared/schemas/frameDocument.ts';
import type { QuantityKind } from '#shared/units/quantities.ts';
import type { DataColumn } from '#src/components/dataTable/DataTable.tsx';
import { QuantityInput } from '#src/components/QuantityInput.tsx';
import { Select } from '#src/components/Select.tsx';
import type { Units } from '#src/hooks/useUnits.ts';
import type { FrameCommand } from '../../state/command.ts';
import type { FrameEditing } from '../../state/FrameEditing.ts';
import { idOf, type EntryOf } from '../../state/lists.ts';
import { withField } from '../../state/withField.ts';
import { SECTION_KINDS } from '../forms/sectionKinds.ts';
import { CellText } from './CellText.tsx';

type Editing = Pick<FrameEditing, 'frame' | 'readOnly' | 'run'>;
type Columns<List extends DocumentList> = readonly DataColumn<EntryOf<List>>[];

/** Columns of each list: what is most often read and changed; the rest stands in the details. */
export const COLUMNS: {
  readonly [List in DocumentList]: (editing: Editing, units: Units) => Columns<List>;
} = {
  nodes: (editing, units) => [
    key('nodes'),
    named('nodes', editing),
    ...(['x', 'y', 'z'] as const).map((axis) =>
      quantity('nodes', editing, units, axis.toUpperCase(), 'length', {
        read: (node) => node[axis],
        write: (node, value) => ({ ...node, [axis]: value }),
      }),
    ),
  ],
  members: (editing, units) => [
    key('members'),
    named('members', editing),
    text('kind', 'Kind', (member) => member.kind),
    text('start', 'Start', (member) => member.start),
    text('end', 'End', (member) => member.end),
    choice('members', editing, 'Section', 'section', editing.frame.sections),
    choice('members', editing, 'Material', 'material', editing.frame.materials),
    text('divisions', 'Divisions', ({ kind, divisions }) => String(kind === 'bar' ? 1 : divisions)),
    text('theory', 'Theory', ({ kind, theory }) => (kind === 'bar' ? '–' : theory)),
    text('roll', 'Roll', ({ roll }) => (roll === 0 ? '–' : units.quantity(roll, 'angle'))),
    text('joints', 'Joints', ({ joints }) =>
      joints
        ? (['start', 'end'] as const).filter((end) => joints[end] !== undefined).join(', ')
        : '–',
    ),
  ],
  sections: (_editing, units) => [
    key('sections'),
    named('sections', _editing),
    text(
      'kind',
      'Shape',
      ({ shape }) => SECTION_KINDS.find(({ value }) => value === shape.kind)?.label ?? shape.kind,
    ),
    ...(
      [
        ['A', 'area'],
        ['Iy', 'secondMoment'],
        ['Iz', 'secondMoment'],
        ['J', 'secondMoment'],
      ] as const
    ).map(([name, kind]): DataColumn<EntryOf<'sections'>> => ({
      id: name,
      header: name,
      unit: units.symbol(kind),
      numeric: true,
      sortValue: ({ shape }) => sectionProperties(shape, 0.3)[name],
      cell: ({ shape }) => units.number(sectionProperties(shape, 0.3)[name], kind),
    })),
  ],
  materials: (editing, units) => [
    key('materials'),
    named('materials', editing),
    quantity('materials', editing, units, 'E', 'pressure', {
      read: ({ E }) => E,
      write: (material, E) => ({ ...material, E }),
    }),
    quantity('materials', editing, units, 'Density', 'density', {
      read: ({ density }) => density,
      write: (material, density) => ({ ...material, density }),
    }),
    text('nu', 'ν', ({ nu }) => (nu === undefined ? '–' : units.number(nu, 'ratio'))),
    text('G', 'G', ({ G }) => (G === undefined ? 'from E and ν' : units.quantity(G, 'pressure'))),
    text('basis', 'Basis', ({ basis }) => basis ?? '–'),
  ],
  supports: (editing, units) => [
    key('supports'),
    text('fixed', 'Fixed', ({ fixed }) => fixed.join(' ') || '–'),
    text('stiffness', 'Sprung', ({ stiffness }) => sixWords(stiffness, units)),
    ...(['soft', 'stiff'] as const).map((end) =>
      quantity('supports', editing, units, end === 'soft' ? 'Soft ×' : 'Stiff ×', 'ratio', {
        read: ({ bracket }) => bracket[end],
        write: (support, factor) => ({
          ...support,
          bracket: { ...support.bracket, [end]: factor },
        }),
      }),
    ),
    text('basis', 'Basis', ({ basis }) => basis ?? '–'),
  ],
  springs: (editing, units) => [
    key('springs'),
    named('springs', editing),
    text('start', 'From', ({ start }) => start),
    text('end', 'To', ({ end }) => end),
    text('stiffness', 'Stiffness', ({ stiffness }) => sixWords(stiffness, units)),
  ],
  rigidLinks: (editing) => [
    key('rigidLinks'),
    named('rigidLinks', editing),
    text('main', 'Main node', ({ main }) => main),
    text('others', 'Moves with it', ({ others }) => others.join(', ')),
  ],
  masses: (editing, units) => [
    key('masses'),
    named('masses', editing),
    text('node', 'Node', ({ node }) => node),
    quantity('masses', editing, units, 'Mass', 'mass', {
      read: ({ mass }) => mass,
      write: (entry, mass) => ({ ...entry, mass }),
    }),
    text('offset', 'Centre of gravity from node', ({ offset }) => vectorWords(offset, units)),
    text('inertia', 'Inertia', ({ inertia }) => (inertia ? 'stated' : 'none')),
  ],
  states: (editing) => [
    key('states'),
    named('states', editing),
    text('supports', 'Supports', ({ supports }) =>
      typeof supports === 'string' ? supports : 'each by itself',
    ),
    text('masses', 'Masses changed', ({ masses }) => Object.keys(masses).join(', ') || '–'),
  ],
};

function key<List extends DocumentList>(list: List): DataColumn<EntryOf<List>> {
  return {
    id: 'id',
    header: list === 'supports' ? 'Node' : 'Id',
    rowHeader: true,
    sortValue: (entry) => idOf(list, entry),
    cell: (entry) => idOf(list, entry),
  };
}

function text<Row>(id: string, header: string, read: (row: Row) => string): DataColumn<Row> {
  return { id, header, sortValue: read, cell: read };
}

type Named = Exclude<DocumentList, 'supports'>;

function named<List extends Named>(list: List, editing: Editing): DataColumn<EntryOf<List>> {
  return {
    id: 'name',
    header: 'Name',
    sortValue: (entry) => entry.name ?? '',
    cell: (entry) => (
      <CellText
        label={`Name of ${entry.id}`}
        value={entry.name ?? ''}
        readOnly={editing.readOnly}
        onCommit={(name) =>
          update(
            list,
            editing,
            entry.id,
            withField<{ name?: string }, 'name'>(
              { ...entry } as { name?: string },
              'name',
              name === '' && isOptionalName(list) ? undefined : name,
            ),
          )
        }
      />
    ),
  };
}

const isOptionalName = (list: Named): boolean =>
  ['nodes', 'members', 'springs', 'rigidLinks'].includes(list);

function quantity<List extends DocumentList>(
  list: List,
  editing: Editing,
  units: Units,
  header: string,
  kind: QuantityKind,
  {
    read,
    write,
  }: {
    read: (entry: EntryOf<List>) => number;
    write: (entry: EntryOf<List>, value: number) => EntryOf<List>;
  },
): DataColumn<EntryOf<List>> {
  const anyNumber = list === 'nodes';
  return {
    id: header,
    header,
    unit: units.symbol(kind),
    numeric: true,
    sortValue: read,
    cell: (entry) =>
      editing.readOnly ? (
        units.number(read(entry), kind)
      ) : (
        <div className="ml-auto w-28">
          <QuantityInput
            labelHidden
            label={`${header} of ${idOf(list, entry)}`}
            kind={kind}
            value={read(entry)}
            check={anyNumber ? undefined : (value) => (value > 0 ? null : 'Above 0')}
            onCommit={(value) => update(list, editing, idOf(list, entry), write(entry, value))}
          />
        </div>
      ),
  };
}

function choice(
  list: 'members',
  editing: Editing,
  header: string,
  field: 'section' | 'material',
  options: readonly { id: string; name: string }[],
): DataColumn<EntryOf<'members'>> {
  const nameOf = new Map(options.map(({ id, name }) => [id, name]));
  return {
    id: field,
    header,
    sortValue: (member) => nameOf.get(member[field]) ?? member[field],
    cell: (member) =>
      editing.readOnly ? (
        (nameOf.get(member[field]) ?? member[field])
      ) : (
        <div className="w-44">
          <Select
            labelHidden
            label={`${header} of ${member.id}`}
            options={[
              ...(nameOf.has(member[field])
                ? []
                : [{ value: member[field], label: `${member[field]} (missing)` }]),
              ...options.map(({ id, name }) => ({ value: id, label: name || id })),
            ]}
            value={member[field]}
            onValueChange={(value) =>
              update(list, editing, member.id, { ...member, [field]: value })
            }
          />
        </div>
      ),
  };
}

function update(list: DocumentList, { run }: Editing, id: string, entry: object): void {
  // The union of commands is indexed by list; the compiler cannot follow the generic through it.
  run({ kind: 'update', list, id, entry } as unknown as FrameCommand, `change ${id}`);
}

function sixWords(values: { [D in Displacement]?: number | undefined } | undefined, units: Units) {
  const parts = Object.entries(values ?? {}).flatMap(([displacement, value]) =>
    value === undefined
      ? []
      : [
          `${displacement} ${units.quantity(value, displacement.startsWith('r') ? 'rotationalStiffness' : 'stiffness')}`,
        ],
  );
  return parts.join(', ') || '–';
}

function vectorWords(vector: Vector3, units: Units): string {
  if (vector.every((part) => part === 0)) return 'at the node';
  return `${vector.map((part) => units.number(part, 'length')).join(', ')} ${units.symbol('length')}`;
}
