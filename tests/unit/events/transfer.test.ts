import { describe, expect, it } from 'vitest';
import { hold } from '../../../shared/events/hold.ts';
import { issue } from '../../../shared/events/issue.ts';
import { transfer } from '../../../shared/events/transfer.ts';
import { aWorkshop } from '../../support/workshop.ts';

const weighed = (gross_g: string, more: object = {}) => ({ how: 'weighed', weighing: { gross_g }, ...more });

describe('transfer', () => {
  it('moves parts of several lots at once, place to place', () => {
    const { book, mara, safe } = aWorkshop();
    const vault = book.place('safe', 'Vault', mara);
    const sheet = book.put(safe, '750 sheet', '50', { gold: '750' });
    const wire = book.put(safe, '585 wire', '8', { gold: '585' });
    const lines = [
      { lot_id: sheet, amount: weighed('20') },
      { lot_id: wire, amount: { how: 'all' } },
    ];
    const { handovers } = book.run(transfer, { from_id: safe, to_id: vault, lines }, mara);
    expect(book.ledger('places')).toEqual([
      'Safe | 750 sheet | 30.000 g | gold 22.500',
      'Vault | 750 sheet | 20.000 g | gold 15.000',
      'Vault | 585 wire | 8.000 g | gold 4.680',
    ]);
    expect(handovers).toEqual([]);
  });

  it('is a handover from the one who keeps the place to the one who keeps the next', () => {
    const { book, mara, corin, yusuf, bench2, bench4 } = aWorkshop();
    const sheet = book.put(bench2, '750 sheet', '12', { gold: '750' });
    const lines = [{ lot_id: sheet, amount: weighed('5') }];
    const { handovers } = book.run(transfer, { from_id: bench2, to_id: bench4, lines }, mara);
    expect(handovers).toMatchObject([{ from_person_id: corin.person_id, to_person_id: yusuf.person_id }]);
  });

  it('empties a bench with a voucher for each job that metal lies there for', () => {
    const { book, mara, safe, bench2, bench4 } = aWorkshop();
    const sheet = book.put(safe, '750 sheet', '50', { gold: '750' });
    const ring = book.job('Ring');
    const give = { from_id: safe, to_id: bench2, lot_id: sheet, operation: 'sheet_work' };
    book.run(issue, { ...give, amount: weighed('10'), job_id: ring }, mara);
    book.run(issue, { ...give, amount: weighed('4') }, mara);
    const { records } = book.run(transfer, { from_id: bench2, to_id: bench4, everything: true }, mara);
    expect(records.map((record) => record.detail['job_id'])).toEqual([ring, null]);
    expect(book.ledger('places')).toEqual([
      'Safe | 750 sheet | 36.000 g | gold 27.000',
      'Bench 4 | 750 sheet | 14.000 g | gold 10.500',
    ]);
    const rows = book.facts({ place_ids: [bench4] }).job_holdings;
    expect(rows.map((row) => [row.job_id, row.mass.gross])).toEqual([
      [ring, 10_000_000n],
      [null, 4_000_000n],
    ]);
  });

  it('takes from a bench no more than lies there for the job', () => {
    const { book, mara, safe, bench2, bench4 } = aWorkshop();
    const sheet = book.put(safe, '750 sheet', '50', { gold: '750' });
    const ring = book.job('Ring');
    const give = { from_id: safe, to_id: bench2, lot_id: sheet, operation: 'sheet_work' };
    book.run(issue, { ...give, amount: weighed('10'), job_id: ring }, mara);
    book.run(issue, { ...give, amount: weighed('4') }, mara);
    const body = { from_id: bench2, to_id: bench4, lines: [{ lot_id: sheet, amount: weighed('5') }] };
    expect(book.refusal(transfer, body, mara).code).toBe('not_enough');
    book.run(transfer, { ...body, job_id: ring }, mara);
    expect(book.held(bench4, sheet).gross).toBe(5_000_000n);
  });

  it('empties a container: the weighed mass moves, the rest goes to count variance of the place', () => {
    const { book, mara, safe } = aWorkshop();
    const vault = book.place('safe', 'Vault', mara);
    const sheet = book.put(safe, '750 sheet', '50', { gold: '750' });
    const lines = [{ lot_id: sheet, amount: weighed('49.500', { emptied: true }) }];
    const draft = book.run(transfer, { from_id: safe, to_id: vault, lines }, mara);
    expect(draft.second_signature).toContain('Safe is 0.500 g short');
    expect(book.ledger('places')).toEqual(['Vault | 750 sheet | 49.500 g | gold 37.125']);
    expect(book.ledger()).toContain('Count variance | 750 sheet | 0.500 g | gold 0.375');
  });

  it('lets a lot on hold move between safes, but never to where it would be worked', () => {
    const { book, mara, safe, bench2, bench4 } = aWorkshop();
    const vault = book.place('safe', 'Vault', mara);
    const sheet = book.put(safe, '750 sheet', '50', { gold: '750' });
    const wire = book.put(bench2, '585 wire', '8', { gold: '585' });
    book.run(hold, { lot_id: sheet, reason: 'claim' }, mara);
    book.run(hold, { lot_id: wire, reason: 'claim' }, mara);
    const all = { how: 'all' };
    book.run(transfer, { from_id: safe, to_id: vault, lines: [{ lot_id: sheet, amount: all }] }, mara);
    const onwards = { from_id: bench2, to_id: bench4, lines: [{ lot_id: wire, amount: all }] };
    expect(book.refusal(transfer, onwards, mara).code).toBe('lot_on_hold');
  });

  it('refuses a safe to a bench (that is an issue), the same place twice, an empty place, a lot twice', () => {
    const { book, mara, safe, bench2, approval } = aWorkshop();
    const vault = book.place('safe', 'Vault', mara);
    const sheet = book.put(safe, '750 sheet', '50', { gold: '750' });
    const line = { lot_id: sheet, amount: weighed('1') };
    const refused = (body: object) => book.refusal(transfer, body, mara).code;
    expect(refused({ from_id: safe, to_id: bench2, lines: [line] })).toBe('wrong_place');
    expect(refused({ from_id: safe, to_id: approval, lines: [line] })).toBe('wrong_place');
    expect(refused({ from_id: safe, to_id: safe, lines: [line] })).toBe('wrong_place');
    expect(refused({ from_id: vault, to_id: safe, everything: true })).toBe('nothing_to_post');
    expect(refused({ from_id: safe, to_id: vault })).toBe('nothing_to_post');
    expect(refused({ from_id: safe, to_id: vault, lines: [line, line] })).toBe('lot_twice');
  });
});
