/**
 * Hong Kong Weights and Measures Ordinance, Cap. 68, 1987 edition, First Schedule (read): catty 0.604 789 82 kg, tael
 * (leung) 1/16 catty = 37.799 363 75 g.
 */
import { expect, it } from 'vitest';
import { Decimal } from '../../shared/decimal.ts';
import { GRAMS_PER_UNIT } from '../../shared/mass/units.ts';

it('a statutory tael is a sixteenth of a catty', () => {
  expect(new Decimal('604.78982').div(16).toString()).toBe('37.79936375');
  expect(GRAMS_PER_UNIT.tael_statutory.toString()).toBe('37.79936375');
});
