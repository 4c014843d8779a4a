/**
 * Two months of a small workshop, recorded over HTTP with dates of their own: house metal from the supplier to the
 * refiner's credit, and a customer's gold worked and partly given back. The figures are in the comments, so that each
 * report can be reckoned by hand.
 */
import type { Person, TestServer } from './server.ts';
import { addMember, signUp } from './server.ts';
import { httpWorkshop } from './workshop-http.ts';

/** The months that the reports are read for. */
export const JANUARY = 'from=2026-01-01&to=2026-01-31';
export const FEBRUARY = 'from=2026-02-01&to=2026-02-28';

export interface WorkedMonths {
  readonly owner: Person;
  readonly smith: Person;
  readonly ids: Readonly<
    Record<
      'safe' | 'bench' | 'refiner' | 'customer' | 'refiner_party' | 'sheet' | 'gold' | 'weigh_in' | 'consign',
      string
    >
  >;
}

/** Records the two months in a fresh workshop of the server. */
export async function workTwoMonths(server: TestServer): Promise<WorkedMonths> {
  const owner = await signUp(server);
  const smith = await addMember(server, owner, 'goldsmith', 'Corin Dask');
  const places = await openPlaces(owner);
  const house = await houseMetal(owner, places);
  const gold = await customersGold(owner, places);
  return { owner, smith, ids: { ...places, ...house, gold } };
}

async function openPlaces(owner: Person) {
  const shop = httpWorkshop(owner);
  const smith = await shop.person('Corin Dask');
  const safe = await shop.account('safe');
  const bench = await shop.openPlace('bench', 'Bench 1', smith);
  const bin = await shop.openPlace('bin', 'Floor');
  const supplier = await shop.party('supplier', 'Brenholt Fine Metals');
  const customer = await shop.party('customer', '=Edda Lorn');
  const refiner_party = await shop.party('refiner', 'Osk & Varley');
  const courier_party = await shop.party('courier', 'Pell Couriers');
  const refiner = await shop.openPlace('refiner', 'Osk & Varley, works', null, refiner_party);
  const courier = await shop.openPlace('courier', 'Pell van', null, courier_party);
  const claim = await shop.openPlace('metal_account', 'With Osk & Varley', null, refiner_party);
  const job = await shop.job('J-1187');
  const own_job = await shop.job('J-1188', customer);
  const shares = Object.fromEntries(
    ['gold', 'silver', 'platinum', 'palladium'].map((metal) => [`${metal}_percent`, '60']),
  );
  await owner.record('set-setting', { what: 'bin_feed', bin_id: bin, operation: 'sheet_work', ...shares });
  for (const [priced_on, price_per_ozt] of [
    ['2026-01-01', '2000'],
    ['2026-02-15', '2500'],
  ])
    await owner.record('set-price', {
      prices: [{ metal: 'gold', price_per_ozt }],
      priced_on,
      source: 'typed',
    });
  await owner.record('set-allowance', {
    operation: 'sheet_work',
    percent: '2',
    fixed_g: '0.05',
    from: '2026-01-01',
  });
  return { safe, bench, bin, supplier, customer, refiner_party, refiner, courier, claim, job, own_job };
}

type Places = Awaited<ReturnType<typeof openPlaces>>;
const weighed = (gross_g: string) => ({ weighing: { gross_g } });

/** 100 g of 750 in, 40 g out, back 10 unused, 2 scrap, 1 filings, 26.5 work: 0.515 g lost, 0.38625 g of it gold. */
async function houseMetal(owner: Person, at: Places) {
  const line = {
    form: 'sheet',
    description: '750 yellow sheet',
    alloy: '750 yellow',
    basis: 'certificate',
    gold_permille: '750',
    ...weighed('100.000'),
  };
  const received = await owner.record('weigh-in', {
    business_date: '2026-01-05',
    party_id: at.supplier,
    safe_id: at.safe,
    lines: [line],
  });
  const sheet = received.lots[0]?.id ?? '';
  await owner.record('issue', {
    business_date: '2026-01-10',
    from_id: at.safe,
    to_id: at.bench,
    lot_id: sheet,
    operation: 'sheet_work',
    job_id: at.job,
    amount: { how: 'weighed', ...weighed('40.000') },
  });
  await owner.record('weigh-back', {
    business_date: '2026-01-12',
    place_id: at.bench,
    safe_id: at.safe,
    works: [
      {
        job_id: at.job,
        operation: 'sheet_work',
        unused: [{ lot_id: sheet, ...weighed('10.000') }],
        scrap: [{ from_lot_id: sheet, ...weighed('2.000') }],
        filings: [weighed('1.000')],
        made: [{ form: 'work', description: 'ring blank', pieces: '1', ...weighed('26.500') }],
      },
    ],
  });
  const consign = await refine(owner, at);
  return { sheet, weigh_in: received.records.at(-1)?.id ?? '', consign };
}

/** 50 g of dust with 0.23175 g of gold by estimate; 0.001 g lighter on arrival; 0.250 g found, 0.2475 g credited. */
async function refine(owner: Person, at: Places) {
  const swept = await owner.record('sweep-up', {
    business_date: '2026-02-03',
    bin_id: at.bin,
    to_id: at.safe,
    container: 'Floor, drum 1',
    ...weighed('50.000'),
  });
  const lot_id = swept.lots[0]?.id ?? '';
  const sent = await owner.record('consign', {
    business_date: '2026-02-05',
    code: 'C-0001',
    from_id: at.safe,
    courier_id: at.courier,
    destination_id: at.refiner,
    lines: [{ lot_id, amount: { how: 'all' } }],
    packages: [{ seal: '0391', content: 'drum 1' }],
    declared_value: '25.00',
  });
  const consign_id = sent.records.at(-1)?.id ?? '';
  await owner.record('arrive', {
    business_date: '2026-02-07',
    consign_id,
    lines: [{ lot_id, received_g: '49.999' }],
  });
  await owner.record('outturn', {
    business_date: '2026-02-20',
    refiner_id: at.refiner,
    consign_id,
    statement: '77-1146',
    lines: [
      {
        lot_id,
        settle: { how: 'all' },
        metals: [{ metal: 'gold', assayed_g: '0.250', credited_g: '0.2475' }],
      },
    ],
    payments: [{ way: 'metal_account', account_id: at.claim, metal: 'gold', mass_g: '0.2475' }],
    charges: [{ what: 'Refining', amount: '12.00' }],
  });
  return consign_id;
}

/** 20 g of a customer's 585 (11.7 g gold); 10 g worked to 9.9 g, 0.0585 g of gold lost; 5 g (2.925 g) given back. */
async function customersGold(owner: Person, at: Places): Promise<string> {
  const line = {
    form: 'old_gold',
    description: 'her mother’s chain',
    owner_id: at.customer,
    origin: 'customers_own',
    basis: 'tested',
    gold_permille: '585',
    ...weighed('20.000'),
  };
  const received = await owner.record('weigh-in', {
    business_date: '2026-02-10',
    party_id: at.customer,
    safe_id: at.safe,
    lines: [line],
  });
  const gold = received.lots[0]?.id ?? '';
  const lot = { lot_id: gold, operation: 'sheet_work', job_id: at.own_job };
  await owner.record('issue', {
    business_date: '2026-02-12',
    from_id: at.safe,
    to_id: at.bench,
    ...lot,
    amount: { how: 'weighed', ...weighed('10.000') },
  });
  await owner.record('weigh-back', {
    business_date: '2026-02-15',
    place_id: at.bench,
    safe_id: at.safe,
    works: [
      {
        job_id: at.own_job,
        operation: 'sheet_work',
        made: [{ form: 'work', description: 'pendant', pieces: '1', ...weighed('9.900') }],
      },
    ],
  });
  await owner.record('return-to-owner', {
    business_date: '2026-02-25',
    place_id: at.safe,
    lot_id: gold,
    amount: { how: 'weighed', ...weighed('5.000') },
  });
  return gold;
}
