import { QueryTypes } from 'sequelize';
import type { FrameDocument } from '#shared/schemas/frameDocument.ts';
import { database } from './database.ts';
import { FrameDocumentRecord } from './FrameDocumentRecord.ts';
import { LockRecord } from './LockRecord.ts';
import { Person } from './Person.ts';
import { Review } from './Review.ts';
import { Revision } from './Revision.ts';
import { RevisionAuthor } from './RevisionAuthor.ts';
import { RevisionComment } from './RevisionComment.ts';
import { RevisionSolve } from './RevisionSolve.ts';
import { Solve } from './Solve.ts';

/** Lowest elastic natural frequency by the consistent method over the states of a revision. */
export interface FirstFrequency {
  /** Hz; null where the modes are all rigid. */
  readonly hz: number | null;
  /** False where one of the solves is incomplete. */
  readonly complete: boolean;
}

/** What a list says of a revision. */
export interface ListedRevision {
  /** With submitter, authors and reviews loaded. */
  readonly revision: Revision;
  /** Null where it has no consistent solve. */
  readonly first: FirstFrequency | null;
}

/** What a revision carries besides its own row. */
export interface RevisionContents {
  readonly document: FrameDocument;
  readonly solves: readonly Solve[];
  readonly comments: readonly RevisionComment[];
  readonly lock: LockRecord | null;
  readonly first: FirstFrequency | null;
}

/** The revisions of a project, newest first. */
export async function listRevisions(projectId: string): Promise<ListedRevision[]> {
  const revisions = await Revision.findAll({
    where: { projectId },
    include: [
      { model: Person, as: 'submittedBy' },
      { model: Review, as: 'reviews', separate: true },
      {
        model: RevisionAuthor,
        as: 'authorships',
        separate: true,
        include: [{ model: Person, as: 'person' }],
      },
    ],
    order: [['number', 'DESC']],
  });
  const frequencies = await firstFrequencies(revisions.map(({ id }) => id));
  return revisions.map((revision) => ({
    revision,
    first: frequencies.get(revision.id) ?? null,
  }));
}

export async function readContents(revision: Revision): Promise<RevisionContents> {
  const where = { revisionId: revision.id };
  const [document, frozen, comments, lock, frequencies] = await Promise.all([
    FrameDocumentRecord.read(revision.teamId, revision.documentFingerprint),
    RevisionSolve.findAll({ where, include: [{ model: Solve, as: 'solve' }] }),
    RevisionComment.findAll({
      where,
      include: [{ model: Person, as: 'author' }],
      order: [['createdAt', 'ASC']],
    }),
    LockRecord.findByPk(revision.id),
    firstFrequencies([revision.id]),
  ]);
  return {
    document,
    solves: frozen.flatMap(({ solve }) => solve ?? []),
    comments,
    lock,
    first: frequencies.get(revision.id) ?? null,
  };
}

async function firstFrequencies(
  revisionIds: readonly string[],
): Promise<ReadonlyMap<string, FirstFrequency>> {
  if (revisionIds.length === 0) return new Map();
  const rows = await database().query<FirstFrequency & { id: string }>(
    `SELECT f.revision_id AS id, min(r.first_frequency_hz) AS hz,
            bool_and(r.complete) AS complete
       FROM revision_solves f
       JOIN solve_results r ON r.team_id = f.team_id AND r.key = f.result_key
      WHERE f.revision_id IN (:revisionIds) AND r.method = 'consistent'
      GROUP BY f.revision_id`,
    { type: QueryTypes.SELECT, replacements: { revisionIds } },
  );
  return new Map(rows.map(({ id, ...first }) => [id, first]));
}
