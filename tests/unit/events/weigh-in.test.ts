import { describe, expect, it } from 'vitest';
import { Decimal } from '../../../shared/decimal.ts';
import { fineness } from '../../../shared/alloy/fineness.ts';
import { invoiceDifference } from '../../../shared/events/invoice-difference.ts';
import { weighIn } from '../../../shared/events/weigh-in.ts';
import { aWorkshop } from '../../support/workshop.ts';

const grain = {
  form: 'grain',
  description: 'fine gold grain',
  basis: 'certificate',
  origin: 'recycled',
  gold_permille: '999.9',
  invoice_gross_g: '100.000',
  weighing: { gross_g: '112.340', tare_g: '12.340', tare_kind: 'measured' },
};

describe('weigh-in', () => {
  it('enters at the weighed mass, out of the supplier’s account', () => {
    const { book, mara, safe, supplier } = aWorkshop();
    book.run(weighIn, { party_id: supplier, safe_id: safe, delivery_note: 'L-4711', lines: [grain] }, mara);
    expect(book.ledger()).toEqual([
      'Safe | fine gold grain | 100.000 g | gold 99.990',
      'Aurel Metals | fine gold grain | -100.000 g | gold -99.990',
    ]);
    expect(book.lastVoucher().detail).toMatchObject({ counterparty_id: supplier, delivery_note: 'L-4711' });
    expect(book.newestLot().standing).toBe('released');
  });

  it('asks for a decision where the invoice is off by more than the tolerance', () => {
    const { book, mara, safe, supplier } = aWorkshop();
    const short = { ...grain, invoice_gross_g: '100.006' };
    const body = (line: object) => ({ party_id: supplier, safe_id: safe, lines: [line] });
    const refusal = book.refusal(weighIn, body(short), mara);
    expect(refusal.code).toBe('decision_needed');
    expect(refusal.field).toBe('lines.0.decision');
    expect(refusal.sentence).toContain('The balance shows 100.000 g, the invoice 100.006 g.');
    book.run(weighIn, body({ ...short, decision: 'accept' }), mara);
    expect(book.newestLot().standing).toBe('released');
    book.run(weighIn, body({ ...grain, invoice_gross_g: '100.005' }), mara);
  });

  it('keeps the difference to the invoice in the record', () => {
    const { book, mara, safe, supplier } = aWorkshop();
    const short = { ...grain, invoice_gross_g: '101.000', decision: 'accept' };
    book.run(weighIn, { party_id: supplier, safe_id: safe, lines: [short] }, mara);
    expect(book.lastVoucher().detail['lines']).toEqual([
      {
        line: '1',
        lot_id: book.newestLot().id,
        weighed_g: '100.000000',
        invoice_g: '101.000000',
        difference_g: '-1.000000',
        fine_difference_g: '-0.999900',
        decision: 'accept',
      },
    ]);
  });

  it('sets a lot under a claim on hold, and says how much is claimed', () => {
    const { book, mara, safe, supplier } = aWorkshop();
    const short = { ...grain, invoice_gross_g: '101.000', decision: 'claim' };
    book.run(weighIn, { party_id: supplier, safe_id: safe, lines: [short] }, mara);
    const { standing, hold_reason } = book.newestLot();
    expect([standing, hold_reason]).toEqual([
      'on_hold',
      'there is a claim on Aurel Metals, 1.000 g short of the invoice',
    ]);
  });

  it('enters nothing of a line that is sent back, and refuses where nothing is left', () => {
    const { book, mara, safe, supplier } = aWorkshop();
    const back = { ...grain, invoice_gross_g: '120', decision: 'send_back' };
    const wire = { ...grain, form: 'wire', description: 'gold wire', invoice_gross_g: null };
    book.run(weighIn, { party_id: supplier, safe_id: safe, lines: [back, wire] }, mara);
    expect(book.ledger('places')).toEqual(['Safe | gold wire | 100.000 g | gold 99.990']);
    const refusal = book.refusal(weighIn, { party_id: supplier, safe_id: safe, lines: [back] }, mara);
    expect(refusal.code).toBe('nothing_to_post');
  });

  it('keeps a lot on hold until the checks that its form asks for are in; a certificate handed in is one', () => {
    const { book, mara, safe, supplier } = aWorkshop();
    book.set({ acceptance: [{ form: 'grain', checks: ['certificate', 'melt_check'] }] });
    const certificate = book.document();
    const lines = [grain, { ...grain, certificate_ids: [certificate] }];
    book.run(weighIn, { party_id: supplier, safe_id: safe, lines }, mara);
    expect(book.newestLot(1).hold_reason).toBe(
      'its certificate is not recorded yet; its melt check is not recorded yet',
    );
    expect(book.newestLot().hold_reason).toBe('its melt check is not recorded yet');
    expect(book.lastVoucher().documents.map((file) => file.id)).toEqual([certificate]);
  });

  it('keeps a customer’s own metal the customer’s, in the customer’s account', () => {
    const { book, mara, safe, customer, otherCustomer } = aWorkshop();
    const ring = {
      form: 'old_gold',
      description: 'wedding ring',
      basis: 'unknown',
      weighing: { gross_g: '4.2' },
    };
    const own = { ...ring, owner_id: customer, origin: 'customers_own' };
    book.run(weighIn, { party_id: customer, safe_id: safe, lines: [own] }, mara);
    expect(book.ledger()).toEqual(['Safe | wedding ring | 4.200 g', 'Edda Lorn | wedding ring | -4.200 g']);
    const foreign = { ...ring, owner_id: otherCustomer };
    expect(book.refusal(weighIn, { party_id: customer, safe_id: safe, lines: [foreign] }, mara).code).toBe(
      'wrong_owner',
    );
  });

  it('adds to an open tray of the same alloy, owner, origin and form, and to no other', () => {
    const { book, mara, safe, supplier } = aWorkshop();
    const tray = book.put(safe, 'tray of 750 scrap', '10.000', {
      form: 'clean_scrap',
      alloy: '750 yellow',
      gold: '748',
    });
    const scrap = {
      form: 'clean_scrap',
      alloy: '750 yellow',
      description: 'bought scrap',
      basis: 'declared',
      origin: 'recycled',
      gold_permille: '750',
      weighing: { gross_g: '5' },
      into_lot_id: tray,
    };
    const body = (line: object) => ({ party_id: supplier, safe_id: safe, lines: [line] });
    book.run(weighIn, body(scrap), mara);
    expect(book.ledger('places')).toEqual(['Safe | tray of 750 scrap | 15.000 g | gold 11.230']);
    for (const other of [
      { alloy: '585 yellow' },
      { form: 'filings' },
      { origin: 'mined' },
      { owner_id: supplier },
    ]) {
      expect(book.refusal(weighIn, body({ ...scrap, ...other }), mara).code).toBe('lots_differ');
    }
    const twice = { ...body(scrap), lines: [scrap, scrap] };
    expect(book.refusal(weighIn, twice, mara).code).toBe('lot_twice');
  });

  it('refuses tare over gross, stones that leave no metal, and a bench instead of a safe', () => {
    const { book, mara, safe, bench2, supplier } = aWorkshop();
    const tare = { ...grain, weighing: { gross_g: '12', tare_g: '13', tare_kind: 'measured' } };
    const stones = { ...grain, weighing: { gross_g: '2', stones_ct: '10' } };
    const refusals = book.refusals(
      weighIn,
      { party_id: supplier, safe_id: safe, lines: [tare, stones] },
      mara,
    );
    expect(refusals.map(({ code, field }) => [code, field])).toEqual([
      ['tare_over_gross', 'lines.0.weighing.tare_g'],
      ['stones_over_net', 'lines.1.weighing.stones_ct'],
    ]);
    const atBench = { party_id: supplier, safe_id: bench2, lines: [grain] };
    expect(book.refusal(weighIn, atBench, mara).code).toBe('wrong_place');
  });
});

describe('difference to an invoice', () => {
  const price = (metal: 'gold' | 'silver', per_ozt: string, priced_on: string) => ({
    metal,
    currency: 'EUR',
    price_per_ozt: new Decimal(per_ozt),
    priced_on,
    source: 'typed',
  });
  const settings = { currency: 'EUR', invoice_tolerance_ug: 5_000n };
  const line = { invoice_ug: 31_103_477n, weighed_ug: 0n, fineness: fineness({ gold: '1000' }) };

  it('is told in grams, percent and money at the newest price: one troy ounce of 31.1034768 g short costs its price', () => {
    // 1 ozt = 31.1034768 g exactly: NIST Handbook 44, Appendix C.
    const prices = [price('gold', '3000', '2026-05-01'), price('gold', '3100.50', '2026-05-13')];
    const invoice = { ...line, invoice_ug: 62_206_954n, weighed_ug: 31_103_477n };
    const difference = invoiceDifference(invoice, { prices, settings });
    expect(difference.difference_ug).toBe(-31_103_477n);
    expect(difference.percent.toFixed(4)).toBe('-50.0000');
    expect(difference.money?.toFixed(2)).toBe('-3100.50');
    expect(difference.within).toBe(false);
  });

  it('has no money where a metal in it has no price', () => {
    const alloy = { ...line, weighed_ug: 31_000_000n, fineness: fineness({ gold: '750', silver: '125' }) };
    const prices = [price('gold', '3000', '2026-05-01')];
    expect(invoiceDifference(alloy, { prices, settings }).money).toBeNull();
  });
});
