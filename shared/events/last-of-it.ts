/**
 * The last of a container (DESIGN section 2): when the keeper says that it is now empty, the weighed mass is what
 * moves, and what differs from the book goes to count variance of that place, in the same transaction. Inside the
 * limit of error of the weighings (two standard uncertainties, JCGM 100) one signature does.
 */
import { Decimal } from '../decimal.ts';
import { apportion, takeGross } from '../mass/apportion.ts';
import type { Micrograms } from '../mass/micrograms.ts';
import type { MassVector } from '../mass/vector.ts';
import { METALS, addMass, fineTotal, subtractMass } from '../mass/vector.ts';
import type { Weighing } from '../weighing/weighing.ts';

export interface LastOfIt {
  /** What the balance showed, at the fineness of the book: this moves. */
  readonly moved: MassVector;
  /** Book less moved: above zero something is missing, below zero there was more than the book knew. */
  readonly remainder: MassVector;
  /** Limit of error of the weighings, in micrograms. */
  readonly limit_ug: Micrograms;
  readonly within: boolean;
}

/** How many readings a weighing rests on: gross, and tare where it was measured too. */
export function readingsOf(weighing: Weighing): bigint {
  return weighing.tare_kind === 'measured' ? 2n : 1n;
}

/** Two standard uncertainties of n readings, each of the given standard uncertainty, in micrograms, rounded down. */
export function limitOfReadings(readings: bigint, weighing_u_ug: Micrograms): Micrograms {
  const square = new Decimal((4n * readings * weighing_u_ug * weighing_u_ug).toString());
  return BigInt(square.sqrt().floor().toFixed(0));
}

/**
 * Empties a holding by a weighed mass, in micrograms. What was found beyond the book has the holding's own fineness.
 * The holding must not be empty.
 */
export function lastOfIt(
  holding: MassVector,
  weighed: Micrograms,
  by: { readonly readings: bigint; readonly weighing_u_ug: Micrograms },
): LastOfIt {
  const moved =
    weighed <= holding.gross ? takeGross(holding, weighed) : withMore(holding, weighed - holding.gross);
  const remainder = subtractMass(holding, moved);
  const limit_ug = limitOfReadings(by.readings, by.weighing_u_ug);
  const off = remainder.gross < 0n ? -remainder.gross : remainder.gross;
  return { moved, remainder, limit_ug, within: off <= limit_ug };
}

function withMore(holding: MassVector, extra: Micrograms): MassVector {
  const metals = METALS.map((metal) => holding[metal]);
  const rest = holding.gross - fineTotal(holding);
  const [gold = 0n, silver = 0n, platinum = 0n, palladium = 0n] = apportion(extra, [...metals, rest]);
  return addMass(holding, { gross: extra, gold, silver, platinum, palladium });
}
