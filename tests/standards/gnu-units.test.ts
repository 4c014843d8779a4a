/**
 * GNU units, `definitions.units` (Debian package `units` 2.22; read): pound 0.45359237 kg, grain 1|7000 pound,
 * pennyweight 24 grains, troy ounce 480, tola 180, metric carat 0.2 g. The momme of pearls, 3.75 g, is from the same
 * table. Its comment that a fine ounce is 99.5 % pure is not followed: in the trade it is pure metal.
 */
import { expect, it } from 'vitest';
import { Decimal } from '../../shared/decimal.ts';
import type { MassUnit } from '../../shared/mass/units.ts';
import { GRAMS_PER_UNIT } from '../../shared/mass/units.ts';

const GRAIN_GRAMS = new Decimal('453.59237').div(7000);

const GRAINS: readonly (readonly [MassUnit, string])[] = [
  ['gr', '1'],
  ['dwt', '24'],
  ['ozt', '480'],
  ['tola', '180'],
  ['ozav', '437.5'],
];

it.each(GRAINS)('1 %s is %s grains, each 1/7000 pound', (unit, grains) => {
  expect(GRAIN_GRAMS.times(grains).toString()).toBe(GRAMS_PER_UNIT[unit].toString());
});

it('an avoirdupois ounce is 175/192 of a troy ounce', () => {
  expect(GRAMS_PER_UNIT.ozav.times(192).eq(GRAMS_PER_UNIT.ozt.times(175))).toBe(true);
});

it('a metric carat is 0.2 g and a momme 3.75 g', () => {
  expect([GRAMS_PER_UNIT.ct.toString(), GRAMS_PER_UNIT.momme.toString()]).toEqual(['0.2', '3.75']);
});

it('its tael, 1/16 of 4/3 pound, is not the statutory one: it differs in the seventh figure', () => {
  const tael = new Decimal('453.59237').times(4).div(3).div(16);
  expect(tael.toFixed(9)).toBe('37.799364167');
  expect(GRAMS_PER_UNIT.tael_statutory.toFixed(9)).toBe('37.799363750');
});
