/** A day at a bench: metal issued for a job and taken over in the morning, weighed back in the evening. */
import type { Faker } from '@faker-js/faker';
import { printGrams } from '../shared/mass/micrograms.ts';
import type { Bench } from './cast.ts';
import { CUSTOMERS, PIECES } from './cast.ts';
import type { Recorder } from './recorder.ts';
import type { Stock } from './stock.ts';

const MG = 1_000n;

/** A whole number of milligrams as grams. */
export const milligrams = (mg: number): string => printGrams(BigInt(mg) * MG);

export interface Made {
  readonly lot_id: string;
  readonly alloy: string;
  readonly mg: number;
  readonly customer: string;
}

let serial = 0;

/** Starts the numbers of jobs anew, so that every demo has the same ones. */
export function restartJobs(): void {
  serial = 1100;
}

/** One job at one bench; gives the finished work that lies in the safe afterwards. */
export async function benchDay(
  book: Recorder,
  dice: Faker,
  bench: Bench,
  stock: Stock,
): Promise<Made | null> {
  const out = dice.number.int({ min: 14_000, max: 42_000 });
  const sheet = stock.take(bench.alloy, out);
  if (sheet === null) return null;
  const customer = dice.helpers.arrayElement(CUSTOMERS);
  const job_id = await openJob(book, dice, customer);
  const place_id = book.id(bench.place);
  const issue = await book.record('07:20', 'keeper', 'issue', {
    from_id: book.id('Safe'),
    to_id: place_id,
    lot_id: sheet,
    operation: bench.operation,
    job_id,
    amount: { how: 'weighed', weighing: { gross_g: milligrams(out) } },
  });
  await book.record('07:24', bench.key, 'acknowledge', {
    voucher_id: issue.records.at(-1)?.id ?? '',
    how: 'session',
  });
  const unused = Math.round(out * dice.number.float({ min: 0.18, max: 0.34 }));
  const scrap = Math.round(out * dice.number.float({ min: 0.04, max: 0.09 }));
  const filings = Math.round(out * dice.number.float({ min: 0.015, max: 0.035 }));
  const loss = Math.round(
    (out - unused) * (bench.loss / 10_000) * dice.number.float({ min: 0.6, max: 1.35 }),
  );
  const made = out - unused - scrap - Math.round(filings * 0.985) - loss;
  const trays = { scrap: `scrap ${bench.alloy}`, filings: `filings ${bench.place}` };
  const work = {
    job_id,
    operation: bench.operation,
    unused: [{ lot_id: sheet, weighing: { gross_g: milligrams(unused) } }],
    scrap: [
      {
        from_lot_id: sheet,
        into_lot_id: stock.trays.get(trays.scrap) ?? null,
        weighing: { gross_g: milligrams(scrap) },
      },
    ],
    filings: [
      { into_lot_id: stock.trays.get(trays.filings) ?? null, weighing: { gross_g: milligrams(filings) } },
    ],
    made: [
      {
        form: 'finished_work',
        description: dice.helpers.arrayElement(PIECES),
        pieces: '1',
        to_id: book.id('Safe'),
        weighing: { gross_g: milligrams(made) },
      },
    ],
  };
  const back = await book.record('15:40', 'keeper', 'weigh-back', {
    place_id,
    safe_id: book.id('Safe'),
    works: [work],
  });
  stock.putBack(bench.alloy, sheet, unused);
  const [, firstScrap, firstFilings] = back.lots;
  if (firstScrap !== undefined) stock.trays.set(trays.scrap, firstScrap.id);
  if (firstFilings !== undefined) stock.trays.set(trays.filings, firstFilings.id);
  return { lot_id: back.lots[0]?.id ?? '', alloy: bench.alloy, mg: made, customer };
}

export async function openJob(book: Recorder, dice: Faker, customer: string | null): Promise<string> {
  serial += 1;
  const title = dice.helpers.arrayElement(PIECES);
  const customer_id = customer === null ? null : book.id(customer);
  return book.opened(
    await book.record('07:10', 'keeper', 'open-job', { code: `J-${serial}`, title, customer_id }),
    'job_id',
  );
}
