import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { Link, Navigate, useNavigate, useSearchParams } from 'react-router-dom';
import { z } from 'zod';
import { Button } from '#src/components/Button.tsx';
import { PageHeading } from '#src/components/PageHeading.tsx';
import { TextInput } from '#src/components/TextInput.tsx';
import { useSession } from '#src/hooks/useSession.ts';
import { emailAddress } from '#shared/schemas/common.ts';
import { returnTo } from '#src/lib/returnTo.ts';
import { useSignIn } from '../api/session.ts';
import { SignInError } from './SignInError.tsx';

const form = z.object({
  email: emailAddress,
  password: z.string().min(1, 'Enter your password.').max(200, 'At most 200 characters.'),
});

export default function SignInPage() {
  const session = useSession();
  const enter = useSignIn();
  const navigate = useNavigate();
  const [search] = useSearchParams();
  const next = returnTo(search.get('next'));
  const { register, handleSubmit, formState } = useForm({
    resolver: zodResolver(form),
    defaultValues: { email: '', password: '' },
  });

  if (session.data?.person) return <Navigate to={next} replace />;

  return (
    <form
      noValidate
      className="space-y-5"
      onSubmit={(event) =>
        void handleSubmit((values) =>
          enter.mutate(values, { onSuccess: () => void navigate(next, { replace: true }) }),
        )(event)
      }
    >
      <PageHeading title="Sign in" />
      {enter.isError && <SignInError error={enter.error} />}
      <TextInput
        label="E-mail"
        type="email"
        autoComplete="username"
        error={formState.errors.email?.message}
        {...register('email')}
      />
      <TextInput
        label="Password"
        type="password"
        autoComplete="current-password"
        error={formState.errors.password?.message}
        {...register('password')}
      />
      <Button type="submit" look="primary" busy={enter.isPending} className="w-full">
        Sign in
      </Button>
      <p className="text-sm">
        <Link to="/reset-request" className="link">
          I have forgotten my password
        </Link>
      </p>
      <p className="text-sm text-ink-soft">
        Accounts are by invitation. Ask your team’s administrator for one.
      </p>
    </form>
  );
}
