/**
 * Outturn: a refiner's statement settles a consignment, at once or in parts, paid onto a metal account, in returned
 * metal, in money, or split. What the paper credits is what is posted, to the last figure; rounding falls into the
 * deduction.
 */
import { fineness } from '../../alloy/fineness.ts';
import type { Account } from '../../book/account.ts';
import type { EntryDraft, Outcome, RecordDraft } from '../../book/draft.ts';
import { accept, refuse } from '../../book/draft.ts';
import { allOf } from '../../book/outcome.ts';
import type { Facts } from '../../book/facts.ts';
import { printGrams } from '../../mass/micrograms.ts';
import { METALS } from '../../mass/vector.ts';
import { readCommon } from '../common-fields.ts';
import type { EventDefinition } from '../definition.ts';
import { recordsOnly } from '../definition.ts';
import { eachLotOnce, findPlace, theAccount } from '../lookup.ts';
import { makeVoucher } from '../make-voucher.ts';
import { openLot } from '../new-lot.ts';
import type { OutturnInput, OutturnPayment } from './outturn-schema.ts';
import { outturnSchema } from './outturn-schema.ts';
import { settleLine } from './settle-line.ts';
import type { SettledLine } from './settle-line.ts';
import { StandingLots, fineMetal } from './standing-lot.ts';

const PROCESSOR = {
  of: ['refiner', 'outworker'],
  sentence: 'an outturn settles what a refiner or casting house holds.',
} as const;

export const outturn: EventDefinition<OutturnInput> = {
  name: 'outturn',
  schema: outturnSchema,
  action: 'book.outturn',
  summary: 'Settles a refiner’s statement: what was found, kept, credited, and how it is paid.',
  needs: (input) => {
    const lots = input.lines.map((line) => line.lot_id);
    const accounts = input.payments.flatMap((payment) =>
      payment.way === 'metal_account' ? [payment.account_id] : [],
    );
    return {
      place_ids: [input.refiner_id, ...new Set(accounts)],
      lot_ids: lots,
      history_lot_ids: lots,
      voucher_ids: input.consign_id === null ? [] : [input.consign_id],
      document_ids: input.document_ids,
    };
  },
  draft(input, facts) {
    const common = readCommon(input, facts);
    if (!common.ok) return common;
    const refiner = findPlace(facts, input.refiner_id, 'refiner_id', PROCESSOR);
    if (!refiner.ok) return refiner;
    const once = eachLotOnce(input.lines, facts, 'lines');
    if (!once.ok) return once;
    const lines = allOf(
      input.lines.map((line, index) => settleLine(line, refiner.value, `lines.${index}`, facts)),
    );
    if (!lines.ok) return lines;
    const adds = paymentsAdd(input, lines.value);
    if (!adds.ok) return adds;
    const standing = new StandingLots(facts, common.value.business_date);
    const paid = allOf(
      input.payments.map((payment, index) =>
        pay(payment, `payments.${index}`, {
          refiner: refiner.value,
          lines: lines.value,
          standing,
          business_date: common.value.business_date,
          facts,
        }),
      ),
    );
    if (!paid.ok) return paid;
    const voucher = makeVoucher(facts, common.value, {
      kind: 'outturn',
      detail: {
        consign_id: input.consign_id,
        refiner_id: refiner.value.id,
        counterparty_id: refiner.value.party_id,
        statement: input.statement,
        stage: input.stage,
        lines: input.lines.flatMap((line, index) => lineRows(line, lines.value[index])),
        payments: input.payments.map(paymentRow),
        charges: input.charges.map(({ what, amount }) => ({ what, amount: amount.toFixed() })),
      },
      entries: [...lines.value.flatMap((line) => line.entries), ...paid.value.map((part) => part.entry)],
    });
    return accept(recordsOnly([...standing.records, ...paid.value.flatMap((part) => part.records), voucher]));
  },
};

/** That what is paid is what is credited, metal by metal. */
function paymentsAdd(input: OutturnInput, lines: readonly SettledLine[]): Outcome<null> {
  for (const metal of METALS) {
    const credited = lines.reduce((sum, line) => sum + line.credited[metal], 0n);
    const paid = input.payments.reduce(
      (sum, payment) => sum + (payment.metal === metal ? payment.mass_g : 0n),
      0n,
    );
    if (paid === credited) continue;
    const sentence = `${printGrams(credited, 3)} g of ${metal} is credited, and ${printGrams(paid, 3)} g is paid. Say how all of it is paid.`;
    return refuse({ code: 'not_balanced', field: 'payments', sentence });
  }
  return accept(null);
}

interface Paying {
  readonly refiner: Account;
  readonly lines: readonly SettledLine[];
  readonly standing: StandingLots;
  readonly business_date: string;
  readonly facts: Facts;
}

function pay(
  payment: OutturnPayment,
  field: string,
  by: Paying,
): Outcome<{ records: readonly RecordDraft[]; entry: EntryDraft }> {
  const mass = fineMetal(payment.metal, payment.mass_g);
  const chief = by.lines.find((line) => line.credited[payment.metal] > 0n)?.lot;
  switch (payment.way) {
    case 'metal_account': {
      const account = by.facts.accounts.get(payment.account_id);
      if (account?.kind !== 'metal_account' || account.closed) {
        const sentence =
          'That is no open metal account. Choose one from the list, or open it under Workshop, places.';
        return refuse({ code: 'wrong_place', field: `${field}.account_id`, sentence });
      }
      return accept({
        records: [],
        entry: { account_id: account.id, lot_id: by.standing.of(account, payment.metal), mass, pieces: null },
      });
    }
    case 'returned': {
      const opened = openLot(by.facts, by.business_date, {
        form: 'grain',
        alloy: null,
        owner_id: null,
        origin: 'recycled',
        fineness: fineness({ [payment.metal]: '1000' }),
        basis: 'declared',
        description: `${payment.metal} to come back from ${by.refiner.name}`,
        hold_reason: null,
        hold_until: null,
        parents: by.lines.filter((line) => line.credited[payment.metal] > 0n).map((line) => line.lot.id),
      });
      return accept({
        records: [opened.act],
        entry: { account_id: by.refiner.id, lot_id: opened.lot_id, mass, pieces: null },
      });
    }
    case 'money':
      return accept({
        records: [],
        entry: { account_id: theAccount(by.facts, 'sold').id, lot_id: chief?.id ?? '', mass, pieces: null },
      });
  }
}

function paymentRow(payment: OutturnPayment) {
  return {
    way: payment.way,
    metal: payment.metal,
    mass_g: printGrams(payment.mass_g),
    account_id: payment.way === 'metal_account' ? payment.account_id : null,
    amount: payment.way === 'money' ? payment.amount.toFixed() : null,
  };
}

/** Sent − credited = weighing difference + assay difference + deduction + metal charge: a row per metal. */
function lineRows(line: OutturnInput['lines'][number], settled: SettledLine | undefined) {
  if (settled === undefined) return [];
  const { assay_difference, weighing_difference, credited, deduction, lot } = settled;
  const there = METALS.filter(
    (metal) => settled.settled[metal] > 0n || line.metals.some((row) => row.metal === metal),
  );
  return there.map((metal) => {
    const charge = line.metals.find((row) => row.metal === metal)?.charge_g ?? 0n;
    return {
      lot_id: lot.id,
      metal,
      sent_g: printGrams(settled.settled[metal] + weighing_difference[metal]),
      weighing_difference_g: printGrams(weighing_difference[metal]),
      assayed_g: printGrams(settled.settled[metal] - assay_difference[metal]),
      assay_difference_g: printGrams(assay_difference[metal]),
      deduction_g: printGrams(deduction[metal] - charge),
      charge_g: printGrams(charge),
      credited_g: printGrams(credited[metal]),
      after_melt_g: line.after_melt_g === null ? null : printGrams(line.after_melt_g),
    };
  });
}
