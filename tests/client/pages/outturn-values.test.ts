/** What is typed of a refiner's statement: which lots are settled, and that split payments add up to the credit. */
import { describe, expect, it } from 'vitest';
import type { OutturnValues, TypedPayment } from '../../../src/pages/refining/outturn-values.ts';
import { noOutturn, paidUg, paymentsOf } from '../../../src/pages/refining/outturn-values.ts';

const metal = (credited: string) => ({ assayed: credited, credited, charge: '' });
const line = (gold: string) => ({ part: '', after_melt: '', metals: { gold: metal(gold) } });
const values: OutturnValues = { ...noOutturn, lines: { a: line('100,5'), b: line('2.625') } };
const payment = (more: Partial<TypedPayment>): TypedPayment => ({
  metal: 'gold',
  way: 'metal_account',
  account_id: 'house',
  mass: '',
  amount: '',
  ...more,
});

describe('payments of an outturn', () => {
  it('puts all that is credited onto the metal account where nothing else was chosen', () => {
    const payments = paymentsOf(values, 'house');
    expect(payments).toEqual([payment({})]);
    expect(payments.map((one) => paidUg(one, payments, values))).toEqual([103_125_000n]);
  });

  it('gives an open part what the named parts leave, so that all of the credit is paid', () => {
    const payments = [payment({ mass: '3.125' }), payment({ way: 'money', amount: '10' })];
    expect(payments.map((one) => paidUg(one, payments, values))).toEqual([3_125_000n, 100_000_000n]);
  });

  it('pays nothing for a metal that is no longer credited', () => {
    const emptied = { ...noOutturn, payments: [payment({})] };
    expect(paymentsOf(emptied, 'house')).toEqual([]);
  });
});
