/** Parts per thousand: of a mass, of a karat, and as the trade writes them. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  fineness,
  finenessOf,
  isPossibleFineness,
  karatToPermille,
  permilleToKarat,
  printPermille,
} from '../../../shared/alloy/fineness.ts';
import { Decimal } from '../../../shared/decimal.ts';
import { massFromFineness } from '../../../shared/mass/apportion.ts';
import { METALS, ZERO_MASS, massVector } from '../../../shared/mass/vector.ts';
import { possibleFineness, possibleMass } from '../../support/masses.ts';

describe('the fineness of a mass', () => {
  it('is each metal’s parts per thousand of gross', () => {
    const found = finenessOf(massVector({ gross: 20_000n, gold: 15_000n, silver: 2_500n }));
    expect(METALS.map((metal) => found?.[metal].toString())).toEqual(['750', '125', '0', '0']);
  });

  it('is none where there is nothing', () => {
    expect(finenessOf(ZERO_MASS)).toBeNull();
    expect(finenessOf(massVector({ gross: -1n }))).toBeNull();
  });

  it('is possible wherever the mass is', () => {
    fc.assert(
      fc.property(possibleMass(), (mass) => {
        const found = finenessOf(mass);
        if (mass.gross > 0n) expect(found !== null && isPossibleFineness(found)).toBe(true);
      }),
    );
  });

  it('is what the mass was made of, to within a microgram of gross', () => {
    fc.assert(
      fc.property(fc.bigInt({ min: 1n, max: 10n ** 12n }), possibleFineness, (gross, f) => {
        const found = finenessOf(massFromFineness(gross, f));
        for (const metal of METALS) {
          const off = (found?.[metal] ?? new Decimal(0)).minus(f[metal]).abs();
          expect(off.lt(new Decimal(1000).div(gross.toString()))).toBe(true);
        }
      }),
    );
  });
});

describe('a fineness', () => {
  it('has nothing of what is not named, and takes figures as text', () => {
    expect(fineness({ gold: '585' }).gold.toString()).toBe('585');
    expect(fineness({ gold: '585' }).palladium.toString()).toBe('0');
  });

  it.each([
    [{ gold: '1000' }, true],
    [{}, true],
    [{ gold: '750', silver: '250' }, true],
    [{ gold: '750', silver: '250.0001' }, false],
    [{ gold: '1000.0001' }, false],
    [{ gold: '-0.0001' }, false],
  ])('%j is possible: %s', (parts, possible) => {
    expect(isPossibleFineness(fineness(parts))).toBe(possible);
  });

  it('is written bare, as the trade does, with no decimals that are nothing', () => {
    expect(['750', '750.0000', '999.9', '916.6666', '0'].map((f) => printPermille(new Decimal(f)))).toEqual([
      '750',
      '750',
      '999.9',
      '916.7',
      '0',
    ]);
    expect(printPermille(new Decimal('916.6666'), 2)).toBe('916.67');
  });
});

describe('a karat', () => {
  it('is a 24th part', () => {
    expect(karatToPermille('18').toString()).toBe('750');
    expect(permilleToKarat('585').toString()).toBe('14.04');
  });

  it('comes back from per mille as it went', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 2400 }), (hundredths) => {
        const karat = new Decimal(hundredths).div(100);
        expect(permilleToKarat(karatToPermille(karat)).toDecimalPlaces(20).eq(karat)).toBe(true);
      }),
    );
  });
});
