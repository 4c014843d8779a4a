/** Puts together what the program runs on: database, mail, files, the stream of changes, the log. */
import { pino } from 'pino';
import type { Logger } from 'pino';
import { fileStore } from './adapters/files/file-store.ts';
import type { LocalMail } from './adapters/mail/local-mail.ts';
import { startLocalMail } from './adapters/mail/local-mail.ts';
import { smtpMailer } from './adapters/mail/mailer.ts';
import type { Config } from './config.ts';
import type { AppContext } from './context.ts';
import { connect } from './db/database.ts';
import { bookStream } from './realtime/book-stream.ts';

export interface Started {
  readonly context: AppContext;
  /** The stand-in for a mail server, where no SMTP_URL is set. */
  readonly local_mail: LocalMail | null;
  close(): Promise<void>;
}

/**
 * Starts the parts; `publicUrl` is asked for when a link is written, since the port may be known only later. The log
 * goes to the standard output, or where a test wants to read it.
 */
export async function startContext(
  config: Config,
  publicUrl: () => string,
  log: Logger = pino({ level: config.log_level, redact: ['req.headers', 'password', 'pin', 'token'] }),
): Promise<Started> {
  const local_mail = config.smtp_url === null ? await startLocalMail() : null;
  const smtp_url = config.smtp_url ?? local_mail?.smtp_url ?? '';
  const context: AppContext = {
    config,
    db: connect(config.database_url, config.database_pool),
    mail: smtpMailer(smtp_url, config.mail_from, log),
    files: fileStore(config.files),
    stream: bookStream(config.database_url, log),
    log,
    publicUrl,
  };
  return {
    context,
    local_mail,
    async close() {
      await context.stream.close();
      await local_mail?.close();
      await context.db.close();
    },
  };
}
