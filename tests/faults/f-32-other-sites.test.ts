/** F-32, F-33, S-09: what another site sends is refused; what people type is shown as text, in pages and e-mails. */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import request from 'supertest';
import { routes } from '../../server/routes/index.ts';
import type { Person, TestServer } from '../support/server.ts';
import { secretInMail, signUp, startTestServer } from '../support/server.ts';

let server: TestServer;
let owner: Person;

beforeAll(async () => {
  server = await startTestServer({ public_url: 'http://127.0.0.1:4180' });
  owner = await signUp(server);
});
afterAll(() => server.close());

const writes = routes.filter(({ method }) => method !== 'get');
const cookies = () => owner.cookies.join('; ');

describe('a write from another site', () => {
  it.each(writes.map((route) => [`${route.method.toUpperCase()} ${route.path}`, route] as const))(
    'is refused at %s: without our header, and from another origin',
    async (_name, { method, path }) => {
      const send = () =>
        request(server.app)
          [method](`/api/v1${path.replace(/:\w+/g, 'x')}`)
          .set('Cookie', cookies());
      const form = await send().set('Origin', 'https://evil.example').type('form').send('a=1');
      expect(form.status).toBe(403);
      expect((await send().set('Content-Type', 'application/json').send({})).status).toBe(403);
      for (const origin of [
        'https://evil.example',
        'null',
        'http://127.0.0.1:4180.evil.example',
        'http://127.0.0.1:81',
      ]) {
        const answer = await send().set('X-Grainward', '1').set('Origin', origin).send({});
        expect([answer.status, answer.body]).toMatchObject([403, { type: '/problems/cross_site' }]);
      }
    },
  );

  it('is asked for in advance by no other origin: CORS is closed', async () => {
    const asked = await request(server.app)
      .options('/api/v1/events/weigh-in')
      .set('Origin', 'https://evil.example')
      .set('Access-Control-Request-Method', 'POST')
      .set('Access-Control-Request-Headers', 'x-grainward');
    expect(asked.headers['access-control-allow-origin']).toBeUndefined();
    expect(asked.headers['access-control-allow-headers']).toBeUndefined();
  });

  it('by our own page is taken', async () => {
    const answer = await owner
      .event('set-party', { kind: 'supplier', name: 'Brenholt' })
      .set('Origin', 'http://127.0.0.1:4180');
    expect(answer.status).toBe(201);
  });
});

describe('script in a name', () => {
  const name = '<script>alert(1)</script>';

  it('is text in the JSON, in the e-mail and on the page of the mail kept here', async () => {
    await owner.event('set-party', { kind: 'supplier', name });
    const read = await owner.get('/parties');
    expect(read.headers['content-type']).toContain('application/json');
    expect(read.headers['x-content-type-options']).toBe('nosniff');
    expect(read.text).toContain(name);
    await owner.post('/invitations', { email: 'bo@example.test', name, role: 'keeper' });
    await secretInMail(server, 'bo@example.test', /invites/);
    const page = await request(server.app).get('/mail');
    expect(page.text).toContain('&lt;script&gt;');
    expect(page.text).not.toContain('<script');
  });
});
