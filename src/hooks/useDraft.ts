import { useQuery } from '@tanstack/react-query';
import { readDraft } from '#shared/schemas/project.ts';
import { call } from '#src/lib/api.ts';
import { queryKeys } from '#src/lib/queryKeys.ts';

export const useDraft = (projectId: string) =>
  useQuery({
    queryKey: queryKeys.draft(projectId),
    queryFn: ({ signal }) => call(readDraft, { params: { projectId }, signal }),
  });
