/** Orders for sorting what stands in tables: figures by size whatever their decimals, words as they are read. */
import { Decimal } from '../../shared/decimal.ts';

const FIGURE = /^-?\d+(\.\d+)?$/;
const READER = new Intl.Collator('en-GB', { numeric: true, sensitivity: 'base' });

/** Words in reading order, so that bench 2 stands before bench 10. */
export const compareWords = (a: string, b: string): number => READER.compare(a, b);

/** Figures by size; what is no figure comes first. */
export function compareFigures(a: string, b: string): number {
  const [isA, isB] = [FIGURE.test(a), FIGURE.test(b)];
  if (isA && isB) return new Decimal(a).cmp(new Decimal(b));
  if (isA !== isB) return isA ? 1 : -1;
  return compareWords(a, b);
}
