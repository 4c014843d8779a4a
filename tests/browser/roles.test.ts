/**
 * Each role's main path in a browser, and an accessibility check of each page it sees: a proprietor opens a book and
 * invites, signs what a keeper asked; an auditor reads, writes nothing, takes the dossier and checks it.
 */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Site, Visitor } from '../support/browser.ts';
import { accessibilityFaults, openSite, signInAs } from '../support/browser.ts';
import type { Person } from '../support/server.ts';
import { PASSWORD, addMember, signUp } from '../support/server.ts';
import { httpWorkshop } from '../support/workshop-http.ts';

let site: Site;
let owner: Person;
let keeper: Person;
let auditor: Person;
let issued = '';

beforeAll(async () => {
  site = await openSite();
  owner = await signUp(site.server);
  keeper = await addMember(site.server, owner, 'keeper', 'Bram Willet');
  auditor = await addMember(site.server, owner, 'auditor', 'Sunna Dreyer');
  const shop = httpWorkshop(owner);
  const safe = await shop.account('safe');
  const bench = await shop.openPlace('bench', 'Bench 1', await shop.person('Bram Willet'));
  const party_id = await shop.party('supplier', 'Brackwater');
  const line = {
    form: 'sheet',
    description: '750 yellow sheet',
    basis: 'certificate',
    gold_permille: '750',
    weighing: { gross_g: '100.000' },
  };
  const lot = (await owner.record('weigh-in', { party_id, safe_id: safe, lines: [line] })).lots[0]?.id ?? '';
  const answer = await keeper.record('issue', {
    from_id: safe,
    to_id: bench,
    lot_id: lot,
    operation: 'sheet_work',
    amount: { how: 'weighed', weighing: { gross_g: '20.000' } },
  });
  issued = answer.records.at(-1)?.sequence ?? '';
});
afterAll(() => site.close());

const faultsOn = async (visitor: Visitor, paths: readonly string[]) => {
  const faults: Record<string, readonly string[]> = {};
  for (const path of paths) {
    await visitor.page.goto(path);
    await visitor.page.getByRole('heading', { level: 1 }).first().waitFor();
    await visitor.page.waitForLoadState('networkidle').catch(() => undefined);
    const found = await accessibilityFaults(visitor.page);
    if (found.length > 0) faults[path] = found;
  }
  return faults;
};

describe('the proprietor', () => {
  it('opens a book, enters a place, and invites somebody who joins by the link', async () => {
    const { page, errors } = await site.visit();
    await page.goto('/sign-up');
    await page.getByLabel('Name of the workshop').fill('Quillon Row');
    await page.getByLabel('Your name').fill('Oriel Tarn');
    await page.getByLabel('E-mail address').fill('oriel@example.test');
    await page.getByLabel('Password').fill('short');
    await page.getByRole('button', { name: 'Open the book' }).click();
    await page.getByText('A password has at least 15 characters').first().waitFor();
    await page.getByLabel('Password').fill(PASSWORD);
    await page.getByRole('button', { name: 'Open the book' }).click();
    await page.getByRole('heading', { level: 1, name: 'Today' }).waitFor();
    await page.goto('/workshop/people');
    await page.getByLabel('Name', { exact: true }).fill('Mei Corby');
    await page.getByLabel('E-mail address').fill('mei@example.test');
    await page.getByRole('button', { name: 'Send the invitation' }).click();
    await page.getByText('The invitation is on its way to mei@example.test.').waitFor();
    const mail = site.server.local_mail
      ?.messages()
      .find((message) => message.to.includes('mei@example.test'));
    const token = /#[\w-]+/.exec(mail?.text ?? '')?.[0] ?? '';
    const guest = await site.visit(390);
    await guest.page.goto(`/invitation${token}`);
    await guest.page.getByText('Quillon Row invites Mei Corby as goldsmith.').waitFor();
    await guest.page.getByLabel('Choose a password').fill(PASSWORD);
    await guest.page.getByRole('button', { name: 'Join the workshop' }).click();
    await guest.page.getByRole('heading', { level: 1, name: 'My bench' }).waitFor();
    expect(await faultsOn(guest, ['/bench', '/account'])).toEqual({});
    expect([...errors, ...guest.errors]).toEqual([]);
  });

  it('signs the reversal that a keeper asked for', async () => {
    const asking = await site.visit();
    await signInAs(asking.page, keeper.email);
    await asking.page.goto(`/reports/vouchers/${issued}`);
    await asking.page
      .getByRole('button', { name: /Reverse/ })
      .first()
      .click();
    await asking.page
      .getByRole('dialog')
      .getByLabel(/Reason/)
      .fill('Wrong bench.');
    await asking.page
      .getByRole('dialog')
      .getByRole('button', { name: /signature|Reverse/ })
      .click();
    await asking.page
      .getByText(/waits for a second signature/)
      .first()
      .waitFor();
    const signing = await site.visit();
    await signInAs(signing.page, owner.email);
    await signing.page.goto('/signatures');
    await signing.page.getByRole('button', { name: /^Sign/ }).first().click();
    await expect.poll(async () => (await owner.get(`/vouchers/${issued}`)).body.reversed_by).not.toBeNull();
    expect([...asking.errors, ...signing.errors]).toEqual([]);
  });

  it('sees no page with an accessibility fault', async () => {
    const visitor = await site.visit();
    await signInAs(visitor.page, owner.email);
    const pages = [
      '/',
      '/counter',
      '/counter/weigh-in',
      '/counter/issue',
      '/counter/weigh-back',
      '/counter/move/transfer',
      '/counter/opening',
      '/lots',
      '/refining',
      '/refining/sweep-up',
      '/refining/consign',
      '/refining/metal-accounts',
    ];
    const settings = [
      '',
      '/people',
      '/parties',
      '/jobs',
      '/alloys',
      '/allowances',
      '/prices',
      '/settings',
      '/periods',
    ].map((part) => `/workshop${part}`);
    const reports = [
      '/reports',
      '/reports/balances',
      '/reports/losses',
      '/reports/reconciliation',
      '/reports/vouchers',
      `/reports/vouchers/${issued}`,
      '/insurance',
      '/insurance/verify',
      '/signatures',
    ];
    expect(await faultsOn(visitor, [...pages, ...settings, ...reports])).toEqual({});
    expect(visitor.errors).toEqual([]);
    // Thirty pages, one after the other, take longer than one path does.
  }, 300_000);
});

describe('the auditor', () => {
  it('reads, finds no way to write, makes the dossier and checks it in the product', async () => {
    const visitor = await site.visit();
    const { page } = visitor;
    await signInAs(page, auditor.email);
    expect(await page.getByRole('link', { name: 'Counter', exact: true }).count()).toBe(0);
    expect((await auditor.event('set-party', { kind: 'customer', name: 'Nobody' })).status).toBe(403);
    await page.goto('/insurance');
    await page.getByRole('button', { name: 'Make the dossier' }).click();
    const link = page.getByRole('link', { name: /ZIP|Take|Download|dossier-/ }).first();
    await link.waitFor({ timeout: 60_000 });
    const [download] = await Promise.all([page.waitForEvent('download'), link.click()]);
    const path = await download.path();
    await page.goto('/insurance/verify');
    await page.locator('input[type=file]').setInputFiles(path);
    await page.getByText('Every voucher sums to nothing in all five masses').waitFor({ timeout: 60_000 });
    expect(await page.getByText('Fails', { exact: true }).count()).toBe(0);
    expect(visitor.errors).toEqual([]);
  });
});

describe('the keyboard alone', () => {
  it('reaches a lot by its code from anywhere', async () => {
    const { page } = await site.visit();
    await signInAs(page, keeper.email);
    await page.keyboard.press('/');
    await page.keyboard.type('750 yellow');
    await page
      .getByText(/750 yellow sheet/)
      .first()
      .waitFor();
    await page.keyboard.press('Enter');
    await page.getByRole('heading', { level: 1, name: /^G\d\d-/ }).waitFor();
  });
});
