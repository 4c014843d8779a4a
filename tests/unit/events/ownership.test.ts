import { describe, expect, it } from 'vitest';
import { hold } from '../../../shared/events/hold.ts';
import { ownership } from '../../../shared/events/ownership.ts';
import { returnToOwner } from '../../../shared/events/return-to-owner.ts';
import { aWorkshop } from '../../support/workshop.ts';

const stated = (gross_g: string) => ({ how: 'stated', gross_g });
const all = { how: 'all' };

describe('ownership', () => {
  it('moves a part into a lot of the new owner, in the same form and place', () => {
    const { book, mara, bench4, customer } = aWorkshop();
    const job = book.job('Her repair', customer);
    const solder = book.put(bench4, '750 solder', '3.000', { form: 'solder', gold: '750', job_id: job });
    const body = {
      place_id: bench4,
      lot_id: solder,
      amount: stated('0.120'),
      new_owner_id: customer,
      job_id: job,
    };
    const draft = book.run(ownership, { ...body, what_for: 'solder in her ring' }, mara);
    expect(draft.second_signature).not.toBeNull();
    expect(book.ledger('places')).toEqual([
      'Bench 4 | 750 solder | 2.880 g | gold 2.160',
      'Bench 4 | 750 solder | 0.120 g | gold 0.090',
    ]);
    expect(book.newestLot()).toMatchObject({ form: 'solder', owner_id: customer });
    expect(draft.records[0]?.detail['parents']).toEqual([{ lot_id: solder }]);
    const rows = book.facts({ place_ids: [bench4] }).job_holdings;
    expect(rows.map((row) => row.job_id)).toEqual([job, job]);
  });

  it('makes a customer’s metal that the house buys recycled metal of the house', () => {
    const { book, mara, safe, customer } = aWorkshop();
    const gold = book.put(safe, 'her old gold', '20', {
      form: 'old_gold',
      gold: '585',
      owner_id: customer,
      origin: 'customers_own',
      basis: 'tested',
    });
    book.run(
      ownership,
      { place_id: safe, lot_id: gold, amount: all, new_owner_id: null, what_for: 'bought' },
      mara,
    );
    expect(book.newestLot()).toMatchObject({ owner_id: null, origin: 'recycled', basis: 'tested' });
  });

  it('only estimates a part taken of mixed metal, and nothing at all of an unknown one', () => {
    const { book, mara, safe, customer } = aWorkshop();
    const part = { place_id: safe, amount: stated('5'), new_owner_id: null, what_for: 'bought' };
    const tested = { form: 'old_gold', gold: '585', owner_id: customer, basis: 'tested' } as const;
    book.run(ownership, { ...part, lot_id: book.put(safe, 'old gold', '20', tested) }, mara);
    expect(book.newestLot().basis).toBe('estimated');
    const unknown = { form: 'old_gold', owner_id: customer, basis: 'unknown' } as const;
    book.run(ownership, { ...part, lot_id: book.put(safe, 'more of it', '20', unknown) }, mara);
    expect(book.newestLot().basis).toBe('unknown');
  });

  it('does not free a lot that is on hold', () => {
    const { book, mara, safe, customer } = aWorkshop();
    const sheet = book.put(safe, '750 sheet', '20', { gold: '750' });
    book.run(hold, { lot_id: sheet, reason: 'claim' }, mara);
    const body = {
      place_id: safe,
      lot_id: sheet,
      amount: all,
      new_owner_id: customer,
      what_for: 'sold to her',
    };
    book.run(ownership, body, mara);
    expect(book.newestLot()).toMatchObject({ standing: 'on_hold', hold_reason: 'claim' });
  });

  it('refuses the owner it has, an owner who is nobody, and an emptied container', () => {
    const { book, mara, safe, customer } = aWorkshop();
    const sheet = book.put(safe, '750 sheet', '20', { gold: '750' });
    const body = { place_id: safe, lot_id: sheet, amount: all, new_owner_id: null, what_for: 'bought' };
    expect(book.refusal(ownership, body, mara).code).toBe('wrong_owner');
    expect(book.refusal(ownership, { ...body, new_owner_id: safe }, mara).code).toBe('not_found');
    const emptied = { how: 'weighed', weighing: { gross_g: '19.9' }, emptied: true };
    expect(book.refusal(ownership, { ...body, new_owner_id: customer, amount: emptied }, mara).code).toBe(
      'invalid',
    );
  });
});

describe('return to owner', () => {
  it('gives a customer’s metal back, so that nothing of it is left owed', () => {
    const { book, mara, safe, customer } = aWorkshop();
    const gold = book.put(safe, 'her gold', '20', { gold: '585', owner_id: customer });
    const part = { how: 'weighed', weighing: { gross_g: '8' } };
    book.run(returnToOwner, { place_id: safe, lot_id: gold, amount: part }, mara);
    expect(book.ledger()).toContain('Edda Lorn | her gold | 8.000 g | gold 4.680');
    book.run(returnToOwner, { place_id: safe, lot_id: gold, amount: all }, mara);
    expect(book.ledger('places')).toEqual([]);
    expect(book.lastVoucher().detail).toMatchObject({ counterparty_id: customer, owner_id: customer });
  });

  it('gives a supplier’s metal back to the supplier', () => {
    const { book, mara, safe, supplier } = aWorkshop();
    const bar = book.put(safe, 'bar on loan', '100', { form: 'bar', gold: '999.9', owner_id: supplier });
    book.run(returnToOwner, { place_id: safe, lot_id: bar, amount: all }, mara);
    expect(book.ledger()).toContain('Aurel Metals | bar on loan | 100.000 g | gold 99.990');
  });

  it('refuses the house’s own metal', () => {
    const { book, mara, safe } = aWorkshop();
    const sheet = book.put(safe, '750 sheet', '20', { gold: '750' });
    expect(book.refusal(returnToOwner, { place_id: safe, lot_id: sheet, amount: all }, mara).code).toBe(
      'wrong_owner',
    );
  });
});
