import { Navigate, Outlet, useLocation } from 'react-router-dom';
import { Button } from '#src/components/Button.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { Loading } from '#src/components/Loading.tsx';
import { useSession } from '#src/hooks/useSession.ts';
import { signInAddress } from '#src/lib/returnTo.ts';

/** Lets signed-in people through; sends others to sign in and back here afterwards. */
export function RequireSession() {
  const session = useSession();
  const { pathname, search, hash } = useLocation();
  if (session.data) {
    if (session.data.person) return <Outlet />;
    return <Navigate to={signInAddress(pathname + search + hash)} replace />;
  }
  return (
    <main id="main" className="p-6">
      {session.isError ? (
        <ErrorNote error={session.error}>
          <Button onClick={() => void session.refetch()}>Try again</Button>
        </ErrorNote>
      ) : (
        <Loading what="your session" />
      )}
    </main>
  );
}
