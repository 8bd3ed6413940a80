import { listActivity as listActivityContract } from '#shared/schemas/activity.ts';
import { listActivity } from '#server/commands/listActivity.ts';
import { handle, type Route } from '#server/middlewares/handle.ts';
import { Project } from '#server/models/Project.ts';
import { authorize } from '#server/policies/policy.ts';
import { presentActivity } from '#server/presenters/activity.ts';

export const activityRoutes = (): readonly Route[] => [
  handle(listActivityContract, async ({ person, input }) => {
    const { projectId } = input.query;
    if (projectId !== undefined) {
      authorize(person, 'read-project', await Project.load(projectId));
    }
    return presentActivity(await listActivity(person, input.query));
  }),
];
