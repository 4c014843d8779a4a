/**
 * ISO/IEC 7064, hybrid system Mod 37,36 (from memory: the standard itself was not read). Its two promises are tried
 * out: every single substitution is found, and nearly every transposition of neighbours.
 */
import { describe, expect, it } from 'vitest';
import { checkCharacter, makeLotCode, readLotCode } from '../../shared/book/lot-code.ts';

const ALPHABET = Array.from('0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZ');

/** The rule once more, written as the standard states it for checking: the whole string must come to 1 modulo M. */
function holds(withCheck: string): boolean {
  const M = 36;
  let s = M;
  let sum = 0;
  for (const character of withCheck) {
    sum = (s % (M + 1)) + ALPHABET.indexOf(character);
    s = (sum % M === 0 ? M : sum % M) * 2;
  }
  return sum % M === 1;
}

const year26 = Array.from({ length: 9999 }, (_, n) =>
  makeLotCode('G', '26', BigInt(n + 1)).replaceAll('-', ''),
);

describe('the check character', () => {
  it('of a string makes the whole string hold', () => {
    for (const code of year26) expect([code, holds(code)]).toEqual([code, true]);
    expect(holds(`A12425GABC1234002${checkCharacter('A12425GABC1234002')}`)).toBe(true);
  });

  it('is M for A12425GABC1234002 (example of the Global Release Identifier’s description, from memory)', () => {
    expect(checkCharacter('A12425GABC1234002')).toBe('M');
  });

  it('finds every single substitution, in each of a year’s first thousand codes', () => {
    const missed = year26
      .slice(0, 1000)
      .flatMap((code) =>
        Array.from(code).flatMap((own, at) =>
          ALPHABET.filter(
            (other) => other !== own && readLotCode(code.slice(0, at) + other + code.slice(at + 1)).ok,
          ).map((other) => `${code} ${at} ${other}`),
        ),
      );
    expect(missed).toEqual([]);
  });

  it('finds all but about one in two hundred swaps of neighbours, in all codes of a year', () => {
    let swaps = 0;
    let missed = 0;
    for (const code of year26) {
      for (let at = 0; at + 1 < code.length; at += 1) {
        const [a = '', b = ''] = [code[at], code[at + 1]];
        if (a === b) continue;
        swaps += 1;
        if (readLotCode(code.slice(0, at) + b + a + code.slice(at + 2)).ok) missed += 1;
      }
    }
    expect(swaps).toBeGreaterThan(50_000);
    expect(missed * 200).toBeLessThan(swaps);
  });
});
