/** F-19: bodies that are no JSON, no object, nothing, far too deep or far too long; F-14 in small. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Person, TestServer } from '../support/server.ts';
import { signUp, startTestServer } from '../support/server.ts';

let server: TestServer;
let owner: Person;

beforeAll(async () => {
  server = await startTestServer();
  owner = await signUp(server);
});
afterAll(() => server.close());

const send = (type: string, body: string) =>
  owner
    .send('post', '/events/set-party')
    .unset('Content-Type')
    .set('Content-Type', type)
    .set('Idempotency-Key', 'broken-body-1')
    .send(body);

const good = JSON.stringify({ kind: 'supplier', name: 'Brenholt' });

describe('a body', () => {
  it.each([
    'text/plain',
    'application/xml',
    'application/x-www-form-urlencoded',
    'text/html',
    'application/jsonp',
  ])('of type %s is refused with 415', async (type) => {
    expect((await send(type, good)).status).toBe(415);
  });

  it('in another character set is refused with 415', async () => {
    expect((await send('application/json; charset=utf-7', good)).status).toBe(415);
  });

  it.each([
    ['empty', ''],
    ['of blanks', '   '],
    ['cut off', '{"kind":"supplier","na'],
    ['with a comma too many', '{"kind":"supplier",}'],
    ['of two objects', `${good}${good}`],
    ['a bare word', 'supplier'],
    ['a list', `[${good}]`],
    ['nothing', 'null'],
    ['a number', '1'],
    ['a hundred layers deep', `${'{"a":'.repeat(100)}1${'}'.repeat(100)}`],
    ['a hundred thousand layers deep', `${'['.repeat(100_000)}${']'.repeat(100_000)}`],
  ])('that is %s is refused with 400', async (_name, body) => {
    const answer = await send('application/json', body);
    expect([answer.status, answer.headers['content-type']]).toEqual([
      400,
      'application/problem+json; charset=utf-8',
    ]);
  });

  it('of more than a megabyte is refused with 413', async () => {
    expect((await send('application/json', JSON.stringify({ name: 'x'.repeat(1_100_000) }))).status).toBe(
      413,
    );
  });

  it('posted nothing of all that', async () => {
    const { body } = await owner.get('/parties');
    expect(body).toEqual({ rows: [] });
  });
});
