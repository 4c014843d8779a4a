/**
 * Sharing a mass out so that the parts always sum to the whole: by largest remainder (the method of the same name in
 * apportionment; ties go to the earlier part). A mass is rounded once, here, where it is made.
 */
import type { Fineness } from '../alloy/fineness.ts';
import { Decimal } from '../decimal.ts';
import type { Micrograms } from './micrograms.ts';
import type { MassVector } from './vector.ts';
import { METALS, ZERO_MASS, fineTotal, isPossibleMass, massVector, subtractMass } from './vector.ts';

/**
 * Finenesses are apportioned as whole parts of this many to the per mille: so fine that 22/24 of a tonne is right to
 * the microgram, and within the 40 figures of a decimal.
 */
const PARTS_PER_PERMILLE = 10n ** 27n;
const WHOLE = 1000n * PARTS_PER_PERMILLE;

/**
 * Shares `total` by `weights`; the parts sum to it exactly.
 * Throws for a negative total or weight, and for weights that are all nothing while the total is not.
 */
export function apportion(total: bigint, weights: readonly bigint[]): bigint[] {
  const sum = weights.reduce((all, weight) => all + weight, 0n);
  if (total < 0n || weights.some((weight) => weight < 0n)) throw new RangeError('shares are not negative');
  if (sum === 0n) {
    if (total === 0n) return weights.map(() => 0n);
    throw new RangeError('something can’t be shared by nothing');
  }
  const parts = weights.map((weight) => (total * weight) / sum);
  const left = total - parts.reduce((all, part) => all + part, 0n);
  const byRemainder = weights
    .map((weight, index) => ({ index, remainder: (total * weight) % sum }))
    .sort((a, b) => (a.remainder === b.remainder ? a.index - b.index : a.remainder > b.remainder ? -1 : 1));
  const raised = new Set(byRemainder.filter((_, rank) => BigInt(rank) < left).map(({ index }) => index));
  return parts.map((part, index) => (raised.has(index) ? part + 1n : part));
}

/**
 * The mass vector of `gross` micrograms of a fineness in per mille: gross apportioned over the four metals and the
 * rest, so that precious metal never exceeds gross. Throws for an impossible fineness.
 */
export function massFromFineness(gross: Micrograms, fineness: Fineness): MassVector {
  const scale = PARTS_PER_PERMILLE.toString();
  // Rounded down, so that metals that make up the whole never come to more than it.
  const weights = METALS.map((metal) => BigInt(fineness[metal].times(scale).toFixed(0, Decimal.ROUND_DOWN)));
  const rest = WHOLE - weights.reduce((all, weight) => all + weight, 0n);
  const [gold = 0n, silver = 0n, platinum = 0n, palladium = 0n] = apportion(gross, [...weights, rest]);
  return { gross, gold, silver, platinum, palladium };
}

/**
 * Part of a holding: fine metal in proportion to gross. Gross is apportioned over the four metals and the rest of the
 * holding, so that neither the part nor what is left holds more than there was; all of it is exactly what is there.
 * Throws where more is taken than there is.
 */
export function takeGross(holding: MassVector, gross: Micrograms): MassVector {
  if (gross === holding.gross) return holding;
  if (gross < 0n || gross > holding.gross) throw new RangeError('more than there is can’t be taken');
  return splitVector(holding, [gross, holding.gross - gross])[0] ?? ZERO_MASS;
}

/**
 * Shares a whole out by gross weights: gross exactly as given where the weights sum to it, else in proportion; the
 * metals in proportion to gross. Every part is possible (nothing negative, no more fine than gross), and the parts sum
 * to the whole in all five masses. Throws for a whole that is not possible.
 */
export function splitVector(whole: MassVector, grossWeights: readonly bigint[]): MassVector[] {
  if (!isPossibleMass(whole)) throw new RangeError('metal that can’t be can’t be shared');
  const grosses = apportion(whole.gross, grossWeights);
  if (whole.gross === 0n) return grosses.map(() => ZERO_MASS);
  let left = whole;
  return grosses.map((gross, index) => {
    const part = index === grosses.length - 1 ? left : proportion(left, gross);
    left = subtractMass(left, part);
    return part;
  });
}

/** `gross` of what is left: apportioned over metals and rest, none of which can exceed what is left of it. */
function proportion(left: MassVector, gross: Micrograms): MassVector {
  if (gross === 0n) return ZERO_MASS;
  const rest = left.gross - fineTotal(left);
  const [gold = 0n, silver = 0n, platinum = 0n, palladium = 0n] = apportion(gross, [
    ...METALS.map((metal) => left[metal]),
    rest,
  ]);
  return massVector({ gross, gold, silver, platinum, palladium });
}
