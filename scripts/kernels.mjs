import { isStale, kernelsBuild, makeBuild } from './lib/builds.mjs';
import { reportFailure } from './lib/steps.mjs';

/** Runs after every installation of the packages: the command line and the tests load the kernels from source. */
async function main() {
  if (isStale(kernelsBuild)) await makeBuild(kernelsBuild);
}

main().catch((error) => {
  process.exitCode = reportFailure(error);
});
