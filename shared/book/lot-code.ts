/**
 * Lot codes such as "G26-0512-V": a letter, the year, a running number, and a check character by ISO/IEC 7064,
 * Mod 37,36 (hybrid system; the method is from memory). It catches every single wrong character and, but for about one
 * in two hundred, every swap of two neighbours, as `tests/standards/iso-7064.test.ts` shows by trying them all. So a
 * mistyped code is refused; what is booked still shows the lot's description beside its code.
 */

const ALPHABET = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZ';
const M = 36;

/**
 * The check character of a payload of digits and capitals: for a lot code, letter, year and number without hyphens.
 * Throws for any other character.
 */
export function checkCharacter(payload: string): string {
  let p = M;
  for (const character of payload) {
    const value = ALPHABET.indexOf(character);
    if (value < 0) throw new RangeError('a lot code has digits and capitals only');
    p = (((p + value) % M || M) * 2) % (M + 1);
  }
  return ALPHABET.charAt((M + 1 - p) % M);
}

/**
 * A code from its capital letter, two-digit year and running number (from 1; written with at least four digits).
 * Throws where one of them is not so, since no label may carry a code that can't be read back.
 */
export function makeLotCode(letter: string, year: string, serial: bigint): string {
  if (!/^[A-Z]$/.test(letter) || !/^\d{2}$/.test(year) || serial < 1n)
    throw new RangeError('a lot code has a capital, a year of two digits and a number from 1');
  const number = serial.toString().padStart(4, '0');
  return `${letter}${year}-${number}-${checkCharacter(`${letter}${year}${number}`)}`;
}

export type ReadLotCode =
  { readonly ok: true; readonly code: string } | { readonly ok: false; readonly reason: string };

/** Blanks and the hyphens and dashes that keyboards, scanners and documents put for "-". */
const BETWEEN = /[ \t\u2010-\u2015\u2212-]/g;
/** ASCII only, before capitals are made: some letters of other scripts have a Latin capital. */
const WRITTEN = /^([A-Za-z])(\d{2})(\d{4}|[1-9]\d{4,11})([0-9A-Za-z])$/;

/**
 * Reads a code as it is typed or scanned: any case, full-width letters, look-alike hyphens, with or without hyphens and
 * blanks. Refuses look-alike letters of other scripts, characters that can't be seen, and a wrong check character,
 * without ever suggesting the right one.
 */
export function readLotCode(text: string): ReadLotCode {
  const match = WRITTEN.exec(text.normalize('NFKC').trim().replace(BETWEEN, ''));
  if (match === null || /\uFEFF/.test(text)) {
    return {
      ok: false,
      reason: 'A lot code is a letter, the year, a number and a check letter, such as on the label.',
    };
  }
  const [letter = '', year = '', number = '', check = ''] = match.slice(1).map((part) => part.toUpperCase());
  const code = `${letter}${year}-${number}-${check}`;
  if (checkCharacter(`${letter}${year}${number}`) !== check) {
    return {
      ok: false,
      reason: `No lot has the code ${code}. The check letter does not fit the rest. Look at the label again, or scan it.`,
    };
  }
  return { ok: true, code };
}
