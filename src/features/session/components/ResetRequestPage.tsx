import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { Link } from 'react-router-dom';
import { z } from 'zod';
import { emailAddress } from '#shared/schemas/common.ts';
import { Button } from '#src/components/Button.tsx';
import { Notice } from '#src/components/Notice.tsx';
import { PageHeading } from '#src/components/PageHeading.tsx';
import { TextInput } from '#src/components/TextInput.tsx';
import { useRequestPasswordReset } from '../api/session.ts';
import { SignInError } from './SignInError.tsx';

const form = z.object({ email: emailAddress });

export default function ResetRequestPage() {
  const ask = useRequestPasswordReset();
  const { register, handleSubmit, formState } = useForm({
    resolver: zodResolver(form),
    defaultValues: { email: '' },
  });
  return (
    <form
      noValidate
      className="space-y-5"
      onSubmit={(event) => void handleSubmit((values) => ask.mutate(values.email))(event)}
    >
      <PageHeading title="Reset your password" />
      {ask.isError && <SignInError error={ask.error} />}
      {ask.isSuccess ? (
        <div role="status">
          <Notice kind="clear" word="Sent">
            {ask.data.message}
          </Notice>
        </div>
      ) : (
        <>
          <TextInput
            label="E-mail"
            type="email"
            autoComplete="username"
            hint="A link to set a new password goes to this address."
            error={formState.errors.email?.message}
            {...register('email')}
          />
          <Button type="submit" look="primary" busy={ask.isPending} className="w-full">
            Send the link
          </Button>
        </>
      )}
      <p className="text-sm">
        <Link to="/sign-in" className="link">
          Back to sign-in
        </Link>
      </p>
    </form>
  );
}
