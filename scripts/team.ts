import { randomUUID } from 'node:crypto';
import { parseArgs } from 'node:util';
import { z } from 'zod';
import { AppError } from '#shared/errors/AppError.ts';
import { emailAddress, personName, role } from '#shared/schemas/common.ts';
import { createPerson } from '#server/commands/createPerson.ts';
import { createTeam } from '#server/commands/createTeam.ts';
import { requestPasswordReset } from '#server/commands/resetPassword.ts';
import { newToken } from '#server/commands/token.ts';
import { readConfig } from '#server/config/config.ts';
import { createLog } from '#server/config/log.ts';
import { connectDatabase, inTransaction } from '#server/models/database.ts';
import { startJobs, stopJobs } from '#server/workers/jobs.ts';
import { loadEnvironment, runTimeAddress } from './lib/environment.mjs';
import { reportFailure, StepError } from './lib/steps.mjs';

/**
 * `npm run team -- --team "Ellerby" --name "Petra Quill" --email petra@ellerby.example [--role lead]`: the first
 * team of a new installation and its administrator, who gets a mail with a link to choose a password.
 */
const input = z.object({
  team: z.string({ error: 'Name the team: --team "…"' }).trim().min(1).max(120),
  name: z.string({ error: 'Name the person: --name "…"' }).pipe(personName),
  email: z.string({ error: 'Give the address: --email …' }).pipe(emailAddress),
  role,
});

async function main(): Promise<void> {
  const { values } = parseArgs({
    options: {
      team: { type: 'string' },
      name: { type: 'string' },
      email: { type: 'string' },
      role: { type: 'string', default: 'lead' },
    },
  });
  const parsed = input.safeParse(values);
  if (!parsed.success) {
    throw new StepError(parsed.error.issues.map((issue) => issue.message).join(' '));
  }
  const { team, ...person } = parsed.data;
  loadEnvironment();
  process.env['DATABASE_URL'] = runTimeAddress();
  const config = readConfig(process.env);
  const database = connectDatabase(config.databaseUrl, config.databasePool);
  await startJobs(config, createLog(config));
  try {
    await inTransaction(async (transaction) => {
      const { id: teamId } = await createTeam(transaction, { id: randomUUID(), name: team });
      // Nobody ever learns this password: the link in the mail sets another.
      const password = newToken();
      await createPerson(transaction, { ...person, teamId, password, isAdministrator: true });
    });
    await requestPasswordReset(person.email);
    console.log(`${team} is made. ${person.email} gets a link to choose a password by mail.`);
  } finally {
    await stopJobs();
    await database.close();
  }
}

main().catch((error: unknown) => {
  process.exitCode = reportFailure(
    error instanceof AppError ? new StepError(error.message) : error,
  );
});
