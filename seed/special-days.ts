/** The days that are not like others: consignments and their outturn, a customer's own metal, a reversal, a dispute. */
import type { Faker } from '@faker-js/faker';
import { gramsText } from '../shared/mass/grams-text.ts';
import { printGrams, roundHalfEven } from '../shared/mass/micrograms.ts';
import { z } from '../shared/schemas/zod.ts';
import { milligrams, openJob } from './bench-day.ts';
import type { Recorder } from './recorder.ts';
import type { Stock } from './stock.ts';

const UG_PER_MG = 1_000n;

/** Drums go to the refiner with the courier and arrive. Gives the consignment's voucher. */
export async function sendSweeps(book: Recorder, code: string, drums: readonly string[]): Promise<string> {
  const sent = await book.record('09:20', 'keeper', 'consign', {
    code,
    from_id: book.id('Safe'),
    courier_id: book.id('courier'),
    destination_id: book.id('refiner'),
    lines: drums.map((lot_id) => ({ lot_id, amount: { how: 'all' } })),
    packages: drums.map((_, index) => ({ seal: `04${31 + index}`, content: `drum ${index + 1}` })),
    declared_value: '1500',
  });
  return sent.records.at(-1)?.id ?? '';
}

export async function arriveSweeps(
  book: Recorder,
  consign_id: string,
  drums: readonly string[],
): Promise<void> {
  const held = await holdings(book, 'courier', drums);
  await book.record('14:00', 'keeper', 'arrive', {
    consign_id,
    lines: held.map((row) => ({ lot_id: row.lot_id, received_g: row.gross_g })),
  });
}

/** The refiner's statement: a little more gold than expected in one drum, less in the other; paid onto the account. */
export async function settleSweeps(
  book: Recorder,
  dice: Faker,
  consign_id: string,
  drums: readonly string[],
): Promise<void> {
  const held = await holdings(book, 'refiner', drums);
  const credit = { gold: 0n, silver: 0n, palladium: 0n };
  const lines = held.map((row) => {
    const metals = (['gold', 'silver', 'palladium'] as const).map((metal) => {
      const found = BigInt(dice.number.int({ min: 930, max: 1060 }));
      const assayed = roundHalfEven((gramsText(row[`${metal}_g`]) * found) / 1000n, UG_PER_MG) * UG_PER_MG;
      const payable = (assayed * (metal === 'gold' ? 985n : 950n)) / 1000n;
      const credited = payable - (payable % UG_PER_MG);
      credit[metal] += credited;
      return { metal, assayed_g: printGrams(assayed), credited_g: printGrams(credited) };
    });
    return { lot_id: row.lot_id, settle: { how: 'all' }, metals };
  });
  const payments = (['gold', 'silver', 'palladium'] as const)
    .filter((metal) => credit[metal] > 0n)
    .map((metal) => ({
      way: 'metal_account',
      account_id: book.id('With Osterlode'),
      metal,
      mass_g: printGrams(credit[metal]),
    }));
  const charges = [
    { what: 'Melting, two drums', amount: '96.00' },
    { what: 'Assay, three metals', amount: '84.00' },
  ];
  await book.record('10:30', 'proprietor', 'outturn', {
    refiner_id: book.id('refiner'),
    consign_id,
    statement: '77-1146',
    lines,
    payments,
    charges,
  });
}

const held = z.object({
  lot_id: z.string(),
  gross_g: z.string(),
  gold_g: z.string(),
  silver_g: z.string(),
  palladium_g: z.string(),
});

function holdings(book: Recorder, place: string, lots: readonly string[]) {
  return book.db.inScope({ workshop_id: book.workshop_id, user_id: null }, (tx) =>
    tx.rows(
      held,
      `SELECT lot_id::text, grams(gross_ug) AS gross_g, grams(gold_ug) AS gold_g, grams(silver_ug) AS silver_g, grams(palladium_ug) AS palladium_g
        FROM holding WHERE workshop_id = current_workshop() AND account_id = $1::uuid AND lot_id = ANY ($2::uuid[]) AND gross_ug > 0 ORDER BY lot_id`,
      [book.id(place), lots],
    ),
  );
}

/** A customer brings gold of her own; it is worked at bench 1 and goes back to her, its loss in her name. */
export async function customersOwn(book: Recorder, dice: Faker): Promise<void> {
  const customer = 'Edda Marsh';
  const came = await book.record('08:30', 'keeper', 'weigh-in', {
    party_id: book.id(customer),
    safe_id: book.id('Safe'),
    lines: [
      {
        form: 'old_gold',
        description: 'two rings, her mother’s',
        basis: 'tested',
        origin: 'customers_own',
        owner_id: book.id(customer),
        gold_permille: '585',
        silver_permille: '240',
        weighing: { gross_g: '11.462' },
      },
    ],
  });
  const lot_id = came.lots[0]?.id ?? '';
  const job_id = await openJob(book, dice, customer);
  const issue = await book.record('09:00', 'keeper', 'issue', {
    from_id: book.id('Safe'),
    to_id: book.id('Bench 1'),
    lot_id,
    operation: 'repair',
    job_id,
    amount: { how: 'all' },
  });
  await book.record('09:02', 'ines', 'acknowledge', {
    voucher_id: issue.records.at(-1)?.id ?? '',
    how: 'session',
  });
  const work = {
    job_id,
    operation: 'repair',
    made: [
      {
        form: 'finished_work',
        description: 'pendant of her own gold',
        pieces: '1',
        to_id: book.id('Safe'),
        weighing: { gross_g: '11.406' },
      },
    ],
  };
  const back = await book.record('15:20', 'keeper', 'weigh-back', {
    place_id: book.id('Bench 1'),
    safe_id: book.id('Safe'),
    works: [work],
  });
  await book.record('15:50', 'keeper', 'return-to-owner', {
    place_id: book.id('Safe'),
    lot_id: back.lots[0]?.id ?? '',
    amount: { how: 'all' },
  });
}

/** Metal issued to the wrong bench; the issue is reversed, signed by the proprietor. */
export async function wrongBench(book: Recorder, stock: Stock): Promise<void> {
  const lot_id = stock.take('750 yellow', 18_400);
  if (lot_id === null) return;
  const issue = await book.record('10:05', 'keeper', 'issue', {
    from_id: book.id('Safe'),
    to_id: book.id('Bench 3'),
    lot_id,
    operation: 'setting',
    amount: { how: 'weighed', weighing: { gross_g: '18.400' } },
  });
  await book.record(
    '10:20',
    'keeper',
    'reversal',
    { voucher_id: issue.records.at(-1)?.id ?? '', reason: 'Issued to bench 3, meant for bench 1.' },
    'proprietor',
  );
  stock.putBack('750 yellow', lot_id, 18_400);
}

/** Today's open ends: metal out, one handover waiting, one disputed, a delivery of grain on hold. */
export async function openEnds(book: Recorder, dice: Faker, stock: Stock): Promise<void> {
  const out = async (time: string, place: string, alloy: string, operation: string, mg: number) => {
    const lot_id = stock.take(alloy, mg);
    if (lot_id === null) throw new Error(`the demo has no ${alloy} left`);
    const job_id = await openJob(book, dice, 'Corvin & Daughter, jewellers');
    const answer = await book.record(time, 'keeper', 'issue', {
      from_id: book.id('Safe'),
      to_id: book.id(place),
      lot_id,
      operation,
      job_id,
      amount: { how: 'weighed', weighing: { gross_g: milligrams(mg) } },
    });
    return answer.records.at(-1)?.id ?? '';
  };
  const first = await out('05:10', 'Bench 1', '750 yellow', 'sheet_work', 38_214);
  await book.record('05:14', 'ines', 'acknowledge', { voucher_id: first, how: 'session' });
  await out('05:22', 'Bench 2', '750 white, palladium', 'soldering', 24_080);
  const disputed = await out('05:31', 'Bench 3', '925 silver', 'setting', 61_300);
  await book.record('05:40', 'mei', 'dispute-handover', {
    voucher_id: disputed,
    how: 'session',
    weighing: { gross_g: '60.930' },
    note: 'Weighed twice on my balance.',
  });
  await book.record('05:50', 'keeper', 'weigh-in', {
    party_id: book.id('Quern Fine Metals'),
    safe_id: book.id('Safe'),
    delivery_note: 'QF-20881',
    lines: [
      {
        form: 'grain',
        alloy: 'Fine gold',
        description: '999.9 gold grain',
        basis: 'certificate',
        origin: 'recycled',
        gold_permille: '999.9',
        invoice_gross_g: '250.000',
        weighing: { gross_g: '291.386', tare_g: '41.412', tare_kind: 'measured' },
      },
    ],
  });
}
