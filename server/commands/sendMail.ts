import type { Config } from '#server/config/config.ts';
import type { MailJob } from '#server/config/queues.ts';
import type { Mail } from '#server/mail/mailer.ts';
import { inTransaction } from '#server/models/database.ts';
import { Invitation } from '#server/models/Invitation.ts';
import { PasswordReset } from '#server/models/PasswordReset.ts';
import { Person } from '#server/models/Person.ts';
import { Team } from '#server/models/Team.ts';
import { newToken, tokenHash } from './token.ts';

/** How long a reset link works. */
export const RESET_MINUTES = 30;

/**
 * Writes and sends one mail of the queue. The token of a link is made here, so that it is kept nowhere but in
 * the mail; trying again makes a new one, and the link sent last is the one that works.
 */
export async function sendMail(
  config: Pick<Config, 'publicUrl'>,
  send: (mail: Mail) => Promise<void>,
  job: MailJob,
): Promise<void> {
  const mail = await writeMail(config.publicUrl, job);
  if (mail !== null) await send(mail);
}

/** Null: there is nothing to send any more. */
function writeMail(publicUrl: string, job: MailJob): Promise<Mail | null> {
  switch (job.kind) {
    case 'invitation':
      return writeInvitation(publicUrl, job.invitationId);
    case 'password-reset':
      return writeReset(publicUrl, job.email);
    case 'notice':
      return writeNotice(publicUrl, job);
  }
}

async function writeInvitation(publicUrl: string, invitationId: string): Promise<Mail | null> {
  const token = newToken();
  const invitation = await inTransaction(async (transaction) => {
    const found = await Invitation.findOne({
      where: { id: invitationId, acceptedAt: null },
      lock: true,
      transaction,
    });
    return found ? found.update({ tokenHash: tokenHash(token) }, { transaction }) : null;
  });
  if (invitation === null) return null;
  const [team, inviter] = await Promise.all([
    Team.findByPk(invitation.teamId, { rejectOnEmpty: true }),
    Person.findByPk(invitation.invitedById, { rejectOnEmpty: true }),
  ]);
  return {
    teamId: team.id,
    to: invitation.email,
    subject: `Invitation to ${team.name} on Ringstead`,
    text: [
      `${inviter.name} invites you to join ${team.name} on Ringstead as ${invitation.role}.`,
      `Open this link to choose your name and password:\n${publicUrl}/invitation#${token}`,
      `The link works once, until ${dateText(invitation.expiresAt)}. If you did not expect this mail, do nothing.`,
    ].join('\n\n'),
  };
}

async function writeReset(publicUrl: string, email: string): Promise<Mail | null> {
  const person = await Person.findOne({ where: { email, active: true } });
  if (person === null) return null;
  const token = newToken();
  const expiresAt = new Date(Date.now() + RESET_MINUTES * 60_000);
  await PasswordReset.create({ personId: person.id, tokenHash: tokenHash(token), expiresAt });
  return {
    teamId: person.teamId,
    to: person.email,
    subject: 'A new password for Ringstead',
    text: [
      `Somebody, probably you, asked for a new password for ${person.email}.`,
      `Open this link to choose it:\n${publicUrl}/reset#${token}`,
      `The link works once, for ${RESET_MINUTES} minutes. If it was not you, do nothing: your password stays as it is.`,
    ].join('\n\n'),
  };
}

async function writeNotice(
  publicUrl: string,
  notice: Extract<MailJob, { kind: 'notice' }>,
): Promise<Mail | null> {
  const person = await Person.findOne({ where: { id: notice.personId, active: true } });
  if (person === null) return null;
  return {
    teamId: person.teamId,
    to: person.email,
    subject: notice.subject,
    text: `${notice.text}\n\n${publicUrl}${notice.path}`,
  };
}

/** A date as everybody reads it, such as 8 December 2026, 14:00 UTC. */
const dateText = (date: Date): string =>
  `${new Intl.DateTimeFormat('en-GB', { dateStyle: 'long', timeStyle: 'short', timeZone: 'UTC' }).format(date)} UTC`;
