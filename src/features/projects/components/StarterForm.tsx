import { zodResolver } from '@hookform/resolvers/zod';
import { useMemo, useState } from 'react';
import { FormProvider, useForm, useWatch } from 'react-hook-form';
import type { Starter } from '#shared/frame/starters/starters.ts';
import { Button } from '#src/components/Button.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { TextInput } from '#src/components/TextInput.tsx';
import { FrameOutline } from './FrameOutline.tsx';
import {
  starterDefaults,
  starterForm,
  type StarterFormInput,
  type StarterFormOutput,
} from './starterForm.ts';
import { StarterFields } from './StarterFields.tsx';
import { useBeginProject } from './useBeginProject.ts';

/** Dimensions, section, what stands on it and what it stands on; the outline follows. */
export function StarterForm({ starter }: { starter: Starter }) {
  const { begin, busy, error } = useBeginProject();
  const [unfinished, setUnfinished] = useState<ReadonlySet<string>>(new Set());
  const form = useForm<StarterFormInput, unknown, StarterFormOutput>({
    resolver: zodResolver(starterForm(starter)),
    defaultValues: starterDefaults(starter),
  });
  const submit = form.handleSubmit(({ machineName, ...parameters }) => {
    if (unfinished.size > 0) return;
    begin({
      name: parameters.name,
      machine: machineName,
      document: starter.build(parameters),
    });
  });
  const { errors } = form.formState;
  return (
    <FormProvider {...form}>
      <div className="grid gap-8 lg:grid-cols-[minmax(0,26rem)_1fr]">
        <form noValidate className="space-y-5" onSubmit={(event) => void submit(event)}>
          {error && <ErrorNote error={error} />}
          <TextInput label="Project" error={errors.name?.message} {...form.register('name')} />
          <TextInput
            label="Machine"
            aside="optional"
            hint="As the Projects list names it, such as “Labelling line 2”."
            error={errors.machineName?.message}
            {...form.register('machineName')}
          />
          <StarterFields
            starter={starter}
            onValidChange={(field, valid) =>
              setUnfinished((now) => {
                if (now.has(field) === !valid) return now;
                const next = new Set(now);
                if (valid) next.delete(field);
                else next.add(field);
                return next;
              })
            }
          />
          <Button type="submit" look="primary" busy={busy}>
            Begin with this frame
          </Button>
        </form>
        <div className="order-first lg:sticky lg:top-6 lg:order-none lg:self-start">
          <StarterOutline starter={starter} />
        </div>
      </div>
    </FormProvider>
  );
}

/** The frame as the form stands. */
function StarterOutline({ starter }: { starter: Starter }) {
  const values = useWatch<StarterFormInput>();
  const document = useMemo(() => {
    const { name, length, width, height, section, material, feet, machine } = values;
    const parsed = starter.parameters.safeParse({
      ...{ length, width, height, section, material, machine },
      name: name === '' ? starter.name : name,
      feet: feet ?? { kind: 'fixed' },
    });
    return parsed.success ? starter.build(parsed.data) : null;
  }, [values, starter]);
  if (!document) {
    return <p className="text-ink-soft">The outline returns when every field can be drawn.</p>;
  }
  return <FrameOutline document={document} />;
}
