/**
 * Canonical JSON after RFC 8785, for the restricted shape of our records: every leaf is a string or null. Strings are
 * normalised (NFC, no NUL, no lone surrogates) before they are written, so that they read back the same.
 */

export type CanonicalValue =
  string | null | readonly CanonicalValue[] | { readonly [key: string]: CanonicalValue };

/** Text as it is hashed and stored: NFC. Throws for NUL and for lone surrogates, which no store keeps. */
export function normaliseText(text: string): string {
  if (text.includes('\u0000')) throw new RangeError('text holds a NUL');
  if (/\p{Cs}/u.test(text)) throw new RangeError('text holds half a character');
  return text.normalize('NFC');
}

/**
 * The canonical text of a value: no blanks, keys in order of their UTF-16 code units, strings escaped as ECMAScript's
 * JSON.stringify escapes them (RFC 8785 sections 3.2.2 and 3.2.3).
 */
export function canonicalJson(value: CanonicalValue): string {
  if (value === null) return 'null';
  if (typeof value === 'string') return JSON.stringify(normaliseText(value));
  if (isList(value)) return `[${value.map(canonicalJson).join(',')}]`;
  const named = new Map(Object.entries(value).map(([key, member]) => [normaliseText(key), member]));
  if (named.size !== Object.keys(value).length) throw new RangeError('two keys are the same text');
  const members = [...named.keys()]
    .sort()
    .map((key) => `${JSON.stringify(key)}:${canonicalJson(named.get(key) ?? null)}`);
  return `{${members.join(',')}}`;
}

function isList(value: CanonicalValue): value is readonly CanonicalValue[] {
  return Array.isArray(value);
}
