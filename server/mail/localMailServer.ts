import type { AddressInfo } from 'node:net';
import { simpleParser } from 'mailparser';
import { SMTPServer, type SMTPServerDataStream } from 'smtp-server';
import { SentMail } from '#server/models/SentMail.ts';

/** Says which team's administrators may read the mail. */
export const TEAM_HEADER = 'X-Ringstead-Team';

const MAX_BYTES = 1024 * 1024;

export interface LocalMailServer {
  readonly url: string;
  readonly close: () => Promise<void>;
}

/** A real SMTP server on loopback that delivers nothing: it stores what it takes, for Team → Sent mail. */
export async function startLocalMailServer(): Promise<LocalMailServer> {
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    size: MAX_BYTES,
    onData: (stream, _session, done) => {
      store(stream).then(
        () => {
          done();
        },
        (error: unknown) => {
          done(error instanceof Error ? error : new Error(String(error)));
        },
      );
    },
  });
  await new Promise<void>((resolve, reject) => {
    server.on('error', reject);
    server.listen(0, '127.0.0.1', resolve);
  });
  const { port } = server.server.address() as AddressInfo;
  return {
    url: `smtp://127.0.0.1:${port}`,
    close: () =>
      new Promise((resolve) => {
        server.close(resolve);
      }),
  };
}

async function store(stream: SMTPServerDataStream): Promise<void> {
  const mail = await simpleParser(stream, { skipTextToHtml: true });
  const teamId = mail.headers.get(TEAM_HEADER.toLowerCase());
  const to = [mail.to ?? []].flat().map((address) => address.text);
  await SentMail.create({
    teamId: typeof teamId === 'string' ? teamId : '',
    to: to.join(', '),
    subject: mail.subject ?? '',
    text: mail.text ?? '',
  });
}
