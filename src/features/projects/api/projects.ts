import { keepPreviousData, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import { createProject, listProjects } from '#shared/schemas/project.ts';
import { call } from '#src/lib/api.ts';
import { queryKeys } from '#src/lib/queryKeys.ts';

export const useProjects = (search: string) =>
  useQuery({
    queryKey: queryKeys.projectList(search),
    queryFn: ({ signal }) => call(listProjects, { query: search === '' ? {} : { search }, signal }),
    select: (answer) => answer.projects,
    placeholderData: keepPreviousData,
  });

export function useCreateProject() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: z.input<typeof createProject.body>) => call(createProject, { body }),
    onSuccess: (project) => {
      client.setQueryData(queryKeys.project(project.id), project);
      void client.invalidateQueries({ queryKey: queryKeys.projects });
    },
  });
}
