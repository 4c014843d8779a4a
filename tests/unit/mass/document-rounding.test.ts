/** What a document shows of a booked mass, and what it leaves over. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Decimal } from '../../../shared/decimal.ts';
import { DOCUMENT_RULES, documentFigure, fineOunces } from '../../../shared/mass/document-rounding.ts';
import { MAX_MASS_UG } from '../../../shared/mass/micrograms.ts';
import { fromUnit } from '../../../shared/mass/units.ts';

const RULES = [
  'fine_down',
  'fine_half_up',
  'good_delivery_gold_gross',
  'good_delivery_silver_gross',
] as const;
const mass = fc.bigInt({ min: 0n, max: MAX_MASS_UG });

describe('a fine weight', () => {
  it('goes down, or to the nearest with halves up', () => {
    const gross = new Decimal(50).div('31.1034768');
    expect(fineOunces(gross, new Decimal(999), 'fine_down').toFixed(3)).toBe('1.605');
    expect(fineOunces(gross, new Decimal(999), 'fine_half_up').toFixed(3)).toBe('1.606');
    expect(fineOunces(new Decimal('0.0005'), new Decimal(1000), 'fine_half_up').toFixed(3)).toBe('0.001');
    expect(fineOunces(new Decimal('0.0015'), new Decimal(1000), 'fine_down').toFixed(3)).toBe('0.001');
  });
});

describe('a booked mass on a document', () => {
  it('is tried here by every rule there is', () => {
    expect(Object.keys(DOCUMENT_RULES)).toEqual(RULES);
  });

  it('of nothing is nothing, and less than nothing is refused', () => {
    expect(documentFigure(0n, 'fine_down')).toEqual({ ounces: new Decimal(0), left_over: 0n });
    expect(() => documentFigure(-1n, 'fine_down')).toThrow(RangeError);
  });

  it('comes back as the ounces that were booked, though the book rounds to the microgram', () => {
    expect(documentFigure(fromUnit(new Decimal('0.498'), 'ozt'), 'fine_down').ounces.toFixed(3)).toBe(
      '0.498',
    );
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 32_000_000 }), (thousandths) => {
        const ounces = new Decimal(thousandths).div(1000);
        for (const rule of ['fine_down', 'fine_half_up'] as const) {
          const shown = documentFigure(fromUnit(ounces, 'ozt'), rule);
          expect(shown.ounces.eq(ounces)).toBe(true);
          expect(shown.left_over).toBe(0n);
        }
      }),
    );
  });

  it('and what is left over are the whole mass again, less than one step of the rule', () => {
    fc.assert(
      fc.property(mass, fc.constantFrom(...RULES), (ug, rule) => {
        const { ounces, left_over } = documentFigure(ug, rule);
        expect(fromUnit(ounces, 'ozt') + left_over).toBe(ug);
        const step = fromUnit(DOCUMENT_RULES[rule].step_ozt, 'ozt') + 1n;
        expect(left_over < step && left_over > -step).toBe(true);
        if (rule !== 'fine_half_up') expect(left_over >= -1n).toBe(true);
      }),
    );
  });
});
