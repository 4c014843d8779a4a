import { describe, expect, it } from 'vitest';
import { hold } from '../../../shared/events/hold.ts';
import { release } from '../../../shared/events/release.ts';
import { aWorkshop } from '../../support/workshop.ts';

function aLot() {
  const workshop = aWorkshop();
  return { ...workshop, lot_id: workshop.book.put(workshop.safe, '750 sheet', '10', { gold: '750' }) };
}

describe('hold and release', () => {
  it('set a lot aside and give it free again, without any entry', () => {
    const { book, mara, lot_id } = aLot();
    const held = book.run(hold, { lot_id, reason: 'bubbles in the sheet' }, mara);
    expect(held.records.map((record) => record.type)).toEqual(['act']);
    expect(book.lot(lot_id)).toMatchObject({ standing: 'on_hold', hold_reason: 'bubbles in the sheet' });
    book.run(release, { lot_id, reason: 'rolled out and looked at' }, mara);
    expect(book.lot(lot_id)).toMatchObject({ standing: 'released', hold_reason: null });
  });

  it('are not done twice', () => {
    const { book, mara, lot_id } = aLot();
    expect(book.refusal(release, { lot_id, reason: 'seen' }, mara).code).toBe('lot_not_on_hold');
    book.run(hold, { lot_id, reason: 'claim' }, mara);
    expect(book.refusal(hold, { lot_id, reason: 'claim' }, mara).code).toBe('lot_on_hold');
  });

  it('keep to the date until which the lot is on hold', () => {
    const { book, mara, lot_id } = aLot();
    expect(book.refusal(hold, { lot_id, reason: 'police', until: '2026-05-13' }, mara).code).toBe('invalid');
    book.run(hold, { lot_id, reason: 'police', until: '2026-05-28' }, mara);
    expect(book.refusal(release, { lot_id, reason: 'seen' }, mara).sentence).toContain('until 2026-05-28');
    book.today = '2026-05-28';
    book.run(release, { lot_id, reason: 'nobody asked for it' }, mara);
    expect(book.lot(lot_id).standing).toBe('released');
  });
});
