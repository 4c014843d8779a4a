import { describe, expect, it } from 'vitest';
import { acknowledge } from '../../../shared/events/acknowledge.ts';
import { disputeHandover } from '../../../shared/events/dispute-handover.ts';
import { issue } from '../../../shared/events/issue.ts';
import { reversal } from '../../../shared/events/reversal.ts';
import { settleDispute } from '../../../shared/events/settle-dispute.ts';
import { aWorkshop } from '../../support/workshop.ts';

function twentyGramsIssued() {
  const workshop = aWorkshop();
  const { book, mara, safe, bench4 } = workshop;
  const sheet = book.put(safe, '750 sheet', '100.000', { gold: '750' });
  const job = book.job('Signet ring');
  const amount = { how: 'weighed', weighing: { gross_g: '20' } };
  book.run(
    issue,
    { from_id: safe, to_id: bench4, lot_id: sheet, amount, operation: 'sheet_work', job_id: job },
    mara,
  );
  return { ...workshop, sheet, job, voucher_id: book.lastVoucher().id };
}

describe('acknowledging a handover', () => {
  it('is done by the receiver in the own session', () => {
    const { book, yusuf, voucher_id } = twentyGramsIssued();
    const { records } = book.run(acknowledge, { voucher_id, how: 'session' }, yusuf);
    expect(records).toMatchObject([
      { kind: 'handover_acknowledged', detail: { voucher_id, person_id: yusuf.person_id, how: 'session' } },
    ]);
    expect(book.state.handovers.map((handover) => handover.state)).toEqual(['acknowledged']);
  });

  it('is entered at the counter with the receiver’s PIN, which stands in no record', () => {
    const { book, mara, yusuf, voucher_id } = twentyGramsIssued();
    const { records } = book.run(acknowledge, { voucher_id, how: 'pin', pin: '4711' }, mara);
    expect(records).toMatchObject([{ detail: { person_id: yusuf.person_id, how: 'pin' } }]);
    expect(JSON.stringify(records[0]?.detail)).not.toContain('4711');
  });

  it('is nobody else’s business: not the giver’s, not another goldsmith’s', () => {
    const { book, mara, corin, voucher_id } = twentyGramsIssued();
    expect(book.refusal(acknowledge, { voucher_id, how: 'session' }, mara).code).toBe('not_receiver');
    expect(book.refusal(acknowledge, { voucher_id, how: 'pin' }, mara).code).toBe('not_receiver');
    expect(book.refusal(acknowledge, { voucher_id, how: 'pin', pin: '4711' }, corin).code).toBe(
      'not_receiver',
    );
  });

  it('is done once, and not for a voucher that was reversed', () => {
    const { book, mara, yusuf, voucher_id } = twentyGramsIssued();
    book.run(acknowledge, { voucher_id, how: 'session' }, yusuf);
    expect(book.refusal(acknowledge, { voucher_id, how: 'session' }, yusuf).code).toBe('already_done');
    const other = twentyGramsIssued();
    other.book.run(reversal, { voucher_id: other.voucher_id, reason: 'wrong bench' }, mara);
    const late = { voucher_id: other.voucher_id, how: 'session' };
    expect(other.book.refusal(acknowledge, late, other.yusuf).code).toBe('already_done');
  });
});

describe('a disputed handover', () => {
  const saying = (voucher_id: string, gross_g: string) => ({
    voucher_id,
    how: 'session',
    weighing: { gross_g },
  });

  it('keeps the weight that the receiver found and moves nothing', () => {
    const { book, yusuf, voucher_id } = twentyGramsIssued();
    const before = book.ledger();
    const { records } = book.run(disputeHandover, saying(voucher_id, '19.870'), yusuf);
    expect(records).toMatchObject([
      { kind: 'handover_disputed', detail: { gross_g: '19.870000', booked_gross_g: '20.000000' } },
    ]);
    expect(book.ledger()).toEqual(before);
    expect(book.refusal(acknowledge, { voucher_id, how: 'session' }, yusuf).code).toBe('already_done');
  });

  it('is no dispute where the same weight is there', () => {
    const { book, yusuf, voucher_id } = twentyGramsIssued();
    expect(book.refusal(disputeHandover, saying(voucher_id, '20.000'), yusuf).code).toBe('invalid');
  });

  it('is settled by a second weighing: the issue is mended, the rest is back at the safe, and it is acknowledged', () => {
    const { book, mara, yusuf, sheet, job, bench4, voucher_id } = twentyGramsIssued();
    book.run(disputeHandover, saying(voucher_id, '19.870'), yusuf);
    const lines = [{ lot_id: sheet, weighing: { gross_g: '19.880' } }];
    const draft = book.run(settleDispute, { voucher_id, how: 'pin', pin: '4711', lines }, mara);
    expect(draft.second_signature).toBeNull();
    expect(draft.records.map((record) => record.kind)).toEqual(['correction', 'handover_acknowledged']);
    expect(book.lastVoucher().detail).toMatchObject({ corrects: voucher_id, job_id: job });
    expect(book.ledger('places')).toEqual([
      'Safe | 750 sheet | 80.120 g | gold 60.090',
      'Bench 4 | 750 sheet | 19.880 g | gold 14.910',
    ]);
    expect(draft.records[1]?.detail['gross_g']).toBe('19.880000');
    const rows = book.facts({ place_ids: [bench4] }).job_holdings;
    expect(rows.map((row) => [row.job_id, row.mass.gross])).toEqual([[job, 19_880_000n]]);
  });

  it('is settled for more than was booked too, out of the safe', () => {
    const { book, mara, yusuf, sheet, voucher_id } = twentyGramsIssued();
    book.run(disputeHandover, saying(voucher_id, '20.100'), yusuf);
    const lines = [{ lot_id: sheet, weighing: { gross_g: '20.100' } }];
    book.run(settleDispute, { voucher_id, how: 'pin', pin: '4711', lines }, mara);
    expect(book.ledger('places')[1]).toBe('Bench 4 | 750 sheet | 20.100 g | gold 15.075');
  });

  it('is settled without a correction where the book was right', () => {
    const { book, mara, yusuf, sheet, voucher_id } = twentyGramsIssued();
    book.run(disputeHandover, saying(voucher_id, '19.870'), yusuf);
    const lines = [{ lot_id: sheet, weighing: { gross_g: '20' } }];
    const { records } = book.run(settleDispute, { voucher_id, how: 'pin', pin: '4711', lines }, mara);
    expect(records.map((record) => record.kind)).toEqual(['handover_acknowledged']);
  });

  it('can’t be settled before anybody disputes', () => {
    const { book, mara, sheet, voucher_id } = twentyGramsIssued();
    const lines = [{ lot_id: sheet, weighing: { gross_g: '20' } }];
    const body = { voucher_id, how: 'pin', pin: '4711', lines };
    expect(book.refusal(settleDispute, body, mara).sentence).toContain('Yusuf Arden has not answered');
  });
});
