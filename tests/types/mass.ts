/**
 * Lines that must not compile: a JavaScript number is no mass, a vector has all five, and what is read may be refused.
 * The compiler is the test: an expectation below that is no error is one itself.
 */
import type { Fineness } from '../../shared/alloy/fineness.ts';
import { massFromFineness, takeGross } from '../../shared/mass/apportion.ts';
import type { Micrograms } from '../../shared/mass/micrograms.ts';
import { parseGrams, printGrams } from '../../shared/mass/micrograms.ts';
import { fromUnit, toUnit } from '../../shared/mass/units.ts';
import type { Metal, MassVector } from '../../shared/mass/vector.ts';
import { ZERO_MASS, massToJson, massVector } from '../../shared/mass/vector.ts';

// @ts-expect-error a mass is a bigint of micrograms, never a number
export const numberAsMass: Micrograms = 12.345;

// @ts-expect-error nor is one printed
export const printedNumber = printGrams(12_345_000);

// @ts-expect-error a number in a vector
export const numberInVector = massVector({ gross: 1 });

// @ts-expect-error a vector has all five masses
export const halfVector: MassVector = { gross: 1n, gold: 1n };

// @ts-expect-error copper is no precious metal of the book
export const copper: Metal = 'copper';

// @ts-expect-error a metal that the vector does not have
export const rhodium = massVector({ rhodium: 1n });

// @ts-expect-error a part is taken in micrograms
export const takenByNumber = takeGross(ZERO_MASS, 0);

// @ts-expect-error a fineness has decimals, not numbers
export const numberAsFineness: Fineness = { gold: 750, silver: 0, platinum: 0, palladium: 0 };

// @ts-expect-error a fineness is not a plain figure
export const plainFineness = massFromFineness(1n, '750');

// @ts-expect-error an ounce is troy or avoirdupois
export const anyOunce = toUnit(1n, 'oz');

// @ts-expect-error a number is no figure in a unit
export const numberInUnit = fromUnit(1.5, 'ozt');

// @ts-expect-error what is read may have been refused
export const unlookedAt: Micrograms = parseGrams('1').ug;

// @ts-expect-error grams in JSON are text
export const jsonNumber: number = massToJson(ZERO_MASS).gross_g;

// @ts-expect-error a vector does not change
ZERO_MASS.gross = 1n;
