import { runBuiltProgram } from './lib/builtProgram.mjs';
import { loadEnvironment, runTimeAddress } from './lib/environment.mjs';
import { runnerProgram } from './lib/server.mjs';
import { reportFailure } from './lib/steps.mjs';

/**
 * `npm run runner`: one more process that solves, for the database that the environment names, else for
 * the one that `npm start` runs here. It has no sessions and sends no mail, so it needs none of their
 * secrets.
 */
async function main() {
  loadEnvironment();
  process.env['DATABASE_URL'] = runTimeAddress();
  await runBuiltProgram(runnerProgram);
}

main().catch((error) => {
  process.exit(reportFailure(error));
});
