/** Grams as tests write and read them: "20.000", with more decimals only where they say something. */
import type { Micrograms } from '../../shared/mass/micrograms.ts';
import { parseGrams, printGrams } from '../../shared/mass/micrograms.ts';

/** Reads grams that a test wrote; throws where they are not well formed. */
export function parseTestGrams(text: string): Micrograms {
  const read = parseGrams(text, { signed: true });
  if (!read.ok) throw new Error(`The test's weight "${text}" can't be read: ${read.reason}`);
  return read.ug;
}

/** Grams with three decimals at least, six at most. */
export function shortGrams(ug: Micrograms): string {
  return printGrams(ug).replace(/0{1,3}$/, '');
}
