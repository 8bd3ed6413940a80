import {
  addProjectMember,
  createProject as createProjectContract,
  listProjects,
  readProject,
  removeProjectMember,
  updateProject as updateProjectContract,
  type ProjectResponse,
} from '#shared/schemas/project.ts';
import { createProject } from '#server/commands/createProject.ts';
import { shareProject } from '#server/commands/shareProject.ts';
import { updateProject } from '#server/commands/updateProject.ts';
import { handle, type Route } from '#server/middlewares/handle.ts';
import type { Person } from '#server/models/Person.ts';
import { Project } from '#server/models/Project.ts';
import { findProjectOverview, listProjectOverviews } from '#server/models/projectOverview.ts';
import { authorize, can } from '#server/policies/policy.ts';
import { presentProject, presentProjectSummary } from '#server/presenters/project.ts';

export const projectRoutes = (): readonly Route[] => [
  handle(listProjects, async ({ person, input }) => {
    const all = await listProjectOverviews(person.teamId, input.query.search);
    const readable = all.filter((project) => can(person, 'read-project', project));
    return { projects: readable.map((project) => presentProjectSummary(person, project)) };
  }),

  handle(createProjectContract, async ({ person, input }) => {
    await createProject(person, input.body);
    return wholeProject(person, input.body.id);
  }),

  handle(readProject, ({ person, input }) => wholeProject(person, input.params.projectId)),

  handle(updateProjectContract, async ({ person, input }) => {
    await updateProject(person, input.params.projectId, input.body);
    return wholeProject(person, input.params.projectId);
  }),

  handle(addProjectMember, async ({ person, input }) => {
    const { projectId, personId } = input.params;
    await shareProject(person, projectId, personId, true);
    return wholeProject(person, projectId);
  }),

  handle(removeProjectMember, async ({ person, input }) => {
    const { projectId, personId } = input.params;
    await shareProject(person, projectId, personId, false);
    return wholeProject(person, projectId);
  }),
];

async function wholeProject(person: Person, id: string): Promise<ProjectResponse> {
  const overview = await findProjectOverview(person.teamId, id);
  authorize(person, 'read-project', overview);
  const project = await Project.load(id);
  const members = (project?.memberships ?? []).flatMap((membership) => membership.person ?? []);
  return presentProject(person, overview, members);
}
