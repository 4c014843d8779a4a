/** Workshops for the load: each with a proprietor signed in, a safe full of sheet, a bench and a job. */
import { randomUUID } from 'node:crypto';
import type { Person, TestServer } from '../support/server.ts';
import { signUp } from '../support/server.ts';
import { httpWorkshop } from '../support/workshop-http.ts';

export interface Shop {
  readonly owner: Person;
  readonly safe: string;
  readonly bench: string;
  readonly sheet: string;
  readonly job: string;
}

export interface Issue {
  readonly cookie: string;
  readonly body: string;
}

/** Opens workshops over the API, one after the other. */
export async function openShops(server: TestServer, count: number): Promise<readonly Shop[]> {
  const shops: Shop[] = [];
  for (let number = 0; number < count; number += 1) {
    const owner = await signUp(server, `Bench Yard ${number}`);
    const shop = httpWorkshop(owner);
    const safe = await shop.account('safe');
    const bench = await shop.openPlace('bench', 'Bench 1', await shop.person('Ada Quill'));
    const party_id = await shop.party('supplier', 'Brenholt Fine Metals');
    const line = {
      form: 'sheet',
      description: '750 yellow sheet',
      alloy: '750 yellow',
      basis: 'certificate',
      gold_permille: '750',
      weighing: { gross_g: '9000.000' },
    };
    const { lots } = await owner.record('weigh-in', { party_id, safe_id: safe, lines: [line] });
    shops.push({ owner, safe, bench, sheet: lots[0]?.id ?? '', job: await shop.job('J-1') });
  }
  return shops;
}

/** What issues 0.010 g of the sheet. */
export function issueBody(shop: Shop): object {
  return {
    from_id: shop.safe,
    to_id: shop.bench,
    lot_id: shop.sheet,
    operation: 'sheet_work',
    job_id: shop.job,
    amount: { how: 'weighed', weighing: { gross_g: '0.010' } },
  };
}

export function issueRequest(shop: Shop): Issue {
  return { cookie: shop.owner.cookies.join('; '), body: JSON.stringify(issueBody(shop)) };
}

/** Issues once in this process. Throws where it is refused. */
export async function issueOnce(shop: Shop): Promise<void> {
  await shop.owner.record('issue', { ...issueBody(shop), note: randomUUID() });
}
