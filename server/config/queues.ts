import type PgBoss from 'pg-boss';

/** One mail to write and send; nothing secret is queued: the sender makes the token of a link itself. */
export type MailJob =
  | { readonly kind: 'invitation'; readonly invitationId: string }
  /** Queued for unknown addresses too, so that asking takes the same time for every address. */
  | { readonly kind: 'password-reset'; readonly email: string }
  /** A plain message to a person of a team; `path` is where its link leads. */
  | {
      readonly kind: 'notice';
      readonly personId: string;
      readonly subject: string;
      readonly text: string;
      readonly path: string;
    };

/** What a job of each queue carries. */
export interface JobData {
  readonly mail: MailJob;
  readonly solve: { readonly solveId: string };
}

export type QueueName = keyof JobData;

/**
 * The job queues. Migrating makes them, as the owner of the tables: a queue is a table of its own, which
 * the run-time role may not make.
 */
export const queues: readonly (PgBoss.Queue & { readonly name: QueueName })[] = [
  // The row of the solve decides whether there is anything to do, so a job is never tried twice; it may last
  // as long as the longest time limit.
  { name: 'solve', retryLimit: 0, expireInSeconds: 21_600 },
  { name: 'mail', retryLimit: 10, retryDelay: 15, retryBackoff: true, expireInSeconds: 120 },
];
