/**
 * Fine weights as documents show them. The book holds whole micrograms; a document of the bullion trade shows troy
 * ounces of three decimals by a rule that differs from party to party, so each rule has a name, and what it leaves
 * over is told. Good Delivery: gross of gold in multiples of 0.025 oz and of silver of 0.1 oz, rounded down (London
 * Good Delivery specification; read). No published rule for the third decimal of fine weight was seen, and the agreed
 * bar table follows none.
 */
import { Decimal } from '../decimal.ts';
import type { Micrograms } from './micrograms.ts';
import { UG_PER_GRAM } from './micrograms.ts';
import { GRAMS_PER_UNIT, fromUnit } from './units.ts';

/** A step in troy ounces and the way to it. */
interface RoundingRule {
  readonly words: string;
  readonly step_ozt: Decimal;
  readonly mode: typeof Decimal.ROUND_DOWN | typeof Decimal.ROUND_HALF_UP;
}

export const DOCUMENT_RULES = {
  fine_down: {
    words: 'fine weight down to 0.001 oz',
    step_ozt: new Decimal('0.001'),
    mode: Decimal.ROUND_DOWN,
  },
  fine_half_up: {
    words: 'fine weight to the nearest 0.001 oz, halves up',
    step_ozt: new Decimal('0.001'),
    mode: Decimal.ROUND_HALF_UP,
  },
  good_delivery_gold_gross: {
    words: 'gross weight of gold down to 0.025 oz',
    step_ozt: new Decimal('0.025'),
    mode: Decimal.ROUND_DOWN,
  },
  good_delivery_silver_gross: {
    words: 'gross weight of silver down to 0.1 oz',
    step_ozt: new Decimal('0.1'),
    mode: Decimal.ROUND_DOWN,
  },
} as const satisfies Readonly<Record<string, RoundingRule>>;

export type DocumentRule = keyof typeof DOCUMENT_RULES;

/** Troy ounces by a named rule. The figure is exact before it is rounded, once. */
export function roundOunces(ounces: Decimal, rule: DocumentRule): Decimal {
  const { step_ozt, mode } = DOCUMENT_RULES[rule];
  return ounces.div(step_ozt).toDecimalPlaces(0, mode).times(step_ozt);
}

/** Fine troy ounces of a bar: gross ounces times per mille, exact, then rounded by a named rule. */
export const fineOunces = (gross_ozt: Decimal, permille: Decimal, rule: DocumentRule): Decimal =>
  roundOunces(gross_ozt.times(permille).div(1000), rule);

export interface DocumentFigure {
  /** Troy ounces as the document shows them. */
  readonly ounces: Decimal;
  /** What the document shows less than the book holds (more, where negative), in micrograms. */
  readonly left_over: Micrograms;
}

/**
 * A booked mass as a document shows it, and what its rounding leaves over. A booked mass is the nearest whole
 * microgram, so half a microgram is added before rounding: an ounce figure that was booked comes back as it was.
 * Throws for less than nothing.
 */
export function documentFigure(mass: Micrograms, rule: DocumentRule): DocumentFigure {
  if (mass < 0n) throw new RangeError('a document shows no mass below nothing');
  const grams = new Decimal(mass.toString()).plus('0.5').div(UG_PER_GRAM.toString());
  const ounces = mass === 0n ? new Decimal(0) : roundOunces(grams.div(GRAMS_PER_UNIT.ozt), rule);
  return { ounces, left_over: mass - fromUnit(ounces, 'ozt') };
}
