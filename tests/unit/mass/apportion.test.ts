/** Sharing out: nothing is made, nothing is lost, no part is impossible. Largest remainder, ties to the earlier part. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fineness } from '../../../shared/alloy/fineness.ts';
import { Decimal } from '../../../shared/decimal.ts';
import { apportion, massFromFineness, splitVector, takeGross } from '../../../shared/mass/apportion.ts';
import { MAX_MASS_UG } from '../../../shared/mass/micrograms.ts';
import type { MassVector } from '../../../shared/mass/vector.ts';
import {
  METALS,
  ZERO_MASS,
  addMass,
  equalMass,
  isPossibleMass,
  massVector,
  subtractMass,
  sumMass,
} from '../../../shared/mass/vector.ts';
import { massAndPart, possibleFineness, possibleMass, someMass } from '../../support/masses.ts';

const sum = (list: readonly bigint[]) => list.reduce((all, one) => all + one, 0n);
const size = (value: bigint) => (value < 0n ? -value : value);
const weights = fc.array(someMass(), { minLength: 1, maxLength: 12 }).filter((list) => sum(list) > 0n);

describe('apportion', () => {
  it('gives what is left over to the largest remainders', () => {
    expect(apportion(10n, [1n, 1n, 1n])).toEqual([4n, 3n, 3n]);
    expect(apportion(100n, [50n, 30n, 21n])).toEqual([49n, 30n, 21n]);
    expect(apportion(1n, [1n, 3n, 2n])).toEqual([0n, 1n, 0n]);
  });

  it('gives ties to the earlier part', () => {
    expect(apportion(1n, [1n, 1n])).toEqual([1n, 0n]);
    expect(apportion(3n, [1n, 1n, 1n, 1n])).toEqual([1n, 1n, 1n, 0n]);
  });

  it('shares nothing as nothing, even by nothing', () => {
    expect(apportion(0n, [3n, 4n])).toEqual([0n, 0n]);
    expect(apportion(0n, [0n, 0n])).toEqual([0n, 0n]);
    expect(apportion(0n, [])).toEqual([]);
  });

  it('refuses what can’t be shared', () => {
    expect(() => apportion(1n, [0n, 0n])).toThrow(RangeError);
    expect(() => apportion(1n, [])).toThrow(RangeError);
    expect(() => apportion(5n, [2n, -1n])).toThrow(RangeError);
    expect(() => apportion(0n, [1n, -1n])).toThrow(RangeError);
    expect(() => apportion(-1n, [1n])).toThrow(RangeError);
  });

  it('always sums to the whole, each part within one of its exact share', () => {
    fc.assert(
      fc.property(someMass(), weights, (total, list) => {
        const parts = apportion(total, list);
        expect(sum(parts)).toBe(total);
        parts.forEach((part, index) => {
          expect(part >= 0n).toBe(true);
          expect(size(part * sum(list) - total * (list[index] ?? 0n)) < sum(list)).toBe(true);
        });
      }),
    );
  });

  it('gives nothing to who has no weight, and the weights themselves where they sum to the whole', () => {
    fc.assert(
      fc.property(someMass(), weights, (total, list) => {
        expect(apportion(total, [0n, ...list, 0n])).toEqual([0n, ...apportion(total, list), 0n]);
        expect(apportion(sum(list), list)).toEqual(list);
      }),
    );
  });
});

describe('the mass of a fineness', () => {
  it('is gross times parts per thousand', () => {
    expect(massFromFineness(20_000_000n, fineness({ gold: '750', silver: '125' }))).toEqual(
      massVector({ gross: 20_000_000n, gold: 15_000_000n, silver: 2_500_000n }),
    );
  });

  it('is right to the microgram for a karat that no decimal holds', () => {
    const karat22 = fineness({ gold: new Decimal(22_000).div(24) });
    expect(massFromFineness(24n, karat22).gold).toBe(22n);
    expect(massFromFineness(MAX_MASS_UG, karat22).gold).toBe((MAX_MASS_UG * 22n + 12n) / 24n);
  });

  it('is possible even where the metals are thirds that make up the whole', () => {
    const third = new Decimal(1000).div(3);
    const mass = massFromFineness(10n, fineness({ gold: third, silver: third, platinum: third }));
    expect(isPossibleMass(mass)).toBe(true);
    const sixths = { gold: third.times(2), silver: third.div(2), platinum: third.div(2) };
    expect(massFromFineness(24n, fineness(sixths))).toEqual(
      massVector({ gross: 24n, gold: 16n, silver: 4n, platinum: 4n }),
    );
    const halves = { gold: '333.33335', silver: '333.33335', platinum: '333.3333' };
    expect(isPossibleMass(massFromFineness(MAX_MASS_UG, fineness(halves)))).toBe(true);
  });

  it('can’t have more metal than there is', () => {
    expect(() => massFromFineness(1n, fineness({ gold: '900', silver: '100.0001' }))).toThrow(RangeError);
    expect(() => massFromFineness(1n, fineness({ gold: '-1' }))).toThrow(RangeError);
    expect(() => massFromFineness(-1n, fineness({ gold: '750' }))).toThrow(RangeError);
  });

  it('has gross as given, each metal within a microgram, and never more fine than gross', () => {
    fc.assert(
      fc.property(someMass(), possibleFineness, (gross, f) => {
        const mass = massFromFineness(gross, f);
        expect(mass.gross).toBe(gross);
        expect(isPossibleMass(mass)).toBe(true);
        for (const metal of METALS) {
          const exact = f[metal].times(gross.toString()).div(1000);
          expect(exact.minus(mass[metal].toString()).abs().lt(1)).toBe(true);
        }
      }),
    );
  });
});

describe('a part of a holding', () => {
  const holding = massVector({ gross: 100n, gold: 75n, silver: 12n });

  it('is fine in proportion to gross', () => {
    expect(takeGross(holding, 40n)).toEqual(massVector({ gross: 40n, gold: 30n, silver: 5n }));
  });

  it('is all that is there where all of it is taken, and nothing where nothing is', () => {
    expect(takeGross(holding, 100n)).toEqual(holding);
    expect(takeGross(holding, 0n)).toEqual(ZERO_MASS);
    expect(takeGross(ZERO_MASS, 0n)).toEqual(ZERO_MASS);
  });

  it('is never more than there is', () => {
    expect(() => takeGross(holding, 101n)).toThrow(RangeError);
    expect(() => takeGross(ZERO_MASS, 1n)).toThrow(RangeError);
    expect(() => takeGross(holding, -1n)).toThrow(RangeError);
  });

  it('and what is left are both possible and make the whole', () => {
    fc.assert(
      fc.property(massAndPart, ({ whole, gross }) => {
        const part = takeGross(whole, gross);
        const left = subtractMass(whole, part);
        expect(part.gross).toBe(gross);
        expect(isPossibleMass(part) && isPossibleMass(left)).toBe(true);
        expect(equalMass(addMass(part, left), whole)).toBe(true);
        for (const metal of METALS)
          expect(size(part[metal] * whole.gross - whole[metal] * gross) <= whole.gross).toBe(true);
      }),
    );
  });

  it('taken piece by piece empties the holding to the last microgram', () => {
    fc.assert(
      fc.property(possibleMass(1_000_000n), fc.array(fc.integer({ min: 1, max: 99 })), (whole, shares) => {
        const taken: MassVector[] = [];
        let left = whole;
        for (const share of shares) {
          const part = takeGross(left, (left.gross * BigInt(share)) / 100n);
          taken.push(part);
          left = subtractMass(left, part);
          expect(isPossibleMass(left)).toBe(true);
        }
        taken.push(takeGross(left, left.gross));
        expect(sumMass(taken)).toEqual(whole);
      }),
    );
  });
});

describe('a whole shared out', () => {
  const whole = massVector({ gross: 10n, gold: 7n, silver: 2n });

  it('has gross exactly as weighed where the weights make the whole, else in proportion', () => {
    expect(splitVector(whole, [3n, 7n]).map((part) => part.gross)).toEqual([3n, 7n]);
    expect(splitVector(whole, [1n, 1n, 2n]).map((part) => part.gross)).toEqual([3n, 2n, 5n]);
  });

  it('of nothing is nothing for everyone', () => {
    expect(splitVector(ZERO_MASS, [0n, 0n])).toEqual([ZERO_MASS, ZERO_MASS]);
    expect(splitVector(ZERO_MASS, [])).toEqual([]);
    expect(splitVector(ZERO_MASS, [2n, 3n])).toEqual([ZERO_MASS, ZERO_MASS]);
  });

  it('can’t be impossible, and can’t be shared by nothing', () => {
    expect(() => splitVector(massVector({ gross: 1n, gold: 2n }), [1n])).toThrow(RangeError);
    expect(() => splitVector(massVector({ gross: 1n, gold: -1n }), [1n])).toThrow(RangeError);
    expect(() => splitVector(whole, [])).toThrow(RangeError);
    expect(() => splitVector(whole, [0n])).toThrow(RangeError);
    expect(() => splitVector(whole, [11n, -1n])).toThrow(RangeError);
  });

  it('makes possible parts that sum to it in all five masses, each fine within a microgram per part', () => {
    fc.assert(
      fc.property(possibleMass(), weights, (mass, list) => {
        const parts = splitVector(mass, list);
        expect(sumMass(parts)).toEqual(mass);
        expect(parts.map((part) => part.gross)).toEqual(apportion(mass.gross, list));
        for (const part of parts) {
          expect(isPossibleMass(part)).toBe(true);
          for (const metal of METALS) {
            const off = size(part[metal] * mass.gross - mass[metal] * part.gross);
            expect(off <= mass.gross * BigInt(list.length)).toBe(true);
          }
        }
      }),
    );
  });
});
