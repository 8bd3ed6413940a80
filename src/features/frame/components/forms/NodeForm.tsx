import { QuantityInput } from '#src/components/QuantityInput.tsx';
import { withField } from '../../state/withField.ts';
import { FieldGrid } from '../fields/fields.tsx';
import { IdField, TextField } from '../fields/textFields.tsx';
import type { EntryFormProps } from './EntryFormProps.ts';

export function NodeForm({ entry, onChange, problem, disabled }: EntryFormProps<'nodes'>) {
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
      </FieldGrid>
      <FieldGrid columns={3}>
        {(['x', 'y', 'z'] as const).map((axis) => (
          <QuantityInput
            key={axis}
            label={axis.toUpperCase()}
            kind="length"
            value={entry[axis]}
            onCommit={(value) => onChange({ ...entry, [axis]: value })}
            disabled={disabled}
            error={problem(axis)}
          />
        ))}
      </FieldGrid>
    </div>
  );
}
