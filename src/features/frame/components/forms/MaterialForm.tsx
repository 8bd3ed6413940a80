import { poissonRatio, shearModulus } from '#shared/frame/materialProperties.ts';
import { Quantity } from '#src/components/Quantity.tsx';
import { QuantityInput } from '#src/components/QuantityInput.tsx';
import { withField } from '../../state/withField.ts';
import { above0, not0Below } from '../fields/checks.ts';
import { FieldGrid } from '../fields/fields.tsx';
import { IdField, TextField } from '../fields/textFields.tsx';
import type { EntryFormProps } from './EntryFormProps.ts';

export function MaterialForm({ entry, onChange, problem, disabled }: EntryFormProps<'materials'>) {
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
          label="E"
          kind="pressure"
          value={entry.E}
          check={above0}
          onCommit={(E) => onChange({ ...entry, E })}
          disabled={disabled}
          error={problem('E')}
        />
        <QuantityInput
          label="Density"
          kind="density"
          value={entry.density}
          check={above0}
          onCommit={(density) => onChange({ ...entry, density })}
          disabled={disabled}
          error={problem('density')}
        />
        <QuantityInput
          label="Poisson’s ratio ν"
          kind="ratio"
          value={entry.nu ?? null}
          check={(nu) => (nu > -1 && nu < 0.5 ? null : 'Between −1 and 0.5.')}
          onCommit={(nu) => onChange({ ...entry, nu })}
          {...(entry.G === undefined
            ? {}
            : { onClear: () => onChange(withField(entry, 'nu', undefined)) })}
          disabled={disabled}
          error={problem('nu')}
        />
        <QuantityInput
          label="G"
          kind="pressure"
          value={entry.G ?? null}
          check={above0}
          onCommit={(G) => onChange({ ...entry, G })}
          {...(entry.nu === undefined
            ? {}
            : { onClear: () => onChange(withField(entry, 'G', undefined)) })}
          disabled={disabled}
          error={problem('G')}
        />
      </FieldGrid>
      <p className="text-sm text-ink-soft">
        {entry.G === undefined ? (
          <>
            G = E / 2(1 + ν) = <Quantity value={shearModulus(entry)} kind="pressure" />
          </>
        ) : (
          <>
            Shear takes the G given; ν = <Quantity value={poissonRatio(entry)} kind="ratio" />
          </>
        )}
      </p>
      <QuantityInput
        label="Damping ratio"
        kind="ratio"
        value={entry.dampingRatio ?? null}
        check={(ratio) => not0Below(ratio) ?? (ratio <= 1 ? null : 'At most 1.')}
        onCommit={(dampingRatio) => onChange({ ...entry, dampingRatio })}
        onClear={() => onChange(withField(entry, 'dampingRatio', undefined))}
        disabled={disabled}
        error={problem('dampingRatio')}
      />
      <TextField
        long
        label="Where the figures come from"
        value={entry.basis ?? ''}
        onCommit={(basis) => onChange(withField(entry, 'basis', basis || undefined))}
        disabled={disabled}
        error={problem('basis')}
      />
    </div>
  );
}
