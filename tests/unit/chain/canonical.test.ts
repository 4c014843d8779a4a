/** RFC 8785 (JSON Canonicalization Scheme), as far as strings and keys go: section 3.2.2.2, 3.2.3 and what we refuse. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { canonicalJson, normaliseText } from '../../../shared/chain/canonical.ts';

describe('a string', () => {
  it('is escaped as in the example of RFC 8785 section 3.2.2', () => {
    const text = '\u20ac$\u000f\u000aA\'\u0042\u0022\u005c\\"/';
    expect(canonicalJson(text)).toBe('"€$\\u000f\\nA\'B\\"\\\\\\\\\\"/"');
  });

  it.each([
    ['\b', '\\b'],
    ['\t', '\\t'],
    ['\n', '\\n'],
    ['\f', '\\f'],
    ['\r', '\\r'],
    ['\u0001', '\\u0001'],
    ['\u001f', '\\u001f'],
    ['\u007f', '\u007f'],
    ['/', '/'],
    ['\u2028', '\u2028'],
  ])('%j has one spelling (RFC 8785 section 3.2.2.2)', (text, escaped) => {
    expect(canonicalJson(text)).toBe(`"${escaped}"`);
  });

  it('is brought to NFC, and NUL and half characters are refused, since no store keeps them', () => {
    expect(canonicalJson('e\u0301')).toBe('"\u00e9"');
    expect(() => normaliseText('a\u0000b')).toThrow(RangeError);
    expect(() => canonicalJson('\ud800')).toThrow(RangeError);
    expect(() => canonicalJson({ 'a\udead': null })).toThrow(RangeError);
    expect(canonicalJson('😀')).toBe('"😀"');
  });
});

describe('an object', () => {
  it('is ordered by UTF-16 code units, as in the example of RFC 8785 section 3.2.3', () => {
    const sample = {
      '\u20ac': 'Euro Sign',
      '\r': 'Carriage Return',
      '\ufb33': 'Hebrew Letter Dalet With Dagesh',
      '1': 'One',
      '\ud83d\ude00': 'Emoji: Grinning Face',
      '\u0080': 'Control',
      '\u00f6': 'Latin Small Letter O With Diaeresis',
    };
    // In the standard U+FB33 comes last; in NFC it is U+05D3 U+05BC, and stands where that belongs.
    expect(canonicalJson(sample)).toBe(
      '{"\\r":"Carriage Return","1":"One","\u0080":"Control","ö":"Latin Small Letter O With Diaeresis",' +
        '"\u05d3\u05bc":"Hebrew Letter Dalet With Dagesh","€":"Euro Sign","😀":"Emoji: Grinning Face"}',
    );
    expect(() => canonicalJson({ '\u00e9': 'x', 'e\u0301': 'y' })).toThrow(RangeError);
  });

  it('has no blanks, and null where nothing is', () => {
    expect(canonicalJson({ b: ['x', null], a: { c: null } })).toBe('{"a":{"c":null},"b":["x",null]}');
  });

  it('reads back as what was written, whatever its strings and keys', () => {
    const text = fc
      .string({ unit: 'grapheme' })
      .map((drawn) => drawn.replaceAll('\u0000', '').normalize('NFC'));
    const value = fc.dictionary(text, fc.option(text));
    fc.assert(
      fc.property(value, (drawn) => {
        const written = canonicalJson(drawn);
        expect(JSON.parse(written)).toEqual({ ...drawn });
        expect(canonicalJson(drawn)).toBe(written);
      }),
    );
  });
});
