import { createTransport } from 'nodemailer';
import type { Config } from '#server/config/config.ts';
import { startLocalMailServer, TEAM_HEADER } from './localMailServer.ts';

export interface Mail {
  readonly teamId: string;
  readonly to: string;
  readonly subject: string;
  /** Plain text. */
  readonly text: string;
}

export interface Mailer {
  /** @throws when the mail server does not take it: the job is tried again later */
  readonly send: (mail: Mail) => Promise<void>;
  readonly close: () => Promise<void>;
}

/** Sends by `SMTP_URL`, or where it is unset by a fake server of our own on loopback. */
export async function startMailer(config: Pick<Config, 'smtpUrl' | 'mailFrom'>): Promise<Mailer> {
  const local = config.smtpUrl === undefined ? await startLocalMailServer() : undefined;
  const url = config.smtpUrl ?? local?.url;
  const transport = createTransport({ url }, { from: config.mailFrom });
  return {
    send: async ({ teamId, to, subject, text }) => {
      const headers = local ? { [TEAM_HEADER]: teamId } : {};
      // An object is taken as the one address it is; a text could name several.
      await transport.sendMail({ to: { name: '', address: to }, subject, text, headers });
    },
    close: async () => {
      transport.close();
      await local?.close();
    },
  };
}
