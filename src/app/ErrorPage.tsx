import { Link, useRouteError } from 'react-router-dom';
import { Button } from '#src/components/Button.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { PageHeading } from '#src/components/PageHeading.tsx';
import { Wordmark } from '#src/components/Wordmark.tsx';

/** Where a failure that no screen has caught ends. */
export function ErrorPage() {
  const error = useRouteError();
  return (
    <main id="main" className="mx-auto max-w-xl space-y-5 p-6 pt-16">
      <Wordmark />
      <PageHeading title="This page has failed" />
      <ErrorNote error={error}>
        <Button onClick={() => window.location.reload()}>Reload</Button>
        <Button asChild>
          <Link to="/projects" reloadDocument>
            Projects
          </Link>
        </Button>
      </ErrorNote>
    </main>
  );
}
