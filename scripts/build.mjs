import { clientBuild, makeBuild, serverBuild } from './lib/builds.mjs';
import { setUpPackages } from './lib/setup.mjs';
import { reportFailure, step } from './lib/steps.mjs';

/** `npm run build`: the client and the server for production, in dist. */
async function main() {
  await setUpPackages();
  for (const build of [clientBuild, serverBuild]) {
    await step(`Build of the ${build.name}`, () => makeBuild(build));
  }
}

main().catch((error) => {
  process.exitCode = reportFailure(error);
});
