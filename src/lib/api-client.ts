/**
 * Talking to the server: JSON, the header that other sites can't send, one refresh of the session when it has run
 * out, answers checked against their schema. Nothing is asserted about what came back.
 */
import { z } from '../../shared/schemas/zod.ts';

const problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number(),
  detail: z.string(),
  errors: z.array(z.object({ field: z.string().nullable(), sentence: z.string() })).default([]),
  error_id: z.string().optional(),
});

/** A refusal of the server, with its sentences by field. */
export class ApiProblem extends Error {
  readonly code: string;
  readonly status: number;
  readonly errors: readonly { readonly field: string | null; readonly sentence: string }[];

  constructor(read: z.output<typeof problem>) {
    super(read.detail);
    this.code = read.type.replace('/problems/', '');
    this.status = read.status;
    this.errors = read.errors;
  }

  /** Whether the server decided against it; otherwise it may have been recorded before something failed. */
  get isRefusal(): boolean {
    return this.status < 500;
  }
}

/** The server could not be reached: what was typed is kept, and the same request may be sent again. */
export class OfflineError extends Error {
  constructor() {
    super('No connection. What you typed is kept here and sent once.');
  }
}

type Method = 'GET' | 'POST' | 'PUT' | 'DELETE';

export interface SendOptions {
  readonly body?: unknown;
  readonly key?: string;
}

const BASE = '/api/v1';

let opened_as: string | null = null;

/**
 * Names the person that this page was opened as, in every request from now on: where another tab has signed somebody
 * else in, the server refuses instead of acting as the wrong one. Null before a sign-in.
 */
export function speakAs(person_id: string | null): void {
  opened_as = person_id;
}

/** Asks for something; the answer is parsed by its schema. Throws ApiProblem and OfflineError. */
export async function get<T>(path: string, schema: z.ZodType<T>): Promise<T> {
  return schema.parse(await send('GET', path));
}

/** Sends a write and gives its JSON, or null where there is none. */
export async function send(method: Method, path: string, options: SendOptions = {}): Promise<unknown> {
  let response = await attempt(method, path, options);
  if (response.status === 401 && path !== '/session' && (await refresh()))
    response = await attempt(method, path, options);
  if (response.status === 401 && path === '/session' && method === 'GET' && (await refresh())) {
    response = await attempt(method, path, options);
  }
  if (response.status === 204) return null;
  const text = await response.text();
  if (response.ok) return text === '' ? null : JSON.parse(text);
  throw new ApiProblem(readProblem(text, response.status));
}

function readProblem(text: string, status: number): z.output<typeof problem> {
  try {
    return problem.parse(JSON.parse(text));
  } catch {
    const detail =
      'The server did not answer as it should. What you typed is kept; send it again, it is recorded once.';
    return { type: '/problems/unavailable', title: '', status, detail, errors: [] };
  }
}

async function attempt(method: Method, path: string, { body, key }: SendOptions): Promise<Response> {
  const headers = new Headers({ Accept: 'application/json' });
  if (method !== 'GET') headers.set('X-Grainward', '1');
  if (opened_as !== null) headers.set('X-Grainward-Person', opened_as);
  if (key !== undefined) headers.set('Idempotency-Key', key);
  if (body !== undefined && !(body instanceof FormData)) headers.set('Content-Type', 'application/json');
  const payload = body === undefined ? null : body instanceof FormData ? body : JSON.stringify(body);
  try {
    return await fetch(`${BASE}${path}`, { method, headers, body: payload, credentials: 'same-origin' });
  } catch {
    throw new OfflineError();
  }
}

let refreshing: Promise<boolean> | null = null;

/** One refresh at a time, however many requests wait for it. */
function refresh(): Promise<boolean> {
  refreshing ??= attempt('POST', '/session/refresh', {})
    .then((response) => response.ok)
    .catch(() => false)
    .finally(() => {
      refreshing = null;
    });
  return refreshing;
}
