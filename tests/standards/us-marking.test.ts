/**
 * United States: 15 U.S.C. 295 as amended in 1976 (limits read, date of effect from memory): gold not under its karat
 * by more than 3/1000, or 7/1000 where assayed with its solder. Silver 4/1000 and 10/1000 (15 U.S.C. 296, from memory).
 * Watchcases and flatware, 3/1000 with solder too, are judged as free of solder. State law may keep older limits.
 */
import { describe, expect, it } from 'vitest';
import { checkMarking, needsMark } from '../../shared/alloy/marking.ts';
import { Decimal } from '../../shared/decimal.ts';

const ask = (metal: 'gold' | 'silver', permille: string, mark: string, with_solder: boolean) =>
  checkMarking({ place: 'united_states', metal, permille: new Decimal(permille), mark, with_solder });

describe('gold', () => {
  it.each([
    ['583.334', '14K', false, 'meets'],
    ['580.334', '14K', false, 'within_tolerance'],
    ['580.33', '14K', false, 'under'],
    ['576.334', '14K', true, 'within_tolerance'],
    ['576.33', '14K', true, 'under'],
    ['747', '18K', false, 'within_tolerance'],
    ['746.9', '18K', false, 'under'],
    ['743', '18K', true, 'within_tolerance'],
    ['997', '24K', false, 'within_tolerance'],
  ] as const)('of %s marked %s, with solder %s: %s', (found, mark, withSolder, verdict) => {
    expect(ask('gold', found, mark, withSolder).verdict).toBe(verdict);
  });

  it('within the tolerance is told so, and who decides', () => {
    expect(ask('gold', '747.5', '18K', false).sentence).toBe(
      '747.5 gold is 2.5 under the mark 18K; the United States allows 3 free of solder, so it may pass. The local authority decides.',
    );
  });

  it('past the tolerance reaches only what it is without any', () => {
    expect(ask('gold', '742', '18K', true)).toMatchObject({ verdict: 'under', reaches: '14K' });
  });
});

describe('silver', () => {
  it.each([
    ['921', 'sterling', false, 'within_tolerance'],
    ['920.9', 'sterling', false, 'under'],
    ['915', 'sterling', true, 'within_tolerance'],
    ['914.9', 'sterling', true, 'under'],
    ['896', 'coin', false, 'within_tolerance'],
  ] as const)('of %s marked %s, with solder %s: %s', (found, mark, withSolder, verdict) => {
    expect(ask('silver', found, mark, withSolder).verdict).toBe(verdict);
  });
});

it('no exemption by weight is published for it', () => {
  expect(needsMark('united_states', 'gold', 1n)).toBe(true);
});
