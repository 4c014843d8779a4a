/**
 * What the program is told from outside, parsed once at start. A wrong value stops the start with a list in plain
 * words; secrets have no default.
 */
import { readFileSync } from 'node:fs';
import { z } from '../shared/schemas/zod.ts';

/** Https, or the loopback of one's own machine, where nothing crosses a network. */
function isSafe(url: string): boolean {
  if (!URL.canParse(url)) return true;
  const { protocol, hostname } = new URL(url);
  return protocol === 'https:' || ['127.0.0.1', 'localhost', '[::1]'].includes(hostname);
}

const required = (sentence: string) => z.string({ error: sentence }).min(1, sentence);

const environment = z.object({
  PORT: z.coerce.number('PORT is a number.').int('PORT is a whole number.').min(0).max(65_535).default(4180),
  HOST: z.string().min(1).default('127.0.0.1'),
  PUBLIC_URL: z
    .url('PUBLIC_URL is the address that people type, such as https://book.example.')
    .refine(
      isSafe,
      'PUBLIC_URL has to be https: over plain http a session could be read on the way. Only this machine’s own loopback may do without.',
    )
    .optional(),
  DATABASE_URL: required('DATABASE_URL is not set: the database and the role that the program runs as.'),
  DATABASE_POOL: z.coerce.number().int().min(1).max(100).default(10),
  JWT_SECRET: required('JWT_SECRET is not set: at least 32 random characters.').min(
    32,
    'JWT_SECRET is too short.',
  ),
  SIGNING_KEY_FILE: required(
    'SIGNING_KEY_FILE is not set: the file with the Ed25519 key that signs dossiers.',
  ),
  BCRYPT_COST: z.coerce.number().int().min(4).max(16).default(12),
  SMTP_URL: z.string().optional(),
  MAIL_FROM: z.string().default('Grainward <book@grainward.invalid>'),
  FILES_DIR: z.string().default('.grainward/files'),
  S3_BUCKET: z.string().optional(),
  S3_ENDPOINT: z.string().optional(),
  S3_REGION: z.string().default('auto'),
  CLIENT_DIR: z.string().default('dist'),
  LOG_LEVEL: z.enum(['silent', 'error', 'warn', 'info', 'debug']).default('info'),
  TRUST_PROXY: z.enum(['yes', 'no']).default('no'),
});

export interface Config {
  readonly port: number;
  /** The address that is listened on. */
  readonly host: string;
  /** Null until the port is known: then the address of this machine's loopback. */
  readonly public_url: string | null;
  readonly database_url: string;
  readonly database_pool: number;
  readonly jwt_secret: string;
  readonly signing_key_pem: string;
  readonly bcrypt_cost: number;
  readonly smtp_url: string | null;
  readonly mail_from: string;
  readonly files:
    | { readonly dir: string }
    | { readonly bucket: string; readonly endpoint: string | null; readonly region: string };
  readonly client_dir: string;
  readonly log_level: string;
  readonly trust_proxy: boolean;
}

/** Reads the environment. Throws an Error whose message lists, a line each, what is wrong. */
export function readConfig(env: Readonly<Record<string, string | undefined>>): Config {
  const read = environment.safeParse(env);
  if (!read.success) throw new Error(read.error.issues.map((issue) => `- ${issue.message}`).join('\n'));
  const e = read.data;
  return {
    port: e.PORT,
    host: e.HOST,
    public_url: e.PUBLIC_URL?.replace(/\/+$/, '') ?? null,
    database_url: e.DATABASE_URL,
    database_pool: e.DATABASE_POOL,
    jwt_secret: e.JWT_SECRET,
    signing_key_pem: readKey(e.SIGNING_KEY_FILE),
    bcrypt_cost: e.BCRYPT_COST,
    smtp_url: e.SMTP_URL ?? null,
    mail_from: e.MAIL_FROM,
    files:
      e.S3_BUCKET === undefined
        ? { dir: e.FILES_DIR }
        : { bucket: e.S3_BUCKET, endpoint: e.S3_ENDPOINT ?? null, region: e.S3_REGION },
    client_dir: e.CLIENT_DIR,
    log_level: e.LOG_LEVEL,
    trust_proxy: e.TRUST_PROXY === 'yes',
  };
}

function readKey(file: string): string {
  try {
    return readFileSync(file, 'utf8');
  } catch {
    throw new Error(`- SIGNING_KEY_FILE names a file that can’t be read: ${file}`);
  }
}
