import { describe, expect, it } from 'vitest';
import { delivery } from '../../../shared/events/delivery.ts';
import { hold } from '../../../shared/events/hold.ts';
import { aWorkshop } from '../../support/workshop.ts';

const all = { how: 'all' };

function aRingInTheSafe() {
  const workshop = aWorkshop();
  const { book, safe, customer } = workshop;
  const ring = book.put(safe, 'signet ring', '12.900', { form: 'finished_work', gold: '750', pieces: 1n });
  const body = (way: string, more: object = {}) => ({
    way,
    party_id: customer,
    place_id: safe,
    lines: [{ lot_id: ring, amount: all }],
    ...more,
  });
  return { ...workshop, ring, body };
}

describe('delivery', () => {
  it('sends house metal to sold and keeps the stones in the detail only', () => {
    const { book, mara, customer, ring, body } = aRingInTheSafe();
    const lines = [{ lot_id: ring, amount: all, stones_ct: '1.85', stones: 'old cut diamond' }];
    book.run(delivery, body('deliver', { lines }), mara);
    expect(book.ledger('places')).toEqual([]);
    expect(book.ledger()).toContain('Sold | signet ring | 12.900 g | gold 9.675 | 1 pieces');
    expect(book.lastVoucher().detail).toMatchObject({
      counterparty_id: customer,
      stones: [
        { line: '1', lot_id: ring, stones: 'old cut diamond', stones_ct: '1.85', taken_off_g: '0.000000' },
      ],
    });
  });

  it('gives a customer’s own metal back into the customer’s account', () => {
    const { book, mara, safe, customer, body } = aRingInTheSafe();
    const own = book.put(safe, 'her ring', '5', {
      form: 'finished_work',
      gold: '585',
      pieces: 1n,
      owner_id: customer,
    });
    book.run(delivery, body('deliver', { lines: [{ lot_id: own, amount: all }] }), mara);
    expect(book.ledger()).toContain('Edda Lorn | her ring | 5.000 g | gold 2.925 | 1 pieces');
  });

  it('never gives one customer’s metal to another', () => {
    const { book, mara, safe, otherCustomer, body } = aRingInTheSafe();
    const his = book.put(safe, 'his ring', '5', { gold: '585', owner_id: otherCustomer });
    const lines = [{ lot_id: his, amount: all }];
    expect(book.refusal(delivery, body('deliver', { lines }), mara).code).toBe('wrong_owner');
    expect(book.refusal(delivery, body('out_on_approval', { lines }), mara).code).toBe('wrong_owner');
  });

  it('goes out on approval into that place and comes back as the same lot', () => {
    const { book, mara, body } = aRingInTheSafe();
    const before = book.ledger();
    book.run(delivery, body('out_on_approval'), mara);
    expect(book.ledger('places')).toEqual([
      'Edda Lorn, on approval | signet ring | 12.900 g | gold 9.675 | 1 pieces',
    ]);
    book.run(delivery, body('back_from_approval'), mara);
    expect(book.ledger()).toEqual(before);
  });

  it('is sold from approval to whoever has it there, and to nobody else', () => {
    const { book, mara, approval, otherCustomer, body } = aRingInTheSafe();
    book.run(delivery, body('out_on_approval'), mara);
    const sale = body('deliver', { place_id: approval });
    expect(book.refusal(delivery, { ...sale, party_id: otherCustomer }, mara).code).toBe('wrong_place');
    book.run(delivery, sale, mara);
    expect(book.ledger()).toContain('Sold | signet ring | 12.900 g | gold 9.675 | 1 pieces');
  });

  it('takes a returned or exchanged piece back as the same lot, from where it went', () => {
    const { book, mara, body } = aRingInTheSafe();
    const before = book.ledger();
    book.run(delivery, body('deliver'), mara);
    book.run(delivery, body('returned'), mara);
    expect(book.ledger()).toEqual(before);
    expect(book.refusal(delivery, body('returned'), mara).code).toBe('not_enough');
  });

  it('delivers from a bench what lies there for the job', () => {
    const { book, mara, bench4, customer, body } = aRingInTheSafe();
    const job = book.job('Her pendant', customer);
    const pendant = book.put(bench4, 'pendant', '7', { form: 'work', gold: '750', pieces: 1n, job_id: job });
    const lines = [{ lot_id: pendant, amount: all }];
    expect(book.refusal(delivery, body('deliver', { place_id: bench4, lines }), mara).code).toBe(
      'not_enough',
    );
    book.run(delivery, body('deliver', { place_id: bench4, job_id: job, lines }), mara);
    expect(book.held(bench4, pendant).gross).toBe(0n);
  });

  it('counts pieces of a lot: so many of them at the mean mass', () => {
    const { book, mara, safe, body } = aRingInTheSafe();
    const studs = book.put(safe, 'ear studs', '10', { form: 'finished_work', gold: '750', pieces: 8n });
    book.run(
      delivery,
      body('deliver', { lines: [{ lot_id: studs, amount: { how: 'pieces', pieces: '2' } }] }),
      mara,
    );
    expect(book.ledger()).toContain('Sold | ear studs | 2.500 g | gold 1.875 | 2 pieces');
  });

  it('refuses a lot on hold', () => {
    const { book, mara, ring, body } = aRingInTheSafe();
    book.run(hold, { lot_id: ring, reason: 'stone is loose' }, mara);
    expect(book.refusal(delivery, body('deliver'), mara).code).toBe('lot_on_hold');
  });

  it('refuses a party who has no account of the kind', () => {
    const { book, mara, otherCustomer, body } = aRingInTheSafe();
    const out = body('out_on_approval', { party_id: otherCustomer });
    expect(book.refusal(delivery, out, mara).field).toBe('party_id');
  });
});
