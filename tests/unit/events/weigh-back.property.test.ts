/** Whatever comes back, in whatever parts: the job's metal is shared without a microgram lost or made. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { weighBack } from '../../../shared/events/weigh-back/weigh-back.ts';
import { printGrams } from '../../../shared/mass/micrograms.ts';
import { isPossibleMass, isZeroMass } from '../../../shared/mass/vector.ts';
import { aWorkshop } from '../../support/workshop.ts';

const share = fc.bigInt({ min: 1n, max: 1_000_000n });
const day = fc.record({
  sheet: fc.bigInt({ min: 10n, max: 500_000_000n }),
  solder: fc.bigInt({ min: 10n, max: 5_000_000n }),
  gold: fc.integer({ min: 0, max: 700 }),
  silver: fc.integer({ min: 0, max: 300 }),
  unused: share,
  cut: share,
  blended: share,
  filings: share,
  made: fc.array(share, { minLength: 1, maxLength: 4 }),
});

describe('any weigh-back', () => {
  it('balances, gives no part below nothing and none with more fine metal than gross', () => {
    fc.assert(
      fc.property(day, ({ sheet, solder, gold, silver, unused, cut, blended, filings, made }) => {
        const { book, bench4, safe, mara } = aWorkshop();
        const job_id = book.job('Ring');
        const fine = { gold: String(gold), silver: String(silver) };
        const lot_id = book.put(bench4, 'sheet', printGrams(sheet), { ...fine, job_id });
        book.put(bench4, 'solder', printGrams(solder), {
          form: 'solder',
          gold: '585',
          silver: '200',
          job_id,
        });
        const whole = sheet + solder;
        const weighing = (of: bigint, part: bigint) => ({
          gross_g: printGrams((of * part) / 1_000_000n + 1n),
        });
        // Parts that lie well inside what was out, up to nearly all of it.
        const parts = BigInt(made.length + 2);
        const work = {
          job_id,
          operation: 'sheet_work',
          unused: [{ lot_id, weighing: weighing(sheet / 3n, unused) }],
          scrap: [
            { from_lot_id: lot_id, weighing: weighing(sheet / 3n, cut) },
            { weighing: weighing(whole / 3n / parts, blended) },
          ],
          filings: [{ weighing: weighing(whole / 3n / parts, filings) }],
          made: made.map((part) => ({
            form: 'work',
            description: 'ring',
            weighing: weighing(whole / 3n / parts, part),
            pieces: '1',
          })),
        };
        const draft = book.attempt(weighBack, { place_id: bench4, safe_id: safe, works: [work] }, mara);
        expect(draft).not.toBeNull();
        expect(isZeroMass(book.total())).toBe(true);
        for (const holding of book.state.allHoldings()) {
          if (book.state.isPlace(holding.account_id)) expect(isPossibleMass(holding.mass)).toBe(true);
        }
        expect(book.held(bench4, lot_id).gross).toBe(0n);
      }),
      { numRuns: 150 },
    );
  });
});
