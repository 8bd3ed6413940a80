import { vi } from 'vitest';
import { SentMail } from '#server/models/SentMail.ts';

/** Waits until this many mails to the address have gone out; newest first. */
export function mailsTo(to: string, count = 1): Promise<SentMail[]> {
  return vi.waitFor(
    async () => {
      const mails = await SentMail.findAll({ where: { to }, order: [['sentAt', 'DESC']] });
      if (mails.length < count) throw new Error(`${mails.length} of ${count} mails to ${to}.`);
      return mails;
    },
    { timeout: 15_000, interval: 50 },
  );
}

/** The token in the link of the newest mail to the address. */
export async function tokenTo(to: string, count = 1): Promise<string> {
  const [mail] = await mailsTo(to, count);
  const token = /#([\w-]{20,})/.exec(mail?.text ?? '')?.[1];
  if (token === undefined) throw new Error(`No link in the mail to ${to}.`);
  return token;
}
