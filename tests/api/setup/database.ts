import { randomBytes } from 'node:crypto';
import { inject } from 'vitest';
import { createDatabase } from '#scripts/lib/throwAway.mjs';
import { TEMPLATE } from './cluster.ts';

/** Connection addresses of one database: of the role that owns the tables, of the run-time role. */
export interface TestDatabase {
  readonly owner: string;
  readonly runTime: string;
}

/** A migrated, empty database of the calling test file's own; it goes away with the whole cluster. */
export function freshDatabase(): TestDatabase {
  return createDatabase(
    inject('throwAwayCluster'),
    `t_${randomBytes(6).toString('hex')}`,
    TEMPLATE,
  );
}
