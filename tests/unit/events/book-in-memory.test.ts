/** That the in-memory book itself catches what it is there to catch: else the tests that lean on it prove nothing. */
import { describe, expect, it } from 'vitest';
import type { EntryDraft, VoucherDraft } from '../../../shared/book/draft.ts';
import { massVector, negateMass } from '../../../shared/mass/vector.ts';
import { aWorkshop } from '../../support/workshop.ts';

function aVoucher() {
  const workshop = aWorkshop();
  const { book, safe, bench2 } = workshop;
  const lot_id = book.put(safe, '750 sheet', '100', { gold: '750' });
  const mass = massVector({ gross: 10_000_000n, gold: 7_500_000n });
  const entry = (account_id: string, of = mass): EntryDraft => ({
    account_id,
    lot_id,
    mass: of,
    pieces: null,
  });
  const post = (entries: readonly EntryDraft[], more: Partial<VoucherDraft> = {}) => {
    const voucher: VoucherDraft = {
      type: 'voucher',
      id: book.state.newId(),
      kind: 'transfer',
      business_date: book.today,
      note: null,
      detail: {},
      documents: [],
      reverses: null,
      entries,
      ...more,
    };
    book.state.post([voucher], null);
    return voucher;
  };
  const move = [entry(safe, negateMass(mass)), entry(bench2)];
  return { ...workshop, lot_id, mass, entry, post, move };
}

describe('the in-memory book', () => {
  it('takes a sound voucher once', () => {
    const { post, move, book, bench2, lot_id } = aVoucher();
    const voucher = post(move);
    expect(book.held(bench2, lot_id).gross).toBe(10_000_000n);
    expect(() => post(move, { id: voucher.id })).toThrow('posted twice');
  });

  it('refuses what does not sum to nothing in each of the five masses', () => {
    const { post, entry, safe, bench2, mass } = aVoucher();
    const short = { ...mass, gold: mass.gold - 1n };
    expect(() => post([entry(safe, negateMass(mass)), entry(bench2, short)])).toThrow(
      'does not sum to nothing',
    );
    expect(() => post([entry(bench2, massVector({}))])).toThrow('does not sum to nothing');
  });

  it('refuses less than nothing in a place, now or at the end of a day', () => {
    const { post, entry, safe, bench2 } = aVoucher();
    const more = massVector({ gross: 100_000_001n });
    expect(() => post([entry(safe, negateMass(more)), entry(bench2, more)])).toThrow('less than nothing');
    const early = aVoucher();
    expect(() => early.post(early.move, { business_date: '2026-05-13' })).toThrow(
      '2026-05-13 ends with less',
    );
  });

  it('refuses more fine metal than gross in a place', () => {
    const { post, entry, safe, bench2 } = aVoucher();
    const dross = massVector({ gross: 90_000_000n });
    expect(() => post([entry(safe, negateMass(dross)), entry(bench2, dross)])).toThrow(
      'more fine metal than gross',
    );
  });

  it('refuses a date ahead, a closed day, and metal that changes owner on the way', () => {
    const { post, entry, book, safe, bench2, move, mass, customer } = aVoucher();
    expect(() => post(move, { business_date: '2026-05-15' })).toThrow('dated ahead');
    const other = book.put(safe, 'her sheet', '1', { gold: '750', owner_id: customer });
    const hers = { ...entry(bench2, mass), lot_id: other };
    expect(() => post([entry(safe, negateMass(mass)), hers])).toThrow('without an ownership voucher');
    book.closeThrough(book.today);
    expect(() => post(move)).toThrow('closed period');
  });

  it('refuses grams in a detail that do not carry six decimals', () => {
    const { post, move } = aVoucher();
    expect(() => post(move, { detail: { gross_g: '1.5' } })).toThrow('six decimals');
  });
});
