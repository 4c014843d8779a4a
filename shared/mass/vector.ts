/**
 * The five masses that travel together: gross, and the gold, silver, platinum and palladium in it. What gross has
 * beyond the four is base metal or foreign matter.
 */
import { gramsText } from './grams-text.ts';
import type { Micrograms } from './micrograms.ts';
import { printGrams } from './micrograms.ts';

export const METALS = ['gold', 'silver', 'platinum', 'palladium'] as const;
export const MASS_KEYS = ['gross', ...METALS] as const;

export type Metal = (typeof METALS)[number];
export type MassKey = (typeof MASS_KEYS)[number];
export type MassVector = Readonly<Record<MassKey, Micrograms>>;
export type MassJson = Readonly<Record<`${MassKey}_g`, string>>;

/** A vector from what is not nothing. */
export function massVector(parts: Partial<MassVector>): MassVector {
  return { gross: 0n, gold: 0n, silver: 0n, platinum: 0n, palladium: 0n, ...parts };
}

export const ZERO_MASS: MassVector = massVector({});

function eachMass(make: (key: MassKey) => Micrograms): MassVector {
  return {
    gross: make('gross'),
    gold: make('gold'),
    silver: make('silver'),
    platinum: make('platinum'),
    palladium: make('palladium'),
  };
}

export const addMass = (a: MassVector, b: MassVector): MassVector => eachMass((key) => a[key] + b[key]);
export const subtractMass = (a: MassVector, b: MassVector): MassVector => eachMass((key) => a[key] - b[key]);
export const negateMass = (a: MassVector): MassVector => eachMass((key) => -a[key]);
export const sumMass = (list: readonly MassVector[]): MassVector => list.reduce(addMass, ZERO_MASS);

export const isZeroMass = (a: MassVector): boolean => MASS_KEYS.every((key) => a[key] === 0n);
export const equalMass = (a: MassVector, b: MassVector): boolean =>
  MASS_KEYS.every((key) => a[key] === b[key]);

/** Whether any of the five is below nothing. */
export const hasNegative = (a: MassVector): boolean => MASS_KEYS.some((key) => a[key] < 0n);

/** The four precious metals together, in micrograms. */
export const fineTotal = (a: MassVector): Micrograms => METALS.reduce((sum, metal) => sum + a[metal], 0n);

/** Whether metal can be so: nothing below nothing, and no more precious metal than gross. */
export const isPossibleMass = (a: MassVector): boolean => !hasNegative(a) && fineTotal(a) <= a.gross;

/** The vector as grams with six decimals. */
export function massToJson(a: MassVector): MassJson {
  return {
    gross_g: printGrams(a.gross),
    gold_g: printGrams(a.gold),
    silver_g: printGrams(a.silver),
    platinum_g: printGrams(a.platinum),
    palladium_g: printGrams(a.palladium),
  };
}

/** A vector from grams. Throws where a figure is not grams: the border's schema has let a fault through. */
export function massFromJson(json: MassJson): MassVector {
  return eachMass((key) => gramsText(json[`${key}_g`]));
}
