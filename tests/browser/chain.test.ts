/**
 * The main job in a real browser: a keeper weighs in, issues, weighs back, sweeps up, consigns and settles; a goldsmith
 * takes the metal over on a phone. The figures are those reckoned by hand in tests/api/chain.test.ts.
 */
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Site, Visitor } from '../support/browser.ts';
import { choose, openSite, signInAs } from '../support/browser.ts';
import type { Person } from '../support/server.ts';
import { addMember, signUp } from '../support/server.ts';
import { httpWorkshop } from '../support/workshop-http.ts';

let site: Site;
let keeper: Visitor;
let smith: Visitor;
let owner: Person;

beforeAll(async () => {
  site = await openSite();
  owner = await signUp(site.server);
  const bram = await addMember(site.server, owner, 'keeper', 'Bram Willet');
  const ines = await addMember(site.server, owner, 'goldsmith', 'Ines Halloran');
  const shop = httpWorkshop(owner);
  await shop.openPlace('bench', 'Bench 1', await shop.person('Ines Halloran'));
  const bin = await shop.openPlace('bin', 'Floor');
  await shop.party('supplier', 'Brackwater');
  const refiner = await shop.party('refiner', 'Osterlode');
  await shop.party('courier', 'Pell');
  await shop.openPlace('metal_account', 'With Osterlode', null, refiner);
  await shop.job('J-1187');
  await owner.record('set-setting', {
    what: 'bin_feed',
    bin_id: bin,
    operation: 'sheet_work',
    gold_percent: '60',
    silver_percent: '60',
    platinum_percent: '60',
    palladium_percent: '60',
  });
  await owner.record('set-allowance', {
    operation: 'sheet_work',
    percent: '2',
    fixed_g: '0.1',
    from: '2020-01-01',
  });
  keeper = await site.visit();
  smith = await site.visit(390);
  await signInAs(keeper.page, bram.email);
  await signInAs(smith.page, ines.email);
});
afterAll(() => site.close());

describe('the chain of the main job, by hand and eye', () => {
  it('weighs in a delivery, refuses a tare over gross, and keeps what was typed over a reload', async () => {
    const { page } = keeper;
    await page.goto('/counter/weigh-in');
    await choose(page, 'From', 'Brackwater');
    await choose(page, 'Form', /^Sheet/);
    await page.getByLabel('In a few words').fill('750 yellow sheet');
    await page.getByLabel('Gold', { exact: true }).fill('750');
    await page.getByLabel('Gross on the balance').fill('120.000 g');
    await page.getByLabel('Tare').fill('130');
    await page.getByRole('button', { name: 'Post the weigh-in' }).click();
    await page.getByText('Tare is as heavy as gross or heavier').first().waitFor();
    await page.getByLabel('Tare').fill('20');
    await page.reload();
    expect(await page.getByLabel('Gross on the balance').inputValue()).toContain('120');
    await page
      .getByRole('cell', { name: /75\.000 Au/ })
      .first()
      .waitFor();
    await page.getByRole('button', { name: 'Post the weigh-in' }).click();
    await page.getByText(/Voucher .* posted/).waitFor();
  });

  it('issues 40 g for a job; the goldsmith sees it and takes it over on a phone', async () => {
    const { page } = keeper;
    await page.goto('/counter/issue');
    await choose(page, 'Lot', '750 yellow sheet');
    await choose(page, 'To', 'Bench 1');
    await choose(page, 'Job', 'J-1187');
    await page.getByLabel('Gross on the balance').fill('40');
    await page.getByRole('button', { name: 'Post the issue' }).click();
    await page.getByText(/Voucher .* posted/).waitFor();
    await smith.page.goto('/bench');
    await smith.page.getByText('40.000').first().waitFor();
    await smith.page.getByRole('button', { name: 'I have it' }).click();
    await smith.page.getByText('Nothing waits for you.').waitFor();
  });

  it('weighs back with its loss, shown before it is posted', async () => {
    const { page } = keeper;
    await page.goto('/counter/weigh-back');
    await choose(page, 'Bench, station or outworker', 'Bench 1');
    await choose(page, 'Job', 'J-1187');
    const line = async (kind: string, gross: string) => {
      await page.getByRole('button', { name: kind, exact: true }).click();
      await page.getByLabel('Gross on the balance').last().fill(gross);
    };
    await line('Unused metal', '10');
    await line('Clean scrap', '2');
    await line('Filings, lemel', '1');
    await line('Finished work', '26.5');
    await page.getByLabel('In a few words').fill('ring blank');
    await choose(page, 'Goes to', /^Safe/);
    await page.getByText('Within allowance').first().waitFor();
    expect(await page.locator('main').innerText()).toContain('0.386');
    await page.getByRole('button', { name: 'Post the weigh-back' }).click();
    await page.getByText(/Voucher .* posted/).waitFor();
  });

  it('sweeps up the floor into a drum with its estimate', async () => {
    const { page } = keeper;
    await page.goto('/refining/sweep-up');
    await choose(page, 'Bin', 'Floor');
    await page.getByLabel('Words on the container').fill('Floor, drum 1');
    await choose(page, 'Stands from now on', /^Safe/);
    await page.getByLabel('Gross on the balance').fill('50');
    await page.getByText('0.232').first().waitFor();
    await page.getByRole('button', { name: /Post the sweep/ }).click();
    await page.getByText(/Voucher .* posted/).waitFor();
  });

  it('shows balances, losses and a reconciliation that adds up', async () => {
    const { page } = keeper;
    await page.goto('/reports/balances');
    await page.getByText('Bench 1').or(page.getByText('Safe')).first().waitFor();
    await page.goto('/reports/losses');
    await page
      .getByRole('row', { name: /Sheet work/ })
      .first()
      .waitFor();
    expect(
      await page
        .getByRole('row', { name: /Sheet work/ })
        .first()
        .innerText(),
    ).toContain('0.386');
    await page.goto('/reports/reconciliation');
    await page
      .getByRole('row', { name: /From suppliers/ })
      .first()
      .waitFor();
    expect(
      await page
        .getByRole('row', { name: /From suppliers/ })
        .first()
        .innerText(),
    ).toContain('75.000');
  });

  it('reports no error in the console', () => {
    expect([...keeper.errors, ...smith.errors]).toEqual([]);
  });
});
