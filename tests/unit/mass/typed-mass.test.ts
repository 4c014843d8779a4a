/** Weights as people type and paste them: understood where they can mean one thing, refused where they can mean two. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { MAX_MASS_UG, printGrams } from '../../../shared/mass/micrograms.ts';
import { readTypedMass } from '../../../shared/mass/typed-mass.ts';

const reasonOf = (text: string) => {
  const read = readTypedMass(text);
  return read.ok ? `taken as ${printGrams(read.ug)}` : read.reason;
};

describe('a typed weight', () => {
  it.each([
    ['12.345', '12.345000'],
    ['12.3', '12.300000'],
    ['38,2 g', '38.200000'],
    ['38,2', '38.200000'],
    [' 38.2G ', '38.200000'],
    ['.5', '0.500000'],
    [',5', '0.500000'],
    ['5.', '5.000000'],
    ['012.5', '12.500000'],
    ['0', '0.000000'],
    ['0.1234560', '0.123456'],
  ])('%j is %s g', (text, grams) => {
    expect(reasonOf(text)).toBe(`taken as ${grams}`);
  });

  it.each([
    ['an ordinary blank', '1 842,316'],
    ['a thin blank', '1\u2009842,316'],
    ['a narrow hard blank', '1\u202F842.316 g'],
    ['a hard blank', '1\u00A0842.316'],
    ['a comma', '1,842.316'],
    ['a point', '1.842,316'],
  ])('may have %s between its thousands', (_, text) => {
    expect(reasonOf(text)).toBe('taken as 1842.316000');
  });

  it('is never taken for a thousand times as much or as little', () => {
    expect(reasonOf('1.234')).toBe('taken as 1.234000');
    expect(reasonOf('1234')).toBe('taken as 1234.000000');
    expect(reasonOf('1,234')).toBe('1,234 may be 1.234 or 1234. Type the one that is meant.');
    expect(reasonOf('250,000 g')).toBe('250,000 may be 250.000 or 250000. Type the one that is meant.');
  });

  it('may have a comma before three decimals where it can’t be thousands', () => {
    expect(reasonOf('0,234')).toBe('taken as 0.234000');
    expect(reasonOf('1234,567')).toBe('taken as 1234.567000');
    expect(reasonOf('1,2345')).toBe('taken as 1.234500');
  });

  it.each([
    '1,234.567,8',
    '1.234,567.8',
    '1,234,567',
    '1.234.567',
    '12,34.5',
    '0,123.4',
    '12.345 13.2',
    '12.345 67',
    '1 23',
    '12 3456',
    '1..2',
    '1.2,',
  ])('%j is refused: where the decimals begin is not clear', (text) => {
    expect(reasonOf(text)).toBe(
      'It is not clear where the decimals begin. Type the weight without marks between thousands.',
    );
  });

  it.each([
    'abc',
    '.',
    ',',
    'g',
    'NaN',
    'Infinity',
    '1e3',
    '12½',
    '١٢',
    '１２',
    '+5',
    '--5',
    '5-',
    '1\u200B2',
    '9'.repeat(41),
  ])('%j is refused as no number, or with an unknown unit', (text) => {
    expect(readTypedMass(text).ok).toBe(false);
  });

  it('is not less than nothing, whichever minus is typed', () => {
    for (const text of ['-5', '−5', '- 5', '-0'])
      expect(reasonOf(text)).toBe('A weight is not less than nothing. Look at the figure again.');
  });

  it('has to be there', () => {
    for (const text of ['', '  ', '\u2009']) expect(reasonOf(text)).toBe('Enter the weight.');
  });

  it('has at most six decimals, and is at most a tonne', () => {
    expect(reasonOf('1.0000001')).toBe('A weight has at most six decimals of a gram. Leave the others away.');
    expect(reasonOf('1000000')).toBe('taken as 1000000.000000');
    expect(reasonOf('1000000.000001')).toMatch('more than a tonne');
    expect(reasonOf('1001 kg')).toMatch('more than a tonne');
  });
});

describe('a unit behind it', () => {
  it.each([
    ['1 ozt', '31.103477'],
    ['1 dwt', '1.555174'],
    ['1 grain', '0.064799'],
    ['480 grains', '31.103477'],
    ['1.5ct', '0.300000'],
    ['1 tola', '11.663804'],
    ['0.5 kg', '500.000000'],
    ['1 momme', '3.750000'],
  ])('%j is %s g, rounded once', (text, grams) => {
    expect(reasonOf(text)).toBe(`taken as ${grams}`);
  });

  it('is the field’s own where none is typed, and goes before it where one is', () => {
    expect(readTypedMass('1', 'ozt')).toEqual({ ok: true, ug: 31_103_477n });
    expect(readTypedMass('31.103477 g', 'ozt')).toEqual({ ok: true, ug: 31_103_477n });
    expect(readTypedMass('10 gr', 'gr')).toEqual({ ok: true, ug: 647_989n });
  });

  it('that means two things is refused', () => {
    expect(reasonOf('1 oz')).toBe('An ounce may be troy or avoirdupois. Type ozt for troy ounces, or grams.');
    expect(reasonOf('5 gr')).toBe('gr may be grains or grams. Type g for grams, or grains.');
    expect(reasonOf('1 tael')).toMatch('may be the statutory one');
    expect(reasonOf('1 baht')).toMatch('weigh differently');
    expect(reasonOf('1 stone')).toBe('stone is no unit of weight here. Type grams.');
  });
});

it('what is printed is read back as the same mass', () => {
  fc.assert(
    fc.property(fc.bigInt({ min: 0n, max: MAX_MASS_UG }), (ug) => {
      expect(readTypedMass(printGrams(ug))).toEqual({ ok: true, ug });
    }),
  );
});

it('whatever is typed gives a weight from nothing to a tonne or a sentence, and never throws', () => {
  const typed = fc.string({ unit: fc.constantFrom(...Array.from('0123456789.,-−  goztkdw\u2009e')) });
  fc.assert(
    fc.property(fc.oneof(typed, fc.string({ unit: 'binary' })), (text) => {
      const read = readTypedMass(text);
      if (read.ok) expect(read.ug >= 0n && read.ug <= MAX_MASS_UG).toBe(true);
      else expect(read.reason).toMatch(/[.]$/);
    }),
    { numRuns: 2000 },
  );
});
