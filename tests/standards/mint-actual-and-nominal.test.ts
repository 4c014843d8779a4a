/**
 * A government mint's education page on weights (read; worked example WE-133): actual and nominal, gross and fine are four
 * figures. 10.0003 oz of 99.9876 % hold 9.9990599628 oz; 10.000 oz of 99.99 % are 9.999 nominal.
 */
import { expect, it } from 'vitest';
import { fineness } from '../../shared/alloy/fineness.ts';
import { Decimal } from '../../shared/decimal.ts';
import { massFromFineness } from '../../shared/mass/apportion.ts';
import { fineOunces } from '../../shared/mass/document-rounding.ts';
import { fromUnit, toUnit } from '../../shared/mass/units.ts';

it.each([
  ['actual', '10.0003', '999.876', '9.9990599628'],
  ['nominal', '10.000', '999.9', '9.999'],
])('the %s fine weight of %s oz of %s is %s oz', (_, gross, permille, fine) => {
  const exact = new Decimal(gross).times(permille).div(1000);
  expect(exact.toString()).toBe(fine);
  const booked = massFromFineness(fromUnit(new Decimal(gross), 'ozt'), fineness({ gold: permille }));
  expect(toUnit(booked.gold, 'ozt').minus(exact).abs().lt('0.00000004')).toBe(true);
  expect(fineOunces(new Decimal(gross), new Decimal(permille), 'fine_down').toFixed(3)).toBe('9.999');
});
