/**
 * Reversal: the exact mirror image of a voucher, once, signed by two. It is refused where later vouchers have used
 * the metal, naming them: then those are reversed first, or a correction mends it.
 */
import { isPlace } from '../book/account.ts';
import type { EntryDraft, Outcome } from '../book/draft.ts';
import { accept, refuse } from '../book/draft.ts';
import type { Facts, RecordedVoucher } from '../book/facts.ts';
import { detailLeaf } from '../book/facts.ts';
import { heldOf } from '../book/holding.ts';
import type { MassVector } from '../mass/vector.ts';
import { MASS_KEYS, addMass, hasNegative, negateMass } from '../mass/vector.ts';
import { id, longText } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';
import { commonFields, readCommon } from './common-fields.ts';
import type { EventDefinition } from './definition.ts';
import { findVoucher } from './lookup.ts';
import { makeVoucher } from './make-voucher.ts';

const reversalSchema = z.strictObject({ ...commonFields, voucher_id: id, reason: longText });
export type ReversalInput = z.output<typeof reversalSchema>;

export const reversal: EventDefinition<ReversalInput> = {
  name: 'reversal',
  schema: reversalSchema,
  action: 'book.reverse',
  summary: 'Undoes a voucher by its exact mirror image.',
  needs: (input) => ({ trace_voucher_ids: [input.voucher_id], document_ids: input.document_ids }),
  draft(input, facts) {
    const common = readCommon(input, facts);
    if (!common.ok) return common;
    const voucher = findVoucher(facts, input.voucher_id, 'voucher_id');
    if (!voucher.ok) return voucher;
    const free = canBeReversed(voucher.value, common.value.business_date, facts);
    if (!free.ok) return free;
    const { id: reverses, sequence, kind, detail } = voucher.value;
    const mirror = makeVoucher(facts, common.value, {
      kind: 'reversal',
      reverses,
      detail: {
        reason: input.reason,
        reversed_kind: kind,
        operation: detailLeaf(detail, 'operation'),
        bench: detailLeaf(detail, 'bench'),
        person_id: detailLeaf(detail, 'person_id'),
        job_id: detailLeaf(detail, 'job_id'),
        counterparty_id: detailLeaf(detail, 'counterparty_id'),
        kept: keptRows(detail),
      },
      entries: voucher.value.entries.map(mirrored),
    });
    const second_signature = `Voucher ${sequence} is reversed only when a second person signs.`;
    return accept({ records: [mirror], handovers: [], second_signature });
  },
};

function mirrored(entry: EntryDraft): EntryDraft {
  const { account_id, lot_id, mass, pieces } = entry;
  return { account_id, lot_id, mass: negateMass(mass), pieces: pieces === null ? null : -pieces };
}

function canBeReversed(voucher: RecordedVoucher, date: string, facts: Facts): Outcome<null> {
  const { sequence } = voucher;
  const field = 'voucher_id';
  if (voucher.reversed_by !== null) {
    const sentence = `Voucher ${sequence} was reversed already. A voucher is reversed once.`;
    return refuse({ code: 'already_done', field, sentence });
  }
  if (voucher.kind === 'reversal') {
    const sentence = `Voucher ${sequence} is a reversal itself. Enter what it undid again instead.`;
    return refuse({ code: 'already_done', field, sentence });
  }
  if (date < voucher.business_date) {
    const sentence = `Voucher ${sequence} is of ${voucher.business_date}, so it can’t be undone before. Enter that day or a later one.`;
    return refuse({ code: 'invalid', field: 'business_date', sentence });
  }
  const users = usedSince(voucher, facts);
  if (users.length > 0) {
    const named = `${users.length === 1 ? 'voucher' : 'vouchers'} ${listed(users)} ${users.length === 1 ? 'has' : 'have'}`;
    const sentence = `Voucher ${sequence} can’t be reversed: ${named} used its metal. Reverse ${users.length === 1 ? 'that one' : 'those'} first, or post a correction.`;
    return refuse({ code: 'used_since', field, sentence });
  }
  return stillThere(voucher, facts);
}

/** Sequences of later vouchers that took from where this one put something, but for those that were reversed. */
function usedSince(voucher: RecordedVoucher, facts: Facts): readonly string[] {
  const put = voucher.entries.filter(
    (entry) => isIn(entry.account_id, facts) && someMass(entry.mass, (ug) => ug > 0n),
  );
  const later = facts.lot_entries.filter(
    (entry) =>
      BigInt(entry.voucher_sequence) > BigInt(voucher.sequence) &&
      entry.reversed_by === null &&
      entry.voucher_kind !== 'reversal' &&
      someMass(entry.mass, (ug) => ug < 0n) &&
      put.some((mine) => mine.account_id === entry.account_id && mine.lot_id === entry.lot_id),
  );
  return [...new Set(later.map((entry) => entry.voucher_sequence))];
}

/** That the mirror leaves nothing below nothing: what was put there has to lie there still. */
function stillThere(voucher: RecordedVoucher, facts: Facts): Outcome<null> {
  for (const entry of voucher.entries) {
    if (!isIn(entry.account_id, facts)) continue;
    const held = heldOf(facts.holdings, entry.account_id, entry.lot_id);
    const pieces = (held.pieces ?? 0n) - (entry.pieces ?? 0n);
    if (!hasNegative(addMass(held.mass, negateMass(entry.mass))) && pieces >= 0n) continue;
    const place = facts.accounts.get(entry.account_id)?.name ?? 'The place';
    const lot = facts.lots.get(entry.lot_id)?.code ?? 'the lot';
    const sentence = `Voucher ${voucher.sequence} can’t be reversed: ${place} no longer holds that much of ${lot}. Post a correction instead.`;
    return refuse({ code: 'not_enough', field: 'voucher_id', sentence });
  }
  return accept(null);
}

function isIn(account_id: string, facts: Facts): boolean {
  const account = facts.accounts.get(account_id);
  return account !== undefined && isPlace(account.kind);
}

function someMass(mass: MassVector, test: (ug: bigint) => boolean): boolean {
  return MASS_KEYS.some((key) => test(mass[key]));
}

function listed(sequences: readonly string[]): string {
  const last = sequences.at(-1) ?? '';
  return sequences.length < 2 ? last : `${sequences.slice(0, -1).join(', ')} and ${last}`;
}

/** Lots kept for several jobs, named again so that they go back to where they were taken from. */
function keptRows(detail: RecordedVoucher['detail']): readonly { readonly lot_id: string }[] {
  const read = z.array(z.object({ lot_id: z.string() })).safeParse(detail['kept']);
  return read.success ? read.data : [];
}
