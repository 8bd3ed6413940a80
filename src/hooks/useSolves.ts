import { useQuery } from '@tanstack/react-query';
import { listSolves } from '#shared/schemas/solve.ts';
import { call } from '#src/lib/api.ts';
import { queryKeys } from '#src/lib/queryKeys.ts';

/** The newest solves of a project, narrowed to one document (`fingerprint`) or one revision. */
export const useSolves = (
  projectId: string,
  of: { fingerprint?: string; revisionId?: string } = {},
  { enabled = true }: { enabled?: boolean } = {},
) =>
  useQuery({
    queryKey: queryKeys.solvesOf(projectId, of),
    queryFn: ({ signal }) => call(listSolves, { query: { projectId, ...of }, signal }),
    select: (answer) => answer.solves,
    enabled,
  });
