/** Lot codes: readable as people write them; a slip of the hand, a letter of another script or an unseen character is refused. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { checkCharacter, makeLotCode, readLotCode } from '../../../shared/book/lot-code.ts';

const ALPHABET = Array.from('0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZ');
const SOME_CODES = [
  makeLotCode('G', '26', 512n),
  makeLotCode('S', '26', 1n),
  makeLotCode('P', '31', 9999n),
  makeLotCode('Z', '99', 10_000n),
];
/** Whether letter, digits and check character, without hyphens, stand for a lot. */
const isTaken = (plain: string) => readLotCode(plain).ok;
const replaced = (text: string, at: number, by: string) => text.slice(0, at) + by + text.slice(at + 1);
const read = (text: string) => {
  const answer = readLotCode(text);
  return answer.ok ? answer.code : null;
};

describe('a lot code', () => {
  it('is a letter, the year, at least four digits and the check character', () => {
    expect(makeLotCode('G', '26', 512n)).toMatch(/^G26-0512-[0-9A-Z]$/);
    expect(makeLotCode('G', '26', 12_345n)).toMatch(/^G26-12345-[0-9A-Z]$/);
  });

  it('is made of nothing else', () => {
    expect(() => makeLotCode('g', '26', 1n)).toThrow(RangeError);
    expect(() => makeLotCode('GG', '26', 1n)).toThrow(RangeError);
    expect(() => makeLotCode('G', '2026', 1n)).toThrow(RangeError);
    expect(() => makeLotCode('G', '26', 0n)).toThrow(RangeError);
    expect(() => checkCharacter('G26-0512')).toThrow(RangeError);
  });

  it('is read back whatever its number', () => {
    const letter = fc.constantFrom(...ALPHABET.slice(10));
    const year = fc.integer({ min: 0, max: 99 }).map((n) => `${n}`.padStart(2, '0'));
    fc.assert(
      fc.property(letter, year, fc.bigInt({ min: 1n, max: 10n ** 11n }), (l, y, serial) => {
        const code = makeLotCode(l, y, serial);
        expect(read(code)).toBe(code);
      }),
    );
  });

  it('is understood in any case, with other hyphens, with blanks, and without either', () => {
    const code = makeLotCode('G', '26', 512n);
    const [head, number, check] = code.split('-');
    for (const mark of [
      '',
      ' ',
      '-',
      '\u2010',
      '\u2011',
      '\u2012',
      '\u2013',
      '\u2014',
      '\u2212',
      '\uFF0D',
      '\u00A0',
    ])
      expect(read(`  ${[head, number, check].join(mark).toLowerCase()}\n`)).toBe(code);
    const fullWidth = Array.from(code, (c) => String.fromCodePoint((c.codePointAt(0) ?? 0) + 0xfee0)).join(
      '',
    );
    expect(read(fullWidth)).toBe(code);
  });

  it.each([
    ['a zero-width blank', '\u200B'],
    ['a byte order mark', '\uFEFF'],
    ['a soft hyphen', '\u00AD'],
    ['a mark from right to left', '\u200F'],
    ['an override of the direction', '\u202E'],
    ['a word joiner', '\u2060'],
    ['nothing but a null', '\u0000'],
  ])('with %s in it is refused, wherever it stands', (_, unseen) => {
    const code = makeLotCode('G', '26', 512n);
    for (const at of [0, 1, 4, code.length])
      expect(read(code.slice(0, at) + unseen + code.slice(at))).toBeNull();
  });

  it.each([
    ['Cyrillic', 'S', '\u0405'],
    ['Greek', 'P', '\u03A1'],
    ['Cyrillic small', 'P', '\u0440'],
    ['dotless', 'I', '\u0131'],
    ['Arabic-Indic one', '1', '\u0661'],
    ['sharp s, which has two capitals', 'S', '\u00DF'],
  ])('with a %s letter that looks like %s is refused', (_, latin, foreign) => {
    const code = makeLotCode(/[A-Z]/.test(latin) ? latin : 'G', '11', 1111n);
    expect(read(code)).toBe(code);
    expect(read(code.replace(latin, foreign))).toBeNull();
  });

  it.each(['', 'G', 'G26', 'G26-512-V', 'G26-00512-V', '26-0512-V', 'G26-0512', `G26-${'1'.repeat(500)}-V`])(
    '%j is no code',
    (text) => {
      expect(readLotCode(text)).toEqual({
        ok: false,
        reason: 'A lot code is a letter, the year, a number and a check letter, such as on the label.',
      });
    },
  );

  it('with a wrong check character is refused without a hint at the right one', () => {
    const code = makeLotCode('G', '26', 512n);
    const right = code.slice(-1);
    for (const wrong of ALPHABET.filter((character) => character !== right)) {
      const typed = replaced(code, code.length - 1, wrong);
      expect(readLotCode(typed)).toEqual({
        ok: false,
        reason: `No lot has the code ${typed}. The check letter does not fit the rest. Look at the label again, or scan it.`,
      });
    }
  });

  it.each(SOME_CODES)('%s: every single wrong character is caught', (code) => {
    const plain = code.replaceAll('-', '');
    for (let at = 0; at < plain.length; at += 1)
      for (const other of ALPHABET.filter((character) => character !== plain[at]))
        expect([other, at, isTaken(replaced(plain, at, other))]).toEqual([other, at, false]);
  });

  it.each(SOME_CODES)('%s: every swap of two neighbours is caught', (code) => {
    const plain = code.replaceAll('-', '');
    for (let at = 0; at + 1 < plain.length; at += 1) {
      const [a = '', b = ''] = [plain[at], plain[at + 1]];
      const swapped = plain.slice(0, at) + b + a + plain.slice(at + 2);
      expect([swapped, isTaken(swapped)]).toEqual([swapped, swapped === plain]);
    }
  });
});
