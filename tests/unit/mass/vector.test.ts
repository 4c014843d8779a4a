/** The five masses that travel together. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  MASS_KEYS,
  ZERO_MASS,
  addMass,
  equalMass,
  fineTotal,
  hasNegative,
  isPossibleMass,
  isZeroMass,
  massFromJson,
  massToJson,
  massVector,
  negateMass,
  subtractMass,
  sumMass,
} from '../../../shared/mass/vector.ts';
import { possibleMass } from '../../support/masses.ts';

const some = massVector({ gross: 10n, gold: 7n, silver: 2n });

describe('a mass vector', () => {
  it('has nothing of what is not named', () => {
    expect(some).toEqual({ gross: 10n, gold: 7n, silver: 2n, platinum: 0n, palladium: 0n });
    expect(massVector({})).toEqual(ZERO_MASS);
  });

  it('knows what is in it together', () => {
    expect(fineTotal(some)).toBe(9n);
    expect(fineTotal(massVector({ gold: 1n, silver: 2n, platinum: 3n, palladium: 4n }))).toBe(10n);
  });

  it('is nothing only where all five are', () => {
    expect(isZeroMass(ZERO_MASS)).toBe(true);
    for (const key of MASS_KEYS) {
      expect(isZeroMass({ ...ZERO_MASS, [key]: 1n })).toBe(false);
      expect(equalMass({ ...some, [key]: 99n }, some)).toBe(false);
    }
    expect(equalMass({ ...some }, some)).toBe(true);
  });

  it('is possible where nothing is below nothing and the metals are at most gross', () => {
    expect(isPossibleMass(ZERO_MASS)).toBe(true);
    expect(isPossibleMass(massVector({ gross: 10n, gold: 7n, silver: 3n }))).toBe(true);
    expect(isPossibleMass(massVector({ gross: 10n, gold: 7n, silver: 4n }))).toBe(false);
    for (const key of MASS_KEYS) {
      expect(hasNegative({ ...some, [key]: -1n })).toBe(true);
      expect(isPossibleMass({ ...some, [key]: -1n })).toBe(false);
    }
  });
});

describe('sums of masses', () => {
  it('go back and forth exactly, in any order', () => {
    fc.assert(
      fc.property(possibleMass(), possibleMass(), possibleMass(), (a, b, c) => {
        expect(subtractMass(addMass(a, b), b)).toEqual(a);
        expect(addMass(a, negateMass(a))).toEqual(ZERO_MASS);
        expect(sumMass([a, b, c])).toEqual(sumMass([c, a, b]));
        expect(isPossibleMass(sumMass([a, b, c]))).toBe(true);
      }),
    );
    expect(sumMass([])).toEqual(ZERO_MASS);
  });
});

describe('a mass in JSON', () => {
  it('is grams with six decimals under the names of the fields', () => {
    expect(massToJson(massVector({ gross: 12_345_000n, gold: 9_258_750n, palladium: -1n }))).toEqual({
      gross_g: '12.345000',
      gold_g: '9.258750',
      silver_g: '0.000000',
      platinum_g: '0.000000',
      palladium_g: '-0.000001',
    });
  });

  it('comes back as it went', () => {
    fc.assert(
      fc.property(possibleMass(), (mass) => {
        expect(massFromJson(massToJson(mass))).toEqual(mass);
        expect(massFromJson(massToJson(negateMass(mass)))).toEqual(negateMass(mass));
      }),
    );
  });

  it('that is not grams is a fault of the program', () => {
    expect(() => massFromJson({ ...massToJson(some), gold_g: '7,0' })).toThrow('not grams');
  });
});
