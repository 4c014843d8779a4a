/**
 * Units of mass, exact. Stored and booked is always in micrograms; a unit is for reading and showing. "oz" is no unit
 * here, since it may be either ounce; a "carat" here is the mass of stones, not the 24th part of gold.
 * Sources: UK Weights and Measures Act 1985 Sch. 1 Pt V (ounce troy 0.0311034768 kg; read); pennyweight, grain, tola,
 * metric carat, momme and ounce avoirdupois from the definitions of GNU units (read, derived); tael of the Hong Kong
 * Weights and Measures Ordinance Cap. 68 (leung 37.79936375 g; read); the trade's tael 37.429 g of a published
 * conversion table (read); baht of bar and ornament as credited to the Thai gold traders (read, medium trust).
 */
import { Decimal } from '../decimal.ts';
import type { Micrograms } from './micrograms.ts';
import { UG_PER_GRAM } from './micrograms.ts';

export const GRAMS_PER_UNIT = {
  g: new Decimal(1),
  kg: new Decimal(1000),
  ozt: new Decimal('31.1034768'),
  dwt: new Decimal('1.55517384'),
  gr: new Decimal('0.06479891'),
  ozav: new Decimal('28.349523125'),
  ct: new Decimal('0.2'),
  momme: new Decimal('3.75'),
  tola: new Decimal('11.6638038'),
  tael_statutory: new Decimal('37.79936375'),
  tael_trade: new Decimal('37.429'),
  baht_bar: new Decimal('15.244'),
  baht_ornament: new Decimal('15.16'),
} as const satisfies Record<string, Decimal>;

export type MassUnit = keyof typeof GRAMS_PER_UNIT;

/** Micrograms in a unit, as a decimal of at most 40 figures: exact wherever the quotient ends. */
export function toUnit(ug: Micrograms, unit: MassUnit): Decimal {
  return new Decimal(ug.toString()).div(UG_PER_GRAM.toString()).div(GRAMS_PER_UNIT[unit]);
}

/** A mass in a unit as whole micrograms, rounded once, half to even. `value` has at most 28 figures. */
export function fromUnit(value: Decimal, unit: MassUnit): Micrograms {
  return BigInt(
    value.times(GRAMS_PER_UNIT[unit]).times(UG_PER_GRAM.toString()).toFixed(0, Decimal.ROUND_HALF_EVEN),
  );
}
