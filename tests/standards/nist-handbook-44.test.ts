/**
 * NIST Handbook 44, Appendix C (and SP 811, B.8): units of mass of the precious-metal trade. That these units are
 * listed was read; the digits are from memory, and equal those derived from the pound.
 */
import { expect, it } from 'vitest';
import type { MassUnit } from '../../shared/mass/units.ts';
import { GRAMS_PER_UNIT } from '../../shared/mass/units.ts';

const PRINTED: readonly (readonly [MassUnit, string])[] = [
  ['ozt', '31.1034768'],
  ['dwt', '1.55517384'],
  ['gr', '0.06479891'],
  ['ozav', '28.349523125'],
  ['ct', '0.2'],
];

it.each(PRINTED)('1 %s is %s g exactly', (unit, grams) => {
  expect(GRAMS_PER_UNIT[unit].toString()).toBe(grams);
});
