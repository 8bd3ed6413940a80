import { setUpPackages } from './lib/setup.mjs';
import { shutDown, shutDownOnSignals } from './lib/shutdown.mjs';
import { stages } from './lib/stages.mjs';
import { formatDuration, reportFailure, StepError } from './lib/steps.mjs';

/** `npm test`: every stage, the first failing one being the last; `npm test -- unit api`: those two. */
async function main() {
  const asked = process.argv.slice(2);
  const unknown = asked.find((name) => !(name in stages));
  if (unknown !== undefined) {
    throw new StepError(`There is no stage ${unknown}: say ${Object.keys(stages).join(', ')}.`);
  }
  await setUpPackages();
  const chosen = Object.entries(stages).filter(
    ([name]) => asked.length === 0 || asked.includes(name),
  );
  const began = performance.now();
  let passed = 0;
  let failed = 0;
  for (const [name, stage] of chosen) {
    console.log(`\n── ${name}`);
    const stageBegan = performance.now();
    const outcome = await stage();
    passed += outcome.passed ?? 0;
    // A stage that fails before it has counted its tests has failed all the same.
    failed += outcome.ok ? 0 : Math.max(outcome.failed ?? 0, 1);
    const time = formatDuration(performance.now() - stageBegan);
    console.log(`── ${name}: ${outcome.ok ? 'passed' : 'FAILED'}, ${outcome.count}, ${time}`);
    if (!outcome.ok) {
      process.exitCode = 1;
      break;
    }
  }
  console.log(`\nAll in ${formatDuration(performance.now() - began)}`);
  console.log(`${passed} passed, ${failed} failed`);
}

shutDownOnSignals(1);
main().catch(async (error) => {
  process.exitCode = reportFailure(error);
  await shutDown();
});
