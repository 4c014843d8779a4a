/** The program in the test's own process, on a database of its own, with people signed in as they are needed. */
import { generateKeyPairSync, randomUUID } from 'node:crypto';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Express } from 'express';
import { pino } from 'pino';
import request from 'supertest';
import type { Test } from 'supertest';
import { createApp } from '../../server/app.ts';
import type { Config } from '../../server/config.ts';
import type { Started } from '../../server/start-context.ts';
import { startContext } from '../../server/start-context.ts';
import type { Role } from '../../shared/permissions.ts';
import { eventAnswer } from '../../shared/schemas/event-answer.ts';
import type { EventAnswer } from '../../shared/schemas/event-answer.ts';
import type { TestDatabase } from './database.ts';
import { createTestDatabase } from './database.ts';

export const PASSWORD = 'river copper lantern moss';

export interface TestServer extends Started {
  readonly app: Express;
  readonly db: TestDatabase;
  readonly config: Config;
}

/**
 * Starts the program on a fresh database. Hashing is cheap here, so that tests are quick. The lines of the log go into
 * `log_lines`, where a test wants to read them.
 */
export async function startTestServer(
  more: Partial<Config> = {},
  log_lines: string[] | null = null,
): Promise<TestServer> {
  const db = await createTestDatabase();
  const files = mkdtempSync(join(tmpdir(), 'grainward-files-'));
  const { privateKey } = generateKeyPairSync('ed25519');
  const config: Config = {
    port: 0,
    host: '127.0.0.1',
    public_url: null,
    database_url: db.app_url,
    database_pool: 10,
    jwt_secret: randomUUID() + randomUUID(),
    signing_key_pem: privateKey.export({ type: 'pkcs8', format: 'pem' }).toString(),
    bcrypt_cost: 4,
    smtp_url: null,
    mail_from: 'Grainward <book@grainward.invalid>',
    files: { dir: files },
    client_dir: join(files, 'no-client'),
    log_level: 'silent',
    trust_proxy: false,
    ...more,
  };
  const publicUrl = () => config.public_url ?? 'http://127.0.0.1';
  const started =
    log_lines === null
      ? await startContext(config, publicUrl)
      : await startContext(
          config,
          publicUrl,
          pino({ level: 'info' }, { write: (line) => void log_lines.push(line) }),
        );
  return {
    ...started,
    app: createApp(started.context, started.local_mail),
    db,
    config,
    async close() {
      await started.close();
      await db.drop();
      rmSync(files, { recursive: true, force: true });
    },
  };
}

/** Somebody signed in: requests carry the session and the header that writes need. */
export class Person {
  readonly #app: Express;
  #cookies: string[] = [];
  email = '';

  constructor(app: Express) {
    this.#app = app;
  }

  /** A request with the session's cookies; the cookies of the answer are kept. */
  send(method: 'get' | 'post' | 'put' | 'patch' | 'delete', path: string, body?: object): Test {
    const test = request(this.#app)
      [method](`/api/v1${path}`)
      .set('X-Grainward', '1')
      .set('Cookie', this.#cookies.join('; '));
    return body === undefined ? test : test.send(body);
  }

  get(path: string): Test {
    return this.send('get', path);
  }

  post(path: string, body: object = {}): Test {
    return this.send('post', path, body);
  }

  keep(headers: Readonly<Record<string, unknown>>): void {
    const set = headers['set-cookie'];
    if (Array.isArray(set)) this.#cookies = set.map((cookie) => String(cookie).split(';')[0] ?? '');
  }

  /** The same browser once more: another tab, or what a thief has copied. */
  copy(app: Express = this.#app): Person {
    const copied = new Person(app);
    copied.email = this.email;
    copied.#cookies = [...this.#cookies];
    return copied;
  }

  /** The value of a cookie by its name without prefix. */
  cookie(name: string): string {
    const found = this.#cookies.find((cookie) => cookie.replace('__Host-', '').startsWith(`${name}=`));
    return found?.slice(found.indexOf('=') + 1) ?? '';
  }

  /** Uses other cookies from now on. */
  carry(cookies: readonly string[]): void {
    this.#cookies = [...cookies];
  }

  /** The same session, asked of this one's process. */
  as(other: Person): this {
    this.#cookies = [...other.cookies];
    return this;
  }

  get cookies(): readonly string[] {
    return this.#cookies;
  }

  /** Sends an event with a key of its own; the answer as it came. */
  event(name: string, body: object, key: string = randomUUID()): Test {
    return this.post(`/events/${name}`, body).set('Idempotency-Key', key);
  }

  /** Records an event; throws with the problem where it is refused. */
  async record(name: string, body: object): Promise<EventAnswer> {
    const response = await this.event(name, body);
    if (response.status !== 201)
      throw new Error(`${name}: ${response.status} ${JSON.stringify(response.body)}`);
    return eventAnswer.parse(response.body);
  }
}

let serial = 0;

/** A fresh workshop, with its proprietor signed in. */
export async function signUp(server: TestServer, name = 'Hallow Lane'): Promise<Person> {
  serial += 1;
  const person = new Person(server.app);
  person.email = `proprietor-${serial}@example.test`;
  const body = {
    workshop_name: name,
    time_zone: 'Europe/Paris',
    currency: 'EUR',
    name: 'Ada Quill',
    email: person.email,
    password: PASSWORD,
  };
  const response = await person.post('/workshops', body);
  if (response.status !== 201)
    throw new Error(`sign-up: ${response.status} ${JSON.stringify(response.body)}`);
  person.keep(response.headers);
  return person;
}

/** Invites somebody into a workshop and signs him or her in, by the link in the e-mail. */
export async function addMember(
  server: TestServer,
  by: Person,
  role: Role,
  name: string,
  until: string | null = null,
): Promise<Person> {
  serial += 1;
  const person = new Person(server.app);
  person.email = `${role}-${serial}@example.test`;
  const invited = await by.post('/invitations', {
    email: person.email,
    name,
    role,
    until: until ?? (role === 'auditor' ? '2099-12-31' : null),
  });
  if (invited.status !== 201)
    throw new Error(`invitation: ${invited.status} ${JSON.stringify(invited.body)}`);
  const mail = server.local_mail?.messages().find((message) => message.to.includes(person.email));
  const token = /#([\w-]+)/.exec(mail?.text ?? '')?.[1];
  const accepted = await person.post('/invitations/accept', { token, password: PASSWORD });
  if (accepted.status !== 204) throw new Error(`accept: ${accepted.status} ${JSON.stringify(accepted.body)}`);
  person.keep(accepted.headers);
  return person;
}

/** Signs in with a password; throws where it is refused. */
export async function signIn(
  server: { readonly app: Express },
  email: string,
  password: string = PASSWORD,
): Promise<Person> {
  const person = new Person(server.app);
  person.email = email;
  const answer = await person.post('/session', { email, password });
  if (answer.status !== 204) throw new Error(`sign-in: ${answer.status} ${JSON.stringify(answer.body)}`);
  person.keep(answer.headers);
  return person;
}

/** The secret behind the # of the newest e-mail to an address; waits for the e-mail up to five seconds. */
export async function secretInMail(server: TestServer, email: string, subject: RegExp): Promise<string> {
  for (let tries = 0; tries < 100; tries += 1) {
    const mail = server.local_mail
      ?.messages()
      .find((message) => message.to.includes(email) && subject.test(message.subject));
    const token = /#([\w-]+)/.exec(mail?.text ?? '')?.[1];
    if (token !== undefined) return token;
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
  throw new Error(`no e-mail to ${email}`);
}
