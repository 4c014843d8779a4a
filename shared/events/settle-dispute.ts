/**
 * Settle a dispute: both weigh again, together. A correction mends the voucher to the agreed mass (the rest is back
 * where it came from, or comes from there too), and the receiver acknowledges it. Both have seen the balance and the
 * receiver's PIN stands for his signature, so that no third person signs.
 */
import type { Account } from '../book/account.ts';
import { isPlace } from '../book/account.ts';
import type { EntryDraft, Outcome, RecordDraft } from '../book/draft.ts';
import { accept, refuse } from '../book/draft.ts';
import type { Facts, Handover, RecordedEntry, RecordedVoucher } from '../book/facts.ts';
import { detailLeaf } from '../book/facts.ts';
import { heldOf } from '../book/holding.ts';
import { allOf } from '../book/outcome.ts';
import { takeGross } from '../mass/apportion.ts';
import type { Micrograms } from '../mass/micrograms.ts';
import { printGrams } from '../mass/micrograms.ts';
import { sumMass } from '../mass/vector.ts';
import { id, optionalNote } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';
import { netOf, weighingSchema } from '../weighing/weighing.ts';
import type { EventDefinition } from './definition.ts';
import { recordsOnly } from './definition.ts';
import { answerAct, answerFields, findHandover } from './handover-answer.ts';
import { eachLotOnce, findVoucher } from './lookup.ts';
import { makeVoucher, moveEntries, weighingRows } from './make-voucher.ts';

const settleDisputeSchema = z.strictObject({
  ...answerFields,
  voucher_id: id,
  /** The second weighing of each lot that was in dispute. */
  lines: z
    .array(z.strictObject({ lot_id: id, weighing: weighingSchema }))
    .min(1, 'Nothing is weighed yet. Weigh again before both.')
    .max(100, 'At most 100 lots go into one voucher.'),
  note: optionalNote,
});
export type SettleDisputeInput = z.output<typeof settleDisputeSchema>;

export const settleDispute: EventDefinition<SettleDisputeInput> = {
  name: 'settle-dispute',
  schema: settleDisputeSchema,
  action: 'book.issue',
  summary: 'Settles a disputed handover by a second weighing before both.',
  needs: (input) => ({ trace_voucher_ids: [input.voucher_id] }),
  draft(input, facts, actor) {
    const handover = findHandover(input, facts, actor, ['disputed']);
    if (!handover.ok) return handover;
    const voucher = findVoucher(facts, input.voucher_id, 'voucher_id');
    if (!voucher.ok) return voucher;
    const once = eachLotOnce(input.lines, facts, 'lines');
    if (!once.ok) return once;
    const lines = allOf(
      input.lines.map((line, at) => mend(line, `lines.${at}`, voucher.value, handover.value, facts)),
    );
    if (!lines.ok) return lines;
    const weighings = input.lines.map((line, at) => ({ weighing: line.weighing, line: at + 1 }));
    const common = { business_date: facts.today, note: input.note, documents: [] };
    const { detail } = voucher.value;
    const correction = makeVoucher(facts, common, {
      kind: 'correction',
      detail: {
        corrects: voucher.value.id,
        handover_id: handover.value.id,
        operation: detailLeaf(detail, 'operation'),
        bench: detailLeaf(detail, 'bench'),
        person_id: detailLeaf(detail, 'person_id'),
        job_id: detailLeaf(detail, 'job_id'),
        weighings: weighingRows(weighings, facts, actor),
      },
      entries: lines.value.flatMap((line) => line.entries),
    });
    const agreed = { gross_g: printGrams(agreedGross(voucher.value, handover.value, correction.entries)) };
    const act = answerAct('handover_acknowledged', handover.value, input.how, facts, agreed);
    const records: readonly RecordDraft[] = correction.entries.length === 0 ? [act] : [correction, act];
    return accept(recordsOnly(records));
  },
};

function agreedGross(
  voucher: RecordedVoucher,
  handover: Handover,
  mended: readonly EntryDraft[],
): Micrograms {
  const before = voucher.entries.filter(
    (entry) => entry.account_id === handover.place_id && entry.mass.gross > 0n,
  );
  const after = mended.filter((entry) => entry.account_id === handover.place_id);
  return sumMass([...before, ...after].map((entry) => entry.mass)).gross;
}

function mend(
  line: SettleDisputeInput['lines'][number],
  field: string,
  voucher: RecordedVoucher,
  handover: Handover,
  facts: Facts,
): Outcome<{ readonly entries: readonly EntryDraft[] }> {
  const net = netOf(line.weighing, `${field}.weighing`);
  if (!net.ok) return net;
  const sides = sidesOf(line.lot_id, field, voucher, handover, facts);
  if (!sides.ok) return sides;
  const { booked, giver, receiver } = sides.value;
  const off = net.value - booked.mass.gross;
  if (off === 0n) return accept({ entries: [] });
  const [from, to] = off < 0n ? [receiver, giver] : [giver, receiver];
  const amount = off < 0n ? -off : off;
  const held = heldOf(facts.holdings, from.id, line.lot_id).mass;
  if (held.gross < amount) {
    const sentence = `${from.name} holds ${printGrams(held.gross, 3)} g of it, and ${printGrams(amount, 3)} g would have to leave. Weigh again, or mend the later vouchers first.`;
    return refuse({ code: 'not_enough', field: `${field}.weighing.gross_g`, sentence });
  }
  const move = { lot_id: line.lot_id, mass: takeGross(held, amount), pieces: null };
  return accept({ entries: moveEntries(move, from.id, to.id) });
}

/** Giver's and receiver's place of a lot in the voucher. Refuses a lot that was not handed over as it was. */
function sidesOf(
  lot_id: string,
  field: string,
  voucher: RecordedVoucher,
  handover: Handover,
  facts: Facts,
): Outcome<{ readonly booked: RecordedEntry; readonly giver: Account; readonly receiver: Account }> {
  const ofLot = voucher.entries.filter((entry) => entry.lot_id === lot_id);
  const booked = ofLot.find((entry) => entry.account_id === handover.place_id && entry.mass.gross > 0n);
  const receiver = facts.accounts.get(handover.place_id);
  const giver = ofLot
    .filter((entry) => entry.mass.gross < 0n)
    .map((entry) => facts.accounts.get(entry.account_id))
    .find((account) => account !== undefined && isPlace(account.kind));
  if (booked !== undefined && receiver !== undefined && giver !== undefined)
    return accept({ booked, giver, receiver });
  const code = facts.lots.get(lot_id)?.code ?? 'That lot';
  const sentence = `${code} was not handed over from one place to the other in voucher ${voucher.sequence}. Mend that voucher by a correction.`;
  return refuse({ code: 'invalid', field: `${field}.lot_id`, sentence });
}
