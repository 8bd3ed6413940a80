import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { standardMaterials } from '#shared/frame/materials.ts';
import { sectionShelf } from '#shared/frame/shelf.ts';
import { frameDocument } from '#shared/schemas/frameDocument.ts';
import { Button } from '#src/components/Button.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { TextInput } from '#src/components/TextInput.tsx';
import { projectForm } from './projectForm.ts';
import { useBeginProject } from './useBeginProject.ts';

/** A sheet with one material and one section, so that the first member can be drawn at once. */
const blankDocument = (name: string) =>
  frameDocument.parse({
    name,
    materials: standardMaterials().filter((material) => material.id === 'steel'),
    sections: sectionShelf().filter((section) => section.id === 'SHS 100x5'),
  });

export function BlankForm() {
  const { begin, busy, error } = useBeginProject();
  const { register, handleSubmit, formState } = useForm({
    resolver: zodResolver(projectForm),
    defaultValues: { name: '', machine: '' },
  });
  const submit = handleSubmit((values) =>
    begin({ ...values, document: blankDocument(values.name) }),
  );
  return (
    <form noValidate className="max-w-md space-y-5" onSubmit={(event) => void submit(event)}>
      {error && <ErrorNote error={error} />}
      <TextInput label="Project" error={formState.errors.name?.message} {...register('name')} />
      <TextInput
        label="Machine"
        aside="optional"
        error={formState.errors.machine?.message}
        {...register('machine')}
      />
      <Button type="submit" look="primary" busy={busy}>
        Open a blank sheet
      </Button>
    </form>
  );
}
