import type { Config } from '#server/config/config.ts';
import { sendMail } from '#server/commands/sendMail.ts';
import { startMailer } from '#server/mail/mailer.ts';
import { workOn } from './jobs.ts';

/**
 * Sends the queued mail in this process.
 *
 * @returns what lets go of the mail server; stop the job queues first
 */
export async function startMailWorker(config: Config): Promise<() => Promise<void>> {
  const mailer = await startMailer(config);
  await workOn('mail', (job) => sendMail(config, mailer.send, job));
  return mailer.close;
}
