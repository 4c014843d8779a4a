/**
 * Correction: a voucher that was wrong is mended by posting the difference only, on the same accounts and lots
 * (typed 500 for 400: 100 g safe → supplier), with today's date. What counts is the voucher as earlier corrections
 * have left it. Two sign it.
 */
import { isPlace } from '../book/account.ts';
import type { EntryDraft, Outcome } from '../book/draft.ts';
import { accept, isBalanced, refuse } from '../book/draft.ts';
import type { Facts, RecordedEntry, RecordedVoucher } from '../book/facts.ts';
import { detailLeaf } from '../book/facts.ts';
import { heldOf } from '../book/holding.ts';
import { allOf } from '../book/outcome.ts';
import { printGrams } from '../mass/micrograms.ts';
import type { MassVector } from '../mass/vector.ts';
import {
  ZERO_MASS,
  addMass,
  fineTotal,
  hasNegative,
  isZeroMass,
  negateMass,
  subtractMass,
  sumMass,
} from '../mass/vector.ts';
import { id, longText } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';
import { commonFields, readCommon } from './common-fields.ts';
import type { EventDefinition } from './definition.ts';
import { findVoucher } from './lookup.ts';
import { makeVoucher } from './make-voucher.ts';
import { rightLineFields, rightMass, rightPieces } from './right-line.ts';

const correctionSchema = z.strictObject({
  ...commonFields,
  voucher_id: id,
  reason: longText,
  /** What the lines of the voucher should have said; lines that were right are left out. */
  lines: z
    .array(z.strictObject(rightLineFields))
    .min(1, 'Nothing is corrected yet. Enter the right mass of the line that was wrong.')
    .max(100, 'At most 100 lines are corrected at once.'),
  /** The line that takes the difference of the others: the supplier's, the loss. */
  rest_line: z
    .string()
    .regex(/^[1-9]\d{0,5}$/, 'Choose one of the voucher’s lines.')
    .nullable()
    .default(null),
});
export type CorrectionInput = z.output<typeof correctionSchema>;

export const correction: EventDefinition<CorrectionInput> = {
  name: 'correction',
  schema: correctionSchema,
  action: 'book.correct',
  summary: 'Mends a voucher by posting the difference to what it should have said.',
  needs: (input) => ({ trace_voucher_ids: [input.voucher_id], document_ids: input.document_ids }),
  draft(input, facts) {
    const common = readCommon(input, facts);
    if (!common.ok) return common;
    const found = findVoucher(facts, input.voucher_id, 'voucher_id');
    if (!found.ok) return found;
    const voucher = correctable(found.value);
    if (!voucher.ok) return voucher;
    const lines = allOf(input.lines.map((line, at) => difference(line, `lines.${at}`, voucher.value, facts)));
    if (!lines.ok) return lines;
    const entries = withRest(lines.value, input, voucher.value);
    if (!entries.ok) return entries;
    const sound = soundDifference(entries.value, voucher.value, facts);
    if (!sound.ok) return sound;
    const { detail, sequence } = voucher.value;
    const mending = makeVoucher(facts, common.value, {
      kind: 'correction',
      detail: {
        corrects: voucher.value.id,
        corrected_kind: voucher.value.kind,
        corrected_on: voucher.value.business_date,
        reason: input.reason,
        operation: detailLeaf(detail, 'operation'),
        bench: detailLeaf(detail, 'bench'),
        person_id: detailLeaf(detail, 'person_id'),
        job_id: detailLeaf(detail, 'job_id'),
        counterparty_id: detailLeaf(detail, 'counterparty_id'),
      },
      entries: entries.value,
    });
    const second_signature = `Voucher ${sequence} is corrected only when a second person signs.`;
    return accept({ records: [mending], handovers: [], second_signature });
  },
};

function correctable(voucher: RecordedVoucher): Outcome<RecordedVoucher> {
  if (voucher.reversed_by !== null) {
    const sentence = `Voucher ${voucher.sequence} was reversed, so there is nothing left of it to correct. Enter it again.`;
    return refuse({ code: 'already_done', field: 'voucher_id', sentence });
  }
  if (voucher.kind === 'reversal' || voucher.kind === 'correction') {
    const sentence = `Voucher ${voucher.sequence} is a ${voucher.kind} itself. Correct the voucher that it mends, or enter what it undid again.`;
    return refuse({ code: 'invalid', field: 'voucher_id', sentence });
  }
  return accept(voucher);
}

/** A line as earlier corrections of its voucher have left it: they stand on the same account and lot. */
function asMended(entry: RecordedEntry, voucher: RecordedVoucher, facts: Facts): RecordedEntry {
  const mends = facts.lot_entries.filter(
    (later) =>
      later.corrects === voucher.id &&
      later.reversed_by === null &&
      later.account_id === entry.account_id &&
      later.lot_id === entry.lot_id,
  );
  const mass = mends.reduce((sum, later) => addMass(sum, later.mass), entry.mass);
  const pieces =
    entry.pieces === null ? null : mends.reduce((sum, later) => sum + (later.pieces ?? 0n), entry.pieces);
  return { ...entry, mass, pieces };
}

function difference(
  line: CorrectionInput['lines'][number],
  field: string,
  voucher: RecordedVoucher,
  facts: Facts,
): Outcome<EntryDraft & { readonly line: string }> {
  const booked = voucher.entries.find((entry) => entry.line === line.line);
  if (booked === undefined) {
    const sentence = `Voucher ${voucher.sequence} has no line ${line.line}. Choose one of its lines.`;
    return refuse({ code: 'not_found', field: `${field}.line`, sentence });
  }
  const now = asMended(booked, voucher, facts);
  const right = rightMass(line, now, field);
  if (!right.ok) return right;
  const pieces = rightPieces(line, now, field);
  if (!pieces.ok) return pieces;
  const { account_id, lot_id } = booked;
  return accept({
    account_id,
    lot_id,
    mass: subtractMass(right.value, now.mass),
    pieces: pieces.value === null ? null : pieces.value - (now.pieces ?? 0n),
    line: line.line,
  });
}

/** Puts what is left over onto the line that is to take it. Refuses a line named twice, and one that is not there. */
function withRest(
  lines: readonly (EntryDraft & { readonly line: string })[],
  input: CorrectionInput,
  voucher: RecordedVoucher,
): Outcome<readonly EntryDraft[]> {
  const named = [
    ...input.lines.map((line) => line.line),
    ...(input.rest_line === null ? [] : [input.rest_line]),
  ];
  const twice = named.find((line, at) => named.indexOf(line) !== at);
  if (twice !== undefined) {
    const sentence = `Line ${twice} is named twice. Leave one of the two out.`;
    return refuse({ code: 'invalid', field: 'lines', sentence });
  }
  const changed = lines.map(({ account_id, lot_id, mass, pieces }) => ({ account_id, lot_id, mass, pieces }));
  if (input.rest_line === null) return accept(changed);
  const rest = voucher.entries.find((entry) => entry.line === input.rest_line);
  if (rest === undefined) {
    const sentence = `Voucher ${voucher.sequence} has no line ${input.rest_line}. Choose one of its lines.`;
    return refuse({ code: 'not_found', field: 'rest_line', sentence });
  }
  const mass = negateMass(sumMass(changed.map((entry) => entry.mass)));
  const counted = changed.filter((entry) => entry.lot_id === rest.lot_id && entry.pieces !== null);
  const sum = counted.reduce((total, entry) => total + (entry.pieces ?? 0n), 0n);
  const pieces = rest.pieces === null || sum === 0n ? null : -sum;
  return accept([...changed, { account_id: rest.account_id, lot_id: rest.lot_id, mass, pieces }]);
}

function soundDifference(
  entries: readonly EntryDraft[],
  voucher: RecordedVoucher,
  facts: Facts,
): Outcome<null> {
  const moving = entries.filter((entry) => !isZeroMass(entry.mass) || (entry.pieces ?? 0n) !== 0n);
  if (moving.length === 0) {
    const sentence = `Voucher ${voucher.sequence} says that already, so there is nothing to correct. Enter what it should have said.`;
    return refuse({ code: 'nothing_to_post', field: 'lines', sentence });
  }
  if (!isBalanced(moving)) {
    const off = sumMass(moving.map((entry) => entry.mass));
    const sentence = `The right masses do not add up: ${printGrams(off.gross)} g gross and ${printGrams(fineTotal(off))} g fine are left over. Name the line that takes the rest.`;
    return refuse({ code: 'not_balanced', field: 'rest_line', sentence });
  }
  if (voucher.kind !== 'ownership' && changesOwner(moving, facts)) {
    const sentence =
      'That would move metal from one owner to another. Correct the lines of each owner by themselves.';
    return refuse({ code: 'wrong_owner', field: 'lines', sentence });
  }
  return staysPossible(moving, facts);
}

function changesOwner(entries: readonly EntryDraft[], facts: Facts): boolean {
  const sums = new Map<string | null, MassVector>();
  for (const entry of entries) {
    const owner = facts.lots.get(entry.lot_id)?.owner_id ?? null;
    sums.set(owner, addMass(sums.get(owner) ?? ZERO_MASS, entry.mass));
  }
  return [...sums.values()].some((sum) => fineTotal(sum) !== 0n);
}

/** No place may hold less than nothing afterwards, nor more fine metal than gross. */
function staysPossible(entries: readonly EntryDraft[], facts: Facts): Outcome<null> {
  for (const entry of entries) {
    const account = facts.accounts.get(entry.account_id);
    if (account === undefined || !isPlace(account.kind)) continue;
    const held = heldOf(facts.holdings, entry.account_id, entry.lot_id);
    const after = addMass(held.mass, entry.mass);
    const pieces = (held.pieces ?? 0n) + (entry.pieces ?? 0n);
    const code = facts.lots.get(entry.lot_id)?.code ?? 'that lot';
    if (hasNegative(after) || pieces < 0n) {
      const sentence = `${account.name} holds ${printGrams(held.mass.gross, 3)} g of ${code}, which is less than would have to leave. Correct the later vouchers first.`;
      return refuse({ code: 'not_enough', field: 'lines', sentence });
    }
    if (fineTotal(after) > after.gross) {
      const sentence = `${account.name} would hold more fine metal of ${code} than gross. Look at the masses again.`;
      return refuse({ code: 'impossible_fineness', field: 'lines', sentence });
    }
  }
  return accept(null);
}
