import { useQuery } from '@tanstack/react-query';
import { readRevision } from '#shared/schemas/revision.ts';
import { call } from '#src/lib/api.ts';
import { queryKeys } from '#src/lib/queryKeys.ts';

/** One revision; `null` while none is chosen. */
export const useRevision = (revisionId: string | null) =>
  useQuery({
    queryKey: queryKeys.revision(revisionId ?? ''),
    queryFn: ({ signal }) =>
      call(readRevision, { params: { revisionId: revisionId ?? '' }, signal }),
    enabled: revisionId !== null,
  });
