/** What comes once a month or week: prices, deliveries from suppliers, polishing, deliveries to customers, sweeping up. */
import type { Faker } from '@faker-js/faker';
import { PRICES, PRICE_SOURCE } from './cast.ts';
import type { Made } from './bench-day.ts';
import { milligrams } from './bench-day.ts';
import type { Recorder } from './recorder.ts';
import type { Stock } from './stock.ts';

/** Prices of the day, drifting a little. */
export function setPrices(book: Recorder, dice: Faker, month: number) {
  const prices = Object.entries(PRICES).map(([metal, first]) => ({
    metal,
    price_per_ozt: (first * (1 + month * 0.012 + dice.number.float({ min: -0.01, max: 0.01 }))).toFixed(2),
  }));
  return book.record('06:50', 'keeper', 'set-price', { prices, priced_on: book.day, source: PRICE_SOURCE });
}

const DELIVERY = [
  {
    alloy: '750 yellow',
    form: 'sheet',
    description: '750 yellow sheet, 1.2 mm',
    fine: { gold_permille: '750', silver_permille: '125' },
    mg: 420_000,
  },
  {
    alloy: '750 white, palladium',
    form: 'wire',
    description: '750 white wire, 1.6 mm',
    fine: { gold_permille: '750', silver_permille: '100', palladium_permille: '150' },
    mg: 380_000,
  },
  {
    alloy: '925 silver',
    form: 'sheet',
    description: '925 silver sheet, 1.0 mm',
    fine: { silver_permille: '925' },
    mg: 460_000,
  },
] as const;

/** A supplier's delivery: three lines, a few milligrams off their invoice. */
export async function supplierDelivery(book: Recorder, dice: Faker, stock: Stock): Promise<void> {
  const lines = DELIVERY.map(({ alloy, form, description, fine, mg }) => {
    const off = dice.number.int({ min: -38, max: 24 });
    return {
      alloy,
      form,
      description,
      basis: 'certificate',
      origin: 'recycled',
      ...fine,
      invoice_gross_g: milligrams(mg),
      weighing: {
        gross_g: milligrams(mg + off + 212_400),
        tare_g: milligrams(212_400),
        tare_kind: 'measured',
      },
    };
  });
  const answer = await book.record('08:15', 'keeper', 'weigh-in', {
    party_id: book.id('Brackwater Semi-finished'),
    safe_id: book.id('Safe'),
    delivery_note: `BW-${dice.number.int({ min: 20_000, max: 29_999 })}`,
    lines,
  });
  DELIVERY.forEach(({ alloy, mg }, index) => stock.add(alloy, answer.lots[index]?.id ?? '', mg - 60));
}

/** A week's finished work is polished at the station, then delivered to its customers. */
export async function polishAndDeliver(book: Recorder, dice: Faker, made: readonly Made[]): Promise<void> {
  for (const piece of made) {
    const issue = await book.record('09:05', 'keeper', 'issue', {
      from_id: book.id('Safe'),
      to_id: book.id('Polishing'),
      lot_id: piece.lot_id,
      operation: 'polishing',
      amount: { how: 'all' },
    });
    await book.record('09:10', 'mei', 'acknowledge', {
      voucher_id: issue.records.at(-1)?.id ?? '',
      how: 'session',
    });
    const loss = Math.max(1, Math.round(piece.mg * dice.number.float({ min: 0.002, max: 0.0055 })));
    const work = {
      job_id: null,
      operation: 'polishing',
      lot_ids: [piece.lot_id],
      made: [
        {
          form: 'finished_work',
          description: 'polished piece',
          pieces: '1',
          to_id: book.id('Safe'),
          weighing: { gross_g: milligrams(piece.mg - loss) },
        },
      ],
    };
    const back = await book.record('13:30', 'keeper', 'weigh-back', {
      place_id: book.id('Polishing'),
      safe_id: book.id('Safe'),
      works: [work],
    });
    await book.record('15:55', 'keeper', 'delivery', {
      way: 'deliver',
      party_id: book.id(piece.customer),
      place_id: book.id('Safe'),
      lines: [{ lot_id: back.lots[0]?.id ?? '', amount: { how: 'all' } }],
    });
  }
}

/** Both bins are swept up into drums that stand in the safe. */
export async function sweepUp(book: Recorder, dice: Faker, month: number): Promise<readonly string[]> {
  const bins = [
    { bin: 'Floor and boards', form: 'sweeps', mg: dice.number.int({ min: 820_000, max: 1_350_000 }) },
    { bin: 'Polishing hood', form: 'polishings', mg: dice.number.int({ min: 240_000, max: 420_000 }) },
  ];
  const drums: string[] = [];
  for (const { bin, form, mg } of bins) {
    const answer = await book.record('16:10', 'keeper', 'sweep-up', {
      bin_id: book.id(bin),
      to_id: book.id('Safe'),
      form,
      container: `${bin}, drum ${month + 1}`,
      weighing: { gross_g: milligrams(mg) },
    });
    drums.push(answer.lots[0]?.id ?? '');
  }
  return drums;
}
