import { withField } from '../../state/withField.ts';
import { above0, not0Below } from '../fields/checks.ts';
import { FieldGrid, FormPart, SixField } from '../fields/fields.tsx';
import { IdField, ReferenceField, TextField } from '../fields/textFields.tsx';
import type { EntryFormProps } from './EntryFormProps.ts';

export function SpringForm({
  frame,
  entry,
  onChange,
  problem,
  disabled,
}: EntryFormProps<'springs'>) {
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
          value={entry.name ?? ''}
          onCommit={(name) => onChange(withField(entry, 'name', name || undefined))}
          disabled={disabled}
          error={problem('name')}
        />
        {(['start', 'end'] as const).map((end) => (
          <ReferenceField
            key={end}
            label={end === 'start' ? 'From node' : 'To node'}
            frame={frame}
            list="nodes"
            value={entry[end]}
            onCommit={(id) => onChange({ ...entry, [end]: id })}
            disabled={disabled}
            error={problem(end)}
          />
        ))}
      </FieldGrid>
      <SixField
        label="Stiffness in global axes, acting half-way"
        translation="stiffness"
        rotation="rotationalStiffness"
        value={entry.stiffness}
        unknowns={frame.unknowns}
        check={above0}
        disabled={disabled}
        error={problem('stiffness')}
        onCommit={(stiffness) => onChange({ ...entry, stiffness: stiffness ?? {} })}
      />
      <FormPart title="Damping" said={entry.damping ? 'stated' : 'none'}>
        <SixField
          label="Per displacement"
          translation="damping"
          rotation="rotationalDamping"
          value={entry.damping}
          unknowns={frame.unknowns}
          check={not0Below}
          disabled={disabled}
          error={problem('damping')}
          onCommit={(damping) => onChange(withField(entry, 'damping', damping))}
        />
      </FormPart>
    </div>
  );
}
