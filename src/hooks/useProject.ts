import { useQuery } from '@tanstack/react-query';
import { readProject } from '#shared/schemas/project.ts';
import { call } from '#src/lib/api.ts';
import { queryKeys } from '#src/lib/queryKeys.ts';

export const useProject = (projectId: string) =>
  useQuery({
    queryKey: queryKeys.project(projectId),
    queryFn: ({ signal }) => call(readProject, { params: { projectId }, signal }),
  });
