import { join } from 'node:path';
import PgBoss from 'pg-boss';
import { Sequelize } from 'sequelize';
import { SequelizeStorage, Umzug } from 'umzug';
import { queues } from '#server/config/queues.ts';
import { root } from './folders.mjs';
import { RUN_TIME } from './roles.mjs';

/** Any fixed number, the same in every process that migrates: the key of the advisory lock. */
const LOCK_KEY = 4_600_001;

/** Where a migration says how to go forward and back; `context` is Sequelize's query interface. */
function migrator(sequelize: Sequelize) {
  return new Umzug({
    migrations: { glob: join(root, 'migrations/*.ts') },
    context: sequelize.getQueryInterface(),
    storage: new SequelizeStorage({ sequelize }),
    logger: undefined,
  });
}

/**
 * Brings the database up to date, the job queue's own tables included. Only one process migrates at a
 * time: another one waits for the advisory lock and then finds nothing to do.
 *
 * @param ownerAddress connection address of the role that owns the tables
 * @returns the names of the migrations that were run
 * @throws what the database says; migrations done before the failing one stay done
 */
export async function migrateUp(ownerAddress: string): Promise<string[]> {
  return withLock(ownerAddress, async (sequelize) => {
    const done = await migrator(sequelize).up();
    await sequelize.query(`GRANT SELECT ON "SequelizeMeta" TO ${RUN_TIME}`);
    await provideQueues(ownerAddress, sequelize);
    return done.map((migration) => migration.name);
  });
}

/** Takes back the last migration; gives its name. */
export async function migrateDown(ownerAddress: string): Promise<string[]> {
  return withLock(ownerAddress, async (sequelize) => {
    const undone = await migrator(sequelize).down();
    return undone.map((migration) => migration.name);
  });
}

async function withLock<T>(
  ownerAddress: string,
  work: (sequelize: Sequelize) => Promise<T>,
): Promise<T> {
  // The lock belongs to a connection, which therefore must not be given back to a pool meanwhile.
  const lock = new Sequelize(ownerAddress, { logging: false, pool: { max: 1, min: 1 } });
  const sequelize = new Sequelize(ownerAddress, { logging: false });
  try {
    return await lock.transaction(async (transaction) => {
      await lock.query(`SELECT pg_advisory_xact_lock(${LOCK_KEY})`, { transaction });
      return await work(sequelize);
    });
  } finally {
    await sequelize.close();
    await lock.close();
  }
}

/**
 * Makes the job queue's schema and queues as the owner (a queue is a table of its own), so that the
 * run-time role only ever reads and writes rows.
 */
async function provideQueues(ownerAddress: string, sequelize: Sequelize): Promise<void> {
  const boss = new PgBoss({ connectionString: ownerAddress, supervise: false, schedule: false });
  boss.on('error', (error) => {
    throw error;
  });
  await boss.start();
  try {
    for (const queue of queues) {
      await boss.createQueue(queue.name, queue);
      // One that exists already may have had other options in an earlier version.
      await boss.updateQueue(queue.name, queue);
    }
  } finally {
    await boss.stop({ graceful: false });
  }
  await sequelize.query(`
    GRANT USAGE ON SCHEMA pgboss TO ${RUN_TIME};
    GRANT SELECT, INSERT, UPDATE, DELETE ON ALL TABLES IN SCHEMA pgboss TO ${RUN_TIME};
  `);
}
