import { loadEnvironment, runTimeAddress } from './lib/environment.mjs';
import { runInProduction } from './lib/production.mjs';
import { runnerProgram } from './lib/server.mjs';
import { reportFailure } from './lib/steps.mjs';

/**
 * `npm run runner`: one more process that solves, for the database that the environment names, else for
 * the one that `npm start` runs here.
 */
async function main() {
  loadEnvironment();
  process.env['DATABASE_URL'] = runTimeAddress();
  await runInProduction(runnerProgram);
}

main().catch((error) => {
  process.exit(reportFailure(error));
});
