import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { toast } from '#src/lib/toast.ts';
import { z } from 'zod';
import { newPassword } from '#shared/schemas/common.ts';
import { Button } from '#src/components/Button.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { TextInput } from '#src/components/TextInput.tsx';
import { useChangePassword } from '../api/account.ts';

const form = z.object({
  currentPassword: z.string().min(1, 'Enter your present password.').max(200),
  newPassword,
});

export function PasswordForm({ email }: { email: string }) {
  const change = useChangePassword();
  const { register, handleSubmit, formState, reset } = useForm({
    resolver: zodResolver(form),
    defaultValues: { currentPassword: '', newPassword: '' },
  });
  const submit = handleSubmit((values) =>
    change.mutate(values, {
      onSuccess: () => {
        reset();
        toast('Password changed. Your other sessions have ended.');
      },
    }),
  );
  return (
    <section>
      <h2 className="mb-4">Password</h2>
      <form noValidate className="space-y-4" onSubmit={(event) => void submit(event)}>
        {change.isError && <ErrorNote error={change.error} />}
        {/* Lets a password manager know whose password this is. */}
        <input type="hidden" name="username" autoComplete="username" value={email} readOnly />
        <TextInput
          label="Present password"
          type="password"
          autoComplete="current-password"
          error={formState.errors.currentPassword?.message}
          {...register('currentPassword')}
        />
        <TextInput
          label="New password"
          type="password"
          autoComplete="new-password"
          hint="At least 12 characters; a few words make a good pass phrase."
          error={formState.errors.newPassword?.message}
          {...register('newPassword')}
        />
        <Button type="submit" busy={change.isPending}>
          Change the password
        </Button>
      </form>
    </section>
  );
}
