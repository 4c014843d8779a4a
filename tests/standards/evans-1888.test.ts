/**
 * Evans, Illustrated History of the United States Mint, 1888 (read; worked examples WE-065 to WE-074): per mille as karat
 * with 32nds, and the value of an ounce at 23.22 grains of fine gold to the dollar. Some rows of the printed table of
 * 32nds are one off; these are not among them.
 */
import { expect, it } from 'vitest';
import { fineness, permilleToKarat } from '../../shared/alloy/fineness.ts';
import { Decimal } from '../../shared/decimal.ts';
import { massFromFineness } from '../../shared/mass/apportion.ts';
import { fromUnit, toUnit } from '../../shared/mass/units.ts';

it.each([
  ['WE-065', '580', '13.92', '13.29'],
  ['WE-067', '900', '21.6', '21.19'],
  ['WE-068', '910', '21.84', '21.27'],
  ['WE-070', '990', '23.76', '23.24'],
])('%s: %s is %s karat, printed as %s with 32nds behind the point', (_, permille, karat, printed) => {
  const found = permilleToKarat(permille);
  expect(found.toString()).toBe(karat);
  const whole = found.floor();
  expect(`${whole.toString()}.${found.minus(whole).times(32).toFixed(0)}`).toBe(printed);
});

it.each([
  ['WE-071', '500', '10.335917'],
  ['WE-073', '1000', '20.671835'],
])('%s: an ounce of %s is worth %s dollars', (_, permille, dollars) => {
  const ounce = massFromFineness(fromUnit(new Decimal(1000), 'ozt'), fineness({ gold: permille }));
  expect(toUnit(ounce.gold, 'gr').div('23.22').div(1000).toFixed(6)).toBe(dollars);
});

it('WE-074: 1 329 631 standard ounces of 900 at 18.604651 dollars are 24 737 320 dollars', () => {
  const exact = new Decimal('1329631').times(480).times('0.9').div('23.22');
  expect(exact.toFixed(2)).toBe('24737320.93');
  const booked = massFromFineness(fromUnit(new Decimal('13296.31'), 'ozt'), fineness({ gold: '900' }));
  expect(toUnit(booked.gold, 'gr').times(100).div('23.22').toFixed(2)).toBe('24737320.93');
});
