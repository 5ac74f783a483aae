import { once } from 'node:events';
import type { AddressInfo } from 'node:net';
import { SMTPServer } from 'smtp-server';
import type { Mail } from '../contract/mailbox.ts';
import { readMessage } from './read-message.ts';

const KEPT_MAILS = 500;

export type LocalMailServer = {
  /** smtp:// address on the loopback interface. */
  url: string;
  /** Mails taken so far, newest first. */
  mails: () => readonly Mail[];
  close: () => Promise<void>;
};

/** A mail server for development and tests: it takes every mail, keeps the last of them in memory and sends none on. */
export async function startLocalMailServer(now: () => number): Promise<LocalMailServer> {
  const mails: Mail[] = [];
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS', 'AUTH'],
    logger: false,
    onData(stream, session, done) {
      const chunks: Buffer[] = [];
      stream.on('data', (chunk: Buffer) => chunks.push(chunk));
      stream.on('end', () => {
        const to = session.envelope.rcptTo.map(({ address }) => address).join(', ');
        try {
          const message = readMessage(Buffer.concat(chunks).toString('utf8'));
          mails.unshift({ to, ...message, receivedAt: new Date(now()).toISOString() });
          mails.length = Math.min(mails.length, KEPT_MAILS);
          done();
        } catch (error) {
          done(error instanceof Error ? error : new Error(String(error)));
        }
      });
    },
  });
  server.listen(0, '127.0.0.1');
  await once(server.server, 'listening');
  const { port } = server.server.address() as AddressInfo;
  return {
    url: `smtp://127.0.0.1:${port}`,
    mails: () => mails,
    close: () =>
      new Promise(
        (resolve) =>
          void server.close(() => {
            resolve();
          }),
      ),
  };
}
