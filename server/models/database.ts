import { DatabaseError, Sequelize, UniqueConstraintError, type Transaction } from 'sequelize';
import { AppError } from '#shared/errors/AppError.ts';
import { initAuditEntry } from './AuditEntry.ts';
import { initInvitation } from './Invitation.ts';
import { initPasswordReset } from './PasswordReset.ts';
import { initPerson } from './Person.ts';
import { initSentMail } from './SentMail.ts';
import { initDraft } from './Draft.ts';
import { initDraftVersion } from './DraftVersion.ts';
import { initFrameDocumentRecord } from './FrameDocumentRecord.ts';
import { initLockRecord } from './LockRecord.ts';
import { initProject } from './Project.ts';
import { initProjectMember } from './ProjectMember.ts';
import { initReview } from './Review.ts';
import { initRevision } from './Revision.ts';
import { initRevisionAuthor } from './RevisionAuthor.ts';
import { initRevisionComment } from './RevisionComment.ts';
import { initRevisionSolve } from './RevisionSolve.ts';
import { initSolve } from './Solve.ts';
import { initSolveResult } from './SolveResult.ts';
import { initTeam } from './Team.ts';

/** Every model's `init`, in the order of their associations. */
const models: readonly ((sequelize: Sequelize) => void)[] = [
  initTeam,
  initPerson,
  initInvitation,
  initPasswordReset,
  initSentMail,
  initAuditEntry,
  initProjectMember,
  initProject,
  initFrameDocumentRecord,
  initDraft,
  initDraftVersion,
  initSolveResult,
  initSolve,
  initRevisionAuthor,
  initReview,
  initRevision,
  initRevisionSolve,
  initRevisionComment,
  initLockRecord,
];

/** PostgreSQL's codes for "try the whole transaction again": serialization failure, deadlock. */
const RETRYABLE = new Set(['40001', '40P01']);
const ATTEMPTS = 4;

/** What people read when a rule of the database is broken by a race that the commands did not see. */
const messages: Readonly<Record<string, string>> = {
  people_email_key: 'This e-mail address already has an account.',
  invitations_open_key: 'This address was invited just now: read the list again.',
  people_last_administrator:
    'The last active administrator of a team cannot lose the switch or be deactivated: make somebody else administrator first.',
};

let connection: Sequelize | undefined;

/**
 * Connects the models of this process to a database, as the run-time role. Models are classes of which a
 * process has one each, so there is one connection pool per process.
 */
export function connectDatabase(url: string, poolSize: number): Sequelize {
  const sequelize = new Sequelize(url, {
    dialect: 'postgres',
    logging: false,
    pool: { max: poolSize, idle: 30_000, acquire: 15_000 },
    define: { underscored: true },
    dialectOptions: { application_name: 'ringstead', statement_timeout: 30_000 },
  });
  for (const init of models) init(sequelize);
  connection = sequelize;
  return sequelize;
}

/** The connected database. @throws {Error} before `connectDatabase` */
export function database(): Sequelize {
  if (connection === undefined) throw new Error('The database is not connected.');
  return connection;
}

/**
 * Runs one command's work in a transaction. Work that lost a deadlock or a serialization race is run again
 * from the start, so it must do nothing outside the database.
 *
 * @throws {AppError} `conflict` when a rule of the database refuses the change
 */
export async function inTransaction<T>(work: (transaction: Transaction) => Promise<T>): Promise<T> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await database().transaction(work);
    } catch (error) {
      if (!isRetryable(error)) throw conflictOf(error) ?? error;
      if (attempt === ATTEMPTS) throw busy(error);
    }
  }
}

interface PostgresFailure {
  readonly code?: string;
  readonly constraint?: string;
}

/** PostgreSQL's own error inside Sequelize's. */
function postgresFailure(error: DatabaseError | UniqueConstraintError): PostgresFailure {
  return 'original' in error ? (error.original as PostgresFailure) : {};
}

function isRetryable(error: unknown): boolean {
  return error instanceof DatabaseError && RETRYABLE.has(postgresFailure(error).code ?? '');
}

/** The conflict that a broken rule of the database means, or undefined when the error is something else. */
function conflictOf(error: unknown): AppError | undefined {
  if (error instanceof UniqueConstraintError) {
    const message = messages[postgresFailure(error).constraint ?? ''];
    return new AppError(
      'conflict',
      message ?? 'Somebody did this just now: read again.',
      {},
      error,
    );
  }
  if (error instanceof DatabaseError) {
    const message = messages[postgresFailure(error).constraint ?? ''];
    if (message !== undefined) return new AppError('conflict', message, {}, error);
  }
  return undefined;
}

function busy(cause: unknown): AppError {
  return new AppError(
    'conflict',
    'Others are changing the same thing just now: try again.',
    {},
    cause,
  );
}
