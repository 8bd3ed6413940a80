import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { Link } from 'react-router-dom';
import { z } from 'zod';
import { newPassword } from '#shared/schemas/common.ts';
import { Button } from '#src/components/Button.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { Notice } from '#src/components/Notice.tsx';
import { PageHeading } from '#src/components/PageHeading.tsx';
import { TextInput } from '#src/components/TextInput.tsx';
import { useResetPassword } from '../api/session.ts';
import { LinkIncomplete } from './LinkIncomplete.tsx';
import { useFragmentToken } from './useFragmentToken.ts';

const form = z.object({ password: newPassword });

export default function ResetPage() {
  const token = useFragmentToken();
  const reset = useResetPassword();
  const { register, handleSubmit, formState } = useForm({
    resolver: zodResolver(form),
    defaultValues: { password: '' },
  });
  if (token === null) {
    return (
      <LinkIncomplete title="Set a new password">
        <Link to="/reset-request" className="link">
          Ask for a new link
        </Link>
      </LinkIncomplete>
    );
  }
  return (
    <form
      noValidate
      className="space-y-5"
      onSubmit={(event) =>
        void handleSubmit((values) => reset.mutate({ token, password: values.password }))(event)
      }
    >
      <PageHeading title="Set a new password" />
      {reset.isError && (
        <ErrorNote error={reset.error}>
          <Link to="/reset-request" className="link">
            Ask for a new link
          </Link>
        </ErrorNote>
      )}
      {reset.isSuccess ? (
        <div role="status" className="space-y-5">
          <Notice kind="clear">The new password holds. Every earlier session has ended.</Notice>
          <Button asChild look="primary" className="w-full">
            <Link to="/sign-in">Sign in</Link>
          </Button>
        </div>
      ) : (
        <>
          <TextInput
            label="New password"
            type="password"
            autoComplete="new-password"
            hint="At least 12 characters; a few words make a good pass phrase."
            error={formState.errors.password?.message}
            {...register('password')}
          />
          <Button type="submit" look="primary" busy={reset.isPending} className="w-full">
            Set the password
          </Button>
        </>
      )}
    </form>
  );
}
