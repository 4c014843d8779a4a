/**
 * Lot codes such as "G26-0512-V": a letter, the year, a running number, and a check character by ISO/IEC 7064,
 * Mod 37,36 (hybrid system), which catches every single wrong character and every swap of two neighbours, so that a
 * mistyped code is refused and never finds another lot.
 */

const ALPHABET = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZ';
const M = 36;

/** The check character of a payload of digits and capitals (ISO/IEC 7064, hybrid system Mod 37,36). */
export function checkCharacter(payload: string): string {
  let p = M;
  for (const character of payload) {
    const value = ALPHABET.indexOf(character);
    if (value < 0) throw new RangeError('a lot code has digits and capitals only');
    p = (((p + value) % M || M) * 2) % (M + 1);
  }
  return ALPHABET.charAt((M + 1 - p) % M);
}

/** A code from its letter, two-digit year and running number (at least four digits). */
export function makeLotCode(letter: string, year: string, serial: bigint): string {
  const number = serial.toString().padStart(4, '0');
  return `${letter}${year}-${number}-${checkCharacter(`${letter}${year}${number}`)}`;
}

export type ReadLotCode =
  { readonly ok: true; readonly code: string } | { readonly ok: false; readonly reason: string };

const WRITTEN = /^([A-Z])(\d{2})(\d{4,})([0-9A-Z])$/;

/**
 * Reads a code as it is typed or scanned: any case, with or without hyphens and blanks. Refuses look-alike letters of
 * other scripts, invisible characters and a wrong check character, without ever suggesting the right one.
 */
export function readLotCode(text: string): ReadLotCode {
  const plain = text
    .trim()
    .replace(/[\s\u2010-\u2015\u2212-]/gu, '')
    .toUpperCase();
  const match = WRITTEN.exec(plain);
  if (match === null) {
    return {
      ok: false,
      reason: 'A lot code is a letter, the year, a number and a check letter, such as on the label.',
    };
  }
  const [, letter = '', year = '', number = '', check = ''] = match;
  const code = `${letter}${year}-${number}-${check}`;
  if (checkCharacter(`${letter}${year}${number}`) !== check) {
    return {
      ok: false,
      reason: `No lot has the code ${code}. The check letter does not fit the rest. Look at the label again, or scan it.`,
    };
  }
  return { ok: true, code };
}
