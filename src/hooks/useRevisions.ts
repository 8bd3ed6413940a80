import { useQuery } from '@tanstack/react-query';
import { listRevisions } from '#shared/schemas/revision.ts';
import { call } from '#src/lib/api.ts';
import { queryKeys } from '#src/lib/queryKeys.ts';

/** The revisions of a project, newest first. */
export const useRevisions = (projectId: string) =>
  useQuery({
    queryKey: queryKeys.revisions(projectId),
    queryFn: ({ signal }) => call(listRevisions, { params: { projectId }, signal }),
    select: (answer) => answer.revisions,
  });
