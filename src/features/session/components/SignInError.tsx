import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { Notice } from '#src/components/Notice.tsx';
import { ApiError } from '#src/lib/api.ts';

/** Why signing in failed. After too many tries it says how long to wait. */
export function SignInError({ error }: { error: Error }) {
  if (error instanceof ApiError && error.problem.code === 'too-many-requests') {
    return (
      <div role="alert">
        <Notice kind="caution" word="Wait">
          Too many tries. {waitSentence(error.retryAfter)} A forgotten password can be reset in the
          meantime.
        </Notice>
      </div>
    );
  }
  return <ErrorNote error={error} />;
}

function waitSentence(seconds: number | null): string {
  if (seconds === null) return 'Try again in a few minutes.';
  if (seconds < 90) return `Try again in ${Math.ceil(seconds)} seconds.`;
  return `Try again in ${Math.ceil(seconds / 60)} minutes.`;
}
