import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { lastOfIt, limitOfReadings } from '../../../shared/events/last-of-it.ts';
import { addMass, equalMass, isPossibleMass, massVector } from '../../../shared/mass/vector.ts';

const by = { readings: 1n, weighing_u_ug: 1_000n };

describe('the last of a container', () => {
  it('has a limit of two standard uncertainties of its readings, in squares (JCGM 100, coverage factor 2)', () => {
    expect(limitOfReadings(1n, 1_000n)).toBe(2_000n);
    // 2 × √2 × 1000 µg = 2828.43 µg.
    expect(limitOfReadings(2n, 1_000n)).toBe(2_828n);
  });

  it('is within up to the limit and beyond it one microgram further', () => {
    const holding = massVector({ gross: 10_000_000n, gold: 7_500_000n });
    expect(lastOfIt(holding, 9_998_000n, by).within).toBe(true);
    expect(lastOfIt(holding, 9_997_999n, by).within).toBe(false);
    expect(lastOfIt(holding, 10_002_000n, by).within).toBe(true);
    expect(lastOfIt(holding, 10_002_001n, by).within).toBe(false);
  });

  it('moves possible metal of the weighed gross, and what moves and what remains are the book together', () => {
    const mass = fc.bigInt({ min: 0n, max: 10n ** 12n });
    fc.assert(
      fc.property(
        mass,
        mass,
        mass,
        fc.bigInt({ min: 1n, max: 10n ** 13n }),
        (gold, silver, rest, weighed) => {
          const holding = massVector({ gross: gold + silver + rest + 1n, gold, silver });
          const { moved, remainder } = lastOfIt(holding, weighed, by);
          expect(moved.gross).toBe(weighed);
          expect(isPossibleMass(moved)).toBe(true);
          expect(equalMass(addMass(moved, remainder), holding)).toBe(true);
        },
      ),
    );
  });
});
