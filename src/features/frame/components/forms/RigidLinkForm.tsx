import { X } from 'lucide-react';
import { Select } from '#src/components/Select.tsx';
import { withField } from '../../state/withField.ts';
import { FieldGrid } from '../fields/fields.tsx';
import { IdField, ReferenceField, TextField } from '../fields/textFields.tsx';
import type { EntryFormProps } from './EntryFormProps.ts';

export function RigidLinkForm({
  frame,
  entry,
  onChange,
  problem,
  disabled,
}: EntryFormProps<'rigidLinks'>) {
  const rest = frame.nodes.filter(({ id }) => id !== entry.main && !entry.others.includes(id));
  const error = problem('others');
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
      <ReferenceField
        label="Main node"
        frame={frame}
        list="nodes"
        value={entry.main}
        onCommit={(main) => onChange({ ...entry, main })}
        disabled={disabled}
        error={problem('main')}
      />
      <fieldset>
        <legend className="text-sm font-medium">Nodes that move with it</legend>
        <ul className="my-1 flex flex-wrap gap-1">
          {entry.others.map((other) => (
            <li key={other} className="flex items-center border border-rule pl-2">
              {other}
              {!disabled && entry.others.length > 1 && (
                <button
                  type="button"
                  aria-label={`Take ${other} out`}
                  className="ml-1 flex size-6 cursor-pointer items-center justify-center"
                  onClick={() =>
                    onChange({ ...entry, others: entry.others.filter((one) => one !== other) })
                  }
                >
                  <X aria-hidden="true" className="size-3.5" />
                </button>
              )}
            </li>
          ))}
        </ul>
        {!disabled && rest.length > 0 && (
          <Select
            labelHidden
            label="Another node"
            options={[
              { value: '', label: 'another node …' },
              ...rest.map(({ id, name }) => ({ value: id, label: name ? `${name} (${id})` : id })),
            ]}
            value=""
            onValueChange={(id) => {
              if (id !== '') onChange({ ...entry, others: [...entry.others, id] });
            }}
          />
        )}
        {error !== undefined && <p className="text-sm text-signal-text">▲ {error}</p>}
      </fieldset>
    </div>
  );
}
