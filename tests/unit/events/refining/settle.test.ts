/** The metal account: drawn, handed over, bought, sold, moved, and never below what was agreed. */
import { describe, expect, it } from 'vitest';
import { settle } from '../../../../shared/events/refining/settle.ts';
import { aRefinersWorkshop } from '../../../support/sweeps.ts';

const GOLD_ON = 'Norrby, metal account | gold on account, Norrby, metal account';

/** The account stands at 10.000 g of gold, handed over out of the safe; 2.000 g may be owed. */
function anAccount() {
  const workshop = aRefinersWorkshop();
  const { book, safe, mara, metalAccount } = workshop;
  book.set({ claim_limits: [{ account_id: metalAccount, metal: 'gold', limit_ug: 2_000_000n }] });
  const bar = book.put(safe, 'fine bar', '10.000', { form: 'bar', gold: '1000' });
  const act = { way: 'hand_over', safe_id: safe, lot_id: bar, amount: { how: 'all' } };
  book.run(settle, { account_id: metalAccount, act }, mara);
  const draw = (gross_g: string, more: object = {}) => ({
    account_id: metalAccount,
    act: {
      way: 'draw',
      metal: 'gold',
      safe_id: safe,
      form: 'grain',
      description: 'drawn grain',
      permille: '1000',
      weighing: { gross_g },
      ...more,
    },
  });
  return { ...workshop, draw };
}

describe('the metal account', () => {
  it('takes metal that is handed over as a claim, fine for fine; base metal falls into the deduction', () => {
    const { book, safe, mara, metalAccount } = anAccount();
    const scrap = book.put(safe, '750 scrap', '4.000', { form: 'clean_scrap', gold: '750' });
    const act = { way: 'hand_over', safe_id: safe, lot_id: scrap, amount: { how: 'all' } };
    book.run(settle, { account_id: metalAccount, act }, mara);
    expect(book.voucherLines(book.lastVoucher())).toEqual([
      'Safe | 750 scrap | -4.000 g | gold -3.000',
      `${GOLD_ON} | 3.000 g | gold 3.000`,
      'Processor’s deduction | 750 scrap | 1.000 g',
    ]);
  });

  it('lets metal be drawn to the agreed debt and no further', () => {
    const { book, mara, draw } = anAccount();
    book.run(settle, draw('12.000'), mara);
    expect(book.ledger()).toContain(`${GOLD_ON} | -2.000 g | gold -2.000`);
    const refusal = book.refusal(settle, draw('0.001'), mara);
    expect(refusal.code).toBe('over_limit');
    expect(refusal.sentence).toContain(
      'would stand at -2.001 g of gold; agreed is a debt of 2.000 g at most',
    );
  });

  it('counts castings of the caster’s own metal, drawn at their fineness', () => {
    const { book, safe, mara, draw } = anAccount();
    const castings = { form: 'casting', description: 'cast rings', permille: '750' };
    expect(book.refusal(settle, draw('8.000', castings), mara)).toMatchObject({ code: 'pieces_needed' });
    book.run(settle, draw('8.000', { ...castings, pieces: '5' }), mara);
    expect(book.voucherLines(book.lastVoucher())).toEqual([
      `${GOLD_ON} | -6.000 g | gold -6.000`,
      'Safe | cast rings | 8.000 g | gold 6.000 | 5 pieces',
      'Processor’s deduction | cast rings | -2.000 g',
    ]);
    expect(book.pieces(safe, book.newestLot().id)).toBe(5n);
  });

  it('sells from the account and moves to another', () => {
    const { book, mara, metalAccount } = anAccount();
    const other = book.account('metal_account', 'Second account', {});
    const deal = { metal: 'gold', mass_g: '3.000' };
    book.run(
      settle,
      { account_id: metalAccount, act: { way: 'sell', ...deal, price_per_ozt: '2100' } },
      mara,
    );
    expect(book.lastVoucher().detail).toMatchObject({
      way: 'sell',
      price_per_ozt: '2100',
      mass_g: '3.000000',
    });
    book.run(settle, { account_id: metalAccount, act: { way: 'move', ...deal, to_account_id: other } }, mara);
    expect(book.ledger()).toContain(`${GOLD_ON} | 4.000 g | gold 4.000`);
    expect(book.ledger()).toContain(
      'Second account | gold on account, Second account | 3.000 g | gold 3.000',
    );
    const same = { way: 'move', ...deal, to_account_id: metalAccount };
    expect(book.refusal(settle, { account_id: metalAccount, act: same }, mara).code).toBe('wrong_place');
  });

  it('is fixed by a purchase out of a supplier’s account', () => {
    const { book, mara, supplier, metalAccount, refinerParty } = anAccount();
    const act = { way: 'buy', metal: 'gold', mass_g: '5.000', price_per_ozt: '2100', reference: 'F-88' };
    const from = (supplier_id: string) => ({ account_id: metalAccount, act: { ...act, supplier_id } });
    expect(book.refusal(settle, from(refinerParty), mara).field).toBe('act.supplier_id');
    book.run(settle, from(supplier), mara);
    expect(book.voucherLines(book.lastVoucher())).toEqual([
      'Aurel Metals | gold on account, Norrby, metal account | -5.000 g | gold -5.000',
      `${GOLD_ON} | 5.000 g | gold 5.000`,
    ]);
    expect(book.lastVoucher().detail).toMatchObject({ reference: 'F-88', supplier_id: supplier });
  });
});
