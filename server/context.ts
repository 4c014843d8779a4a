/** What the routes and services are handed: nothing of it lives at module level, so that tests can run several. */
import type { Logger } from 'pino';
import type { Config } from './config.ts';
import type { Database } from './db/database.ts';
import type { Mailer } from './adapters/mail/mailer.ts';
import type { FileStore } from './adapters/files/file-store.ts';
import type { BookStream } from './realtime/book-stream.ts';

export interface AppContext {
  readonly config: Config;
  readonly db: Database;
  readonly mail: Mailer;
  readonly files: FileStore;
  readonly stream: BookStream;
  readonly log: Logger;
  /** The address that people reach this server under, without a slash at the end. */
  publicUrl(): string;
}
