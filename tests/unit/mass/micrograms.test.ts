/** Grams in their strict form, and micrograms as they are printed. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { gramsText } from '../../../shared/mass/grams-text.ts';
import { MAX_MASS_UG, parseGrams, printGrams, roundHalfEven } from '../../../shared/mass/micrograms.ts';

const anyMass = fc.bigInt({ min: -MAX_MASS_UG, max: MAX_MASS_UG });

describe('grams in JSON', () => {
  it.each([
    ['0', 0n],
    ['12.345', 12_345_000n],
    ['0.000001', 1n],
    ['0.5', 500_000n],
    ['1000000', MAX_MASS_UG],
    ['1000000.000000', MAX_MASS_UG],
  ])('%j is read exactly', (text, ug) => {
    expect(parseGrams(text)).toEqual({ ok: true, ug });
  });

  it.each([
    '',
    ' ',
    ' 1',
    '1 ',
    '1\n',
    'NaN',
    'Infinity',
    '1e3',
    '1E-3',
    '0x10',
    '+1',
    '.5',
    '5.',
    '00.5',
    '01',
    '1,5',
    '1,234.5',
    '1_000',
    '1.0000000',
    '1.2.3',
    '１２',
    '١٢',
    '12g',
    '1n',
    'null',
  ])('%j is no weight', (text) => {
    expect(parseGrams(text)).toEqual({
      ok: false,
      reason: 'A weight is grams such as 12.345, with at most six decimals.',
    });
    expect(parseGrams(text, { signed: true }).ok).toBe(false);
  });

  it.each(['1000000.000001', '1000001', '99999999999'])('%s g is more than a tonne', (text) => {
    const reason = 'That is more than a tonne. Look at the unit and the point again.';
    expect(parseGrams(text)).toEqual({ ok: false, reason });
    expect(parseGrams(`-${text}`, { signed: true })).toEqual({ ok: false, reason });
  });

  it('have a sign only where one is wanted, and minus nothing never', () => {
    expect(parseGrams('-0.126', { signed: true })).toEqual({ ok: true, ug: -126_000n });
    expect(parseGrams('-0.126').ok).toBe(false);
    expect(parseGrams('-0', { signed: true }).ok).toBe(false);
    expect(parseGrams('-0.000000', { signed: true }).ok).toBe(false);
  });

  it('are the same mass again after printing, to the microgram', () => {
    fc.assert(
      fc.property(anyMass, (ug) => {
        expect(parseGrams(printGrams(ug), { signed: true })).toEqual({ ok: true, ug });
        expect(gramsText(printGrams(ug))).toBe(ug);
      }),
    );
  });

  it('of our own records that are not grams are a fault of the program', () => {
    expect(() => gramsText('twelve')).toThrow('not grams');
  });
});

describe('printed grams', () => {
  it.each([
    [0n, 6, '0.000000'],
    [-1n, 6, '-0.000001'],
    [12_345_678n, 6, '12.345678'],
    [12_345_678n, 3, '12.346'],
    [12_345_678n, 0, '12'],
    [999_999_999n, 3, '1000.000'],
    [-400n, 3, '0.000'],
  ])('%d µg with %d decimals is %s', (ug, decimals, text) => {
    expect(printGrams(ug, decimals)).toBe(text);
  });

  it('go to the even figure where they lie half-way', () => {
    expect([500n, 1500n, 2500n, 2501n].map((ug) => printGrams(ug, 3))).toEqual([
      '0.000',
      '0.002',
      '0.002',
      '0.003',
    ]);
    expect([-500n, -1500n, -2500n].map((ug) => printGrams(ug, 3))).toEqual(['0.000', '-0.002', '-0.002']);
  });

  it('have no other places than 0 to 6', () => {
    expect(() => printGrams(1n, 7)).toThrow(RangeError);
    expect(() => printGrams(1n, -1)).toThrow(RangeError);
  });

  it('are never further from the mass than half a unit, and symmetrical about nothing', () => {
    fc.assert(
      fc.property(anyMass, fc.bigInt({ min: 1n, max: 1_000_000n }), (value, unit) => {
        const off = roundHalfEven(value, unit) * unit - value;
        expect((off < 0n ? -off : off) * 2n).toBeLessThanOrEqual(unit);
        expect(roundHalfEven(-value, unit)).toBe(-roundHalfEven(value, unit));
      }),
    );
  });
});
