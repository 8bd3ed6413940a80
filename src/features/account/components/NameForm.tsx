import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { toast } from '#src/lib/toast.ts';
import { z } from 'zod';
import { personName } from '#shared/schemas/common.ts';
import type { SignedInPerson } from '#shared/schemas/session.ts';
import { Button } from '#src/components/Button.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { TextInput } from '#src/components/TextInput.tsx';
import { useUpdateAccount } from '../api/account.ts';

const form = z.object({ name: personName });

export function NameForm({ person }: { person: SignedInPerson }) {
  const update = useUpdateAccount();
  const { register, handleSubmit, formState } = useForm({
    resolver: zodResolver(form),
    values: { name: person.name },
  });
  return (
    <section>
      <h2 className="mb-4">Name</h2>
      <form
        noValidate
        className="space-y-4"
        onSubmit={(event) =>
          void handleSubmit((values) =>
            update.mutate(values, { onSuccess: () => toast('Name changed') }),
          )(event)
        }
      >
        {update.isError && <ErrorNote error={update.error} />}
        <TextInput
          label="Your name"
          autoComplete="name"
          hint="Stands beside what you submit, review and approve."
          error={formState.errors.name?.message}
          {...register('name')}
        />
        <Button type="submit" busy={update.isPending} disabled={!formState.isDirty}>
          Change the name
        </Button>
      </form>
    </section>
  );
}
