import { zodResolver } from '@hookform/resolvers/zod';
import { useEffect } from 'react';
import { useForm } from 'react-hook-form';
import { Link, useNavigate } from 'react-router-dom';
import { z } from 'zod';
import { newPassword, personName } from '#shared/schemas/common.ts';
import { Button } from '#src/components/Button.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { Loading } from '#src/components/Loading.tsx';
import { PageHeading } from '#src/components/PageHeading.tsx';
import { TextInput } from '#src/components/TextInput.tsx';
import { useAcceptInvitation, useReadInvitation } from '../api/session.ts';
import { LinkIncomplete } from './LinkIncomplete.tsx';
import { useFragmentToken } from './useFragmentToken.ts';

const form = z.object({ name: personName, password: newPassword });

export default function InvitationPage() {
  const token = useFragmentToken();
  const navigate = useNavigate();
  const { mutate: read, data: invitation, error: unreadable } = useReadInvitation();
  const accept = useAcceptInvitation();
  const { register, handleSubmit, formState } = useForm({
    resolver: zodResolver(form),
    defaultValues: { name: '', password: '' },
  });

  useEffect(() => {
    if (token !== null) read(token);
  }, [token, read]);

  if (token === null) {
    return (
      <LinkIncomplete title="Invitation">
        If it keeps failing, ask your team’s administrator to invite you again.
      </LinkIncomplete>
    );
  }
  if (!invitation) {
    return (
      <div className="space-y-5">
        <PageHeading title="Invitation" />
        {unreadable ? (
          <ErrorNote error={unreadable}>
            <Link to="/sign-in" className="link">
              Sign in
            </Link>
          </ErrorNote>
        ) : (
          <Loading what="the invitation" lines={3} />
        )}
      </div>
    );
  }
  return (
    <form
      noValidate
      className="space-y-5"
      onSubmit={(event) =>
        void handleSubmit((values) =>
          accept.mutate(
            { token, ...values },
            { onSuccess: () => void navigate('/projects', { replace: true }) },
          ),
        )(event)
      }
    >
      <PageHeading title={`Join ${invitation.teamName}`} />
      <p>
        You are invited as <strong>{invitation.role}</strong> with the address{' '}
        <strong className="break-all">{invitation.email}</strong>.
      </p>
      {accept.isError && <ErrorNote error={accept.error} />}
      <TextInput
        label="Your name"
        autoComplete="name"
        error={formState.errors.name?.message}
        {...register('name')}
      />
      <TextInput
        label="Password"
        type="password"
        autoComplete="new-password"
        hint="At least 12 characters; a few words make a good pass phrase."
        error={formState.errors.password?.message}
        {...register('password')}
      />
      <Button type="submit" look="primary" busy={accept.isPending} className="w-full">
        Join
      </Button>
    </form>
  );
}
