import { loadEnvironment, ownerAddress } from './lib/environment.mjs';
import { migrateDown, migrateUp } from './lib/migrations.ts';
import { reportFailure, StepError } from './lib/steps.mjs';

/** `npm run migrate` brings the database up to date; `npm run migrate -- down` takes the last step back. */
async function main(direction: string): Promise<void> {
  loadEnvironment();
  const owner = ownerAddress();
  if (direction !== 'up' && direction !== 'down') {
    throw new StepError(`Say \`up\` or \`down\`, not \`${direction}\`.`);
  }
  const names = await (direction === 'up' ? migrateUp(owner) : migrateDown(owner));
  console.log(names.length === 0 ? 'Nothing to do.' : names.join('\n'));
}

main(process.argv[2] ?? 'up').catch((error: unknown) => {
  process.exitCode = reportFailure(error);
});
