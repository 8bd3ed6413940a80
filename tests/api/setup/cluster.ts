import {
  createDatabase,
  startThrowAwayCluster,
  stopThrowAwayCluster,
  type ThrowAwayCluster,
} from '#scripts/lib/throwAway.mjs';
import { runScript } from '#scripts/lib/processes.mjs';
import type { TestProject } from 'vitest/node';

declare module 'vitest' {
  export interface ProvidedContext {
    readonly throwAwayCluster: ThrowAwayCluster;
  }
}

/** The migrated, empty database that each test file copies (database.ts). */
export const TEMPLATE = 'template_migrated';

/** Vitest's global set-up of the API tests: one throw-away cluster, with one migrated template. */
export default async function setup(project: TestProject): Promise<() => void> {
  const throwAway = await startThrowAwayCluster();
  const stop = () => stopThrowAwayCluster(throwAway);
  try {
    const { owner, runTime } = createDatabase(throwAway, TEMPLATE);
    const env = { ...process.env, MIGRATION_DATABASE_URL: owner, DATABASE_URL: runTime };
    if ((await runScript('scripts/migrate.ts', [], env)).status !== 0) {
      throw new Error('The template database could not be migrated: see the messages above.');
    }
  } catch (error) {
    stop();
    throw error;
  }
  project.provide('throwAwayCluster', throwAway);
  return stop;
}
