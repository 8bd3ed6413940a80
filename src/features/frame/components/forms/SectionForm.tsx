import { poissonRatio } from '#shared/frame/materialProperties.ts';
import { sectionProperties } from '#shared/frame/sectionProperties.ts';
import { sectionShelf } from '#shared/frame/shelf.ts';
import type { SectionShape } from '#shared/schemas/frameDocument.ts';
import { Quantity } from '#src/components/Quantity.tsx';
import { Select } from '#src/components/Select.tsx';
import { FieldGrid } from '../fields/fields.tsx';
import { ShapeFields } from '../fields/ShapeFields.tsx';
import { IdField, TextField } from '../fields/textFields.tsx';
import { SectionDrawing } from '../SectionDrawing.tsx';
import type { EntryFormProps } from './EntryFormProps.ts';
import { SECTION_KINDS, shapeOfKind } from './sectionKinds.ts';

/** κ depends on ν: shown for the material of the first member that uses the section, else for steel. */
const STEEL_NU = 0.3;

export function SectionForm({
  frame,
  entry,
  onChange,
  problem,
  disabled,
}: EntryFormProps<'sections'>) {
  const user = frame.members.find(({ section }) => section === entry.id);
  const material = frame.materials.find(({ id }) => id === user?.material);
  const nu = material ? poissonRatio(material) : STEEL_NU;
  const set = (shape: SectionShape) => onChange({ ...entry, shape });
  return (
    <div className="space-y-2">
      <FieldGrid>
        <IdField
          value={entry.id}
          onCommit={(id) => onChange({ ...entry, id })}
          disabled={disabled}
          error={problem('id')}
        />
        <TextField
          label="Name"
          value={entry.name}
          onCommit={(name) => onChange({ ...entry, name })}
          disabled={disabled}
          error={problem('name')}
        />
      </FieldGrid>
      {!disabled && (
        <Select
          label="From the shelf"
          options={[
            { value: '', label: 'choose …' },
            ...sectionShelf().map(({ id, name }) => ({ value: id, label: name })),
          ]}
          value=""
          onValueChange={(chosen) => {
            const shelf = sectionShelf().find(({ id }) => id === chosen);
            if (shelf) onChange({ ...entry, name: shelf.name, shape: shelf.shape });
          }}
        />
      )}
      <Select
        label="Shape"
        options={SECTION_KINDS}
        value={entry.shape.kind}
        onValueChange={(kind) => set(shapeOfKind(kind, entry.shape, nu))}
        disabled={disabled}
      />
      <ShapeFields shape={entry.shape} onChange={set} problem={problem} disabled={disabled} />
      <SectionDrawing shape={entry.shape} />
      <Computed shape={entry.shape} nu={nu} />
    </div>
  );
}

function Computed({ shape, nu }: { shape: SectionShape; nu: number }) {
  const { A, Iy, Iz, Iyz, J, ky, kz, notes } = sectionProperties(shape, nu);
  const rows = [
    ['A', A, 'area'],
    ['Iy', Iy, 'secondMoment'],
    ['Iz', Iz, 'secondMoment'],
    ['Iyz', Iyz, 'secondMoment'],
    ['J', J, 'secondMoment'],
    ['κ along y', ky, 'ratio'],
    ['κ along z', kz, 'ratio'],
  ] as const;
  return (
    <div className="text-sm">
      <dl className="grid grid-cols-2 gap-x-4">
        {rows.map(([label, value, kind]) => (
          <div key={label} className="flex justify-between gap-2 border-b border-rule">
            <dt className="text-ink-soft">{label}</dt>
            <dd>
              <Quantity value={value} kind={kind} />
            </dd>
          </div>
        ))}
      </dl>
      <p className="mt-1 text-ink-soft">
        κ for ν = <Quantity value={nu} kind="ratio" />. {notes.join(' ')}
      </p>
    </div>
  );
}
