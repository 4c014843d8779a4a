/** Units there and back. Their factors are checked against their sources in `tests/standards`. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Decimal } from '../../../shared/decimal.ts';
import { MAX_MASS_UG } from '../../../shared/mass/micrograms.ts';
import type { MassUnit } from '../../../shared/mass/units.ts';
import { GRAMS_PER_UNIT, fromUnit, toUnit } from '../../../shared/mass/units.ts';

const UNITS: readonly MassUnit[] = [
  'g',
  'kg',
  'ozt',
  'dwt',
  'gr',
  'ozav',
  'ct',
  'momme',
  'tola',
  'tael_statutory',
  'tael_trade',
  'baht_bar',
  'baht_ornament',
];

describe('a mass in a unit', () => {
  it('is tried here for every unit there is, and "oz" is none', () => {
    expect(Object.keys(GRAMS_PER_UNIT).sort()).toEqual([...UNITS].sort());
  });

  it('is the same mass again when it is read back, whatever the unit', () => {
    fc.assert(
      fc.property(
        fc.bigInt({ min: -MAX_MASS_UG, max: MAX_MASS_UG }),
        fc.constantFrom(...UNITS),
        (ug, unit) => {
          expect(fromUnit(toUnit(ug, unit), unit)).toBe(ug);
        },
      ),
    );
  });

  it('is rounded once, half to even', () => {
    const micrograms = ['0.5', '1.5', '2.5', '2.500001'].map((ug) => new Decimal(ug).div(1_000_000));
    expect(micrograms.map((grams) => fromUnit(grams, 'g'))).toEqual([0n, 2n, 2n, 3n]);
  });
});

describe('decimals', () => {
  it('are printed without an exponent, from a microgram’s share to the value of a tonne', () => {
    expect(new Decimal('0.000000000000000000001').toString()).toBe('0.000000000000000000001');
    expect(new Decimal('123456789012345678901234567890').toString()).toBe('123456789012345678901234567890');
  });

  it('have 40 figures and round half to even', () => {
    expect(new Decimal(2).div(3).toString()).toBe(`0.${'6'.repeat(39)}7`);
    expect(new Decimal('0.25').toDecimalPlaces(1).toString()).toBe('0.2');
    expect(new Decimal('0.35').toDecimalPlaces(1).toString()).toBe('0.4');
  });
});
