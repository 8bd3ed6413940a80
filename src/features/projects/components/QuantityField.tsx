import { Controller, useFormContext } from 'react-hook-form';
import type { QuantityKind } from '#shared/units/quantities.ts';
import { QuantityInput } from '#src/components/QuantityInput.tsx';
import type { StarterFormInput } from './starterForm.ts';

export type ValidChange = (field: string, valid: boolean) => void;

interface QuantityFieldProps {
  name:
    | 'length'
    | 'width'
    | 'height'
    | `machine.${'mass' | 'centreHeight' | 'length' | 'width' | 'height'}`
    | `feet.${'vertical' | 'horizontal' | 'tilting'}`;
  label: string;
  kind: QuantityKind;
  hint?: string;
  onValidChange: ValidChange;
}

/** A quantity of the starter's form; the outline follows as it is typed. */
export function QuantityField({ name, label, kind, hint, onValidChange }: QuantityFieldProps) {
  const { control } = useFormContext<StarterFormInput>();
  return (
    <Controller
      control={control}
      name={name}
      render={({ field, fieldState }) => (
        <QuantityInput
          live
          label={label}
          kind={kind}
          hint={hint}
          value={field.value ?? null}
          error={fieldState.error?.message}
          onCommit={field.onChange}
          onValidChange={(valid) => onValidChange(name, valid)}
        />
      )}
    />
  );
}
