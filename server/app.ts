/** The Express app: its middleware in the order in which a request passes it. */
import { existsSync } from 'node:fs';
import { resolve } from 'node:path';
import cookieParser from 'cookie-parser';
import express from 'express';
import type { Express } from 'express';
import { pinoHttp } from 'pino-http';
import { randomUUID } from 'node:crypto';
import type { LocalMail } from './adapters/mail/local-mail.ts';
import type { AppContext } from './context.ts';
import { securityHeaders } from './middleware/headers.ts';
import { problemHandler } from './middleware/problem-handler.ts';
import { mailPage } from './middleware/mail-page.ts';
import { metrics } from './middleware/metrics.ts';
import { apiRouter } from './middleware/router.ts';
import { openApiDocument, openApiPage } from './openapi/document.ts';
import { sameSiteOnly } from './middleware/same-site.ts';
import { jsonOnly, shallowOnly } from './middleware/json-only.ts';
import { ProblemError } from './problem.ts';
import { routes } from './routes/index.ts';
import { unavailable } from './db/database-problem.ts';

const BODY_LIMIT = '1mb';

/**
 * Makes the app. `isOpen` tells whether the database has been looked at: until then only life signs are answered, so that
 * nothing is ever served from a database whose rules could be switched off.
 */
export function createApp(
  context: AppContext,
  local_mail: LocalMail | null = null,
  isOpen: () => boolean = () => true,
): Express {
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', context.config.trust_proxy ? 1 : false);
  app.use(
    pinoHttp({
      logger: context.log,
      genReqId: () => randomUUID(),
      serializers: {
        req: ({ id, method, url }: RequestLine) => ({ id, method, path: url.split('?')[0] }),
        res: ({ statusCode }: { statusCode: number }) => ({ statusCode }),
      },
      autoLogging: { ignore: (request) => request.url === '/api/v1/health/live' },
    }),
  );
  const measured = metrics();
  app.use(measured.count);
  app.use(securityHeaders());
  app.use(cookieParser());
  app.use(
    '/api',
    sameSiteOnly(() => context.publicUrl()),
    jsonOnly(),
    express.json({ limit: BODY_LIMIT, strict: true }),
    shallowOnly(),
  );
  app.get('/metrics', measured.page);
  app.use('/api', (request, _response, next) => {
    if (isOpen() || request.path === '/v1/health/live') next();
    else throw unavailable();
  });
  app.get('/api/v1/openapi.json', (_request, response) => void response.json(openApiDocument(routes)));
  app.get('/api/v1/docs', (_request, response) => void response.type('html').send(openApiPage(routes)));
  if (local_mail !== null) app.get('/mail', mailPage(local_mail));
  app.use('/api/v1', apiRouter(context, routes));
  app.use('/api', () => {
    throw new ProblemError('not_found', 'There is nothing at this address.');
  });
  serveClient(app, resolve(context.config.client_dir));
  app.use(() => {
    throw new ProblemError('not_found', 'There is nothing at this address.');
  });
  app.use(problemHandler(context.log));
  return app;
}

interface RequestLine {
  readonly id: string;
  readonly method: string;
  readonly url: string;
}

/** The built client; every path that is not a file is a page of it. */
function serveClient(app: Express, dir: string): void {
  if (!existsSync(dir)) return;
  app.use(
    '/assets',
    express.static(resolve(dir, 'assets'), {
      immutable: true,
      maxAge: '1y',
      index: false,
      fallthrough: true,
    }),
  );
  app.use(express.static(dir, { index: false, maxAge: 0 }));
  app.get('/{*page}', (request, response, next) => {
    if (request.path.startsWith('/assets/')) {
      next(new ProblemError('not_found', 'There is nothing at this address.'));
      return;
    }
    response.sendFile(resolve(dir, 'index.html'), {
      cacheControl: false,
      headers: { 'Cache-Control': 'no-cache' },
    });
  });
}
