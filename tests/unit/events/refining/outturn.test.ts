/** Outturn: parts, ways of payment, metals that nobody paid for, and the identity that its paper has to fulfil. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import type { Detail } from '../../../../shared/book/draft.ts';
import { arrive, consign } from '../../../../shared/events/refining/consign.ts';
import { outturn } from '../../../../shared/events/refining/outturn.ts';
import { sweepUp } from '../../../../shared/events/refining/sweep-up.ts';
import { weighBack } from '../../../../shared/events/weigh-back/weigh-back.ts';
import { printGrams } from '../../../../shared/mass/micrograms.ts';
import { isZeroMass } from '../../../../shared/mass/vector.ts';
import { parseTestGrams } from '../../../support/grams.ts';
import { aRefinersWorkshop, feed, way } from '../../../support/sweeps.ts';

/** 50.000 g of 750 scrap with 5 % silver lies at the refiner. */
function aScrapLot() {
  const workshop = aRefinersWorkshop();
  const scrap = workshop.book.put(workshop.refiner, '750 scrap', '50.000', {
    form: 'clean_scrap',
    gold: '750',
    silver: '50',
  });
  return { ...workshop, scrap, on: way(workshop, scrap) };
}

const gold = (assayed_g: string, credited_g: string, more: object = {}) => ({
  metal: 'gold',
  assayed_g,
  credited_g,
  ...more,
});

/** Sent − credited − weighing difference − assay difference − deduction − metal charge, of each row of a statement. */
function leftOver(detail: Detail): readonly bigint[] {
  const row = z.object({
    sent_g: z.string(),
    credited_g: z.string(),
    weighing_difference_g: z.string(),
    assay_difference_g: z.string(),
    deduction_g: z.string(),
    charge_g: z.string(),
  });
  const rows = z.array(row).min(1).parse(detail.lines);
  return rows.map(({ sent_g, ...others }) =>
    Object.values(others).reduce((left, part) => left - parseTestGrams(part), parseTestGrams(sent_g)),
  );
}

describe('outturn', () => {
  it('books an assay that differs as fine metal only, and metal that nobody paid for as deduction', () => {
    const { book, mara, metalAccount, on } = aScrapLot();
    const paid = [{ way: 'metal_account', account_id: metalAccount, metal: 'gold', mass_g: '37.2' }];
    book.run(outturn, on.outturn([gold('37.4', '37.2')], paid), mara);
    // Book 37.500 gold, 2.500 silver. Gross 50.000 − 37.200 credited = 12.800 stays with the refiner.
    expect(book.voucherLines(book.lastVoucher())).toEqual([
      'Norrby Refining | 750 scrap | -50.000 g | gold -37.500 | silver -2.500',
      'Assay variance | 750 scrap | 0.000 g | gold 0.100',
      'Processor’s deduction | 750 scrap | 12.800 g | gold 0.200 | silver 2.500',
      'Norrby, metal account | gold on account, Norrby, metal account | 37.200 g | gold 37.200',
    ]);
  });

  it('splits the payment over metal account, returned metal and money', () => {
    const { book, mara, metalAccount, refiner, on } = aScrapLot();
    const payments = [
      { way: 'metal_account', account_id: metalAccount, metal: 'gold', mass_g: '20' },
      { way: 'returned', metal: 'gold', mass_g: '10' },
      { way: 'money', metal: 'gold', mass_g: '7.2', amount: '455.10' },
    ];
    book.run(outturn, on.outturn([gold('37.5', '37.2')], payments), mara);
    expect(book.ledger()).toContain(
      'Norrby Refining | gold to come back from Norrby Refining | 10.000 g | gold 10.000',
    );
    expect(book.ledger()).toContain('Sold | 750 scrap | 7.200 g | gold 7.200');
    expect(book.held(refiner, book.newestLot().id).gold).toBe(10_000_000n);
    expect(book.refusal(outturn, on.outturn([gold('37.5', '37.2')], []), mara).code).toBe('not_enough');
  });

  it('leaves at the refiner what an advance does not settle', () => {
    const { book, mara, metalAccount, refiner, scrap, on } = aScrapLot();
    const paid = (mass_g: string) => [
      { way: 'metal_account', account_id: metalAccount, metal: 'gold', mass_g },
    ];
    const part = { how: 'part', gross_g: '30.000' };
    book.run(outturn, { ...on.outturn([gold('22.5', '22')], paid('22'), part), stage: 'advance' }, mara);
    expect(book.held(refiner, scrap)).toMatchObject({ gross: 20_000_000n, gold: 15_000_000n });
    book.run(outturn, on.outturn([gold('15', '14.9')], paid('14.9')), mara);
    expect(isZeroMass(book.held(refiner, scrap))).toBe(true);
  });

  it('refuses a paper that does not add up', () => {
    const { book, mara, metalAccount, on } = aScrapLot();
    const paid = (mass_g: string) => [
      { way: 'metal_account', account_id: metalAccount, metal: 'gold', mass_g },
    ];
    const refusal = (metals: object[], payments: object[]) =>
      book.refusal(outturn, on.outturn(metals, payments), mara);
    expect(refusal([gold('37.5', '37.2')], paid('37.0'))).toMatchObject({
      code: 'not_balanced',
      field: 'payments',
    });
    expect(refusal([gold('37.5', '37.6')], paid('37.6')).sentence).toContain(
      'More gold is credited than was found.',
    );
    expect(refusal([gold('37.5', '37.2', { charge_g: '0.4' })], paid('37.2')).code).toBe('invalid');
    expect(refusal([gold('1', '1'), gold('1', '1')], paid('2')).sentence).toContain('stands here twice');
  });

  it('settles any statement: sent less credited is the sum of its lines, and nothing is left at the refiner', () => {
    const share = fc.bigInt({ min: 0n, max: 1_200_000n });
    const chance = fc.record({
      assay: share,
      credit: fc.bigInt({ min: 0n, max: 1_000_000n }),
      dust: fc.bigInt({ min: 500_000n, max: 900_000_000n }),
      worked: fc.bigInt({ min: 1_000n, max: 10_000_000n }),
      first: fc.bigInt({ min: 1n, max: 999_999n }),
    });
    fc.assert(
      fc.property(chance, ({ assay, credit, dust, worked, first }) => {
        const workshop = aRefinersWorkshop();
        const { book, mara, bench4, safe, sweepsBin, metalAccount, refiner } = workshop;
        const job_id = book.job('Ring');
        const lost = worked / 3n + 1n;
        book.put(bench4, 'sheet', printGrams(worked + lost), { gold: '585', silver: '300', job_id });
        const made = [
          { form: 'work', description: 'ring', weighing: { gross_g: printGrams(worked) }, pieces: '1' },
        ];
        book.run(
          weighBack,
          { place_id: bench4, safe_id: safe, works: [{ job_id, operation: 'sheet_work', made }] },
          mara,
        );
        feed(workshop, 'sheet_work', { gold: '70', silver: '55.5' });
        const weighing = { gross_g: printGrams(dust) };
        book.run(sweepUp, { bin_id: sweepsBin, to_id: safe, container: 'Drum', weighing }, mara);
        const sweeps = book.newestLot().id;
        const on = way(workshop, sweeps);
        book.run(consign, on.consign, mara);
        book.run(arrive, on.arrive(book.lastVoucher().id, printGrams(dust - 499n)), mara);
        const settle = (how: object) => {
          const held = book.held(refiner, sweeps);
          const assayed = (held.gold * assay) / 1_000_000n;
          const credited = (assayed * credit) / 1_000_000n;
          const metals = [
            gold(printGrams(assayed), printGrams(credited), {
              charge_g: printGrams((assayed - credited) / 2n),
            }),
          ];
          const paid = [
            { way: 'metal_account', account_id: metalAccount, metal: 'gold', mass_g: printGrams(credited) },
          ];
          book.run(outturn, on.outturn(metals, credited > 0n ? paid : [], how), mara);
          expect(leftOver(book.lastVoucher().detail).every((left) => left === 0n)).toBe(true);
        };
        const part = (book.held(refiner, sweeps).gross * first) / 1_000_000n;
        if (part > 0n) settle({ how: 'part', gross_g: printGrams(part) });
        settle({ how: 'all' });
        expect(isZeroMass(book.held(refiner, sweeps))).toBe(true);
        expect(book.held(book.find('foreign_matter'), sweeps).gross).toBe(0n);
        expect(isZeroMass(book.total())).toBe(true);
      }),
      { numRuns: 60 },
    );
  });
});
