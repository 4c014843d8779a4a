/** Fineness: parts per thousand of each precious metal. Computed with decimals, never with floating point. */
import { Decimal } from '../decimal.ts';
import type { MassVector, Metal } from '../mass/vector.ts';
import { METALS } from '../mass/vector.ts';

/** Parts per thousand by mass of each of the four metals. */
export type Fineness = Readonly<Record<Metal, Decimal>>;

/** A fineness from what is not nothing; figures or decimal strings. */
export function fineness(parts: Partial<Record<Metal, Decimal | string>>): Fineness {
  const of = (metal: Metal) => new Decimal(parts[metal] ?? 0);
  return { gold: of('gold'), silver: of('silver'), platinum: of('platinum'), palladium: of('palladium') };
}

/** The fineness of a mass, or null where there is nothing. Not rounded beyond the decimals' 40 figures. */
export function finenessOf(mass: MassVector): Fineness | null {
  if (mass.gross <= 0n) return null;
  const of = (metal: Metal) => new Decimal(mass[metal].toString()).times(1000).div(mass.gross.toString());
  return { gold: of('gold'), silver: of('silver'), platinum: of('platinum'), palladium: of('palladium') };
}

/** Whether metal can have it: each from 0 to 1000, together at most 1000. */
export function isPossibleFineness(f: Fineness): boolean {
  const sum = METALS.reduce((total, metal) => total.plus(f[metal]), new Decimal(0));
  return METALS.every((metal) => f[metal].gte(0)) && sum.lte(1000);
}

/** Karat (24ths) as per mille: k × 1000 ÷ 24. */
export const karatToPermille = (karat: Decimal | string): Decimal => new Decimal(karat).times(1000).div(24);

/** Per mille as karat (24ths). */
export const permilleToKarat = (permille: Decimal | string): Decimal =>
  new Decimal(permille).times(24).div(1000);

/** Bare, as the trade writes it: "750", "999.9"; at most `decimals` places, none that are nothing. */
export const printPermille = (permille: Decimal, decimals = 1): string =>
  permille.toDecimalPlaces(decimals).toString();
