import { describe, expect, it } from 'vitest';
import { correction } from '../../../shared/events/correction.ts';
import { issue } from '../../../shared/events/issue.ts';
import { reversal } from '../../../shared/events/reversal.ts';
import { weighIn } from '../../../shared/events/weigh-in.ts';
import { aWorkshop } from '../../support/workshop.ts';

function typedFiveHundred() {
  const workshop = aWorkshop();
  const { book, mara, safe, supplier } = workshop;
  const grain = { form: 'grain', description: 'grain', basis: 'declared', gold_permille: '999.9' };
  const lines = [{ ...grain, weighing: { gross_g: '500' } }];
  book.run(weighIn, { party_id: supplier, safe_id: safe, lines }, mara);
  const voucher_id = book.lastVoucher().id;
  const body = (lines: readonly object[], more: object = {}) => ({
    voucher_id,
    reason: 'Typed 500 for 400.',
    lines,
    ...more,
  });
  return { ...workshop, lot_id: book.newestLot().id, voucher_id, body };
}

describe('correction', () => {
  it('posts the difference only: typed 500 for 400 is 100 g from the safe back to the supplier', () => {
    const { book, mara, voucher_id, body } = typedFiveHundred();
    const draft = book.run(correction, body([{ line: '2', gross_g: '400' }], { rest_line: '1' }), mara);
    expect(draft.second_signature).toContain('second person signs');
    expect(book.voucherLines(book.lastVoucher())).toEqual([
      'Safe | grain | -100.000 g | gold -99.990',
      'Aurel Metals | grain | 100.000 g | gold 99.990',
    ]);
    expect(book.lastVoucher().detail).toMatchObject({ corrects: voucher_id, corrected_kind: 'weigh_in' });
  });

  it('takes both right masses where no line takes the rest, and refuses them where they do not add up', () => {
    const { book, mara, body } = typedFiveHundred();
    const off = body([
      { line: '1', gross_g: '-410' },
      { line: '2', gross_g: '400' },
    ]);
    expect(book.refusal(correction, off, mara).code).toBe('not_balanced');
    const right = body([
      { line: '1', gross_g: '-400' },
      { line: '2', gross_g: '400' },
    ]);
    book.run(correction, right, mara);
    expect(book.ledger('places')).toEqual(['Safe | grain | 400.000 g | gold 399.960']);
  });

  it('mends fine metal alone', () => {
    const { book, mara, body } = typedFiveHundred();
    const line = { line: '2', gross_g: '500', gold_g: '499.5' };
    book.run(correction, body([line], { rest_line: '1' }), mara);
    expect(book.voucherLines(book.lastVoucher())).toEqual([
      'Safe | grain | 0.000 g | gold -0.450',
      'Aurel Metals | grain | 0.000 g | gold 0.450',
    ]);
    const impossible = body([{ line: '2', gross_g: '500', gold_g: '500.1' }], { rest_line: '1' });
    expect(book.refusal(correction, impossible, mara).code).toBe('impossible_fineness');
  });

  it('starts from what earlier corrections have left, so that the same mistake is not mended twice', () => {
    const { book, mara, body } = typedFiveHundred();
    const once = body([{ line: '2', gross_g: '400' }], { rest_line: '1' });
    book.run(correction, once, mara);
    expect(book.refusal(correction, once, mara).code).toBe('nothing_to_post');
    book.run(correction, body([{ line: '2', gross_g: '410' }], { rest_line: '1' }), mara);
    expect(book.ledger('places')).toEqual(['Safe | grain | 410.000 g | gold 409.959']);
  });

  it('is refused where the metal has gone on since, saying what is left', () => {
    const { book, mara, safe, bench4, lot_id, body } = typedFiveHundred();
    const amount = { how: 'weighed', weighing: { gross_g: '450' } };
    book.run(issue, { from_id: safe, to_id: bench4, lot_id, amount, operation: 'sheet_work' }, mara);
    const refusal = book.refusal(correction, body([{ line: '2', gross_g: '400' }], { rest_line: '1' }), mara);
    expect(refusal.code).toBe('not_enough');
    expect(refusal.sentence).toContain('Safe holds 50.000 g');
  });

  it('never moves metal from one owner to another', () => {
    const { book, mara, safe, customer, body } = typedFiveHundred();
    const grain = { form: 'old_gold', basis: 'declared', gold_permille: '500', weighing: { gross_g: '10' } };
    const lines = [
      { ...grain, description: 'bought' },
      { ...grain, description: 'hers', owner_id: customer },
    ];
    book.run(weighIn, { party_id: customer, safe_id: safe, lines }, mara);
    const mixed = {
      ...body([{ line: '2', gross_g: '11' }], { rest_line: '4' }),
      voucher_id: book.lastVoucher().id,
    };
    expect(book.refusal(correction, mixed, mara).code).toBe('wrong_owner');
  });

  it('mends no voucher that was reversed, no reversal, no line twice and none that is not there', () => {
    const { book, mara, voucher_id, body } = typedFiveHundred();
    const line = { line: '2', gross_g: '400' };
    expect(book.refusal(correction, body([line, line]), mara).code).toBe('invalid');
    expect(book.refusal(correction, body([{ ...line, line: '3' }]), mara).code).toBe('not_found');
    expect(book.refusal(correction, body([line], { rest_line: '9' }), mara).code).toBe('not_found');
    book.run(reversal, { voucher_id, reason: 'all wrong' }, mara);
    expect(book.refusal(correction, body([line]), mara).code).toBe('already_done');
    const ofReversal = { ...body([line]), voucher_id: book.lastVoucher().id };
    expect(book.refusal(correction, ofReversal, mara).code).toBe('invalid');
  });
});
