import { useState } from 'react';
import type { Inertia } from '#shared/schemas/frameDocument.ts';
import { Checkbox } from '#src/components/Checkbox.tsx';
import { QuantityInput } from '#src/components/QuantityInput.tsx';
import { Select } from '#src/components/Select.tsx';
import { withField } from '../../state/withField.ts';
import { above0, not0Below } from '../fields/checks.ts';
import { FieldGrid, FormPart, VectorField } from '../fields/fields.tsx';
import { IdField, ReferenceField, TextField } from '../fields/textFields.tsx';
import type { EntryFormProps } from './EntryFormProps.ts';

export function MassForm(props: EntryFormProps<'masses'>) {
  const { frame, entry, onChange, problem, disabled } = props;
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
        <QuantityInput
          label="Mass"
          kind="mass"
          value={entry.mass}
          check={above0}
          onCommit={(mass) => onChange({ ...entry, mass })}
          disabled={disabled}
          error={problem('mass')}
        />
        <ReferenceField
          label="Hangs on node"
          frame={frame}
          list="nodes"
          value={entry.node}
          onCommit={(node) => onChange({ ...entry, node })}
          disabled={disabled}
          error={problem('node')}
        />
      </FieldGrid>
      <VectorField
        label="From the node to its centre of gravity"
        value={entry.offset}
        onCommit={(offset) => onChange({ ...entry, offset })}
        disabled={disabled}
        error={problem('offset')}
      />
      <InertiaPart {...props} />
    </div>
  );
}

const CONVENTIONS = [
  { value: 'tensor', label: 'elements of the tensor: Ixy = −∫xy dm' },
  { value: 'products', label: 'products of inertia: Pxy = ∫xy dm' },
] as const;

const NO_INERTIA: Inertia = { Ixx: 0, Iyy: 0, Izz: 0 };

/** Inertia about the centre of gravity; the document keeps tensor elements, people may give products. */
function InertiaPart({ entry, onChange, problem, disabled }: EntryFormProps<'masses'>) {
  const [convention, setConvention] = useState<'tensor' | 'products'>('tensor');
  const { inertia } = entry;
  const sign = convention === 'tensor' ? 1 : -1;
  const letter = convention === 'tensor' ? 'I' : 'P';
  const error = problem('inertia');
  const set = (key: keyof Inertia, value: number | undefined) =>
    onChange({ ...entry, inertia: withField(inertia ?? NO_INERTIA, key, value) });
  return (
    <FormPart title="Inertia" said={inertia ? 'stated' : 'none: a point'}>
      <Checkbox
        label="State the inertia about its centre of gravity"
        checked={inertia !== undefined}
        disabled={disabled}
        onCheckedChange={(stated) =>
          onChange(withField(entry, 'inertia', stated ? NO_INERTIA : undefined))
        }
      />
      {inertia && (
        <>
          <FieldGrid columns={3}>
            {(['Ixx', 'Iyy', 'Izz'] as const).map((key) => (
              <QuantityInput
                key={key}
                label={key}
                kind="massMoment"
                value={inertia[key]}
                check={not0Below}
                onCommit={(value) => set(key, value)}
                disabled={disabled}
              />
            ))}
          </FieldGrid>
          <Select
            label="Off the diagonal given as"
            options={CONVENTIONS}
            value={convention}
            onValueChange={setConvention}
          />
          <FieldGrid columns={3}>
            {(['Ixy', 'Ixz', 'Iyz'] as const).map((key) => {
              const value = inertia[key];
              return (
                <QuantityInput
                  key={key}
                  label={key.replace('I', letter)}
                  kind="massMoment"
                  // Adding 0 makes −0 read as 0.
                  value={value === undefined ? null : sign * value + 0}
                  onCommit={(typed) => set(key, sign * typed + 0)}
                  onClear={() => set(key, undefined)}
                  disabled={disabled}
                />
              );
            })}
          </FieldGrid>
        </>
      )}
      {error !== undefined && <p className="text-sm text-signal-text">▲ {error}</p>}
    </FormPart>
  );
}
