import { describe, expect, it } from 'vitest';
import { issue } from '../../../shared/events/issue.ts';
import { reversal } from '../../../shared/events/reversal.ts';
import { transfer } from '../../../shared/events/transfer.ts';
import { weighIn } from '../../../shared/events/weigh-in.ts';
import { aWorkshop } from '../../support/workshop.ts';

const weighed = (gross_g: string) => ({ how: 'weighed', weighing: { gross_g } });
const undo = (voucher_id: string, more: object = {}) => ({
  voucher_id,
  reason: 'Typed on the wrong line.',
  ...more,
});

function twoIssues() {
  const workshop = aWorkshop();
  const { book, mara, safe, bench4, supplier } = workshop;
  const grain = { form: 'grain', description: 'grain', basis: 'declared', gold_permille: '999.9' };
  const lines = [{ ...grain, weighing: { gross_g: '100' } }];
  book.run(weighIn, { party_id: supplier, safe_id: safe, lines }, mara);
  const received = book.lastVoucher();
  const lot_id = book.newestLot().id;
  const job = book.job('Ring');
  const give = { from_id: safe, to_id: bench4, lot_id, operation: 'sheet_work' };
  return { ...workshop, received, lot_id, job, give };
}

describe('reversal', () => {
  it('is the exact mirror image of the voucher and restores every holding', () => {
    const { book, mara, bench4, give, job } = twoIssues();
    const before = book.ledger();
    book.run(issue, { ...give, amount: weighed('33.333333'), job_id: job }, mara);
    const draft = book.run(reversal, undo(book.lastVoucher().id), mara);
    expect(draft.second_signature).toContain('second person signs');
    expect(book.ledger()).toEqual(before);
    expect(book.lastVoucher()).toMatchObject({ kind: 'reversal', reverses: book.lastVoucher(1).id });
    expect(book.facts({ place_ids: [bench4] }).job_holdings).toEqual([]);
  });

  it('happens once, and never to a reversal', () => {
    const { book, mara, received } = twoIssues();
    book.run(reversal, undo(received.id), mara);
    expect(book.refusal(reversal, undo(received.id), mara).code).toBe('already_done');
    expect(book.refusal(reversal, undo(book.lastVoucher().id), mara).code).toBe('already_done');
  });

  it('is refused where later vouchers have used the metal, naming them', () => {
    const { book, mara, received, give } = twoIssues();
    book.run(issue, { ...give, amount: weighed('10') }, mara);
    book.run(issue, { ...give, amount: weighed('5') }, mara);
    const refusal = book.refusal(reversal, undo(received.id), mara);
    expect(refusal.code).toBe('used_since');
    expect(refusal.sentence).toBe(
      'Voucher 2 can’t be reversed: vouchers 3 and 4 have used its metal. Reverse those first, or post a correction.',
    );
  });

  it('is free again once those later vouchers are reversed themselves', () => {
    const { book, mara, received, give } = twoIssues();
    book.run(issue, { ...give, amount: weighed('10') }, mara);
    book.run(reversal, undo(book.lastVoucher().id), mara);
    book.run(reversal, undo(received.id), mara);
    expect(book.ledger()).toEqual([]);
  });

  it('looks at what left the place, whoever took it', () => {
    const { book, mara, bench2, bench4, give, lot_id } = twoIssues();
    book.run(issue, { ...give, amount: weighed('10') }, mara);
    const issued = book.lastVoucher().id;
    book.run(transfer, { from_id: bench4, to_id: bench2, lines: [{ lot_id, amount: weighed('1') }] }, mara);
    expect(book.refusal(reversal, undo(issued), mara).sentence).toContain('voucher 4 has used its metal');
  });

  it('carries today’s date, never one before the voucher’s', () => {
    const { book, mara, received } = twoIssues();
    const early = undo(received.id, { business_date: '2026-05-13' });
    expect(book.refusal(reversal, early, mara).field).toBe('business_date');
    book.today = '2026-05-20';
    book.run(reversal, undo(received.id), mara);
    expect(book.lastVoucher().business_date).toBe('2026-05-20');
  });
});
