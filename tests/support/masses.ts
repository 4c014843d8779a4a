/** Masses and finenesses for the property tests: from nothing to the tonne, with the extremes more often than chance. */
import fc from 'fast-check';
import type { Fineness } from '../../shared/alloy/fineness.ts';
import { fineness } from '../../shared/alloy/fineness.ts';
import { Decimal } from '../../shared/decimal.ts';
import { MAX_MASS_UG } from '../../shared/mass/micrograms.ts';
import type { MassVector } from '../../shared/mass/vector.ts';

/** Micrograms from nothing to `max`. */
export const someMass = (max: bigint = MAX_MASS_UG) =>
  fc.oneof(
    fc.bigInt({ min: 0n, max }),
    fc.bigInt({ min: 0n, max: max < 20n ? max : 20n }),
    fc.constantFrom(0n, max),
  );

/** Metal that can be: the four and the rest are drawn, gross is their sum. */
export const possibleMass = (most: bigint = MAX_MASS_UG / 5n): fc.Arbitrary<MassVector> =>
  fc
    .tuple(someMass(most), someMass(most), someMass(most), someMass(most), someMass(most))
    .map(([gold, silver, platinum, palladium, rest]) => ({
      gross: gold + silver + platinum + palladium + rest,
      gold,
      silver,
      platinum,
      palladium,
    }));

/** Metal that can be, and a part of its gross. */
export const massAndPart = possibleMass().chain((whole) =>
  someMass(whole.gross).map((gross) => ({ whole, gross })),
);

/** A fineness that metal can have, with four decimals as a certificate may have. */
export const possibleFineness: fc.Arbitrary<Fineness> = fc
  .tuple(...([0, 1, 2, 3] as const).map(() => fc.integer({ min: 0, max: 10_000_000 })))
  .map((cuts) => [...cuts].sort((a, b) => a - b))
  .map((cuts) => {
    const part = (at: number) => new Decimal((cuts[at] ?? 0) - (cuts[at - 1] ?? 0)).div(10_000);
    return fineness({ gold: part(0), silver: part(1), platinum: part(2), palladium: part(3) });
  });
