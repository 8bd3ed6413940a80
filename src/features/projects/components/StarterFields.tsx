import { Controller, useFormContext } from 'react-hook-form';
import { standardMaterials } from '#shared/frame/materials.ts';
import { sectionShelf } from '#shared/frame/shelf.ts';
import type { Starter } from '#shared/frame/starters/starters.ts';
import { Select } from '#src/components/Select.tsx';
import { TextInput } from '#src/components/TextInput.tsx';
import { FeetFields } from './FeetFields.tsx';
import { QuantityField, type ValidChange } from './QuantityField.tsx';
import type { StarterFormInput } from './starterForm.ts';

const SECTIONS = sectionShelf().map((section) => ({ value: section.id, label: section.name }));
const MATERIALS = standardMaterials().map((one) => ({ value: one.id, label: one.name }));

interface StarterFieldsProps {
  starter: Starter;
  onValidChange: ValidChange;
}

export function StarterFields({ starter, onValidChange }: StarterFieldsProps) {
  const { control, register, formState } = useFormContext<StarterFormInput>();
  return (
    <>
      <Group legend="The frame">
        <QuantityField name="length" label="Length along X" kind="length" {...{ onValidChange }} />
        <QuantityField name="width" label="Width along Y" kind="length" {...{ onValidChange }} />
        <QuantityField
          name="height"
          label={starter.heightMeans}
          kind="length"
          {...{ onValidChange }}
        />
        <Controller
          control={control}
          name="section"
          render={({ field, fieldState }) => (
            <Select
              label="Section"
              value={field.value ?? ''}
              options={SECTIONS}
              error={fieldState.error?.message}
              onValueChange={field.onChange}
            />
          )}
        />
        <Controller
          control={control}
          name="material"
          render={({ field, fieldState }) => (
            <Select
              label="Material"
              value={field.value ?? ''}
              options={MATERIALS}
              error={fieldState.error?.message}
              onValueChange={field.onChange}
            />
          )}
        />
      </Group>
      <Group legend="What stands on it?">
        <TextInput
          label="Name"
          error={formState.errors.machine?.name?.message}
          {...register('machine.name')}
        />
        <QuantityField name="machine.mass" label="Mass" kind="mass" {...{ onValidChange }} />
        <QuantityField
          name="machine.centreHeight"
          label="Centre above frame"
          kind="length"
          {...{ onValidChange }}
        />
        <QuantityField
          name="machine.length"
          label="Size along X"
          kind="length"
          {...{ onValidChange }}
        />
        <QuantityField
          name="machine.width"
          label="Size along Y"
          kind="length"
          {...{ onValidChange }}
        />
        <QuantityField
          name="machine.height"
          label="Size along Z"
          kind="length"
          {...{ onValidChange }}
        />
      </Group>
      <Group legend="What does it stand on?">
        <FeetFields onValidChange={onValidChange} />
      </Group>
    </>
  );
}

function Group({ legend, children }: { legend: string; children: React.ReactNode }) {
  return (
    <fieldset className="border-t border-pencil pt-3">
      <legend className="float-left mb-3 w-full font-semibold">{legend}</legend>
      <div className="clear-left grid gap-x-5 gap-y-4 sm:grid-cols-2">{children}</div>
    </fieldset>
  );
}
