import { Link } from 'react-router-dom';
import { Button } from '#src/components/Button.tsx';
import { EmptyState } from '#src/components/EmptyState.tsx';
import { PageHeading } from '#src/components/PageHeading.tsx';

export function NotFoundPage() {
  return (
    <div className="space-y-5">
      <PageHeading title="No such page" />
      <EmptyState
        title="Nothing stands at this address"
        action={
          <Button asChild look="primary">
            <Link to="/projects">Go to Projects</Link>
          </Button>
        }
      >
        It may have moved, or it may not be shared with you.
      </EmptyState>
    </div>
  );
}
