import { useEffect } from 'react';
import { useParams, useSearchParams } from 'react-router-dom';
import { EmptyState } from '#src/components/EmptyState.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { Loading } from '#src/components/Loading.tsx';
import { PageHeading } from '#src/components/PageHeading.tsx';
import { useProject } from '#src/hooks/useProject.ts';
import { useRevisions } from '#src/hooks/useRevisions.ts';
import { RevisionList } from './RevisionList.tsx';
import { RevisionSheet } from './RevisionSheet.tsx';
import { SubmitDraft } from './SubmitDraft.tsx';

/** Release: what may be submitted, the revisions, and the one that is open. */
export default function ReleasePage() {
  const { projectId = '' } = useParams();
  const [search, setSearch] = useSearchParams();
  const project = useProject(projectId);
  const revisions = useRevisions(projectId);
  const wanted = search.get('revision');
  const newest = revisions.data?.[0]?.number;

  // The address names what is open, so that the frequency line below speaks of the same revision.
  useEffect(() => {
    if (wanted === null && newest !== undefined) {
      setSearch({ revision: String(newest) }, { replace: true });
    }
  }, [wanted, newest, setSearch]);

  if (project.error ?? revisions.error) {
    return (
      <div className="p-6">
        <PageHeading title="Release" />
        <ErrorNote error={project.error ?? revisions.error} />
      </div>
    );
  }
  if (!project.data || !revisions.data) {
    return (
      <div className="p-6">
        <PageHeading title="Release" />
        <Loading what="revisions" />
      </div>
    );
  }

  const open = revisions.data.find((revision) => String(revision.number) === wanted);

  return (
    <div className="h-full overflow-y-auto">
      <div className="mx-auto grid max-w-6xl gap-x-12 gap-y-8 px-4 py-6 sm:px-8 lg:grid-cols-[20rem_1fr]">
        <div className="flex flex-col gap-8">
          <PageHeading title={`Release, ${project.data.name}`}>Release</PageHeading>
          {project.data.abilities.submit && (
            <SubmitDraft project={project.data} revisions={revisions.data} />
          )}
          {revisions.data.length > 0 && (
            <RevisionList revisions={revisions.data} openNumber={open?.number ?? null} />
          )}
        </div>
        <div className="min-w-0">
          {open ? (
            <RevisionSheet key={open.id} projectId={projectId} revisionId={open.id} />
          ) : wanted !== null ? (
            <EmptyState title={`There is no R${wanted} in this project`}>
              Choose one of the revisions listed here.
            </EmptyState>
          ) : (
            <EmptyState title="Nothing submitted yet">
              {project.data.abilities.submit
                ? 'Solve the draft in every operating state, then submit it with a change note. A reviewer is told by e-mail.'
                : 'When a designer submits the draft, it appears here as R1 with everything its review needs.'}
            </EmptyState>
          )}
        </div>
      </div>
    </div>
  );
}
