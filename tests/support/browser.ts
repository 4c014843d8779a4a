/** The program served to a real browser: the built client, the API, a database of its own, Debian's Chromium. */
import { existsSync, readFileSync } from 'node:fs';
import { createServer } from 'node:http';
import { createRequire } from 'node:module';
import { join } from 'node:path';
import { chromium } from 'playwright-core';
import type { Browser, Page } from 'playwright-core';
import { createApp } from '../../server/app.ts';
import { workOf } from '../../server/jobs/kinds.ts';
import { startWorker } from '../../server/jobs/worker.ts';
import { z } from '../../shared/schemas/zod.ts';
import { PASSWORD, startTestServer } from './server.ts';
import type { TestServer } from './server.ts';

const DIST = join(import.meta.dirname, '../../dist');
const FLAGS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

export interface Site {
  readonly server: TestServer;
  readonly url: string;
  /** A fresh visitor at a width; whatever the console reports as an error fails the test that asks for it. */
  visit(width?: number): Promise<Visitor>;
  close(): Promise<void>;
}

export interface Visitor {
  readonly page: Page;
  /** Errors of the console and of the page so far. */
  readonly errors: string[];
}

/** Serves the built client over a fresh database, and starts a browser. */
export async function openSite(): Promise<Site> {
  if (!existsSync(join(DIST, 'index.html')))
    throw new Error('The client is not built. Run the tests with: npm test');
  const server = await startTestServer({ client_dir: DIST });
  const http = createServer(createApp(server.context, server.local_mail));
  await new Promise<void>((resolve) => http.listen(0, '127.0.0.1', resolve));
  const address = http.address();
  if (address === null || typeof address === 'string') throw new Error('no port');
  const worker = startWorker(server.context.db, workOf(server.context), server.context.log);
  const browser: Browser = await chromium.launch({ executablePath: '/usr/bin/chromium', args: FLAGS });
  const url = `http://127.0.0.1:${address.port}`;
  return {
    server,
    url,
    async visit(width = 1440) {
      const context = await browser.newContext({
        baseURL: url,
        viewport: { width, height: 900 },
        acceptDownloads: true,
      });
      const page = await context.newPage();
      page.setDefaultTimeout(20_000);
      const errors: string[] = [];
      page.on('pageerror', (error) => errors.push(String(error)));
      page.on('console', (message) => {
        if (message.type() === 'error' && !/status of (401|409|422)/.test(message.text()))
          errors.push(message.text());
      });
      return { page, errors };
    },
    async close() {
      await browser.close();
      await worker.stop();
      http.closeAllConnections();
      await new Promise((resolve) => http.close(resolve));
      await server.close();
    },
  };
}

/** Signs a visitor in through the form. */
export async function signInAs(page: Page, email: string): Promise<void> {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail address').fill(email);
  await page.getByLabel('Password').fill(PASSWORD);
  await page.getByRole('button', { name: 'Sign in' }).click();
  await page.getByRole('heading', { level: 1, name: /Today|My bench/ }).waitFor();
}

/** Chooses an entry of a list by its words, once the list holds it. */
export async function choose(page: Page, label: string, words: string | RegExp): Promise<void> {
  const list = page.getByLabel(label, { exact: true });
  const entry = list.locator('option', { hasText: words }).first();
  await entry.waitFor({ state: 'attached' });
  await list.selectOption((await entry.getAttribute('value')) ?? '');
}

const axeSource = readFileSync(createRequire(import.meta.url).resolve('axe-core/axe.min.js'), 'utf8');

const axeResult = z.object({
  violations: z.array(
    z.object({ id: z.string(), nodes: z.array(z.object({ target: z.array(z.unknown()) })) }),
  ),
});

/** What the accessibility check finds on the page as it is: rule and place of each violation. */
export async function accessibilityFaults(page: Page): Promise<string[]> {
  await page.evaluate(axeSource);
  const { violations } = axeResult.parse(await page.evaluate('axe.run()'));
  return violations.map(
    ({ id, nodes }) => `${id}: ${nodes.map(({ target }) => target.join(' ')).join(', ')}`,
  );
}
