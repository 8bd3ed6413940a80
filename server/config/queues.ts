import type PgBoss from 'pg-boss';

/**
 * The job queues. Migrating makes them, as the owner of the tables: a queue is a table of its own, which
 * the run-time role may not make.
 */
export const queues: readonly PgBoss.Queue[] = [{ name: 'solve' }];
