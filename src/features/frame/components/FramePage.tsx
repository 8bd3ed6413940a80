import { Link, useParams, useSearchParams } from 'react-router-dom';
import { Button } from '#src/components/Button.tsx';
import { EmptyState } from '#src/components/EmptyState.tsx';
import { ErrorNote } from '#src/components/ErrorNote.tsx';
import { Loading } from '#src/components/Loading.tsx';
import { PageHeading } from '#src/components/PageHeading.tsx';
import { useDraft } from '#src/hooks/useDraft.ts';
import { useProject } from '#src/hooks/useProject.ts';
import { useShownFrame } from '#src/hooks/useShownFrame.ts';
import { FrameEditor } from './FrameEditor.tsx';
import { FrameReader } from './FrameReader.tsx';

/** Frame: the drawing sheet of the draft, or of a revision to read. */
export default function FramePage() {
  const { projectId = '' } = useParams();
  const [search] = useSearchParams();
  const project = useProject(projectId);
  const draft = useDraft(projectId);
  const { shown, error, noSuchRevision } = useShownFrame(projectId);
  const heading = <PageHeading title={`Frame, ${project.data?.name ?? ''}`} hidden />;
  const failure = error ?? project.error;

  if (noSuchRevision || (failure && !shown)) {
    return (
      <div className="p-6">
        {heading}
        {noSuchRevision ? (
          <EmptyState
            title={`There is no R${search.get('revision') ?? ''} in this project`}
            action={
              <Button asChild>
                <Link to={`/projects/${projectId}/frame`}>Go to the draft</Link>
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
  if (!shown || !project.data || !draft.data) {
    return (
      <div className="p-6">
        {heading}
        <Loading what="the frame" />
      </div>
    );
  }
  const { revision } = shown;
  return (
    <>
      {heading}
      {revision === null && project.data.abilities.edit ? (
        <FrameEditor key={projectId} project={project.data} draft={draft.data} shown={shown} />
      ) : (
        <FrameReader
          key={revision?.id ?? 'draft'}
          project={project.data}
          shown={shown}
          by={
            revision
              ? { name: revision.submittedBy.name, at: revision.submittedAt }
              : { name: draft.data.updatedBy.name, at: draft.data.updatedAt }
          }
        />
      )}
    </>
  );
}
