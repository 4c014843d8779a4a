/** The day on which the demo's book begins: places, parties, alloys, allowances, rates, and what was in the safe. */
import { ALLOYS, BENCHES, CUSTOMERS } from './cast.ts';
import type { Recorder, Who } from './recorder.ts';

export async function firstDay(book: Recorder): Promise<void> {
  await openPlaces(book);
  await openParties(book);
  for (const alloy of ALLOYS) {
    await book.record('07:30', 'proprietor', 'set-alloy', {
      silver_permille: '0',
      gold_permille: '0',
      platinum_permille: '0',
      palladium_permille: '0',
      ...alloy,
    });
  }
  const allowances = {
    sheet_work: '0.5',
    soldering: '0.55',
    setting: '0.7',
    polishing: '0.6',
    repair: '0.6',
  };
  for (const [operation, percent] of Object.entries(allowances)) {
    await book.record('07:40', 'proprietor', 'set-allowance', {
      operation,
      percent,
      fixed_g: '0.020',
      from: book.day,
    });
  }
  for (const operation of ['sheet_work', 'soldering', 'setting', 'repair'])
    await feed(book, 'Floor and boards', operation, '48');
  await feed(book, 'Polishing hood', 'polishing', '70');
  await book.record('07:50', 'proprietor', 'set-setting', { what: 'night_limit', amount: '25000' });
  await book.record('07:50', 'proprietor', 'set-setting', {
    what: 'acceptance',
    form: 'grain',
    checks: ['melt_check'],
  });
  await book.record('07:50', 'proprietor', 'set-setting', {
    what: 'claim',
    account_id: book.id('With Osterlode'),
    metal: 'gold',
    mass_g: '100',
  });
  await book.record('08:00', 'keeper', 'opening', { lines: openingLines(book) });
}

async function openPlaces(book: Recorder): Promise<void> {
  const open = async (kind: string, name: string, who: Who | null) => {
    const custodian_id = who === null ? null : book.person(who).person_id;
    book.ids.set(
      name,
      await book.opened(
        await book.record('07:05', 'proprietor', 'open-place', { kind, name, custodian_id }),
        'account_id',
      ),
    );
  };
  for (const bench of BENCHES) await open('bench', bench.place, bench.key);
  await open('station', 'Polishing', 'mei');
  await open('bin', 'Floor and boards', 'keeper');
  await open('bin', 'Polishing hood', 'keeper');
  await book.record('07:06', 'proprietor', 'change-custodian', {
    account_id: book.id('Safe'),
    custodian_id: book.person('keeper').person_id,
  });
}

async function openParties(book: Recorder): Promise<void> {
  const enter = async (kind: string, name: string) => {
    const answer = await book.record('07:15', 'proprietor', 'set-party', { kind, name });
    book.ids.set(name, await book.opened(answer, 'party_id'));
  };
  await enter('supplier', 'Quern Fine Metals');
  await enter('supplier', 'Brackwater Semi-finished');
  for (const customer of CUSTOMERS) await enter('customer', customer);
  await enter('refiner', 'Osterlode Refining');
  await enter('courier', 'Pell & Sons, couriers');
  await enter('outworker', 'Ilse Brandt, setter');
  const account = { kind: 'metal_account', name: 'With Osterlode', party_id: book.id('Osterlode Refining') };
  book.ids.set(
    'With Osterlode',
    await book.opened(await book.record('07:20', 'proprietor', 'open-place', account), 'account_id'),
  );
}

function feed(book: Recorder, bin: string, operation: string, percent: string) {
  const rates = {
    gold_percent: percent,
    silver_percent: percent,
    platinum_percent: percent,
    palladium_percent: percent,
  };
  return book.record('07:45', 'proprietor', 'set-setting', {
    what: 'bin_feed',
    bin_id: book.id(bin),
    operation,
    ...rates,
  });
}

function openingLines(book: Recorder) {
  const line = (form: string, alloy: string, description: string, gross_g: string, fine: object) => ({
    place_id: book.id('Safe'),
    form,
    alloy,
    description,
    basis: 'declared',
    origin: 'recycled',
    weighing: { gross_g },
    ...fine,
  });
  return [
    line('sheet', '585 yellow', '585 yellow sheet, 1.0 mm', '184.260', {
      gold_permille: '585',
      silver_permille: '265',
    }),
    line('wire', '950 platinum', '950 platinum wire', '61.400', { platinum_permille: '950' }),
    line('clean_scrap', '750 yellow', '750 yellow scrap', '96.118', {
      gold_permille: '750',
      silver_permille: '125',
    }),
  ];
}
