import type { ProjectSummary } from '#shared/schemas/project.ts';
import { NoticeMark } from '#src/components/Notice.tsx';

/** Whose move it is; one's own is marked by a shape and a word. */
export function WaitsFor({ project }: { project: ProjectSummary }) {
  return (
    <>
      {sentenceOf(project)}
      {project.waitsForMe && (
        <span className="flex items-center gap-1.5 font-medium text-signal-text">
          <NoticeMark kind="signal" className="size-3" />
          waits for you
        </span>
      )}
    </>
  );
}

function sentenceOf({ waitsFor, latestRevision }: ProjectSummary): string {
  const revision = latestRevision ? `R${latestRevision.number}` : 'Revision';
  switch (waitsFor) {
    case 'designer':
      return latestRevision?.state === 'returned'
        ? `${revision} returned to the designers`
        : 'Draft with the designers';
    case 'reviewer':
      return `${revision} in review`;
    case 'lead':
      return `${revision} before a lead`;
    case 'nobody':
      return 'Nobody’s move';
  }
}
