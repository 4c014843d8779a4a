/**
 * UK Weights and Measures Act 1985, Schedule 1 Part V: "OUNCE TROY = 0.031 103 476 8 kilogram" (read); the text of 1991
 * has "Ounce troy = 12/175 pound" (read), the pound being 0.453 592 37 kg.
 */
import { expect, it } from 'vitest';
import { Decimal } from '../../shared/decimal.ts';
import { GRAMS_PER_UNIT, fromUnit, toUnit } from '../../shared/mass/units.ts';

const POUND_GRAMS = new Decimal('453.59237');

it('the ounce troy is 0.0311034768 kg', () => {
  expect(GRAMS_PER_UNIT.ozt.div(1000).toString()).toBe('0.0311034768');
});

it('the ounce troy is 12/175 of a pound', () => {
  expect(POUND_GRAMS.times(12).div(175).toString()).toBe(GRAMS_PER_UNIT.ozt.toString());
});

it('a kilogram is 32.150746568627… ounces troy', () => {
  expect(toUnit(1_000_000_000n, 'ozt').toFixed(12, Decimal.ROUND_DOWN)).toBe('32.150746568627');
});

it('ten thousand ounces are booked to the microgram', () => {
  expect(fromUnit(new Decimal(10_000), 'ozt')).toBe(311_034_768_000n);
});
