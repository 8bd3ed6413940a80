import { useSearchParams } from 'react-router-dom';
import { Button } from '#src/components/Button.tsx';
import { EmptyState } from '#src/components/EmptyState.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { Loading } from '#src/components/Loading.tsx';
import { PageHeading } from '#src/components/PageHeading.tsx';
import { Select } from '#src/components/Select.tsx';
import { useActivity, useProjectChoices } from '../api/activity.ts';
import { ActivityList } from './ActivityList.tsx';

const EVERY = '';

export default function ActivityPage() {
  const [params, setParams] = useSearchParams();
  const projectId = params.get('project') ?? EVERY;
  const projects = useProjectChoices();
  const activity = useActivity(projectId === EVERY ? null : projectId);
  const entries = activity.data?.pages.flatMap((page) => page.entries) ?? [];
  return (
    <div className="max-w-3xl space-y-6">
      <div>
        <PageHeading title="Activity" />
        <p className="mt-1 text-ink-soft">
          Every change, in order. Entries can’t be altered or removed: each carries the fingerprint
          of the one before it.
        </p>
      </div>
      <Select
        label="Project"
        className="max-w-md"
        value={projectId}
        onValueChange={(chosen) =>
          setParams(chosen === EVERY ? {} : { project: chosen }, { replace: true })
        }
        options={[
          { value: EVERY, label: 'Every project' },
          ...(projects.data ?? []).map((project) => ({ value: project.id, label: project.name })),
        ]}
      />
      {activity.isPending && <Loading what="activity" lines={8} />}
      {activity.isError && (
        <ErrorNote error={activity.error}>
          <Button onClick={() => void activity.refetch()}>Try again</Button>
        </ErrorNote>
      )}
      {activity.data && entries.length === 0 && (
        <EmptyState title="Nothing has happened yet">
          What people change, solve, review and release is listed here.
        </EmptyState>
      )}
      {entries.length > 0 && <ActivityList entries={entries} showProject={projectId === EVERY} />}
      {activity.hasNextPage && (
        <Button busy={activity.isFetchingNextPage} onClick={() => void activity.fetchNextPage()}>
          Show earlier entries
        </Button>
      )}
    </div>
  );
}
