/** One job's metal from the supplier's bag to the refiner's credit. Every figure is reckoned by hand beside it. */
import { describe, expect, it } from 'vitest';
import { issue } from '../../../../shared/events/issue.ts';
import { arrive, consign } from '../../../../shared/events/refining/consign.ts';
import { outturn } from '../../../../shared/events/refining/outturn.ts';
import { sweepUp } from '../../../../shared/events/refining/sweep-up.ts';
import { weighBack } from '../../../../shared/events/weigh-back/weigh-back.ts';
import { weighIn } from '../../../../shared/events/weigh-in.ts';
import { isZeroMass } from '../../../../shared/mass/vector.ts';
import { aRefinersWorkshop, feed, way } from '../../../support/sweeps.ts';

const weighing = (gross_g: string) => ({ gross_g });

/** Weigh-in of 100.000 g of 750/125, issue of 20.000 g for a job, weigh-back. */
function aDayOfWork() {
  const workshop = aRefinersWorkshop();
  const { book, mara, safe, bench4, supplier } = workshop;
  const line = {
    form: 'sheet',
    description: '750 sheet',
    alloy: '750 yellow',
    basis: 'certificate',
    gold_permille: '750',
    silver_permille: '125',
    invoice_gross_g: '100.000',
    weighing: weighing('100.000'),
  };
  book.run(weighIn, { party_id: supplier, safe_id: safe, lines: [line] }, mara);
  const sheet = book.newestLot().id;
  const job_id = book.job('Signet ring');
  const amount = { how: 'weighed', weighing: weighing('20.000') };
  book.run(
    issue,
    { from_id: safe, to_id: bench4, lot_id: sheet, amount, operation: 'sheet_work', job_id },
    mara,
  );
  const work = {
    job_id,
    operation: 'sheet_work',
    unused: [{ lot_id: sheet, weighing: weighing('5.000') }],
    scrap: [{ from_lot_id: sheet, weighing: weighing('2.000') }],
    filings: [{ weighing: weighing('0.800') }],
    made: [{ form: 'work', description: 'signet ring', weighing: weighing('11.900'), pieces: '1' }],
  };
  book.run(weighBack, { place_id: bench4, safe_id: safe, works: [work] }, mara);
  return workshop;
}

describe('from weigh-in to outturn', () => {
  it('keeps every microgram in the book', () => {
    const workshop = aDayOfWork();
    const { book, mara, safe, sweepsBin, metalAccount, refiner, courier } = workshop;
    // Out 20.000 g (15.000 gold, 2.500 silver). Blend 20 − 5 − 2 = 13.000 g at 750/125. Filings 0.788 g of it are metal:
    // 0.591 gold, 0.0985 silver. Of the remaining 12.212 g the ring is 11.900 (8.925, 1.4875), the loss 0.312 g.
    expect(book.ledger()).toContain('Loss, sheet work | signet ring | 0.312 g | gold 0.234 | silver 0.039');
    expect(book.ledger()).toContain(
      'Bench 4 | signet ring | 11.900 g | gold 8.925 | silver 1.4875 | 1 pieces',
    );
    // Worked: 15.000 − 3.750 unused.
    expect(book.lastVoucher().detail).toMatchObject({
      worked_gold_g: '11.250000',
      worked_silver_g: '1.875000',
    });

    feed(workshop, 'sheet_work', { gold: '60', silver: '50' });
    const drum = { gross_g: '262.000', tare_g: '12.000', tare_kind: 'measured' };
    book.run(sweepUp, { bin_id: sweepsBin, to_id: safe, container: 'Drum 1', weighing: drum }, mara);
    const sweeps = book.newestLot().id;
    // 60 % of 0.234 gold, 50 % of 0.039 silver; dust 250.000 − 0.1404 − 0.0195.
    expect(book.voucherLines(book.lastVoucher())).toEqual([
      'Safe | Drum 1 | 250.000 g | gold 0.1404 | silver 0.0195',
      'Loss, sheet work | Drum 1 | -0.1599 g | gold -0.1404 | silver -0.0195',
      'Foreign matter | Drum 1 | -249.8401 g',
    ]);

    const on = way(workshop, sweeps);
    book.run(consign, on.consign, mara);
    expect(book.held(courier, sweeps).gross).toBe(250_000_000n);
    book.run(arrive, on.arrive(book.lastVoucher().id, '249.999'), mara);
    // A milligram is inside two uncertainties of two weighings (2 × √2 × 1 mg). Of it 0.56 µg would be gold and 0.08 µg
    // silver: by largest remainder one microgram of gold and none of silver goes with it.
    expect(book.voucherLines(book.lastVoucher())).toEqual([
      'Valois Secure | Drum 1 | -250.000 g | gold -0.1404 | silver -0.0195',
      'Norrby Refining | Drum 1 | 249.999 g | gold 0.140399 | silver 0.0195',
      'Count variance | Drum 1 | 0.001 g | gold 0.000001',
    ]);

    // The refiner found 0.150 gold and 0.018 silver, credits 0.147 gold, charges 0.001 gold; silver isn't paid.
    const metals = [
      { metal: 'gold', assayed_g: '0.150', credited_g: '0.147', charge_g: '0.001' },
      { metal: 'silver', assayed_g: '0.018', credited_g: '0' },
    ];
    const paid = [{ way: 'metal_account', account_id: metalAccount, metal: 'gold', mass_g: '0.147' }];
    book.run(outturn, on.outturn(metals, paid), mara);
    // Gold 0.140399 − 0.150 and silver 0.0195 − 0.018 go back to the loss that the estimate came from. Foreign matter
    // gets back what it gave; the deduction's gross is 0.003 + 0.018 less the 0.000999 g of dust lost on the way.
    expect(book.voucherLines(book.lastVoucher())).toEqual([
      'Norrby Refining | Drum 1 | -249.999 g | gold -0.140399 | silver -0.0195',
      'Loss, sheet work | Drum 1 | -0.009601 g | gold -0.009601',
      'Loss, sheet work | Drum 1 | 0.0015 g | silver 0.0015',
      'Processor’s deduction | Drum 1 | 0.020001 g | gold 0.003 | silver 0.018',
      'Foreign matter | Drum 1 | 249.8401 g',
      'Norrby, metal account | gold on account, Norrby, metal account | 0.147 g | gold 0.147',
    ]);
    // 0.1404 − 0.147 = 0.000001 − 0.009601 + 0.002 + 0.001
    expect(book.lastVoucher().detail.lines).toMatchObject([
      {
        metal: 'gold',
        sent_g: '0.140400',
        weighing_difference_g: '0.000001',
        assay_difference_g: '-0.009601',
        deduction_g: '0.002000',
        charge_g: '0.001000',
        credited_g: '0.147000',
      },
      { metal: 'silver', sent_g: '0.019500', assay_difference_g: '0.001500', deduction_g: '0.018000' },
    ]);
    expect(isZeroMass(book.held(refiner, sweeps))).toBe(true);
    expect(isZeroMass(book.held(book.find('foreign_matter'), sweeps))).toBe(true);
    expect(isZeroMass(book.total())).toBe(true);
  });
});
