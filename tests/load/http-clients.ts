/** Clients that post as fast as they are answered, each over a connection that it keeps. */
import { randomUUID } from 'node:crypto';
import { Agent, request } from 'node:http';
import type { Issue } from './shops.ts';

/** Issues posted per second by so many clients at once. Throws at the first answer that is not 201. */
export async function httpRate(
  port: string,
  issues: readonly Issue[],
  clients: number,
  seconds: number,
): Promise<number> {
  const agent = new Agent({ keepAlive: true, maxSockets: clients });
  const from = performance.now();
  const until = from + seconds * 1_000;
  let posted = 0;
  const client = async () => {
    while (performance.now() < until) {
      const issue = issues[Math.floor(Math.random() * issues.length)];
      if (issue === undefined) throw new Error('there is nothing to post');
      await post(agent, port, issue);
      posted += 1;
    }
  };
  await Promise.all(Array.from({ length: clients }, client));
  agent.destroy();
  return (posted * 1_000) / (performance.now() - from);
}

function post(agent: Agent, port: string, { cookie, body }: Issue): Promise<void> {
  const headers = {
    'Content-Type': 'application/json',
    'Content-Length': Buffer.byteLength(body),
    'X-Grainward': '1',
    'Idempotency-Key': randomUUID(),
    Cookie: cookie,
  };
  return new Promise((resolve, reject) => {
    const sent = request(
      { agent, host: '127.0.0.1', port, method: 'POST', path: '/api/v1/events/issue', headers },
      (response) => {
        let text = '';
        response.setEncoding('utf8').on('data', (part: string) => (text += part));
        response.on('end', () => {
          if (response.statusCode === 201) resolve();
          else reject(new Error(`${response.statusCode ?? 0}: ${text}`));
        });
      },
    );
    sent.on('error', reject);
    sent.end(body);
  });
}
