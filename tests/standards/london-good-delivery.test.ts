/**
 * London Good Delivery Rules, Annex C and specification (read): specimen line 401.125 oz gross of 995.8 gives 399.440
 * fine oz; gross of gold in multiples of 0.025 oz and of silver of 0.1 oz, rounded down. The rule for the third decimal
 * of fine weight was not seen; the specimen does not decide it.
 */
import { describe, expect, it } from 'vitest';
import { fineness } from '../../shared/alloy/fineness.ts';
import { Decimal } from '../../shared/decimal.ts';
import { massFromFineness } from '../../shared/mass/apportion.ts';
import { documentFigure, fineOunces, roundOunces } from '../../shared/mass/document-rounding.ts';
import { fromUnit, toUnit } from '../../shared/mass/units.ts';

describe('the specimen line (WE-075)', () => {
  const gross = new Decimal('401.125');
  const permille = new Decimal('995.8');

  it('is 399.440275 oz exactly, and 399.440 by either rule', () => {
    expect(gross.times(permille).div(1000).toString()).toBe('399.440275');
    for (const rule of ['fine_down', 'fine_half_up'] as const)
      expect(fineOunces(gross, permille, rule).toFixed(3)).toBe('399.440');
  });

  it('is booked to the microgram and shown as printed', () => {
    const booked = massFromFineness(fromUnit(gross, 'ozt'), fineness({ gold: permille }));
    expect(toUnit(booked.gold, 'ozt').minus('399.440275').abs().lt('0.0000001')).toBe(true);
    const { ounces, left_over } = documentFigure(booked.gold, 'fine_down');
    expect(ounces.toFixed(3)).toBe('399.440');
    expect(left_over).toBe(booked.gold - fromUnit(new Decimal('399.440'), 'ozt'));
    expect(documentFigure(booked.gross, 'good_delivery_gold_gross').ounces.toFixed(3)).toBe('401.125');
  });
});

describe('gross weight', () => {
  it.each([
    ['401.149', '401.125'],
    ['401.150', '401.150'],
    ['400.0249', '400.000'],
  ])('of gold: %s oz is shown as %s', (weighed, shown) => {
    expect(roundOunces(new Decimal(weighed), 'good_delivery_gold_gross').toFixed(3)).toBe(shown);
  });

  it.each([
    ['1000.09', '1000.0'],
    ['999.99', '999.9'],
    ['1000.1', '1000.1'],
  ])('of silver: %s oz is shown as %s', (weighed, shown) => {
    expect(roundOunces(new Decimal(weighed), 'good_delivery_silver_gross').toFixed(1)).toBe(shown);
  });
});
