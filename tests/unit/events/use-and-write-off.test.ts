import { describe, expect, it } from 'vitest';
import { hold } from '../../../shared/events/hold.ts';
import { issue } from '../../../shared/events/issue.ts';
import { useUp } from '../../../shared/events/use-up.ts';
import { writeOff } from '../../../shared/events/write-off.ts';
import { massVector } from '../../../shared/mass/vector.ts';
import { aWorkshop } from '../../support/workshop.ts';

const stated = (gross_g: string) => ({ how: 'stated', gross_g });

describe('use', () => {
  it('books an assay sample as used up, a lot on hold included', () => {
    const { book, mara, safe } = aWorkshop();
    const bar = book.put(safe, '750 bar', '100', { form: 'bar', gold: '750' });
    book.run(hold, { lot_id: bar, reason: 'its assay is not in' }, mara);
    const sample = {
      place_id: safe,
      lot_id: bar,
      amount: { how: 'weighed', weighing: { gross_g: '0.250' } },
    };
    book.run(useUp, { ...sample, what_for: 'assay_sample', reference: 'A-118' }, mara);
    expect(book.ledger()).toContain('Used up | 750 bar | 0.250 g | gold 0.1875');
    const plating = { ...sample, what_for: 'plating', reference: 'bath 2' };
    expect(book.refusal(useUp, plating, mara).code).toBe('lot_on_hold');
  });

  it('books plating that nobody can weigh as stated, and wants to know what it was for', () => {
    const { book, mara, casting } = aWorkshop();
    const bath = book.put(casting, 'rhodium bath', '5', { form: 'other_precious' });
    const plating = { place_id: casting, lot_id: bath, amount: stated('0.040'), what_for: 'plating' };
    expect(book.refusal(useUp, plating, mara).field).toBe('reference');
    book.run(useUp, { ...plating, reference: '14 rings' }, mara);
    expect(book.ledger('places')).toEqual(['Casting | rhodium bath | 4.960 g']);
    expect(book.lastVoucher().detail['weighed']).toBeNull();
  });
});

describe('write-off', () => {
  function stolen() {
    const workshop = aWorkshop();
    const { book, safe } = workshop;
    const sheet = book.put(safe, '750 sheet', '100', { gold: '750' });
    const body = {
      way: 'from_place',
      place_id: safe,
      cause: 'theft',
      number: 'VJ/4711/26',
      reason: 'The safe was found open on Monday morning.',
      lines: [{ lot_id: sheet, amount: stated('40') }],
    };
    return { ...workshop, sheet, body };
  }

  it('takes what is gone out of the place, under two signatures and a number', () => {
    const { book, mara, body } = stolen();
    expect(book.refusal(writeOff, { ...body, number: null }, mara).field).toBe('number');
    const draft = book.run(writeOff, body, mara);
    expect(draft.second_signature).not.toBeNull();
    expect(book.ledger()).toContain('Safe | 750 sheet | 60.000 g | gold 45.000');
    expect(book.ledger()).toContain('Written off | 750 sheet | 40.000 g | gold 30.000');
  });

  it('brings metal that is found again back from there, and no more than was written off', () => {
    const { book, mara, sheet, body } = stolen();
    const before = book.ledger();
    book.run(writeOff, body, mara);
    const found = { ...body, way: 'found_again', number: null };
    const more = { ...found, lines: [{ lot_id: sheet, amount: stated('40.001') }] };
    expect(book.refusal(writeOff, more, mara).code).toBe('not_enough');
    book.run(writeOff, found, mara);
    expect(book.ledger()).toEqual(before);
  });

  it('takes over a shortage of a count variance whose cause is found later, naming its voucher', () => {
    const { book, mara, safe, bench4, sheet, body } = stolen();
    const amount = { how: 'weighed', weighing: { gross_g: '99' }, emptied: true };
    book.run(issue, { from_id: safe, to_id: bench4, lot_id: sheet, amount, operation: 'sheet_work' }, mara);
    const variance = book.lastVoucher().id;
    const lines = [{ lot_id: sheet, amount: stated('1') }];
    const found = { ...body, way: 'from_variance', place_id: null, lines };
    expect(book.refusal(writeOff, found, mara).field).toBe('variance_voucher_id');
    const tooMuch = {
      ...found,
      variance_voucher_id: variance,
      lines: [{ lot_id: sheet, amount: stated('1.5') }],
    };
    expect(book.refusal(writeOff, tooMuch, mara).code).toBe('not_enough');
    book.run(writeOff, { ...found, variance_voucher_id: variance }, mara);
    expect(book.ledger()).toContain('Written off | 750 sheet | 1.000 g | gold 0.750');
    expect(book.ledger().some((line) => line.startsWith('Count variance'))).toBe(false);
  });

  it('gives up an operation’s loss that the sweeps did not bring back, and nothing stolen from there', () => {
    const { book, mara, bench4, sheet, body } = stolen();
    const filing = book.find('working_loss', 'filing');
    book.post(sheet, massVector({ gross: 2_000_000n, gold: 1_500_000n }), { to: filing });
    const lines = [{ lot_id: sheet, amount: stated('0.5') }];
    const loss = { ...body, way: 'from_loss', place_id: bench4, operation: 'filing', number: null, lines };
    expect(book.refusal(writeOff, loss, mara).field).toBe('cause');
    const given = { ...loss, cause: 'not_recovered' };
    expect(book.refusal(writeOff, { ...given, operation: null }, mara).field).toBe('operation');
    book.run(writeOff, given, mara);
    expect(book.ledger()).toContain('Loss, filing | 750 sheet | 1.500 g | gold 1.125');
    expect(book.ledger()).toContain('Written off | 750 sheet | 0.500 g | gold 0.375');
  });

  it('refuses a voucher that booked no shortage of the lot', () => {
    const { book, mara, body } = stolen();
    const other = {
      ...body,
      way: 'from_variance',
      place_id: null,
      variance_voucher_id: book.lastVoucher().id,
    };
    expect(book.refusal(writeOff, other, mara).sentence).toContain('booked no shortage');
  });
});
