/** Talking to the server: one refresh, problems with their sentences, a lost line, the header that other sites lack. */
import { describe, expect, it, vi } from 'vitest';
import { z } from '../../../shared/schemas/zod.ts';
import { ApiProblem, OfflineError, get, send, speakAs } from '../../../src/lib/api-client.ts';
import { broken, fakeServer, json, nothing, problem } from '../support/fake-server.ts';

const lots = z.object({ lots: z.array(z.string()) });
const ended = problem(401, 'not_signed_in', 'Your session has ended.');

/** Waits for a refusal and gives it. */
async function refusal(asked: Promise<unknown>): Promise<unknown> {
  try {
    await asked;
  } catch (error) {
    return error;
  }
  throw new Error('nothing was refused');
}

describe('a session that has run out', () => {
  it('is renewed once, and the request goes again', async () => {
    const asked = fakeServer({
      'GET /lots': [ended, json({ lots: ['G26-0512-V'] })],
      'POST /session/refresh': nothing,
    });
    expect(await get('/lots', lots)).toEqual({ lots: ['G26-0512-V'] });
    expect(asked.map(({ method, path }) => `${method} ${path}`)).toEqual([
      'GET /lots',
      'POST /session/refresh',
      'GET /lots',
    ]);
  });

  it('is renewed once for all requests that wait for it', async () => {
    const asked = fakeServer({
      'GET /lots': [ended, ended, json({ lots: [] })],
      'POST /session/refresh': nothing,
    });
    await Promise.all([get('/lots', lots), get('/lots', lots)]);
    expect(asked.filter(({ path }) => path === '/session/refresh')).toHaveLength(1);
  });

  it('that can’t be renewed is told as it is, without trying for ever', async () => {
    const asked = fakeServer({ 'GET /lots': ended, 'POST /session/refresh': ended });
    const error = await refusal(get('/lots', lots));
    expect(error).toBeInstanceOf(ApiProblem);
    expect(asked).toHaveLength(2);
  });

  it('is not renewed after a wrong password', async () => {
    const asked = fakeServer({ 'POST /session': problem(401, 'not_signed_in', 'We could not sign you in.') });
    await refusal(send('POST', '/session', { body: {} }));
    expect(asked).toHaveLength(1);
  });
});

describe('refusals', () => {
  it('carry code, sentence and the sentences by field', async () => {
    const errors = [{ field: 'gross_g', sentence: '12.006 g is left.' }];
    fakeServer({ 'POST /events/issue': problem(409, 'not_enough', 'Someone was quicker.', errors) });
    const error = await refusal(send('POST', '/events/issue', { body: {}, key: 'k1' }));
    expect(error).toMatchObject({
      code: 'not_enough',
      message: 'Someone was quicker.',
      errors,
      isRefusal: true,
    });
  });

  it('that are no problem document are a fault, never a refusal', async () => {
    fakeServer({ 'POST /events/issue': () => new Response('<html>Bad gateway</html>', { status: 502 }) });
    expect(await refusal(send('POST', '/events/issue', {}))).toMatchObject({
      code: 'unavailable',
      isRefusal: false,
    });
  });

  it('a lost line is told apart', async () => {
    fakeServer({ 'GET /lots': broken });
    expect(await refusal(get('/lots', lots))).toBeInstanceOf(OfflineError);
  });
});

it('writes carry the header of our own pages and their key; reads carry neither', async () => {
  const asked = fakeServer({ 'GET /lots': json({ lots: [] }), 'POST /events/hold': json({}) });
  await get('/lots', lots);
  await send('POST', '/events/hold', { body: { lot_id: 'x' }, key: 'k1' });
  expect(asked.map(({ own_header, key }) => [own_header, key])).toEqual([
    [null, null],
    ['1', 'k1'],
  ]);
});

it('an answer that is not as agreed is refused rather than believed', async () => {
  fakeServer({ 'GET /lots': json({ lots: 'all of them' }) });
  expect(await refusal(get('/lots', lots))).toBeInstanceOf(z.ZodError);
});

it('a page names the person that it was opened as, so that nothing is done as somebody else', async () => {
  const persons: (string | null)[] = [];
  fakeServer({ 'GET /lots': json({ lots: [] }) });
  const plain = fetch;
  vi.stubGlobal('fetch', (address: string, init: RequestInit) => {
    persons.push(new Headers(init.headers).get('X-Grainward-Person'));
    return plain(address, init);
  });
  await get('/lots', lots);
  speakAs('p1');
  await get('/lots', lots);
  speakAs(null);
  await get('/lots', lots);
  expect(persons).toEqual([null, 'p1', null]);
});
