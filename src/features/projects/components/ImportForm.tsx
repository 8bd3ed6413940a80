import { zodResolver } from '@hookform/resolvers/zod';
import { useState } from 'react';
import { useForm } from 'react-hook-form';
import { Button } from '#src/components/Button.tsx';
import { ErrorNote, IssueList } from '#src/components/ErrorNote.tsx';
import { Notice } from '#src/components/Notice.tsx';
import { TextInput } from '#src/components/TextInput.tsx';
import { FileDrop } from './FileDrop.tsx';
import { FrameOutline } from './FrameOutline.tsx';
import { projectForm } from './projectForm.ts';
import { readDocumentFile, type ReadDocument } from './readDocumentFile.ts';
import { useBeginProject } from './useBeginProject.ts';

/** Brings a frame document along. Every refusal is listed with its place; a broken one is never sent. */
export function ImportForm() {
  const { begin, busy, error } = useBeginProject();
  const [read, setRead] = useState<ReadDocument | null>(null);
  const { register, handleSubmit, formState, setValue, getValues } = useForm({
    resolver: zodResolver(projectForm),
    defaultValues: { name: '', machine: '' },
  });

  const take = async (file: File) => {
    const result = await readDocumentFile(file);
    setRead(result);
    if (result.ok && getValues('name') === '') setValue('name', result.document.name.slice(0, 120));
  };
  const submit = handleSubmit((values) => {
    if (read?.ok) begin({ ...values, document: read.document });
  });

  return (
    <div className="grid gap-8 lg:grid-cols-2">
      <form noValidate className="max-w-md space-y-5" onSubmit={(event) => void submit(event)}>
        {error && <ErrorNote error={error} />}
        <FileDrop onFile={(file) => void take(file)} />
        {read && !read.ok && (
          <div role="alert">
            <Notice kind="signal" word="Refused">
              <span className="font-medium break-all">{read.fileName}</span>. {read.sentence}
              <IssueList issues={read.issues} />
            </Notice>
          </div>
        )}
        {read?.ok && (
          <>
            <div role="status">
              <Notice kind="clear" word="Read">
                <span className="font-medium break-all">{read.fileName}</span>:{' '}
                {read.document.nodes.length} nodes, {read.document.members.length} members.
              </Notice>
            </div>
            {read.warnings.length > 0 && (
              <Notice kind="caution">
                Worth knowing before you rely on it:
                <IssueList issues={read.warnings} />
              </Notice>
            )}
            <TextInput
              label="Project"
              error={formState.errors.name?.message}
              {...register('name')}
            />
            <TextInput
              label="Machine"
              aside="optional"
              error={formState.errors.machine?.message}
              {...register('machine')}
            />
            <Button type="submit" look="primary" busy={busy}>
              Begin with this frame
            </Button>
          </>
        )}
      </form>
      {read?.ok && <FrameOutline document={read.document} />}
    </div>
  );
}
