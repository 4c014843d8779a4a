/**
 * A mass is a whole number of micrograms. This file reads and prints it in the strict decimal form of grams that
 * stands in JSON and CSV; what a person types is read by `typed-mass.ts`.
 */

/** A mass in micrograms. Never a JavaScript number. */
export type Micrograms = bigint;

export const UG_PER_GRAM = 1_000_000n;

/** The largest mass that a workshop's book takes: one tonne. What is more is a slip of the finger. */
export const MAX_MASS_UG = 1_000_000_000_000n;

export type ReadGrams =
  { readonly ok: true; readonly ug: Micrograms } | { readonly ok: false; readonly reason: string };

const GRAMS = /^(-?)(0|[1-9]\d{0,14})(?:\.(\d{1,6}))?$/;

/**
 * Reads grams such as "12.345": a point, at most six decimals, no blanks, no exponent, no thousands marks.
 * Refuses a sign unless `signed`, minus nothing, and more than a tonne.
 */
export function parseGrams(text: string, options: { readonly signed?: boolean } = {}): ReadGrams {
  const match = GRAMS.exec(text);
  if (match === null)
    return { ok: false, reason: 'A weight is grams such as 12.345, with at most six decimals.' };
  const [, sign, whole = '0', decimals = ''] = match;
  const ug = BigInt(whole) * UG_PER_GRAM + BigInt(decimals.padEnd(6, '0'));
  if (sign === '-' && (options.signed !== true || ug === 0n)) {
    return { ok: false, reason: 'A weight is not less than nothing. Look at the figure again.' };
  }
  if (ug > MAX_MASS_UG)
    return { ok: false, reason: 'That is more than a tonne. Look at the unit and the point again.' };
  return { ok: true, ug: sign === '-' ? -ug : ug };
}

/**
 * Prints micrograms as grams with `decimals` places, 0 to 6. Fewer than six are rounded half to even, for the eye
 * only: what is stored or exported always has six. Throws for other places than 0 to 6.
 */
export function printGrams(ug: Micrograms, decimals = 6): string {
  const unit = 10n ** BigInt(6 - decimals);
  const rounded = roundHalfEven(ug, unit);
  const size = rounded < 0n ? -rounded : rounded;
  const scale = 10n ** BigInt(decimals);
  const fraction = decimals === 0 ? '' : `.${(size % scale).toString().padStart(decimals, '0')}`;
  return `${rounded < 0n ? '-' : ''}${size / scale}${fraction}`;
}

/** `value` in whole `unit`s, half to even. */
export function roundHalfEven(value: bigint, unit: bigint): bigint {
  const size = value < 0n ? -value : value;
  const quotient = size / unit;
  const twice = (size % unit) * 2n;
  const up = twice > unit || (twice === unit && quotient % 2n === 1n) ? 1n : 0n;
  return (value < 0n ? -1n : 1n) * (quotient + up);
}
