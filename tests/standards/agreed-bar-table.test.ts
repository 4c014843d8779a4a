/**
 * London market, "bar weights and their agreed fine gold content" (read in a published conversion table; worked
 * examples WE-076 to WE-102, and the rows of 999.9 from the facts' section 8.3). The table follows no single rounding,
 * so the book holds the exact figure, and each row tells which of our named rules gives what is printed.
 * (For five taels of 999.9 the facts have 6.016248, reckoned from the rounded 1.20337 oz; from 37.429 g it is 6.016250.)
 */
import { describe, expect, it } from 'vitest';
import { fineness } from '../../shared/alloy/fineness.ts';
import { Decimal } from '../../shared/decimal.ts';
import { massFromFineness } from '../../shared/mass/apportion.ts';
import type { DocumentRule } from '../../shared/mass/document-rounding.ts';
import { fineOunces } from '../../shared/mass/document-rounding.ts';
import type { MassUnit } from '../../shared/mass/units.ts';
import { GRAMS_PER_UNIT, fromUnit, toUnit } from '../../shared/mass/units.ts';

const NONE: readonly DocumentRule[] = [];
const DOWN: readonly DocumentRule[] = ['fine_down'];
const NEAREST: readonly DocumentRule[] = ['fine_half_up'];
const BOTH: readonly DocumentRule[] = [...DOWN, ...NEAREST];

type Row = readonly [string, string, MassUnit, string, string, string, readonly DocumentRule[]];
const TABLE: readonly Row[] = [
  ['WE-076', '1000', 'g', '995.0', '31.990', '31.989993', NEAREST],
  ['WE-077', '1000', 'g', '999.0', '32.119', '32.118596', NEAREST],
  ['section 8.3', '1000', 'g', '999.9', '32.148', '32.147531', NEAREST],
  ['WE-079', '500', 'g', '995.0', '15.995', '15.994996', NEAREST],
  ['WE-080', '500', 'g', '999.0', '16.059', '16.059298', BOTH],
  ['WE-082', '250', 'g', '995.0', '7.998', '7.997498', NONE],
  ['WE-083', '250', 'g', '999.0', '8.030', '8.029649', NEAREST],
  ['WE-085', '200', 'g', '995.0', '6.398', '6.397999', NEAREST],
  ['WE-086', '200', 'g', '999.0', '6.424', '6.423719', NEAREST],
  ['WE-088', '100', 'g', '995.0', '3.199', '3.198999', NEAREST],
  ['WE-089', '100', 'g', '999.0', '3.212', '3.211860', NEAREST],
  ['WE-091', '50', 'g', '995.0', '1.600', '1.599500', NONE],
  ['WE-092', '50', 'g', '999.0', '1.607', '1.605930', NONE],
  ['WE-094', '10', 'tola', '995.0', '3.731', '3.731250', BOTH],
  ['WE-095', '10', 'tola', '999.0', '3.746', '3.746250', BOTH],
  ['section 8.3', '10', 'tola', '999.9', '3.750', '3.749625', NEAREST],
  ['WE-097', '5', 'tael_trade', '995.0', '5.987', '5.986767', NEAREST],
  ['WE-098', '5', 'tael_trade', '999.0', '6.011', '6.010835', NEAREST],
  ['section 8.3', '5', 'tael_trade', '999.9', '6.017', '6.016250', NONE],
  ['WE-100', '1', 'ozt', '995.0', '0.995', '0.995000', BOTH],
  ['WE-101', '1', 'ozt', '999.0', '0.999', '0.999000', BOTH],
];

describe.each(TABLE)('%s: %s %s of %s', (_, bar, unit, assay, printed, exact, rules) => {
  const gross = new Decimal(bar).times(GRAMS_PER_UNIT[unit]).div(GRAMS_PER_UNIT.ozt);

  it(`is ${exact} fine oz exactly, in the book to the microgram`, () => {
    expect(gross.times(assay).div(1000).toFixed(6)).toBe(exact);
    const booked = massFromFineness(fromUnit(new Decimal(bar), unit), fineness({ gold: assay }));
    const off = toUnit(booked.gold, 'ozt').minus(gross.times(assay).div(1000)).abs();
    expect(off.lt('0.00000007')).toBe(true);
  });

  it(`is printed as ${printed}, which is what these rules give: ${rules.join(', ') || 'none'}`, () => {
    const giving = BOTH.filter((rule) => fineOunces(gross, new Decimal(assay), rule).toFixed(3) === printed);
    expect(giving).toEqual(rules);
  });
});
