import { readdir } from 'node:fs/promises';
import { join } from 'node:path';
import { QueryTypes } from 'sequelize';
import { database } from './database.ts';

/** Beside the product, in the folder it was started in. */
const FOLDER = join(process.cwd(), 'migrations');

/** Whether every migration that this product brings has been run on the database. */
export async function migrationsAreCurrent(): Promise<boolean> {
  const rows = await database().query<{ name: string }>('SELECT name FROM "SequelizeMeta"', {
    type: QueryTypes.SELECT,
  });
  const done = new Set(rows.map((row) => row.name));
  const files = (await readdir(FOLDER)).filter((name) => name.endsWith('.ts'));
  return files.every((name) => done.has(name));
}
