import { keepPreviousData, useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import {
  addProjectMember,
  createProject,
  listProjects,
  removeProjectMember,
  updateProject,
  type ProjectResponse,
} from '#shared/schemas/project.ts';
import { call } from '#src/lib/api.ts';
import { queryKeys } from '#src/lib/queryKeys.ts';

export const useProjects = (search: string) =>
  useQuery({
    queryKey: queryKeys.projectList(search),
    queryFn: ({ signal }) => call(listProjects, { query: search === '' ? {} : { search }, signal }),
    select: (answer) => answer.projects,
    placeholderData: keepPreviousData,
  });

/** Every change answers with the project as it is now; the list is read again. */
function useKeepProject() {
  const client = useQueryClient();
  return (project: ProjectResponse): void => {
    client.setQueryData(queryKeys.project(project.id), project);
    void client.invalidateQueries({ queryKey: queryKeys.projects });
  };
}

export function useCreateProject() {
  return useMutation({
    mutationFn: (body: z.input<typeof createProject.body>) => call(createProject, { body }),
    onSuccess: useKeepProject(),
  });
}

export function useUpdateProject(projectId: string) {
  return useMutation({
    mutationFn: (body: z.input<typeof updateProject.body>) =>
      call(updateProject, { params: { projectId }, body }),
    onSuccess: useKeepProject(),
  });
}

/** Shares the project with a person, or stops sharing it. */
export function useShareProject(projectId: string) {
  return useMutation({
    mutationFn: ({ personId, shared }: { personId: string; shared: boolean }) =>
      call(shared ? addProjectMember : removeProjectMember, { params: { projectId, personId } }),
    onSuccess: useKeepProject(),
  });
}
