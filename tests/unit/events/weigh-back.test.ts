/** The weigh-back: DESIGN's example to the microgram, owners, kept stock, more back than out, loss over allowance. */
import { describe, expect, it } from 'vitest';
import { Decimal } from '../../../shared/decimal.ts';
import { weighBack } from '../../../shared/events/weigh-back/weigh-back.ts';
import { aWorkshop } from '../../support/workshop.ts';

const weighing = (gross_g: string) => ({ gross_g });

function aBench() {
  const workshop = aWorkshop();
  const { book, bench4 } = workshop;
  const job_id = book.job('J-1187');
  const sheet = book.put(bench4, '750 sheet', '20.000', { gold: '750', alloy: '750 yellow', job_id });
  return { ...workshop, job_id, sheet };
}

describe('weigh-back', () => {
  it('shares the content as the agreed example says, to the microgram', () => {
    const { book, bench4, safe, mara, job_id, sheet } = aBench();
    book.put(bench4, '585 solder', '1.000', { form: 'solder', gold: '585', job_id });
    const work = {
      job_id,
      operation: 'sheet_work',
      unused: [{ lot_id: sheet, weighing: weighing('5.000') }],
      scrap: [{ from_lot_id: sheet, weighing: weighing('2.000') }],
      filings: [{ weighing: weighing('0.800') }],
      made: [{ form: 'work', description: 'ring', weighing: weighing('12.900'), pieces: '1' }],
    };
    book.run(weighBack, { place_id: bench4, safe_id: safe, works: [work] }, mara);
    expect(book.voucherLines(book.lastVoucher())).toEqual([
      'Bench 4 | 750 sheet | -20.000 g | gold -15.000',
      'Bench 4 | 585 solder | -1.000 g | gold -0.585',
      'Safe | 750 sheet | 5.000 g | gold 3.750',
      'Bench 4 | ring | 12.900 g | gold 9.522964 | 1 pieces',
      'Safe | 750 yellow scrap | 2.000 g | gold 1.500',
      'Safe | 750 yellow filings, Bench 4 | 0.800 g | gold 0.581713',
      'Loss, sheet work | ring | 0.312 g | gold 0.230323',
      'Foreign matter | 750 yellow filings, Bench 4 | -0.012 g',
    ]);
    expect(book.lastVoucher().detail).toMatchObject({ worked_gold_g: '11.835000' });
  });

  it('reckons two jobs in two metals at one bench each by itself', () => {
    const { book, bench4, safe, mara, job_id } = aBench();
    const other = book.job('J-1190');
    book.put(bench4, '950 platinum wire', '10.000', {
      form: 'wire',
      platinum: '950',
      alloy: '950 platinum',
      job_id: other,
    });
    const made = (gross: string, description: string) => [
      { form: 'work', description, weighing: weighing(gross), pieces: '1' },
    ];
    const works = [
      { job_id, operation: 'sheet_work', made: made('19.900', 'gold ring') },
      { job_id: other, operation: 'sheet_work', made: made('9.950', 'platinum ring') },
    ];
    book.run(weighBack, { place_id: bench4, safe_id: safe, works }, mara);
    expect(book.voucherLines(book.lastVoucher(1))).toContain(
      'Loss, sheet work | gold ring | 0.100 g | gold 0.075',
    );
    expect(book.voucherLines(book.lastVoucher())).toContain(
      'Loss, sheet work | platinum ring | 0.050 g | platinum 0.0475',
    );
  });

  it('lets house solder kept for several jobs change owner before it goes into a customer’s piece', () => {
    const { book, bench4, safe, mara, customer } = aBench();
    const job_id = book.job('J-1201', customer);
    book.put(bench4, 'own gold', '8.000', { gold: '750', owner_id: customer, job_id });
    const solder = book.put(bench4, '750 solder', '3.000', { form: 'solder', gold: '750' });
    const work = {
      job_id,
      operation: 'soldering',
      kept: [{ lot_id: solder, weighing: weighing('2.800') }],
      made: [{ form: 'work', description: 'repaired ring', weighing: weighing('8.190'), pieces: '1' }],
    };
    book.run(weighBack, { place_id: bench4, safe_id: safe, works: [work] }, mara);
    expect(book.voucherLines(book.lastVoucher(1))).toEqual([
      'Bench 4 | 750 solder | -0.200 g | gold -0.150',
      'Bench 4 | 750 solder | 0.200 g | gold 0.150',
    ]);
    expect(book.newestLot().owner_id).toBe(customer);
    expect(book.held(bench4, solder).gross).toBe(2_800_000n);
    expect(
      book.facts({ place_ids: [bench4] }).job_holdings.find((row) => row.lot_id === solder)?.mass.gross,
    ).toBe(2_800_000n);
  });

  it('refuses more back than out, and with a reason asks for a second signature', () => {
    const { book, bench4, safe, mara, job_id } = aBench();
    const work = {
      job_id,
      operation: 'sheet_work',
      made: [{ form: 'work', description: 'ring', weighing: weighing('20.500'), pieces: '1' }],
    };
    const body = { place_id: bench4, safe_id: safe, works: [work] };
    expect(book.refusal(weighBack, body, mara).sentence).toBe(
      'Bench 4 holds 20.000 g for this job. More can’t come back than went out. Weigh again, or give a reason and a second signature.',
    );
    const signed = book.draft(
      weighBack,
      { ...body, works: [{ ...work, reason: 'solder of the next job was on it' }] },
      mara,
    );
    expect(signed.second_signature).toContain('a second person signs');
  });

  it('posts a loss over the allowance as it is, to be explained', () => {
    const { book, bench4, safe, mara, job_id } = aBench();
    book.state.allowances.push({
      operation: 'sheet_work',
      alloy: null,
      percent: new Decimal('0.6'),
      fixed_ug: 50_000n,
      from: '2026-02-01',
    });
    const work = (gross: string) => ({
      job_id,
      operation: 'sheet_work',
      made: [{ form: 'work', description: 'ring', weighing: weighing(gross), pieces: '1' }],
    });
    const draft = (gross: string) =>
      book.draft(weighBack, { place_id: bench4, safe_id: safe, works: [work(gross)] }, mara).records.at(-1)
        ?.detail;
    expect(draft('19.500')).toMatchObject({
      finding: 'over_allowance',
      to_explain: 'yes',
      allowance_g: '0.140000',
    });
    expect(draft('19.900')).toMatchObject({ finding: 'within_allowance', to_explain: null });
  });

  it('counts work that stays at the same job and operation as worked once', () => {
    const { book, bench4, safe, mara, job_id } = aBench();
    const day = (gross: string) => ({
      place_id: bench4,
      safe_id: safe,
      works: [
        {
          job_id,
          operation: 'sheet_work',
          made: [{ form: 'work', description: 'ring', weighing: weighing(gross), pieces: '1' }],
        },
      ],
    });
    book.run(weighBack, day('19.900'), mara);
    expect(book.lastVoucher().detail).toMatchObject({ worked_gold_g: '15.000000' });
    book.run(weighBack, day('19.800'), mara);
    expect(book.lastVoucher().detail).toMatchObject({ worked_gold_g: '0.000000' });
  });

  it('takes back unused metal that weighs a trifle more, inside the limit of error', () => {
    const { book, bench4, safe, mara, job_id, sheet } = aBench();
    // Two uncertainties of one weighing are 2 mg.
    const work = (gross: string, reason: string | null = null) => ({
      job_id,
      operation: 'sheet_work',
      reason,
      unused: [{ lot_id: sheet, weighing: weighing(gross) }],
    });
    const body = (...works: object[]) => ({ place_id: bench4, safe_id: safe, works });
    expect(book.refusal(weighBack, body(work('20.003')), mara)).toMatchObject({ code: 'more_back' });
    const signed = book.draft(weighBack, body(work('20.003', 'tare was taken twice')), mara);
    expect(signed.second_signature).toContain('a second person signs');
    const draft = book.run(weighBack, body(work('20.002')), mara);
    expect(draft.second_signature).toBeNull();
    expect(book.voucherLines(book.lastVoucher())).toEqual([
      'Bench 4 | 750 sheet | -20.000 g | gold -15.000',
      'Safe | 750 sheet | 20.002 g | gold 15.0015',
      'Loss, sheet work | 750 sheet | -0.002 g | gold -0.0015',
    ]);
    expect(book.lastVoucher().detail).toMatchObject({
      worked_gold_g: '0.000000',
      finding: 'within_weighing_error',
    });
  });

  it('names the work after what went into it, not after what came back whole', () => {
    const { book, bench4, safe, mara, job_id, sheet } = aBench();
    const wire = book.put(bench4, '585 wire', '5.000', {
      form: 'wire',
      gold: '585',
      alloy: '585 red',
      job_id,
    });
    const work = {
      job_id,
      operation: 'sheet_work',
      unused: [{ lot_id: sheet, weighing: weighing('20.000') }],
      filings: [{ weighing: weighing('5.000') }],
    };
    book.run(weighBack, { place_id: bench4, safe_id: safe, works: [work] }, mara);
    expect(book.newestLot()).toMatchObject({ form: 'filings', alloy: '585 red' });
    // 985 of 1000 parts of 5.000 g are metal of the wire; the rest of the wire is loss, in the wire's name.
    expect(book.voucherLines(book.lastVoucher())).toContain(
      'Loss, sheet work | 585 wire | 0.075 g | gold 0.043875',
    );
    expect(book.held(bench4, wire).gross).toBe(0n);
  });

  it('keeps a customer’s loss in the customer’s name where house metal came back whole', () => {
    const { book, bench4, safe, mara, customer } = aBench();
    const job_id = book.job('J-1202', customer);
    const own = book.put(bench4, 'own gold', '4.000', {
      gold: '750',
      alloy: '750 yellow',
      owner_id: customer,
      job_id,
    });
    const house = book.put(bench4, '750 strip', '9.000', { gold: '750', alloy: '750 yellow', job_id });
    const work = {
      job_id,
      operation: 'sheet_work',
      unused: [{ lot_id: house, weighing: weighing('9.000') }],
      scrap: [{ from_lot_id: own, weighing: weighing('3.900') }],
    };
    book.run(weighBack, { place_id: bench4, safe_id: safe, works: [work] }, mara);
    expect(book.lastVoucher().entries.at(-1)).toMatchObject({ lot_id: own, mass: { gross: 100_000n } });
    expect(book.newestLot().owner_id).toBe(customer);
  });

  it('takes what an outworker keeps by custom as loss of his operation, under its own allowance', () => {
    const { book, safe, setter, setterParty, mara } = aWorkshop();
    const job_id = book.job('J-1203');
    book.put(setter, '750 ring', '12.000', { form: 'work', gold: '750', pieces: 1n, job_id });
    book.state.allowances.push({
      operation: 'setting',
      alloy: null,
      percent: new Decimal(1),
      fixed_ug: 0n,
      from: '2026-01-01',
    });
    const made = [
      {
        form: 'work',
        description: 'set ring',
        weighing: { gross_g: '12.270', stones_ct: '1.85' },
        pieces: '1',
        to_id: safe,
      },
    ];
    book.run(
      weighBack,
      { place_id: setter, safe_id: safe, works: [{ job_id, operation: 'setting', made }] },
      mara,
    );
    // 12.270 less 1.85 ct × 0.2 g = 11.900; 1 % of 9.000 gold worked may be lost.
    expect(book.voucherLines(book.lastVoucher())).toContain(
      'Loss, setting | set ring | 0.100 g | gold 0.075',
    );
    expect(book.lastVoucher().detail).toMatchObject({
      counterparty_id: setterParty,
      allowance_g: '0.090000',
      finding: 'within_allowance',
    });
  });

  it('records what stays for the night without any entry', () => {
    const { book, bench4, safe, mara } = aBench();
    const overnight = [
      { how: 'weighed', description: 'signet ring', weighing: weighing('12.900'), pieces: '1' },
      { how: 'sealed_box', description: 'box 12, seal 0412', pieces: '3' },
    ];
    const before = book.ledger();
    const draft = book.run(weighBack, { place_id: bench4, safe_id: safe, overnight }, mara);
    expect(book.ledger()).toEqual(before);
    expect(draft.records).toMatchObject([
      {
        kind: 'count_taken',
        detail: {
          what: 'overnight',
          account_id: bench4,
          lines: [
            { line: '1', how: 'weighed', net_g: '12.900000', pieces: '1' },
            { line: '2', how: 'sealed_box', net_g: null, pieces: '3' },
          ],
        },
      },
    ]);
    expect(weighBack.schema.safeParse({ place_id: bench4, safe_id: safe }).success).toBe(false);
  });
});
