/**
 * Weigh-in: metal comes from a supplier or a customer and enters at the mass that the balance shows, whatever the
 * invoice says. A difference beyond tolerance needs a decision; a new lot stays on hold until its acceptance checks
 * are in. What belongs on an open tray joins the tray's lot.
 */
import type { Fineness } from '../alloy/fineness.ts';
import type { Account } from '../book/account.ts';
import type { DocumentRef, EntryDraft, Outcome, RecordDraft } from '../book/draft.ts';
import { accept, refuse } from '../book/draft.ts';
import type { Facts, Party } from '../book/facts.ts';
import { allOf } from '../book/outcome.ts';
import { massFromFineness } from '../mass/apportion.ts';
import type { Micrograms } from '../mass/micrograms.ts';
import { printGrams } from '../mass/micrograms.ts';
import { gramsAboveZero, id, shortText } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';
import { netOf, weighingSchema } from '../weighing/weighing.ts';
import type { Common } from './common-fields.ts';
import { commonFields, documentsOf, readCommon } from './common-fields.ts';
import type { EventDefinition } from './definition.ts';
import { recordsOnly } from './definition.ts';
import type { InvoiceDifference } from './invoice-difference.ts';
import { invoiceDifference } from './invoice-difference.ts';
import { findParty, findPlace, partyAccount } from './lookup.ts';
import { makeVoucher, moveEntries, weighingRows } from './make-voucher.ts';
import { newLotFields, newLotFineness, newLotPieces, openLot } from './new-lot.ts';
import { joinTray } from './tray.ts';

const lineSchema = z.strictObject({
  ...newLotFields,
  /** What the invoice says, where there is one. */
  invoice_gross_g: gramsAboveZero.nullable().default(null),
  weighing: weighingSchema,
  /** What to do about a difference to the invoice. */
  decision: z.enum(['accept', 'claim', 'send_back']).nullable().default(null),
  /** An open tray that it joins, instead of a lot of its own. */
  into_lot_id: id.nullable().default(null),
  /** Certificates of this line, by id. */
  certificate_ids: z.array(id).max(5, 'At most 5 certificates belong to one line.').default([]),
});
const weighInSchema = z.strictObject({
  ...commonFields,
  party_id: id,
  safe_id: id,
  delivery_note: shortText.nullable().default(null),
  lines: z
    .array(lineSchema)
    .min(1, 'Nothing is entered yet. Add the first line of the delivery note.')
    .max(100, 'At most 100 lines go into one voucher. Enter the rest in another.'),
});
export type WeighInInput = z.output<typeof weighInSchema>;
type WeighInLine = WeighInInput['lines'][number];

/** Where a delivery goes and whom it comes from, found once for all its lines. */
interface Delivery {
  readonly party: Party;
  readonly from: Account;
  readonly safe: Account;
  readonly common: Common;
}

interface Received {
  readonly act: RecordDraft | null;
  readonly lot_id: string | null;
  readonly entries: readonly EntryDraft[];
  readonly documents: readonly DocumentRef[];
  readonly net: Micrograms;
  readonly difference: InvoiceDifference | null;
}

export const weighIn: EventDefinition<WeighInInput> = {
  name: 'weigh-in',
  schema: weighInSchema,
  action: 'book.weigh_in',
  summary: 'Takes in a delivery at its weighed mass, beside what the invoice says.',
  needs: (input) => ({
    account_ids: [input.safe_id],
    party_ids: [input.party_id],
    lot_ids: input.lines.flatMap((line) => line.into_lot_id ?? []),
    document_ids: [...input.document_ids, ...input.lines.flatMap((line) => line.certificate_ids)],
  }),
  draft(input, facts, actor) {
    const delivery = findDelivery(input, facts);
    if (!delivery.ok) return delivery;
    const trays = eachTrayOnce(input);
    if (!trays.ok) return trays;
    const lines = allOf(
      input.lines.map((line, index) => receive(line, `lines.${index}`, delivery.value, facts)),
    );
    if (!lines.ok) return lines;
    if (lines.value.every((line) => line.entries.length === 0)) {
      const sentence =
        'Every line is sent back, so nothing enters the book. Send the parcel back with its delivery note.';
      return refuse({ code: 'nothing_to_post', field: 'lines', sentence });
    }
    const { common, party } = delivery.value;
    const weighings = input.lines.map((line, index) => ({ weighing: line.weighing, line: index + 1 }));
    const certificates = lines.value.flatMap((line) => line.documents);
    const documents = [
      ...new Map([...common.documents, ...certificates].map((file) => [file.id, file])).values(),
    ];
    const voucher = makeVoucher(
      facts,
      { ...common, documents },
      {
        kind: 'weigh_in',
        detail: {
          counterparty_id: party.id,
          delivery_note: input.delivery_note,
          lines: lines.value.map((line, index) =>
            lineDetail(line, input.lines[index]?.decision ?? null, index + 1),
          ),
          weighings: weighingRows(weighings, facts, actor),
        },
        entries: lines.value.flatMap((line) => line.entries),
      },
    );
    return accept(recordsOnly([...lines.value.flatMap((line) => line.act ?? []), voucher]));
  },
};

function findDelivery(input: WeighInInput, facts: Facts): Outcome<Delivery> {
  const common = readCommon(input, facts);
  if (!common.ok) return common;
  const party = findParty(facts, input.party_id, 'party_id');
  if (!party.ok) return party;
  const kind = party.value.kind === 'customer' ? 'customer' : 'supplier';
  const from = partyAccount(facts, party.value, kind, 'party_id');
  if (!from.ok) return from;
  const sentence = 'a delivery is weighed into a safe. Transfer it from there.';
  const safe = findPlace(facts, input.safe_id, 'safe_id', { of: ['safe'], sentence });
  if (!safe.ok) return safe;
  return accept({ party: party.value, from: from.value, safe: safe.value, common: common.value });
}

function eachTrayOnce(input: WeighInInput): Outcome<null> {
  const seen = new Set<string>();
  for (const [index, line] of input.lines.entries()) {
    if (line.into_lot_id === null) continue;
    if (seen.has(line.into_lot_id)) {
      const sentence = 'Two lines join the same tray. Weigh them together, or post two vouchers.';
      return refuse({ code: 'lot_twice', field: `lines.${index}.into_lot_id`, sentence });
    }
    seen.add(line.into_lot_id);
  }
  return accept(null);
}

function receive(line: WeighInLine, field: string, delivery: Delivery, facts: Facts): Outcome<Received> {
  const { party } = delivery;
  if (line.owner_id !== null && line.owner_id !== party.id) {
    const sentence = `Metal from ${party.name} is either the house’s or stays ${party.name}’s. Choose one of the two.`;
    return refuse({ code: 'wrong_owner', field: `${field}.owner_id`, sentence });
  }
  const fine = newLotFineness(line, field);
  if (!fine.ok) return fine;
  const pieces = newLotPieces(line, field);
  if (!pieces.ok) return pieces;
  const net = netOf(line.weighing, `${field}.weighing`);
  if (!net.ok) return net;
  const documents = documentsOf(line.certificate_ids, facts, `${field}.certificate_ids`);
  if (!documents.ok) return documents;
  const invoiced = compare(line, net.value, fine.value, field, facts);
  if (!invoiced.ok) return invoiced;
  const seen = { documents: documents.value, net: net.value, difference: invoiced.value };
  if (line.decision === 'send_back') return accept({ ...seen, act: null, lot_id: null, entries: [] });
  const lot = lotOf(line, fine.value, seen, { field, delivery, facts });
  if (!lot.ok) return lot;
  const mass = massFromFineness(net.value, fine.value);
  const move = { lot_id: lot.value.lot_id, mass, pieces: pieces.value };
  return accept({ ...seen, ...lot.value, entries: moveEntries(move, delivery.from.id, delivery.safe.id) });
}

/** The difference to the invoice. Refuses one beyond tolerance on which nothing is decided. */
function compare(
  line: WeighInLine,
  weighed_ug: Micrograms,
  fineness: Fineness,
  field: string,
  facts: Facts,
): Outcome<InvoiceDifference | null> {
  if (line.invoice_gross_g === null) return accept(null);
  const difference = invoiceDifference({ invoice_ug: line.invoice_gross_g, weighed_ug, fineness }, facts);
  if (difference.within || line.decision !== null) return accept(difference);
  const sentence = `The balance shows ${printGrams(weighed_ug, 3)} g, the invoice ${printGrams(line.invoice_gross_g, 3)} g. That is beyond what is accepted unasked. Decide whether to accept it as weighed, to claim, or to send it back.`;
  return refuse({ code: 'decision_needed', field: `${field}.decision`, sentence });
}

/** The lot that a line enters as: the tray that it joins, or one of its own. */
function lotOf(
  line: WeighInLine,
  fineness: Fineness,
  seen: Pick<Received, 'documents' | 'net' | 'difference'>,
  at: { readonly field: string; readonly delivery: Delivery; readonly facts: Facts },
): Outcome<{ readonly act: RecordDraft | null; readonly lot_id: string }> {
  const { field, delivery, facts } = at;
  if (line.into_lot_id !== null) {
    const like = { ...line, place: delivery.safe, claimed: line.decision === 'claim' };
    const tray = joinTray(line.into_lot_id, like, `${field}.into_lot_id`, facts);
    return tray.ok ? accept({ act: null, lot_id: tray.value.id }) : tray;
  }
  const opened = openLot(facts, delivery.common.business_date, {
    form: line.form,
    alloy: line.alloy,
    owner_id: line.owner_id,
    origin: line.origin,
    fineness,
    basis: line.basis,
    description: line.description,
    hold_reason: holdReason(line, seen, delivery.party, facts),
    hold_until: null,
    parents: [],
  });
  return accept({ act: opened.act, lot_id: opened.lot_id });
}

/** Why a new lot is on hold: a claim, or acceptance checks that are not in. A certificate handed in is a check. */
function holdReason(
  line: WeighInLine,
  seen: Pick<Received, 'documents' | 'difference'>,
  party: Party,
  facts: Facts,
): string | null {
  const asked = facts.settings.acceptance.find((policy) => policy.form === line.form)?.checks ?? [];
  const missing = asked.filter((check) => !(check === 'certificate' && seen.documents.length > 0));
  const claim = line.decision === 'claim' ? claimWords(seen.difference, party) : [];
  const checks = missing.map((check) => `its ${check.replaceAll('_', ' ')} is not recorded yet`);
  const reasons = [...claim, ...checks];
  return reasons.length === 0 ? null : reasons.join('; ');
}

function claimWords(difference: InvoiceDifference | null, party: Party): readonly string[] {
  if (difference === null) return [`there is a claim on ${party.name}`];
  const off = difference.difference_ug;
  const words = off < 0n ? `${printGrams(-off, 3)} g short of` : `${printGrams(off, 3)} g over`;
  return [`there is a claim on ${party.name}, ${words} the invoice`];
}

function lineDetail(line: Received, decision: string | null, number: number) {
  const difference = line.difference;
  return {
    line: String(number),
    lot_id: line.lot_id,
    weighed_g: printGrams(line.net),
    invoice_g: difference === null ? null : printGrams(line.net - difference.difference_ug),
    difference_g: difference === null ? null : printGrams(difference.difference_ug),
    fine_difference_g: difference === null ? null : printGrams(difference.fine_difference_ug),
    decision,
  };
}
