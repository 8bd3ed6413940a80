import { Controller, useFormContext, useWatch } from 'react-hook-form';
import { Select } from '#src/components/Select.tsx';
import { QuantityField, type ValidChange } from './QuantityField.tsx';
import { FEET_TO_BEGIN_WITH, type StarterFormInput } from './starterForm.ts';

const CHOICES = [
  { value: '', label: 'Choose …', disabled: true },
  { value: 'fixed', label: 'Bolted to a foundation taken as rigid' },
  { value: 'stiffness', label: 'Feet, pads or floor with a stiffness' },
] as const;

/** What the frame stands on has to be chosen: nothing moves the lowest modes more. */
export function FeetFields({ onValidChange }: { onValidChange: ValidChange }) {
  const { control } = useFormContext<StarterFormInput>();
  const kind = useWatch<StarterFormInput, 'feet'>({ name: 'feet' })?.kind ?? '';
  return (
    <>
      <Controller
        control={control}
        name="feet"
        render={({ field, fieldState }) => (
          <Select
            label="Kind of foot"
            className="sm:col-span-2"
            hint="Supports and joints govern the lowest modes."
            value={kind}
            options={CHOICES}
            error={fieldState.error?.message}
            onValueChange={(chosen) =>
              field.onChange(chosen === 'stiffness' ? FEET_TO_BEGIN_WITH : { kind: 'fixed' })
            }
          />
        )}
      />
      {kind === 'stiffness' && (
        <>
          <QuantityField
            name="feet.vertical"
            label="Vertical, each foot"
            kind="stiffness"
            hint="Put the maker’s figure in place of this one."
            {...{ onValidChange }}
          />
          <QuantityField
            name="feet.horizontal"
            label="Horizontal, each foot"
            kind="stiffness"
            hint="Soft and stiff feet are made operating states."
            {...{ onValidChange }}
          />
          <QuantityField
            name="feet.tilting"
            label="Tilting, each foot"
            kind="rotationalStiffness"
            hint="0 for a foot that tilts freely."
            {...{ onValidChange }}
          />
        </>
      )}
    </>
  );
}
