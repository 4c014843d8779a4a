/** Plays the demo workshop's months through the program's own services; nothing is put behind the book's back. */
import { Faker, en } from '@faker-js/faker';
import { z } from '../shared/schemas/zod.ts';
import type { Config } from '../server/config.ts';
import type { Database } from '../server/db/database.ts';
import type { Made } from './bench-day.ts';
import { benchDay, restartJobs } from './bench-day.ts';
import { isFirstOfMonth, workingDays } from './calendar.ts';
import { BENCHES } from './cast.ts';
import { firstDay } from './first-day.ts';
import { polishAndDeliver, setPrices, supplierDelivery, sweepUp } from './month.ts';
import { bringPeople } from './people.ts';
import { Recorder } from './recorder.ts';
import {
  arriveSweeps,
  customersOwn,
  openEnds,
  sendSweeps,
  settleSweeps,
  wrongBench,
} from './special-days.ts';
import { Stock } from './stock.ts';

const SEED = 4180;
const WEEKS = 26;

/** Makes the workshop; `today` is the day that it ends on, `tell` hears of each month. Gives the workshop's id. */
export async function playWorkshop(
  context: { readonly db: Database; readonly config: Config },
  today: string,
  tell: (month: string) => void = () => undefined,
): Promise<string> {
  const dice = new Faker({ locale: en, seed: SEED });
  const days = workingDays(today, WEEKS);
  const [begin = today] = days;
  restartJobs();
  const until = new Date(Date.parse(`${today}T12:00:00Z`) + 60 * 86_400_000).toISOString().slice(0, 10);
  const { workshop_id, people } = await bringPeople(context, new Date(`${begin}T06:30:00.000Z`), until);
  const book = new Recorder(context.db, workshop_id, people);
  const stock = new Stock();
  book.day = begin;
  await nameAccounts(book);
  await firstDay(book);
  await nameAccounts(book);
  await playDays(book, dice, days, stock, tell);
  return workshop_id;
}

async function playDays(
  book: Recorder,
  dice: Faker,
  days: readonly string[],
  stock: Stock,
  tell: (month: string) => void,
): Promise<void> {
  let month = -1;
  let made: Made[] = [];
  const drums: string[] = [];
  let sent = '';
  const at = (share: number) => Math.floor(days.length * share);
  for (const [index, day] of days.entries()) {
    book.day = day;
    if (isFirstOfMonth(days, index)) {
      month += 1;
      tell(day.slice(0, 7));
      await setPrices(book, dice, month);
      await supplierDelivery(book, dice, stock);
    }
    if (index === at(0.5)) sent = await sendSweeps(book, 'C-0001', drums);
    if (index === at(0.53)) await arriveSweeps(book, sent, drums.splice(0));
    if (index === days.length - 1) {
      await openEnds(book, dice, stock);
      break;
    }
    for (const bench of BENCHES) {
      const piece = dice.datatype.boolean(0.62) ? await benchDay(book, dice, bench, stock) : null;
      if (piece !== null) made.push(piece);
    }
    if (index === at(0.3)) await customersOwn(book, dice);
    if (index === at(0.45)) await wrongBench(book, stock);
    if (new Date(`${day}T12:00:00Z`).getUTCDay() === 5) {
      await polishAndDeliver(book, dice, made.slice(0, 3));
      made = made.slice(3, 8);
    }
    if (isFirstOfMonth(days, index + 1) && index < days.length - 2)
      drums.push(...(await sweepUp(book, dice, month)));
    if (index === at(0.65)) await settle(book, dice, sent);
    if (index === days.length - 4) await sendSweeps(book, 'C-0002', drums);
  }
}

/** The first consignment's statement comes some weeks after it arrived. */
async function settle(book: Recorder, dice: Faker, consign_id: string): Promise<void> {
  const lots = await book.db.inScope({ workshop_id: book.workshop_id, user_id: null }, (tx) =>
    tx.rows(
      z.object({ lot_id: z.string() }),
      `SELECT DISTINCT e.lot_id::text FROM record r JOIN entry e ON e.workshop_id = r.workshop_id AND e.voucher_sequence = r.sequence
        WHERE r.workshop_id = current_workshop() AND r.id = $1::uuid ORDER BY 1`,
      [consign_id],
    ),
  );
  await settleSweeps(
    book,
    dice,
    consign_id,
    lots.map(({ lot_id }) => lot_id),
  );
}

/** Names the accounts that the program itself opened: the safe, the refiner's and the courier's places. */
async function nameAccounts(book: Recorder): Promise<void> {
  const rows = await book.db.inScope({ workshop_id: book.workshop_id, user_id: null }, (tx) =>
    tx.rows(
      z.object({ id: z.string(), kind: z.string(), name: z.string() }),
      `SELECT id::text, kind, name FROM account WHERE workshop_id = current_workshop() AND kind IN ('safe', 'refiner', 'courier')`,
    ),
  );
  for (const { id, kind, name } of rows) book.ids.set(kind === 'safe' ? name : kind, id);
}
