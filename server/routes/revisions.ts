import {
  acceptRevision as acceptContract,
  approveRevision as approveContract,
  createRevisionComment,
  listRevisions as listContract,
  readRevision,
  recallRevision as recallContract,
  returnRevision as returnContract,
  submitRevision as submitContract,
  withdrawRevision as withdrawContract,
  type RevisionResponse,
} from '#shared/schemas/revision.ts';
import { approveRevision } from '#server/commands/approveRevision.ts';
import { requirePassword } from '#server/commands/changePassword.ts';
import { commentRevision } from '#server/commands/commentRevision.ts';
import { listRevisions, readContents } from '#server/models/revisionContents.ts';
import { recallRevision } from '#server/commands/recallRevision.ts';
import { acceptRevision, returnRevision } from '#server/commands/reviewRevision.ts';
import { submitRevision } from '#server/commands/submitRevision.ts';
import { withdrawRevision } from '#server/commands/withdrawRevision.ts';
import { handle, type Route } from '#server/middlewares/handle.ts';
import type { Person } from '#server/models/Person.ts';
import { Project } from '#server/models/Project.ts';
import { Revision } from '#server/models/Revision.ts';
import { authorize } from '#server/policies/policy.ts';
import {
  presentComment,
  presentRevision,
  presentRevisionBrief,
} from '#server/presenters/revision.ts';
import type { Services } from './services.ts';

export const revisionRoutes = ({ limits }: Services): readonly Route[] => [
  handle(listContract, async ({ person, input }) => {
    const { projectId } = input.params;
    authorize(person, 'read-project', await Project.load(projectId));
    return { revisions: (await listRevisions(projectId)).map(presentRevisionBrief) };
  }),

  handle(submitContract, async ({ person, input }) =>
    wholeRevision(person, await submitRevision(person, input.params.projectId, input.body)),
  ),

  handle(readRevision, ({ person, input }) => wholeRevision(person, input.params.revisionId)),

  handle(recallContract, async ({ person, input }) => {
    await recallRevision(person, input.params.revisionId);
    return wholeRevision(person, input.params.revisionId);
  }),

  handle(acceptContract, async ({ person, input }) => {
    await acceptRevision(person, input.params.revisionId, input.body.comment);
    return wholeRevision(person, input.params.revisionId);
  }),

  handle(returnContract, async ({ person, input }) => {
    await returnRevision(person, input.params.revisionId, input.body.comment);
    return wholeRevision(person, input.params.revisionId);
  }),

  handle(approveContract, async ({ person, input }) => {
    const { revisionId } = input.params;
    authorize(person, 'approve-revision', await Revision.load(revisionId));
    await limits.spend('password-person', person.id);
    await requirePassword(person, input.body.password, 'password');
    await limits.forgive('password-person', person.id);
    await approveRevision(person, revisionId);
    return wholeRevision(person, revisionId);
  }),

  handle(withdrawContract, async ({ person, input }) => {
    await withdrawRevision(person, input.params.revisionId, input.body.reason);
    return wholeRevision(person, input.params.revisionId);
  }),

  handle(createRevisionComment, async ({ person, input }) => {
    const comment = await commentRevision(person, input.params.revisionId, input.body);
    comment.author = person;
    return presentComment(comment);
  }),
];

async function wholeRevision(person: Person, id: string): Promise<RevisionResponse> {
  const revision = await Revision.load(id);
  authorize(person, 'read-revision', revision);
  return presentRevision(person, revision, await readContents(revision));
}
