/** What is typed as a weight is understood as people type it, and never guessed at. */
import { describe, expect, it } from 'vitest';
import { setFigureRight, setMassRight } from '../../../src/forms/set-right.ts';

describe('a weight on leaving its field', () => {
  it.each([
    ['38,2 g', '38.200'],
    ['38.2', '38.200'],
    [' 1 842,316 g ', '1842.316'],
    ['0.123456', '0.123456'],
    ['12.3450', '12.345'],
    ['7', '7.000'],
    ['2\u2009000.5', '2000.500'],
  ])('%j becomes %j', (typed, right) => {
    expect(setMassRight(typed)).toBe(right);
  });

  it.each(['', 'abc', '1.234.567', '12 oz', '−5'])('%j stays as it was typed', (typed) => {
    expect(setMassRight(typed)).toBe(typed);
  });
});

describe('another figure on leaving its field', () => {
  it.each([
    ['999,9', '999.9'],
    ['1 250,50', '1250.50'],
    ['three', 'three'],
    ['1,2,3', '1,2,3'],
  ])('%j becomes %j', (typed, right) => {
    expect(setFigureRight(typed)).toBe(right);
  });
});
