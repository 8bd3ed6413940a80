import { randomUUID } from 'node:crypto';
import { Op, type Transaction } from 'sequelize';
import type { z } from 'zod';
import { SOLVER_VERSION } from '#shared/analysis/solverVersion.ts';
import { AppError } from '#shared/errors/AppError.ts';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import type { submitRevision as contract } from '#shared/schemas/revision.ts';
import type { SolveSettings } from '#shared/schemas/solveResult.ts';
import { inTransaction } from '#server/models/database.ts';
import { Draft } from '#server/models/Draft.ts';
import { DraftVersion } from '#server/models/DraftVersion.ts';
import { FrameDocumentRecord } from '#server/models/FrameDocumentRecord.ts';
import { Person } from '#server/models/Person.ts';
import { Project } from '#server/models/Project.ts';
import { Revision } from '#server/models/Revision.ts';
import { RevisionAuthor } from '#server/models/RevisionAuthor.ts';
import { RevisionSolve } from '#server/models/RevisionSolve.ts';
import { Solve } from '#server/models/Solve.ts';
import { resultKey, SolveResult, type ResultSubject } from '#server/models/SolveResult.ts';
import { Team } from '#server/models/Team.ts';
import { authorize } from '#server/policies/policy.ts';
import { announceRevision, auditSubject, mailAboutRevision } from './moveRevision.ts';
import { recordAudit } from './recordAudit.ts';
import { addDoneSolve, requireSolvable } from './requestSolves.ts';
import { staleDraft } from './writeDraft.ts';

/** Both mass kinds, so that a reviewer sees them side by side. */
const REQUIRED_METHODS = ['consistent', 'lumped'] as const;

/**
 * Freezes the draft as the project's next revision, with its results and the team's release rules of now, and
 * asks for review.
 *
 * @returns the revision's id
 * @throws {AppError} `stale-version` when the draft moved on; `conflict` when a revision is under way or a
 *   result is missing (`details.missing`); `invalid-document` when the frame cannot be solved
 */
export async function submitRevision(
  person: Person,
  projectId: string,
  input: z.output<typeof contract.body>,
): Promise<string> {
  return inTransaction(async (transaction) => {
    const project = await Project.lock(transaction, projectId);
    authorize(person, 'submit-revision', project);
    const { teamId } = project;
    const draft = await Draft.findByPk(projectId, {
      include: [{ model: Person, as: 'updatedBy' }],
      transaction,
      rejectOnEmpty: true,
    });
    if (draft.version !== input.draftVersion) {
      throw await staleDraft(transaction, draft, input.draftVersion);
    }
    await refuseSecond(transaction, projectId);
    const document = await FrameDocumentRecord.read(teamId, draft.fingerprint, transaction);
    requireSolvable(document);
    const subjects = requiredResults(document, draft.fingerprint, input.settings);
    await requireResults(transaction, teamId, document, subjects);

    const team = await Team.findByPk(teamId, { transaction, rejectOnEmpty: true });
    const authorIds = await authorsOf(transaction, draft, person.id);
    const latest = await Revision.max<number, Revision>('number', {
      where: { projectId },
      transaction,
    });
    const revision = await Revision.create(
      {
        id: randomUUID(),
        teamId,
        projectId,
        number: (latest ?? 0) + 1,
        state: 'submitted',
        changeNote: input.changeNote,
        draftVersion: draft.version,
        documentFingerprint: draft.fingerprint,
        settings: input.settings,
        solverVersion: SOLVER_VERSION,
        requiredReviews: team.requiredReviews,
        soleReviewerMayApprove: team.soleReviewerMayApprove,
        submittedById: person.id,
      },
      { transaction },
    );
    await RevisionAuthor.bulkCreate(
      authorIds.map((personId) => ({ revisionId: revision.id, personId })),
      { transaction },
    );
    await freezeSolves(transaction, person, project, revision, subjects);
    await askForReview(transaction, person, project, revision, authorIds);
    await project.touch(transaction);
    await announceRevision(transaction, revision);
    await recordAudit(transaction, {
      teamId,
      actorId: person.id,
      projectId,
      action: 'revision-submitted',
      details: {
        ...auditSubject(revision),
        changeNote: input.changeNote,
        documentFingerprint: draft.fingerprint,
      },
    });
    return revision.id;
  });
}

async function refuseSecond(transaction: Transaction, projectId: string): Promise<void> {
  const underWay = await Revision.findOne({
    where: { projectId, state: ['submitted', 'accepted'] },
    transaction,
  });
  if (!underWay) return;
  throw new AppError(
    'conflict',
    `R${underWay.number} is already under way: it has to be recalled, returned or approved first.`,
    { revisionId: underWay.id, state: underWay.state },
  );
}

function requiredResults(
  document: FrameDocument,
  documentFingerprint: string,
  settings: SolveSettings,
): ResultSubject[] {
  const states = document.states.length > 0 ? document.states.map(({ id }) => id) : [null];
  return states.flatMap((stateId) =>
    REQUIRED_METHODS.map((method) => ({
      documentFingerprint,
      stateId,
      method,
      settings,
      solverVersion: SOLVER_VERSION,
    })),
  );
}

/** @throws {AppError} `conflict` naming every result that is not there or not complete */
async function requireResults(
  transaction: Transaction,
  teamId: string,
  document: FrameDocument,
  subjects: readonly ResultSubject[],
): Promise<void> {
  const results = await SolveResult.findAll({
    attributes: ['key', 'complete'],
    where: { teamId, key: subjects.map(resultKey) },
    transaction,
  });
  const completeByKey = new Map(results.map(({ key, complete }) => [key, complete]));
  const missing = subjects.flatMap(({ stateId, method, ...rest }) => {
    const complete = completeByKey.get(resultKey({ stateId, method, ...rest }));
    if (complete === true) return [];
    const state = document.states.find(({ id }) => id === stateId);
    return [
      {
        stateId,
        stateName: state?.name ?? null,
        method,
        reason: complete === false ? ('incomplete' as const) : ('not solved' as const),
      },
    ];
  });
  if (missing.length === 0) return;
  const named = missing.map(
    ({ stateName, method, reason }) =>
      `${method}${stateName === null ? '' : ` in “${stateName}”`}: ${reason}`,
  );
  throw new AppError(
    'conflict',
    `Every operating state needs complete consistent and lumped results of this very draft. Missing: ${named.join('; ')}.`,
    { missing },
  );
}

/** Whoever wrote a version of the draft since the last one that was approved and not withdrawn, and the submitter. */
async function authorsOf(
  transaction: Transaction,
  { projectId, version }: Draft,
  submitterId: string,
): Promise<string[]> {
  const approved = await Revision.max<number | null, Revision>('draftVersion', {
    where: { projectId, state: ['approved', 'superseded'] },
    transaction,
  });
  const versions = await DraftVersion.findAll({
    attributes: ['writtenById'],
    where: { projectId, version: { [Op.gt]: approved ?? 0, [Op.lte]: version } },
    group: ['writtenById'],
    transaction,
  });
  return [...new Set([submitterId, ...versions.map(({ writtenById }) => writtenById)])];
}

/** Ties the revision to one solve of the project per required result. */
async function freezeSolves(
  transaction: Transaction,
  person: Person,
  project: Project,
  revision: Revision,
  subjects: readonly ResultSubject[],
): Promise<void> {
  for (const subject of subjects) {
    const key = resultKey(subject);
    const solve =
      (await Solve.findOne({
        where: { projectId: project.id, resultKey: key, status: 'done' },
        order: [['requestedAt', 'DESC']],
        transaction,
      })) ?? (await addDoneSolve(transaction, person, project, subject, null));
    await RevisionSolve.create(
      { revisionId: revision.id, teamId: project.teamId, solveId: solve.id, resultKey: key },
      { transaction },
    );
  }
}

async function askForReview(
  transaction: Transaction,
  person: Person,
  project: Project,
  revision: Revision,
  authorIds: readonly string[],
): Promise<void> {
  const reviewers = await Person.findAll({
    where: {
      teamId: project.teamId,
      active: true,
      role: ['reviewer', 'lead'],
      id: { [Op.notIn]: authorIds },
    },
    transaction,
  });
  await mailAboutRevision(transaction, revision, {
    to: reviewers.map(({ id }) => id),
    subject: `${project.name}: R${revision.number} waits for review`,
    text: `${person.name} submitted R${revision.number} of ${project.name} and asks for review.\n\nWhat changed: ${revision.changeNote}`,
  });
}
