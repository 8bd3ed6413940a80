import type { Transaction } from 'sequelize';
import type { Revision } from '#server/models/Revision.ts';
import {
  mayStep,
  REVISION_STEPS,
  stepConflict,
  type RevisionStep,
} from '#server/policies/revisionTransitions.ts';
import { enqueue } from '#server/workers/jobs.ts';
import { notify } from '#server/workers/notifications.ts';

/** @throws {AppError} `conflict`, saying how the revision stands, when the table does not allow the step */
export function requireStep(revision: Revision, step: RevisionStep): void {
  if (!mayStep(revision.state, step)) throw stepConflict(revision.number, revision.state, step);
}

/** Moves a revision that the transaction has locked, by the transition table, and tells who is looking. */
export async function moveRevision(
  transaction: Transaction,
  revision: Revision,
  step: RevisionStep,
  particulars: Partial<
    Pick<
      Revision,
      'approvedById' | 'approvedAt' | 'withdrawnById' | 'withdrawnAt' | 'withdrawalReason'
    >
  > = {},
): Promise<void> {
  requireStep(revision, step);
  await revision.update(
    { ...particulars, state: REVISION_STEPS[step].to, stateSince: new Date() },
    { transaction },
  );
  await announceRevision(transaction, revision);
}

export function announceRevision(transaction: Transaction, revision: Revision): Promise<void> {
  const { projectId, id: revisionId, number, state } = revision;
  return notify(transaction, projectId, { kind: 'revision', revisionId, number, state });
}

export interface Mail {
  readonly to: Iterable<string>;
  readonly subject: string;
  readonly text: string;
}

/** Queues the same plain mail to several people, with a link to the revision. */
export async function mailAboutRevision(
  transaction: Transaction,
  { number, projectId }: Revision,
  { to, subject, text }: Mail,
): Promise<void> {
  const path = `/projects/${projectId}/release?revision=${number}`;
  for (const personId of new Set(to)) {
    await enqueue(transaction, 'mail', { kind: 'notice', personId, subject, text, path });
  }
}

/** Which revision, for an audit entry. */
export const auditSubject = (revision: Revision) => ({
  revisionId: revision.id,
  number: revision.number,
});
