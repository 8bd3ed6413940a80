import { readDraft, writeDraft as writeDraftContract } from '#shared/schemas/project.ts';
import { writeDraft } from '#server/commands/writeDraft.ts';
import { handle, type Route } from '#server/middlewares/handle.ts';
import { Draft } from '#server/models/Draft.ts';
import { FrameDocumentRecord } from '#server/models/FrameDocumentRecord.ts';
import { Person } from '#server/models/Person.ts';
import { Project } from '#server/models/Project.ts';
import { authorize } from '#server/policies/policy.ts';
import { presentDraft } from '#server/presenters/project.ts';

export const draftRoutes = (): readonly Route[] => [
  handle(readDraft, async ({ person, input, response }) => {
    const { projectId } = input.params;
    authorize(person, 'read-project', await Project.load(projectId));
    const draft = await Draft.findByPk(projectId, {
      include: [{ model: Person, as: 'updatedBy' }],
      rejectOnEmpty: true,
    });
    const document = await FrameDocumentRecord.read(draft.teamId, draft.fingerprint);
    response.set('ETag', `"${draft.version}"`);
    return presentDraft(draft, document);
  }),

  handle(writeDraftContract, async ({ person, input, response }) => {
    const draft = await writeDraft(person, input.params.projectId, input.body);
    response.set('ETag', `"${draft.version}"`);
    return {
      version: draft.version,
      fingerprint: draft.fingerprint,
      updatedAt: draft.updatedAt.toISOString(),
    };
  }),
];
