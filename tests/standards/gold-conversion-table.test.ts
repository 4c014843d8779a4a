/**
 * A published gold conversion table (read in reproduction): tola 11.6638 g = 0.375 oz, trade tael 37.429 g = 1.20337 oz,
 * baht bar 15.244 g, 1 g = 0.0321507465 oz. The baht of ornaments, 15.16 g, is credited to the Thai gold traders on
 * general reference pages (read, medium trust).
 */
import { expect, it } from 'vitest';
import { Decimal } from '../../shared/decimal.ts';
import { GRAMS_PER_UNIT, fromUnit, toUnit } from '../../shared/mass/units.ts';

const ounces = (unit: 'g' | 'tola' | 'tael_trade') => GRAMS_PER_UNIT[unit].div(GRAMS_PER_UNIT.ozt);

it('a gram is 0.0321507465 oz to ten decimals, rounded down as the table has it', () => {
  expect(ounces('g').toFixed(10, Decimal.ROUND_DOWN)).toBe('0.0321507465');
});

it('a tola is 0.375 oz exactly', () => {
  expect(ounces('tola').toString()).toBe('0.375');
  expect(GRAMS_PER_UNIT.tola.toFixed(4)).toBe('11.6638');
});

it('a trade tael is 37.429 g, 1.20337 oz', () => {
  expect(ounces('tael_trade').toFixed(5)).toBe('1.20337');
  expect(fromUnit(new Decimal(5), 'tael_trade')).toBe(187_145_000n);
});

it('a baht is 15.244 g of bar and 15.16 g of ornaments', () => {
  expect(toUnit(15_244_000n, 'baht_bar').toString()).toBe('1');
  expect(toUnit(15_160_000n, 'baht_ornament').toString()).toBe('1');
});
