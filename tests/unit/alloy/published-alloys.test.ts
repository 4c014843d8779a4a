/** Published compositions add up to the whole; names promise nothing. */
import { describe, expect, it } from 'vitest';
import { isPossibleFineness } from '../../../shared/alloy/fineness.ts';
import type { PublishedAlloy } from '../../../shared/alloy/published-alloys.ts';
import {
  CONSTITUENTS,
  PUBLISHED_ALLOYS,
  finenessOfPublished,
} from '../../../shared/alloy/published-alloys.ts';
import { Decimal } from '../../../shared/decimal.ts';

const sumOf = ({ shares }: PublishedAlloy, end: 'from' | 'to') =>
  CONSTITUENTS.reduce((sum, one) => sum.plus(shares[one]?.[end] ?? 0), new Decimal(0));
const named = (name: string) => PUBLISHED_ALLOYS.find((alloy) => alloy.name === name);

describe.each(PUBLISHED_ALLOYS.map((alloy) => [alloy.name, alloy] as const))('%s', (_, alloy) => {
  it('is the whole: its parts make 1000, or leave room for the balance', () => {
    const [least, most] = [sumOf(alloy, 'from'), sumOf(alloy, 'to')];
    if (alloy.balance === null) expect([least, most].map(String)).toEqual(['1000', '1000']);
    else expect(least.lte(most) && most.lt(1000) && alloy.shares[alloy.balance] === undefined).toBe(true);
  });

  it('has a source, shares from less to more, and a fineness that metal can have', () => {
    expect(alloy.source.title.length).toBeGreaterThan(4);
    for (const one of CONSTITUENTS) {
      const share = alloy.shares[one];
      if (share !== undefined) expect(share.from.gt(0) && share.from.lte(share.to)).toBe(true);
    }
    const fine = finenessOfPublished(alloy);
    if (fine !== null) expect(isPossibleFineness(fine)).toBe(true);
  });
});

it('each has a name of its own', () => {
  const names = PUBLISHED_ALLOYS.map(({ name }) => name);
  expect(new Set(names).size).toBe(names.length);
});

it('Henley’s two golds of 15 in 20 dwt are exactly 750, by their pennyweights and grains', () => {
  const grains = (dwt: number, gr: number) => new Decimal(dwt).times(24).plus(gr);
  const rows = [
    ['18 carat yellow, Henley', grains(2, 18), grains(2, 6)],
    ['18 carat red, Henley', grains(1, 18), grains(3, 6)],
  ] as const;
  for (const [name, silver, copper] of rows) {
    const whole = grains(15, 0).plus(silver).plus(copper);
    const permille = (part: Decimal) => part.times(1000).div(whole).toString();
    expect(permille(grains(15, 0))).toBe(named(name)?.shares.gold?.from.toString());
    expect(permille(silver)).toBe(named(name)?.shares.silver?.from.toString());
    expect(permille(copper)).toBe(named(name)?.shares.copper?.from.toString());
  }
});

it('one figure for each metal is a fineness; a range is none', () => {
  const sterling = named('Sterling silver');
  const threeN = named('3N');
  expect(sterling && finenessOfPublished(sterling)?.silver.toString()).toBe('925');
  expect(threeN && finenessOfPublished(threeN)).toBeNull();
});
