import type { Member } from '#shared/schemas/frameDocument.ts';
import { DOCUMENT_LIMITS } from '#shared/schemas/frameDocument.ts';
import { Quantity } from '#src/components/Quantity.tsx';
import { QuantityInput } from '#src/components/QuantityInput.tsx';
import { Select } from '#src/components/Select.tsx';
import { frameModel } from '#src/viewer/model/frameModel.ts';
import { orNothing, withField } from '../../state/withField.ts';
import { not0Below } from '../fields/checks.ts';
import { FieldGrid, FormPart, VectorField } from '../fields/fields.tsx';
import { JointField } from '../fields/JointField.tsx';
import { IdField, ReferenceField, TextField } from '../fields/textFields.tsx';
import type { EntryFormProps } from './EntryFormProps.ts';

const KINDS = [
  { value: 'beam', label: 'beam' },
  { value: 'bar', label: 'bar (along its axis only)' },
] as const;
const THEORIES = [
  { value: 'timoshenko', label: 'Timoshenko (with shear)' },
  { value: 'bernoulli', label: 'Bernoulli-Euler' },
] as const;

export function MemberForm(props: EntryFormProps<'members'>) {
  const { frame, entry, onChange, problem, disabled } = props;
  const set = (change: Partial<Member>) => onChange({ ...entry, ...change });
  const placed = frameModel({ ...frame, members: [entry] }).members[0];
  return (
    <div className="space-y-2">
      <FieldGrid>
        <IdField
          value={entry.id}
          onCommit={(id) => set({ id })}
          disabled={disabled}
          error={problem('id')}
        />
        <TextField
          label="Name"
          value={entry.name ?? ''}
          onCommit={(name) => onChange(withField(entry, 'name', name || undefined))}
          disabled={disabled}
          error={problem('name')}
        />
        <ReferenceField
          label="Start"
          frame={frame}
          list="nodes"
          value={entry.start}
          onCommit={(start) => set({ start })}
          disabled={disabled}
          error={problem('start')}
        />
        <ReferenceField
          label="End"
          frame={frame}
          list="nodes"
          value={entry.end}
          onCommit={(end) => set({ end })}
          disabled={disabled}
          error={problem('end')}
        />
        <ReferenceField
          label="Section"
          frame={frame}
          list="sections"
          value={entry.section}
          onCommit={(section) => set({ section })}
          disabled={disabled}
          error={problem('section')}
        />
        <ReferenceField
          label="Material"
          frame={frame}
          list="materials"
          value={entry.material}
          onCommit={(material) => set({ material })}
          disabled={disabled}
          error={problem('material')}
        />
        <Select
          label="Kind"
          options={KINDS}
          value={entry.kind}
          onValueChange={(kind) => set({ kind })}
          disabled={disabled}
          error={problem('kind')}
        />
        <Select
          label="Theory"
          options={THEORIES}
          value={entry.theory}
          onValueChange={(theory) => set({ theory })}
          disabled={disabled || entry.kind === 'bar'}
          error={problem('theory')}
        />
        <DivisionsField {...props} />
        <QuantityInput
          label="Roll"
          kind="angle"
          value={entry.roll}
          onCommit={(roll) => set({ roll })}
          disabled={disabled}
          error={problem('roll')}
        />
      </FieldGrid>
      <QuantityInput
        label="Carried besides its own mass"
        hint="Pipes, cladding: moves with the member, adds nothing to its stiffness."
        kind="massPerLength"
        value={entry.massPerLength}
        check={not0Below}
        onCommit={(massPerLength) => set({ massPerLength })}
        disabled={disabled}
        error={problem('massPerLength')}
      />
      {placed && (
        <p className="text-sm text-ink-soft">
          Length between its ends <Quantity value={placed.axes.length} kind="length" />
          {placed.axes.nearlyUpright && '; nearly upright: a small move would turn its y and z.'}
        </p>
      )}
      <Joints {...props} />
      <Arms {...props} />
    </div>
  );
}

function DivisionsField({ entry, onChange, problem, disabled }: EntryFormProps<'members'>) {
  return (
    <TextField
      label="Divisions"
      value={String(entry.kind === 'bar' ? 1 : entry.divisions)}
      disabled={disabled || entry.kind === 'bar'}
      error={problem('divisions')}
      check={(typed) => {
        const count = Number(typed);
        return typed.trim() === 'auto' ||
          (Number.isInteger(count) && count >= 1 && count <= DOCUMENT_LIMITS.divisions)
          ? null
          : `A whole number 1 to ${DOCUMENT_LIMITS.divisions}, or auto.`;
      }}
      onCommit={(typed) =>
        onChange({ ...entry, divisions: typed.trim() === 'auto' ? 'auto' : Number(typed) })
      }
    />
  );
}

function Joints({ frame, entry, onChange, problem, disabled }: EntryFormProps<'members'>) {
  const ends = (['start', 'end'] as const).filter((end) => entry.joints?.[end] !== undefined);
  return (
    <FormPart
      title="Joints"
      said={ends.length === 0 ? 'rigid at both ends' : `at ${ends.join(' and ')}`}
    >
      <p className="text-sm text-ink-soft">In the member’s own axes x (along), y, z.</p>
      {(['start', 'end'] as const).map((end) => (
        <JointField
          key={end}
          label={`At the ${end}, node ${entry[end]}`}
          value={entry.joints?.[end]}
          unknowns={frame.unknowns}
          disabled={disabled}
          error={problem(`joints.${end}`)}
          onCommit={(joint) =>
            onChange(
              withField(entry, 'joints', orNothing(withField(entry.joints ?? {}, end, joint))),
            )
          }
        />
      ))}
    </FormPart>
  );
}

function Arms({ entry, onChange, problem, disabled }: EntryFormProps<'members'>) {
  const some = entry.startArm !== undefined || entry.endArm !== undefined;
  return (
    <FormPart title="Rigid arms" said={some ? 'stated' : 'none'}>
      <p className="text-sm text-ink-soft">From the node to the member’s end, in global axes.</p>
      {(['startArm', 'endArm'] as const).map((arm) => (
        <VectorField
          key={arm}
          label={arm === 'startArm' ? 'At the start' : 'At the end'}
          value={entry[arm] ?? [0, 0, 0]}
          disabled={disabled}
          error={problem(arm)}
          onCommit={(value) =>
            onChange(withField(entry, arm, value.every((part) => part === 0) ? undefined : value))
          }
        />
      ))}
    </FormPart>
  );
}
