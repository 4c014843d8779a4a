/** Grams that are known to be well-formed, from our own records: read, or the program is at fault. */
import type { Micrograms } from './micrograms.ts';
import { parseGrams } from './micrograms.ts';

/** Signed grams as micrograms. Throws where the text is not grams. */
export function gramsText(text: string): Micrograms {
  const read = parseGrams(text, { signed: true });
  if (!read.ok) throw new Error(`not grams: ${text.slice(0, 40)}`);
  return read.ug;
}
