import { useMemo } from 'react';
import { Link, useParams, useSearchParams } from 'react-router-dom';
import { Button } from '#src/components/Button.tsx';
import { EmptyState } from '#src/components/EmptyState.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { Loading } from '#src/components/Loading.tsx';
import { PageHeading } from '#src/components/PageHeading.tsx';
import { useProject } from '#src/hooks/useProject.ts';
import { useShownFrame } from '#src/hooks/useShownFrame.ts';
import { useShownSolves } from '#src/hooks/useShownSolves.ts';
import { useSolve } from '#src/hooks/useSolve.ts';
import { useSolveShapes } from '#src/hooks/useSolveShapes.ts';
import { useMethodSolve } from '../api/useMethodSolve.ts';
import { ModesSheet } from './ModesSheet.tsx';

/** Modes: one frame moving in its mode, all of them, and the methods beside each other. */
export default function ModesPage() {
  const { projectId = '' } = useParams();
  const [search] = useSearchParams();
  const project = useProject(projectId);
  const { shown, error, noSuchRevision } = useShownFrame(projectId);
  const { current, stale, loading } = useShownSolves(projectId, shown);
  const consistentId = current.consistent?.status === 'done' ? current.consistent.id : stale?.id;
  const consistent = useSolve(consistentId ?? null);
  const shapes = useSolveShapes(consistentId ?? null);
  const summary = consistent.data?.summary;
  const solved = useMemo(
    () => (summary && shapes.data ? { summary, shapes: shapes.data } : null),
    [summary, shapes.data],
  );
  // Beside a stale result stands nothing: the others are of another frame.
  const isStale = current.consistent?.status !== 'done';
  const lumped = useMethodSolve('lumped', isStale ? undefined : current.lumped);
  const meshFree = useMethodSolve('mesh-free', isStale ? undefined : current['mesh-free']);
  const others = useMemo(() => [lumped, meshFree], [lumped, meshFree]);

  const heading = <PageHeading title={`Modes, ${project.data?.name ?? ''}`} hidden />;
  const failure = error ?? project.error ?? consistent.error ?? shapes.error;
  if (noSuchRevision || failure) {
    return (
      <div className="p-6">
        {heading}
        {noSuchRevision ? (
          <EmptyState
            title={`There is no R${search.get('revision') ?? ''} in this project`}
            action={
              <Button asChild>
                <Link to={`/projects/${projectId}/modes`}>Go to the draft</Link>
              </Button>
            }
          >
            The link names a revision that was never submitted here.
          </EmptyState>
        ) : (
          <ErrorNote error={failure} />
        )}
      </div>
    );
  }
  if (!shown || !project.data || loading) {
    return (
      <div className="p-6">
        {heading}
        <Loading what="modes" />
      </div>
    );
  }
  if (consistentId === undefined) {
    const under = current.consistent?.status;
    return (
      <div className="p-6">
        {heading}
        <EmptyState
          title={under === 'queued' || under === 'running' ? 'Solving' : 'No modes yet'}
          action={
            <Button asChild look="primary">
              <Link to={`/projects/${projectId}/frame?${search.toString()}`}>Go to Frame</Link>
            </Button>
          }
        >
          {under === 'queued' || under === 'running'
            ? 'The modes appear here as soon as the solve is in.'
            : under === 'failed'
              ? (current.consistent?.error?.message ?? 'The solve failed.')
              : 'Solve the frame at Frame: its natural frequencies and moving shapes appear here.'}
        </EmptyState>
      </div>
    );
  }
  if (!solved) {
    return (
      <div className="p-6">
        {heading}
        <Loading what="modes" />
      </div>
    );
  }
  return (
    <>
      {heading}
      <ModesSheet
        key={consistentId}
        project={project.data}
        shown={shown}
        stale={isStale}
        consistent={solved}
        others={others}
      />
    </>
  );
}
