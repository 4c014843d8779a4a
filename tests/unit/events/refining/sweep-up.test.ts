/** Sweep-up, and the way of a container to the refiner. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { Decimal } from '../../../../shared/decimal.ts';
import { arrive, consign } from '../../../../shared/events/refining/consign.ts';
import { sweepEstimate, sweepUp } from '../../../../shared/events/refining/sweep-up.ts';
import { weighBack } from '../../../../shared/events/weigh-back/weigh-back.ts';
import { fineTotal, isPossibleMass, massVector, sumMass } from '../../../../shared/mass/vector.ts';
import { aRefinersWorkshop, feed, way } from '../../../support/sweeps.ts';

/** Loses 1.000 g of fine gold at a bench, for a job of its own. */
function lose(workshop: ReturnType<typeof aRefinersWorkshop>, bench_id: string, operation = 'filing') {
  const { book, safe, mara } = workshop;
  const job_id = book.job('Ring');
  book.put(bench_id, 'gold', '10.000', { gold: '1000', job_id });
  const made = [{ form: 'work', description: 'ring', weighing: { gross_g: '9.000' }, pieces: '1' }];
  book.run(weighBack, { place_id: bench_id, safe_id: safe, works: [{ job_id, operation, made }] }, mara);
}

function sweep(workshop: ReturnType<typeof aRefinersWorkshop>, gross_g: string) {
  const { sweepsBin, safe } = workshop;
  return { bin_id: sweepsBin, to_id: safe, container: 'Drum', weighing: { gross_g } };
}

describe('sweep-up', () => {
  it('estimates from the loss since the bin was last swept, never from the balance', () => {
    const workshop = aRefinersWorkshop();
    const { book, mara, bench4, safe } = workshop;
    feed(workshop, 'filing', { gold: '60' });
    lose(workshop, bench4);
    book.run(sweepUp, sweep(workshop, '100.000'), mara);
    expect(book.held(safe, book.newestLot().id).gold).toBe(600_000n);
    lose(workshop, bench4);
    book.run(sweepUp, sweep(workshop, '100.000'), mara);
    // 60 % of the one gram lost since, though 1.400 g stand on the account.
    expect(book.held(safe, book.newestLot().id).gold).toBe(600_000n);
  });

  it('takes only the benches that feed the bin', () => {
    const workshop = aRefinersWorkshop();
    const { book, mara, bench2, bench4, safe } = workshop;
    feed(workshop, 'filing', { gold: '60' }, bench2);
    lose(workshop, bench4);
    lose(workshop, bench2);
    book.run(sweepUp, sweep(workshop, '100.000'), mara);
    expect(book.held(safe, book.newestLot().id).gold).toBe(600_000n);
    expect(book.newestLot()).toMatchObject({ form: 'sweeps', basis: 'estimated', owner_id: null });
  });

  it('refuses a bin without rates', () => {
    const workshop = aRefinersWorkshop();
    const refusal = workshop.book.refusal(sweepUp, sweep(workshop, '100.000'), workshop.mara);
    expect(refusal.sentence).toContain('names no operation that feeds it');
  });

  it('never estimates more metal than the container weighs', () => {
    const ug = fc.bigInt({ min: -1_000n, max: 1_000_000_000n });
    const row = fc.record({ gold: ug, silver: ug, platinum: ug, palladium: ug });
    fc.assert(
      fc.property(
        fc.array(row, { minLength: 1, maxLength: 5 }),
        fc.bigInt({ min: 1n, max: 2_000_000_000n }),
        (rows, net) => {
          const of = (index: number) => ({ bin_id: 'bin', operation: `operation ${index}`, bench_id: null });
          const percent = new Decimal('62.5');
          const rate_percent = { gold: percent, silver: percent, platinum: percent, palladium: percent };
          const shares = sweepEstimate(
            rows.map((_, index) => ({ ...of(index), rate_percent })),
            rows.map((loss, index) => ({ ...of(index), loss: massVector(loss) })),
            net,
          );
          const total = sumMass(shares.map(({ metal }) => metal));
          expect(total.gross <= net).toBe(true);
          for (const { metal } of shares) {
            expect(isPossibleMass(metal)).toBe(true);
            expect(metal.gross).toBe(fineTotal(metal));
          }
        },
      ),
    );
  });
});

describe('a consignment', () => {
  it('leaves what is missing beyond the limit of error with the courier', () => {
    const workshop = aRefinersWorkshop();
    const { book, mara, safe, courier, refiner } = workshop;
    const scrap = book.put(safe, '750 scrap', '50.000', { form: 'clean_scrap', gold: '750' });
    const on = way(workshop, scrap);
    book.run(consign, on.consign, mara);
    const consign_id = book.lastVoucher().id;
    book.run(arrive, on.arrive(consign_id, '49.000'), mara);
    expect(book.held(refiner, scrap).gross).toBe(49_000_000n);
    expect(book.held(courier, scrap)).toMatchObject({ gross: 1_000_000n, gold: 750_000n });
    expect(book.lastVoucher().detail.lines).toMatchObject([{ sent_g: '50.000000', finding: 'unexplained' }]);
    book.run(arrive, on.arrive(consign_id, '1.000'), mara);
    expect(book.refusal(arrive, on.arrive(consign_id, '1.000'), mara).code).toBe('not_enough');
  });

  it('keeps seals, destination and declared value in the record, and refuses a package without a seal', () => {
    const workshop = aRefinersWorkshop();
    const { book, mara, safe, refiner, refinerParty } = workshop;
    const scrap = book.put(safe, '750 scrap', '50.000', { form: 'clean_scrap', gold: '750' });
    const body = { ...way(workshop, scrap).consign, declared_value: '3200.50' };
    book.run(consign, body, mara);
    expect(book.lastVoucher().detail).toMatchObject({
      code: 'C-0031',
      destination_id: refiner,
      counterparty_id: refinerParty,
      packages: [{ seal: '004417', content: 'Sweeps' }],
      declared_value: '3200.5',
    });
    expect(consign.schema.safeParse({ ...body, packages: [] }).success).toBe(false);
  });
});
