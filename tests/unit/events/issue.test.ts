import { describe, expect, it } from 'vitest';
import { hold } from '../../../shared/events/hold.ts';
import { issue } from '../../../shared/events/issue.ts';
import { aWorkshop } from '../../support/workshop.ts';

const weighed = (gross_g: string, more: object = {}) => ({ how: 'weighed', weighing: { gross_g }, ...more });

function aSheetInTheSafe() {
  const workshop = aWorkshop();
  const { book, safe, bench4 } = workshop;
  const sheet = book.put(safe, '750 sheet', '100.000', { gold: '750' });
  const to = (amount: object, more: object = {}) => ({
    from_id: safe,
    to_id: bench4,
    lot_id: sheet,
    amount,
    operation: 'sheet_work',
    ...more,
  });
  return { ...workshop, sheet, to };
}

describe('issue', () => {
  it('moves the weighed mass from the safe to the bench, with its share of fine metal', () => {
    const { book, mara, to } = aSheetInTheSafe();
    const job = book.job('Signet ring');
    const dish = { gross_g: '28.412', tare_g: '8.412', tare_kind: 'measured' };
    book.run(issue, to({ how: 'weighed', weighing: dish }, { job_id: job }), mara);
    expect(book.ledger('places')).toEqual([
      'Safe | 750 sheet | 80.000 g | gold 60.000',
      'Bench 4 | 750 sheet | 20.000 g | gold 15.000',
    ]);
  });

  it('hands over from the keeper to whoever keeps the bench', () => {
    const { book, mara, yusuf, bench4, to } = aSheetInTheSafe();
    const { handovers } = book.run(issue, to(weighed('20')), mara);
    expect(handovers).toMatchObject([
      {
        voucher_id: book.lastVoucher().id,
        place_id: bench4,
        from_person_id: mara.person_id,
        to_person_id: yusuf.person_id,
      },
    ]);
    expect(book.lastVoucher().detail).toMatchObject({
      operation: 'sheet_work',
      bench: bench4,
      person_id: yusuf.person_id,
      job_id: null,
      single_handed: null,
    });
  });

  it('names the person where a station is shared, and refuses one who has left', () => {
    const { book, mara, corin, casting, to } = aSheetInTheSafe();
    const { handovers } = book.run(
      issue,
      to(weighed('20'), { to_id: casting, person_id: corin.person_id }),
      mara,
    );
    expect(handovers.map((handover) => handover.to_person_id)).toEqual([corin.person_id]);
    const gone = book.state.people.get(corin.person_id);
    if (gone !== undefined) book.state.people.set(gone.id, { ...gone, active: false });
    const late = to(weighed('20'), { to_id: casting, person_id: corin.person_id });
    expect(book.refusal(issue, late, mara).code).toBe('not_permitted');
  });

  it('is marked single-handed where a keeper issues to himself', () => {
    const { book, yusuf, to } = aSheetInTheSafe();
    const { handovers } = book.run(issue, to(weighed('20')), { ...yusuf, role: 'keeper' });
    expect(handovers).toEqual([]);
    expect(book.lastVoucher().detail['single_handed']).toBe('yes');
  });

  it('takes findings by the piece at the mean mass of their lot, marked by count', () => {
    const { book, mara, safe, to } = aSheetInTheSafe();
    const findings = book.put(safe, 'ear wires', '10.000', { form: 'findings', gold: '750', pieces: 40n });
    book.run(issue, to({ how: 'pieces', pieces: '6' }, { lot_id: findings }), mara);
    expect(book.ledger('places')).toContain('Bench 4 | ear wires | 1.500 g | gold 1.125 | 6 pieces');
    expect(book.ledger('places')).toContain('Safe | ear wires | 8.500 g | gold 6.375 | 34 pieces');
    expect(book.lastVoucher().detail['by_count']).toBe('yes');
    expect(book.refusal(issue, to({ how: 'pieces', pieces: '35' }, { lot_id: findings }), mara).code).toBe(
      'not_enough',
    );
    expect(book.refusal(issue, to(weighed('1'), { lot_id: findings }), mara).code).toBe('pieces_needed');
  });

  it('takes exactly what is there where all of it goes', () => {
    const { book, mara, safe, to } = aSheetInTheSafe();
    const odd = book.put(safe, 'odd sheet', '0.000007', { gold: '333.3' });
    book.run(issue, to({ how: 'all' }, { lot_id: odd }), mara);
    expect(book.ledger('places')).toContain('Bench 4 | odd sheet | 0.000007 g | gold 0.000002');
  });

  it('refuses more than there is and says what is left', () => {
    const { book, mara, to } = aSheetInTheSafe();
    const refusal = book.refusal(issue, to(weighed('100.001')), mara);
    expect([refusal.code, refusal.field]).toEqual(['not_enough', 'amount.weighing.gross_g']);
    expect(refusal.sentence).toContain('Safe holds 100.000 g');
  });

  it('refuses a lot on hold, naming the reason', () => {
    const { book, mara, sheet, to } = aSheetInTheSafe();
    book.run(hold, { lot_id: sheet, reason: 'its melt check is not recorded yet' }, mara);
    const refusal = book.refusal(issue, to(weighed('20')), mara);
    expect(refusal.code).toBe('lot_on_hold');
    expect(refusal.sentence).toContain('is on hold: its melt check is not recorded yet.');
  });

  it('gives a customer’s metal only into that customer’s jobs', () => {
    const { book, mara, safe, customer, otherCustomer, to } = aSheetInTheSafe();
    const own = book.put(safe, 'her gold', '10', { gold: '585', owner_id: customer });
    const hers = book.job('Her ring', customer);
    const his = book.job('His ring', otherCustomer);
    expect(book.refusal(issue, to(weighed('5'), { lot_id: own }), mara).code).toBe('wrong_owner');
    expect(book.refusal(issue, to(weighed('5'), { lot_id: own, job_id: his }), mara).code).toBe(
      'wrong_owner',
    );
    book.run(issue, to(weighed('5'), { lot_id: own, job_id: hers }), mara);
    expect(book.ledger('places')).toContain('Bench 4 | her gold | 5.000 g | gold 2.925');
  });

  it('refuses an operation that is not kept, and places that are no safe or no place of work', () => {
    const { book, mara, safe, bench2, to } = aSheetInTheSafe();
    expect(book.refusal(issue, to(weighed('5'), { operation: 'weaving' }), mara).field).toBe('operation');
    expect(book.refusal(issue, to(weighed('5'), { from_id: bench2 }), mara).field).toBe('from_id');
    expect(book.refusal(issue, to(weighed('5'), { to_id: safe }), mara).field).toBe('to_id');
  });

  it('refuses unknown fields and a mass of nothing', () => {
    const { to } = aSheetInTheSafe();
    expect(issue.schema.safeParse({ ...to(weighed('5')), approved_by: 'me' }).success).toBe(false);
    expect(issue.schema.safeParse(to(weighed('0'))).success).toBe(false);
    expect(issue.schema.safeParse(to(weighed('-1'))).success).toBe(false);
  });
});

describe('the last of a container', () => {
  // One reading of 0.001 g standard uncertainty: limit of error 2 × 0.001 g (JCGM 100, coverage factor 2).
  it('moves what the balance shows and books a difference within weighing error to count variance', () => {
    const { book, mara, to } = aSheetInTheSafe();
    const draft = book.run(issue, to(weighed('99.998', { emptied: true })), mara);
    expect(draft.second_signature).toBeNull();
    expect(book.voucherLines(book.lastVoucher())).toEqual([
      'Safe | 750 sheet | -100.000 g | gold -75.000',
      'Bench 4 | 750 sheet | 99.998 g | gold 74.9985',
      'Count variance | 750 sheet | 0.002 g | gold 0.0015',
    ]);
  });

  it('books more than the book knew out of count variance', () => {
    const { book, mara, to } = aSheetInTheSafe();
    book.run(issue, to(weighed('100.002', { emptied: true })), mara);
    expect(book.ledger()).toContain('Bench 4 | 750 sheet | 100.002 g | gold 75.0015');
    expect(book.ledger()).toContain('Count variance | 750 sheet | -0.002 g | gold -0.0015');
  });

  it('waits for a recount and a second person beyond the limit of error', () => {
    const { book, mara, to } = aSheetInTheSafe();
    const draft = book.draft(issue, to(weighed('99.997', { emptied: true })), mara);
    expect(draft.second_signature).toContain('Safe is 0.003 g short');
    const twoReadings = { gross_g: '104.997', tare_g: '5', tare_kind: 'measured' };
    const measured = book.draft(issue, to({ how: 'weighed', weighing: twoReadings, emptied: true }), mara);
    // Gross and tare: 2 × √2 × 0.001 g = 0.002828 g.
    expect(measured.second_signature).toContain('limit of error of 0.003 g');
  });
});
