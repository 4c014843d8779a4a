/**
 * Opening: what was counted when the book began, in any place, the house's or a customer's own, dust that lay there
 * before included. Each line is a new lot, out of opening stock. A CSV is read elsewhere into the same input.
 */
import type { EntryDraft, Outcome, RecordDraft } from '../book/draft.ts';
import { accept } from '../book/draft.ts';
import type { Facts } from '../book/facts.ts';
import { allOf } from '../book/outcome.ts';
import { massFromFineness } from '../mass/apportion.ts';
import { id } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';
import { netOf, weighingSchema } from '../weighing/weighing.ts';
import type { Common } from './common-fields.ts';
import { commonFields, readCommon } from './common-fields.ts';
import type { EventDefinition } from './definition.ts';
import { recordsOnly } from './definition.ts';
import { findParty, findPlace, theAccount } from './lookup.ts';
import { makeVoucher, moveEntries, weighingRows } from './make-voucher.ts';
import type { OpenedLot } from './new-lot.ts';
import { newLotFields, newLotFineness, newLotPieces, openLot } from './new-lot.ts';

const openingSchema = z.strictObject({
  ...commonFields,
  lines: z
    .array(z.strictObject({ ...newLotFields, place_id: id, weighing: weighingSchema }))
    .min(1, 'Nothing is entered yet. Add what was counted.')
    .max(1000, 'At most 1000 lines go into one voucher. Enter the rest in another.'),
});
export type OpeningInput = z.output<typeof openingSchema>;
type OpeningLine = OpeningInput['lines'][number];

interface OpenedLine {
  readonly lot: OpenedLot;
  readonly entries: readonly EntryDraft[];
}

export const opening: EventDefinition<OpeningInput> = {
  name: 'opening',
  schema: openingSchema,
  action: 'book.opening',
  summary: 'Enters what was counted when the book began.',
  needs: (input) => ({
    account_ids: [...new Set(input.lines.map((line) => line.place_id))],
    party_ids: [...new Set(input.lines.flatMap((line) => line.owner_id ?? []))],
    document_ids: input.document_ids,
  }),
  draft(input, facts, actor) {
    const common = readCommon(input, facts);
    if (!common.ok) return common;
    const lines = allOf(
      input.lines.map((line, index) => openLine(line, `lines.${index}`, facts, common.value)),
    );
    if (!lines.ok) return lines;
    const weighings = input.lines.map((line, index) => ({ weighing: line.weighing, line: index + 1 }));
    const voucher = makeVoucher(facts, common.value, {
      kind: 'opening',
      detail: { weighings: weighingRows(weighings, facts, actor) },
      entries: lines.value.flatMap((line) => line.entries),
    });
    const records: readonly RecordDraft[] = [...lines.value.map((line) => line.lot.act), voucher];
    return accept(recordsOnly(records));
  },
};

function openLine(line: OpeningLine, field: string, facts: Facts, common: Common): Outcome<OpenedLine> {
  const place = findPlace(facts, line.place_id, `${field}.place_id`);
  if (!place.ok) return place;
  const owner = line.owner_id === null ? accept(null) : findParty(facts, line.owner_id, `${field}.owner_id`);
  if (!owner.ok) return owner;
  const fine = newLotFineness(line, field);
  if (!fine.ok) return fine;
  const pieces = newLotPieces(line, field);
  if (!pieces.ok) return pieces;
  const net = netOf(line.weighing, `${field}.weighing`);
  if (!net.ok) return net;
  const lot = openLot(facts, common.business_date, {
    form: line.form,
    alloy: line.alloy,
    owner_id: line.owner_id,
    origin: line.origin,
    fineness: fine.value,
    basis: line.basis,
    description: line.description,
    hold_reason: null,
    hold_until: null,
    parents: [],
  });
  const mass = massFromFineness(net.value, fine.value);
  const move = { lot_id: lot.lot_id, mass, pieces: pieces.value };
  return accept({ lot, entries: moveEntries(move, theAccount(facts, 'opening_stock').id, place.value.id) });
}
