/**
 * Write-off: metal that is gone: stolen, lost in transit, not recovered. It leaves a place, the count variance whose
 * cause was found later, or the loss of an operation that the settled sweeps did not bring back; found again it comes
 * back from there. Two sign it.
 */
import type { Account } from '../book/account.ts';
import type { EntryDraft, Outcome } from '../book/draft.ts';
import { accept, refuse } from '../book/draft.ts';
import type { Facts, RecordedVoucher } from '../book/facts.ts';
import { allOf } from '../book/outcome.ts';
import type { Micrograms } from '../mass/micrograms.ts';
import { printGrams } from '../mass/micrograms.ts';
import { id, longText, shortText } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';
import type { Amount } from './amount.ts';
import { drawAmount, statedAmountSchema } from './amount.ts';
import { commonFields, readCommon } from './common-fields.ts';
import type { EventDefinition } from './definition.ts';
import { eachLotOnce, findJob, findLot, findPlace, findVoucher, lossAccount, theAccount } from './lookup.ts';
import { makeVoucher, moveEntries, weighingRows } from './make-voucher.ts';

const writeOffSchema = z.strictObject({
  ...commonFields,
  /** Out of a place, a count variance whose cause was found, or an operation's loss; or found again. */
  way: z.enum(['from_place', 'from_variance', 'from_loss', 'found_again']),
  /** The place that it was in, or where it is put now that it is found. */
  place_id: id.nullable().default(null),
  /** The voucher that booked the count variance. */
  variance_voucher_id: id.nullable().default(null),
  /** The operation whose loss is given up. */
  operation: shortText.nullable().default(null),
  cause: z.enum(['theft', 'lost_in_transit', 'not_recovered'], 'Say what became of it.'),
  /** Number of the police report or of the claim. */
  number: shortText.nullable().default(null),
  reason: longText,
  job_id: id.nullable().default(null),
  lines: z
    .array(z.strictObject({ lot_id: id, amount: statedAmountSchema }))
    .min(1, 'Nothing is chosen yet. Choose the lot.')
    .max(100, 'At most 100 lines go into one voucher. Enter the rest in another.'),
});
export type WriteOffInput = z.output<typeof writeOffSchema>;

interface Ends {
  readonly from: Account;
  readonly to: Account;
  readonly variance: RecordedVoucher | null;
}

export const writeOff: EventDefinition<WriteOffInput> = {
  name: 'write-off',
  schema: writeOffSchema,
  action: 'book.write_off',
  summary: 'Writes off metal that is gone, or takes it back where it was found again.',
  needs: (input) => ({
    place_ids: input.place_id === null ? [] : [input.place_id],
    lot_ids: input.lines.map((line) => line.lot_id),
    voucher_ids: input.variance_voucher_id === null ? [] : [input.variance_voucher_id],
    job_ids: input.job_id === null ? [] : [input.job_id],
    document_ids: input.document_ids,
  }),
  draft(input, facts, actor) {
    const common = readCommon(input, facts);
    if (!common.ok) return common;
    const ends = endsOf(input, facts);
    if (!ends.ok) return ends;
    const job = findJob(facts, input.job_id, 'job_id');
    if (!job.ok) return job;
    const numbered = numberGiven(input);
    if (!numbered.ok) return numbered;
    const once = eachLotOnce(input.lines, facts, 'lines');
    if (!once.ok) return once;
    const lines = allOf(
      input.lines.map((line, index) => lineEntries(line, `lines.${index}`, ends.value, input.job_id, facts)),
    );
    if (!lines.ok) return lines;
    const weighings = input.lines.map(({ amount }, index) => ({
      weighing: amount.how === 'weighed' ? amount.weighing : null,
      line: index + 1,
    }));
    const voucher = makeVoucher(facts, common.value, {
      kind: 'write_off',
      detail: {
        way: input.way,
        cause: input.cause,
        number: input.number,
        reason: input.reason,
        variance_voucher_id: input.variance_voucher_id,
        operation: input.operation,
        job_id: input.job_id,
        weighings: weighingRows(weighings, facts, actor),
      },
      entries: lines.value.flat(),
    });
    const second_signature =
      input.way === 'found_again'
        ? 'Metal that was written off comes back only when a second person signs.'
        : 'Metal is written off only when a second person signs.';
    return accept({ records: [voucher], handovers: [], second_signature });
  },
};

function endsOf(input: WriteOffInput, facts: Facts): Outcome<Ends> {
  const off = theAccount(facts, 'written_off');
  if (input.way === 'from_variance') {
    const variance = varianceVoucher(input, facts);
    if (!variance.ok) return variance;
    return accept({ from: theAccount(facts, 'count_variance'), to: off, variance: variance.value });
  }
  if (input.way === 'from_loss') {
    const loss = lossGivenUp(input, facts);
    return loss.ok ? accept({ from: loss.value, to: off, variance: null }) : loss;
  }
  if (input.place_id === null) {
    const sentence = 'It is not said where the metal is or was. Choose the place.';
    return refuse({ code: 'invalid', field: 'place_id', sentence });
  }
  const place = findPlace(facts, input.place_id, 'place_id');
  if (!place.ok) return place;
  const [from, to] = input.way === 'from_place' ? [place.value, off] : [off, place.value];
  return accept({ from, to, variance: null });
}

/** The loss account that metal is given up on. Refuses a cause that no working loss has, and a missing operation. */
function lossGivenUp(input: WriteOffInput, facts: Facts): Outcome<Account> {
  if (input.cause !== 'not_recovered') {
    const sentence = 'What an operation lost was neither stolen nor lost in transit. Choose “not recovered”.';
    return refuse({ code: 'invalid', field: 'cause', sentence });
  }
  if (input.operation === null) {
    const sentence = 'It is not said which operation’s loss is given up. Choose the operation.';
    return refuse({ code: 'invalid', field: 'operation', sentence });
  }
  return lossAccount(facts, input.operation, 'operation');
}

function varianceVoucher(input: WriteOffInput, facts: Facts): Outcome<RecordedVoucher> {
  if (input.variance_voucher_id === null) {
    const sentence = 'It is not said which count variance is explained. Choose its voucher.';
    return refuse({ code: 'invalid', field: 'variance_voucher_id', sentence });
  }
  return findVoucher(facts, input.variance_voucher_id, 'variance_voucher_id');
}

/** A theft has the number of its report, a loss in transit that of the claim; dust that never came back has none. */
function numberGiven(input: WriteOffInput): Outcome<null> {
  if (input.way === 'found_again' || input.cause === 'not_recovered' || input.number !== null)
    return accept(null);
  const sentence =
    input.cause === 'theft'
      ? 'A theft is written off under the number of its police report. Enter the number.'
      : 'A loss in transit is written off under the number of its claim. Enter the number.';
  return refuse({ code: 'invalid', field: 'number', sentence });
}

function lineEntries(
  line: { readonly lot_id: string; readonly amount: Amount },
  field: string,
  ends: Ends,
  job_id: string | null,
  facts: Facts,
): Outcome<readonly EntryDraft[]> {
  const lot = findLot(facts, line.lot_id, `${field}.lot_id`);
  if (!lot.ok) return lot;
  const booked = ends.variance === null ? null : bookedVariance(ends.variance, ends.from.id, lot.value.id);
  if (booked === 0n) {
    const sentence = `That voucher booked no shortage of ${lot.value.code}. Choose the voucher that did.`;
    return refuse({ code: 'invalid', field: `${field}.lot_id`, sentence });
  }
  const drawn = drawAmount(
    facts,
    { account: ends.from, lot: lot.value, job_id },
    line.amount,
    `${field}.amount`,
  );
  if (!drawn.ok) return drawn;
  if (drawn.value.last !== null) {
    const sentence = 'What is written off is gone, so it leaves no empty container. Enter the mass alone.';
    return refuse({ code: 'invalid', field: `${field}.amount.emptied`, sentence });
  }
  const { mass, pieces } = drawn.value;
  if (booked !== null && mass.gross > booked) {
    const sentence = `That voucher booked ${printGrams(booked, 3)} g of ${lot.value.code} as short. No more of it can be explained. Enter that or less.`;
    return refuse({ code: 'not_enough', field: `${field}.amount`, sentence });
  }
  return accept(moveEntries({ lot_id: lot.value.id, mass, pieces }, ends.from.id, ends.to.id));
}

/** The shortage of a lot that a voucher booked to count variance, in micrograms; nothing where it was reversed. */
function bookedVariance(voucher: RecordedVoucher, variance_id: string, lot_id: string): Micrograms {
  if (voucher.reversed_by !== null) return 0n;
  const booked = voucher.entries.find((entry) => entry.account_id === variance_id && entry.lot_id === lot_id);
  return booked === undefined || booked.mass.gross < 0n ? 0n : booked.mass.gross;
}
