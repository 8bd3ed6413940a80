import { demoSignIns, seedDemo } from '#seeders/demo.ts';
import { reportFailure } from './lib/steps.mjs';

/** Fills in the demo where it is missing, then prints one sign-in for each role as JSON. */
async function main(): Promise<void> {
  await seedDemo();
  console.log(JSON.stringify(demoSignIns));
}

main().catch((error: unknown) => {
  process.exitCode = reportFailure(error);
});
