import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { useCreateProject } from '../api/projects.ts';

export interface ProjectToBegin {
  name: string;
  machine: string;
  document: unknown;
}

/**
 * Makes the project and goes to its frame. The id is chosen once, when the form opens, so that a request sent
 * twice makes one project.
 */
export function useBeginProject() {
  const [id] = useState(() => crypto.randomUUID());
  const create = useCreateProject();
  const navigate = useNavigate();
  const begin = (project: ProjectToBegin) =>
    create.mutate(
      { id, ...project },
      { onSuccess: (made) => void navigate(`/projects/${made.id}/frame`) },
    );
  return { begin, busy: create.isPending, error: create.error };
}
