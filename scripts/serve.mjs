import { loadEnvironment } from './lib/environment.mjs';
import { runInProduction } from './lib/production.mjs';
import { serverProgram } from './lib/server.mjs';
import { reportFailure } from './lib/steps.mjs';

/** `npm run serve`: the server, for production. */
loadEnvironment();
runInProduction(serverProgram).catch((error) => {
  process.exit(reportFailure(error));
});
