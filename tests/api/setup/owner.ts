import { Sequelize } from 'sequelize';
import type { TestDatabase } from './database.ts';

/** Runs SQL as the owner of the tables: what a test may bring about, and the run-time role may not. */
export async function asOwner(
  database: TestDatabase,
  sql: string,
  replacements: Record<string, string> = {},
): Promise<void> {
  const owner = new Sequelize(database.owner, { logging: false });
  try {
    await owner.query(sql, { replacements });
  } finally {
    await owner.close();
  }
}
