import { runBuiltProgram } from './lib/builtProgram.mjs';
import { loadEnvironment } from './lib/environment.mjs';
import { serverProgram } from './lib/server.mjs';
import { reportFailure } from './lib/steps.mjs';

/** `npm run serve`: the server, for production; refuses a default secret and the fake mail server. */
loadEnvironment();
process.env['RINGSTEAD_MODE'] = 'production';
runBuiltProgram(serverProgram).catch((error) => {
  process.exit(reportFailure(error));
});
