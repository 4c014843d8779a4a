/**
 * The local stand-in for a mail server: takes messages over SMTP on the loopback and keeps the newest, for the page
 * under /mail. Nothing leaves the machine.
 */
import type { AddressInfo } from 'node:net';
import { simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';

const KEPT = 200;

export interface KeptMessage {
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly received_at: string;
}

export interface LocalMail {
  readonly smtp_url: string;
  /** Newest first. */
  messages(): readonly KeptMessage[];
  close(): Promise<void>;
}

/** Starts it on a free port of 127.0.0.1. */
export async function startLocalMail(): Promise<LocalMail> {
  const kept: KeptMessage[] = [];
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS', 'AUTH'],
    onData(stream, _session, done) {
      simpleParser(stream)
        .then((mail) => {
          const to =
            mail.to === undefined
              ? ''
              : [mail.to]
                  .flat()
                  .map((address) => address.text)
                  .join(', ');
          kept.unshift({
            to,
            subject: mail.subject ?? '',
            text: mail.text ?? '',
            received_at: new Date().toISOString(),
          });
          kept.splice(KEPT);
          done();
        })
        .catch((error: unknown) => done(error instanceof Error ? error : new Error('not a message')));
    },
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const address = server.server.address();
  return {
    smtp_url: `smtp://127.0.0.1:${portOf(address)}?ignoreTLS=true`,
    messages: () => kept,
    close: () => new Promise((resolve) => server.close(() => resolve())),
  };
}

function portOf(address: string | AddressInfo | null): number {
  if (address === null || typeof address === 'string') throw new Error('the local mail server has no port');
  return address.port;
}
