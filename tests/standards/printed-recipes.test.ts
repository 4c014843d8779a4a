/**
 * Printed recipes of the trade: Warren (dental metallurgy), Pike (arithmetic), Gee (Silversmith's Handbook, 1921) and
 * Henley's Recipes of 1914, all read; worked examples by number. Where print and exact answer differ, the exact one
 * stands here: several recipes miss the carat they claim.
 */
import { describe, expect, it } from 'vitest';
import type { Fineness } from '../../shared/alloy/fineness.ts';
import { fineness, finenessOf, karatToPermille, permilleToKarat } from '../../shared/alloy/fineness.ts';
import { Decimal } from '../../shared/decimal.ts';
import { massFromFineness } from '../../shared/mass/apportion.ts';
import type { MassUnit } from '../../shared/mass/units.ts';
import { fromUnit } from '../../shared/mass/units.ts';
import { massVector, sumMass } from '../../shared/mass/vector.ts';

/** Thousandfold, so that the microgram's rounding stays far below the figures compared. */
const mass = (amount: string, unit: MassUnit) => fromUnit(new Decimal(amount).times(1000), unit);
const melt = (metal: 'gold' | 'silver', fine: string, rest: readonly string[]): Fineness | null => {
  const fineMass = mass(fine, 'gr');
  const gross = rest.reduce((sum, part) => sum + mass(part, 'gr'), fineMass);
  return finenessOf(massVector({ gross, [metal]: fineMass }));
};

describe('gold by its parts in grains, silver and copper after gold', () => {
  it.each([
    ['WE-044', '360', ['66', '54'], '18.0000', true],
    ['WE-046', '864', ['144', '288'], '16.0000', true],
    ['WE-047, claimed 16', '480', ['168', '120'], '15.0000', false],
    ['WE-049', '360', ['34', '113'], '17.0414', true],
    ['WE-050', '480', ['106', '53'], '18.0282', true],
    ['WE-052, claimed 18', '432', ['66', '90'], '17.6327', false],
    ['WE-053, claimed 19', '480', ['54', '84'], '18.6408', false],
    ['WE-055', '432', ['12', '27'], '22.0127', true],
    ['WE-056', '444', ['24', '12'], '22.2000', true],
  ])('%s: %s with %j is %s carat', (name, fine, rest, carat, keeps) => {
    const found = permilleToKarat(melt('gold', fine, rest)?.gold ?? '0');
    expect(found.toFixed(4)).toBe(carat);
    const claimed = /claimed (\d+)/.exec(name)?.[1];
    expect(claimed === undefined || found.gte(claimed)).toBe(keeps);
  });
});

describe('silver by its parts in grains', () => {
  it.each([
    ['WE-026 sterling', '444', ['36'], '925.0000'],
    ['WE-028 Britannia (printed 959)', '460', ['20'], '958.3333'],
    ['WE-029 Britannia for the assay', '462', ['18'], '962.5000'],
    ['sterling for the assay, p. 62', '446', ['34'], '929.1667'],
    ['WE-040 medium solder', '360', ['96', '24'], '750.0000'],
  ])('%s: %s with %j is %s', (_, fine, rest, permille) => {
    expect(melt('silver', fine, rest)?.silver.toFixed(4)).toBe(permille);
  });
});

describe('mixing', () => {
  const lot = (amount: string, unit: MassUnit, karat: string) =>
    massFromFineness(mass(amount, unit), fineness({ gold: karatToPermille(karat) }));

  it.each([
    [
      'WE-008, Pike: 8 oz of 22, 20 oz of 21 and 10 oz of 18 make 20 8/19 carat',
      [lot('8', 'ozt', '22'), lot('20', 'ozt', '21'), lot('10', 'ozt', '18')],
      '20.421053',
    ],
    [
      'WE-004, Warren: 1 dwt of 16 with 1/3 dwt fine is 18 carat',
      [lot('3', 'dwt', '16'), lot('1', 'dwt', '24')],
      '18.000000',
    ],
    [
      'WE-005, Warren: 1 dwt of 16 with 1/2 dwt of 22 is 18 carat',
      [lot('2', 'dwt', '16'), lot('1', 'dwt', '22')],
      '18.000000',
    ],
    [
      'WE-001, Warren: 6 parts gold, 2 silver, 1 copper are 16 carat',
      [lot('6', 'g', '24'), lot('3', 'g', '0')],
      '16.000000',
    ],
  ])('%s', (_, lots, carat) => {
    expect(permilleToKarat(finenessOf(sumMass(lots))?.gold ?? '0').toFixed(6)).toBe(carat);
  });
});
