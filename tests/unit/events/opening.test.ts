import { describe, expect, it } from 'vitest';
import { opening } from '../../../shared/events/opening.ts';
import { aWorkshop } from '../../support/workshop.ts';

const sheet = {
  form: 'sheet',
  description: '750 yellow sheet',
  basis: 'declared',
  gold_permille: '750',
  silver_permille: '125',
  weighing: { gross_g: '100.000' },
};

describe('opening', () => {
  it('brings what was counted out of opening stock into each place', () => {
    const { book, mara, safe, bench2 } = aWorkshop();
    const wire = {
      ...sheet,
      form: 'wire',
      description: '585 wire',
      gold_permille: '585',
      silver_permille: '0',
    };
    const lines = [
      { ...sheet, place_id: safe },
      { ...wire, place_id: bench2, weighing: { gross_g: '12.500', tare_g: '2.500', tare_kind: 'measured' } },
    ];
    book.run(opening, { lines }, mara);
    expect(book.ledger()).toEqual([
      'Safe | 750 yellow sheet | 100.000 g | gold 75.000 | silver 12.500',
      'Bench 2 | 585 wire | 10.000 g | gold 5.850',
      'Opening stock | 750 yellow sheet | -100.000 g | gold -75.000 | silver -12.500',
      'Opening stock | 585 wire | -10.000 g | gold -5.850',
    ]);
  });

  it('takes dust that lay in a bin before the book began, its content only estimated', () => {
    const { book, mara, sweepsBin } = aWorkshop();
    const dust = { form: 'sweeps', description: 'old sweeps', basis: 'estimated', gold_permille: '12.5' };
    book.run(opening, { lines: [{ ...dust, place_id: sweepsBin, weighing: { gross_g: '800' } }] }, mara);
    expect(book.ledger('places')).toEqual(['Sweeps bin | old sweeps | 800.000 g | gold 10.000']);
    expect(book.newestLot().code.startsWith('W')).toBe(true);
  });

  it('books nothing but gross where nobody knows the fineness', () => {
    const { book, mara, safe } = aWorkshop();
    const found = { form: 'old_gold', description: 'found in a drawer', basis: 'unknown' };
    book.run(opening, { lines: [{ ...found, place_id: safe, weighing: { gross_g: '7.250' } }] }, mara);
    expect(book.ledger('places')).toEqual(['Safe | found in a drawer | 7.250 g']);
  });

  it('keeps a customer’s metal in a lot of that owner', () => {
    const { book, mara, safe, customer } = aWorkshop();
    book.run(opening, { lines: [{ ...sheet, place_id: safe, owner_id: customer }] }, mara);
    expect(book.newestLot().owner_id).toBe(customer);
  });

  it('refuses a fineness beyond 1000, and one given though it is unknown', () => {
    const { book, mara, safe } = aWorkshop();
    const over = { ...sheet, place_id: safe, silver_permille: '300' };
    const unknown = { ...sheet, place_id: safe, basis: 'unknown' };
    const refusals = book.refusals(opening, { lines: [over, unknown] }, mara);
    expect(refusals.map(({ code, field }) => [code, field])).toEqual([
      ['impossible_fineness', 'lines.0.gold_permille'],
      ['impossible_fineness', 'lines.1.gold_permille'],
    ]);
  });

  it('wants pieces for metal that is counted, and none for other metal', () => {
    const { book, mara, safe } = aWorkshop();
    const findings = { ...sheet, form: 'findings', place_id: safe };
    const refusals = book.refusals(
      opening,
      { lines: [findings, { ...sheet, place_id: safe, pieces: '3' }] },
      mara,
    );
    expect(refusals.map(({ code, field }) => [code, field])).toEqual([
      ['pieces_needed', 'lines.0.pieces'],
      ['pieces_needed', 'lines.1.pieces'],
    ]);
    book.run(opening, { lines: [{ ...findings, pieces: '40' }] }, mara);
    expect(book.ledger('places')).toEqual([
      'Safe | 750 yellow sheet | 100.000 g | gold 75.000 | silver 12.500 | 40 pieces',
    ]);
  });

  it('refuses a closed place, an account that is no place, and an owner who is not a party', () => {
    const { book, mara, safe, bench2 } = aWorkshop();
    book.change(bench2, { closed: true });
    const lines = [
      { ...sheet, place_id: bench2 },
      { ...sheet, place_id: book.find('sold') },
      { ...sheet, place_id: safe, owner_id: '00000000-0000-4000-8000-999999999999' },
    ];
    const refusals = book.refusals(opening, { lines }, mara);
    expect(refusals.map(({ code, field }) => [code, field])).toEqual([
      ['place_closed', 'lines.0.place_id'],
      ['not_found', 'lines.1.place_id'],
      ['not_found', 'lines.2.owner_id'],
    ]);
  });

  it('refuses a date ahead and a day of a closed period', () => {
    const { book, mara, safe } = aWorkshop();
    book.closeThrough('2026-04-30');
    const lines = [{ ...sheet, place_id: safe }];
    expect(book.refusal(opening, { lines, business_date: '2026-05-15' }, mara).code).toBe('date_ahead');
    expect(book.refusal(opening, { lines, business_date: '2026-04-30' }, mara).code).toBe('closed_period');
    book.run(opening, { lines, business_date: '2026-05-01' }, mara);
    expect(book.lastVoucher().business_date).toBe('2026-05-01');
  });
});
