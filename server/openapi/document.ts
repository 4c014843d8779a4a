/** The OpenAPI 3.1 document, made from the table of routes and the events' own schemas, so that it can't lag behind. */
import { EVENTS } from '../../shared/events/index.ts';
import { PERMISSIONS } from '../../shared/permissions.ts';
import { PROBLEMS } from '../../shared/problems.ts';
import { z } from '../../shared/schemas/zod.ts';
import type { Route } from '../routes/route.ts';

/** The document as JSON. */
export function openApiDocument(routes: readonly Route[]) {
  const paths: Record<string, Record<string, object>> = {};
  for (const route of routes) {
    const path = route.path.replace(/:(\w+)/g, '{$1}');
    paths[path] = { ...paths[path], [route.method]: operation(route) };
  }
  return {
    openapi: '3.1.0',
    info: {
      title: 'Grainward',
      version: '1',
      description: 'A double-entry book of fine metal. Masses are grams as decimal strings.',
    },
    servers: [{ url: '/api/v1' }],
    paths,
    components: {
      schemas: { Problem: z.toJSONSchema(problem, { io: 'output' }) },
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: '__Host-grainward' } },
    },
  };
}

const problem = z.object({
  type: z.enum(Object.keys(PROBLEMS).map((code) => `/problems/${code}`)),
  title: z.string(),
  status: z.number(),
  detail: z.string(),
  errors: z.array(z.object({ field: z.string().nullable(), sentence: z.string() })),
  error_id: z.string(),
});

function operation(route: Route): object {
  const parameters = [...route.path.matchAll(/:(\w+)/g)].map(([, name]) => ({
    name,
    in: 'path',
    required: true,
    schema: { type: 'string' },
  }));
  const event = Object.values(EVENTS).find(({ name }) => route.path === `/events/${name}`);
  const key = {
    name: 'Idempotency-Key',
    in: 'header',
    required: true,
    schema: { type: 'string', minLength: 8, maxLength: 100 },
  };
  return {
    summary: route.summary,
    ...(route.allow === 'public' ? {} : { security: [{ session: [] }], 'x-roles': PERMISSIONS[route.allow] }),
    parameters: event === undefined ? parameters : [...parameters, key],
    ...(event === undefined
      ? {}
      : {
          requestBody: {
            required: true,
            content: {
              'application/json': {
                schema: z.toJSONSchema(event.schema, { io: 'input', unrepresentable: 'any' }),
              },
            },
          },
        }),
    responses: {
      '2XX': { description: 'Done.' },
      default: {
        description: 'A problem (RFC 9457).',
        content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } },
      },
    },
  };
}

/** A page of the same for people: every route, who may, and what it is for. */
export function openApiPage(routes: readonly Route[]): string {
  const rows = routes.map(
    (route) =>
      `<tr><td>${route.method.toUpperCase()}</td><td><code>/api/v1${route.path}</code></td><td>${route.summary}</td><td>${route.allow === 'public' ? 'everybody' : PERMISSIONS[route.allow].join(', ')}</td></tr>`,
  );
  const problems = Object.entries(PROBLEMS).map(
    ([code, { status, title }]) =>
      `<tr><td>${status}</td><td><code>${code}</code></td><td>${title}</td></tr>`,
  );
  return `<!doctype html><html lang="en"><head><meta charset="utf-8"><title>API · Grainward</title></head><body><h1>API of Grainward</h1>
<p>The same for programs: <a href="/api/v1/openapi.json">openapi.json</a>. Masses are grams as decimal strings; every event takes an Idempotency-Key; writes carry the header X-Grainward: 1.</p>
<h2>Routes</h2><table><thead><tr><th>Method</th><th>Path</th><th>What for</th><th>Who may</th></tr></thead><tbody>${rows.join('')}</tbody></table>
<h2>Problems</h2><table><thead><tr><th>Status</th><th>Code</th><th>Title</th></tr></thead><tbody>${problems.join('')}</tbody></table></body></html>`;
}
