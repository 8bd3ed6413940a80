import { useInfiniteQuery, useQuery } from '@tanstack/react-query';
import { listActivity } from '#shared/schemas/activity.ts';
import { listProjects } from '#shared/schemas/project.ts';
import { call } from '#src/lib/api.ts';
import { queryKeys } from '#src/lib/queryKeys.ts';

const PAGE = 50;

/** What happened, newest first, page by page. */
export const useActivity = (projectId: string | null) =>
  useInfiniteQuery({
    queryKey: queryKeys.activity(projectId),
    queryFn: ({ pageParam, signal }) =>
      call(listActivity, {
        query: {
          limit: PAGE,
          ...(projectId === null ? {} : { projectId }),
          ...(pageParam === null ? {} : { before: pageParam }),
        },
        signal,
      }),
    initialPageParam: null as number | null,
    getNextPageParam: (page) => page.nextBefore,
    staleTime: 0,
  });

/** The projects to filter by. */
export const useProjectChoices = () =>
  useQuery({
    queryKey: queryKeys.projectList(''),
    queryFn: ({ signal }) => call(listProjects, { signal }),
    select: (answer) => answer.projects,
  });
