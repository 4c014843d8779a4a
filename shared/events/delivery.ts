/**
 * Delivery: finished work leaves the house. House metal goes to sold, a customer's own back into the customer's
 * account, and what goes out on approval into that place. What comes back, from approval, returned or exchanged,
 * comes in as the same lot from where it went. Stones stand in the detail only: this is a book of metal.
 */
import type { Account, AccountKind } from '../book/account.ts';
import { isPlace } from '../book/account.ts';
import type { EntryDraft, Outcome } from '../book/draft.ts';
import { accept, refuse } from '../book/draft.ts';
import type { Facts, Party } from '../book/facts.ts';
import type { Lot } from '../book/lot.ts';
import { allOf } from '../book/outcome.ts';
import { printGrams } from '../mass/micrograms.ts';
import { id, shortText } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';
import { stonesOf } from '../weighing/weighing.ts';
import type { Drawn } from './amount.ts';
import { amountSchema, drawAmount, drawnEntries, remainderToSign } from './amount.ts';
import { commonFields, readCommon } from './common-fields.ts';
import type { EventDefinition } from './definition.ts';
import {
  eachLotOnce,
  findJob,
  findLot,
  findParty,
  findPlace,
  partyAccount,
  theAccount,
  usableLot,
} from './lookup.ts';
import { makeVoucher, weighingRows } from './make-voucher.ts';

const deliverySchema = z.strictObject({
  ...commonFields,
  /** Delivered for good; out on approval; back from approval; or returned after it was delivered. */
  way: z.enum(['deliver', 'out_on_approval', 'back_from_approval', 'returned']),
  party_id: id,
  /** The place that it leaves, or that it comes back to. */
  place_id: id,
  /** The job whose metal leaves a bench. */
  job_id: id.nullable().default(null),
  lines: z
    .array(
      z.strictObject({
        lot_id: id,
        amount: amountSchema,
        /** Stones in the piece, in carats, and what they are. */
        stones_ct: z
          .string()
          .regex(/^\d{1,6}(\.\d{1,4})?$/, 'Stones are entered in carats, such as 1.85.')
          .nullable()
          .default(null),
        stones: shortText.nullable().default(null),
      }),
    )
    .min(1, 'Nothing is chosen yet. Choose the piece.')
    .max(100, 'At most 100 lines go into one voucher. Enter the rest in another.'),
});
export type DeliveryInput = z.output<typeof deliverySchema>;
type Way = DeliveryInput['way'];

const LEAVES: readonly AccountKind[] = ['safe', 'bench', 'station', 'approval'];
const PLACES: Readonly<Record<Way, { readonly of: readonly AccountKind[]; readonly sentence: string }>> = {
  deliver: {
    of: LEAVES,
    sentence: 'work is delivered from a safe, a bench or from approval. Transfer it first.',
  },
  out_on_approval: {
    of: ['safe', 'bench', 'station'],
    sentence: 'work goes out on approval from a safe or a bench.',
  },
  back_from_approval: { of: ['safe'], sentence: 'what comes back is weighed into a safe. Choose one.' },
  returned: { of: ['safe'], sentence: 'what comes back is weighed into a safe. Choose one.' },
};

interface Line {
  readonly drawn: Drawn;
  readonly from: Account;
  readonly entries: readonly EntryDraft[];
}

export const delivery: EventDefinition<DeliveryInput> = {
  name: 'delivery',
  schema: deliverySchema,
  action: 'book.deliver',
  summary: 'Delivers finished work, sends it out on approval, or takes it back.',
  needs: (input) => ({
    place_ids: [input.place_id],
    party_ids: [input.party_id],
    lot_ids: input.lines.map((line) => line.lot_id),
    job_ids: input.job_id === null ? [] : [input.job_id],
    document_ids: input.document_ids,
  }),
  draft(input, facts, actor) {
    const common = readCommon(input, facts);
    if (!common.ok) return common;
    const party = findParty(facts, input.party_id, 'party_id');
    if (!party.ok) return party;
    const place = findPlace(facts, input.place_id, 'place_id', PLACES[input.way]);
    if (!place.ok) return place;
    if (place.value.kind === 'approval' && place.value.party_id !== party.value.id) {
      const sentence = `${place.value.name} is with somebody else than ${party.value.name}. Choose who has the piece.`;
      return refuse({ code: 'wrong_place', field: 'place_id', sentence });
    }
    const job = findJob(facts, input.job_id, 'job_id');
    if (!job.ok) return job;
    const once = eachLotOnce(input.lines, facts, 'lines');
    if (!once.ok) return once;
    const at = { input, party: party.value, place: place.value, facts };
    const lines = allOf(input.lines.map((line, index) => deliverLine(line, `lines.${index}`, at)));
    if (!lines.ok) return lines;
    const weighings = lines.value.map((line, index) => ({ weighing: line.drawn.weighing, line: index + 1 }));
    const voucher = makeVoucher(facts, common.value, {
      kind: 'delivery',
      detail: {
        way: input.way,
        counterparty_id: party.value.id,
        job_id: input.job_id,
        stones: input.lines.flatMap((line, index) => stonesRow(line, index + 1)),
        weighings: weighingRows(weighings, facts, actor),
      },
      entries: lines.value.flatMap((line) => line.entries),
    });
    const reasons = lines.value.map((line) => remainderToSign(line.drawn, line.from));
    const second_signature = reasons.find((reason) => reason !== null) ?? null;
    return accept({ records: [voucher], handovers: [], second_signature });
  },
};

interface At {
  readonly input: DeliveryInput;
  readonly party: Party;
  readonly place: Account;
  readonly facts: Facts;
}

function deliverLine(line: DeliveryInput['lines'][number], field: string, at: At): Outcome<Line> {
  const { input, place, facts } = at;
  const found = findLot(facts, line.lot_id, `${field}.lot_id`);
  if (!found.ok) return found;
  const leaving = input.way === 'deliver' || input.way === 'out_on_approval';
  const lot = leaving ? usableLot(found.value, `${field}.lot_id`) : found;
  if (!lot.ok) return lot;
  const away = awayAccount(lot.value, field, at);
  if (!away.ok) return away;
  const [from, to] = leaving ? [place, away.value] : [away.value, place];
  const drawn = drawAmount(
    facts,
    { account: from, lot: lot.value, job_id: input.job_id },
    line.amount,
    `${field}.amount`,
  );
  if (!drawn.ok) return drawn;
  if (drawn.value.last !== null && !isPlace(from.kind)) {
    const sentence = `${from.name} is no container that could be empty. Take back all of it, or what the balance shows.`;
    return refuse({ code: 'invalid', field: `${field}.amount.emptied`, sentence });
  }
  const variance = theAccount(facts, 'count_variance').id;
  return accept({ drawn: drawn.value, from, entries: drawnEntries(drawn.value, from.id, to.id, variance) });
}

/** Where a piece is once it has left: approval, sold, or with the customer whose metal it is. */
function awayAccount(lot: Lot, field: string, at: At): Outcome<Account> {
  const { input, party, facts } = at;
  const mayGo = lot.owner_id === null || lot.owner_id === party.id;
  if (!mayGo) {
    const owner = facts.parties.get(lot.owner_id)?.name ?? 'somebody else';
    const sentence = `Lot ${lot.code} belongs to ${owner}, not to ${party.name}. Choose its owner, or change the owner first.`;
    return refuse({ code: 'wrong_owner', field: `${field}.lot_id`, sentence });
  }
  if (input.way === 'out_on_approval' || input.way === 'back_from_approval') {
    return partyAccount(facts, party, 'approval', 'party_id');
  }
  if (lot.owner_id === null) return accept(theAccount(facts, 'sold'));
  return partyAccount(facts, party, party.kind === 'supplier' ? 'supplier' : 'customer', 'party_id');
}

function stonesRow(line: DeliveryInput['lines'][number], number: number) {
  const weighed = line.amount.how === 'weighed' ? stonesOf(line.amount.weighing) : 0n;
  if (line.stones === null && line.stones_ct === null && weighed === 0n) return [];
  return [
    {
      line: String(number),
      lot_id: line.lot_id,
      stones: line.stones,
      stones_ct: line.stones_ct,
      taken_off_g: printGrams(weighed),
    },
  ];
}
