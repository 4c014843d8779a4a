/**
 * Consigning: lots leave a safe with a courier, packed and sealed, for a refiner or another place outside; and their
 * arrival there, with the weight that was found. A difference inside the limit of error goes to count variance; beyond
 * it the missing metal stays with the courier until it is explained.
 */
import type { EntryDraft, Outcome } from '../../book/draft.ts';
import { accept, refuse } from '../../book/draft.ts';
import { allOf } from '../../book/outcome.ts';
import type { Facts } from '../../book/facts.ts';
import { heldOf } from '../../book/holding.ts';
import { takeGross } from '../../mass/apportion.ts';
import { printGrams } from '../../mass/micrograms.ts';
import { isZeroMass } from '../../mass/vector.ts';
import { gramsAboveZero, id, money, shortText } from '../../schemas/primitives.ts';
import { z } from '../../schemas/zod.ts';
import { amountSchema, drawAmount, drawnEntries, remainderToSign } from '../amount.ts';
import { commonFields, readCommon } from '../common-fields.ts';
import type { EventDefinition } from '../definition.ts';
import { recordsOnly } from '../definition.ts';
import { lastOfIt, limitOfReadings } from '../last-of-it.ts';
import { eachLotOnce, findLot, findPlace, findVoucher, theAccount, usableLot } from '../lookup.ts';
import { makeVoucher, moveEntries, weighingRows } from '../make-voucher.ts';

const consignSchema = z.strictObject({
  ...commonFields,
  /** The workshop's own number of the consignment: "C-0031". */
  code: shortText,
  from_id: id,
  courier_id: id,
  destination_id: id,
  lines: z
    .array(z.strictObject({ lot_id: id, amount: amountSchema }))
    .min(1, 'Nothing is packed yet. Add the first lot.')
    .max(100, 'At most 100 lots go into one consignment.'),
  packages: z
    .array(z.strictObject({ seal: shortText, content: shortText }))
    .min(1, 'Each package carries a seal. Enter its number.')
    .max(50, 'At most 50 packages go into one consignment.'),
  declared_value: money.nullable().default(null),
});
export type ConsignInput = z.output<typeof consignSchema>;

const OUTSIDE = {
  of: ['refiner', 'outworker', 'approval'],
  sentence: 'a consignment goes to a place outside.',
} as const;

export const consign: EventDefinition<ConsignInput> = {
  name: 'consign',
  schema: consignSchema,
  action: 'book.consign',
  summary: 'Hands packed and sealed lots to a courier, for a refiner or another place outside.',
  needs: (input) => ({
    account_ids: [input.from_id, input.courier_id, input.destination_id],
    lot_ids: input.lines.map((line) => line.lot_id),
    document_ids: input.document_ids,
  }),
  draft(input, facts, actor) {
    const common = readCommon(input, facts);
    if (!common.ok) return common;
    const from = findPlace(facts, input.from_id, 'from_id', {
      of: ['safe', 'bin'],
      sentence: 'a consignment leaves from a safe or a bin.',
    });
    if (!from.ok) return from;
    const courier = findPlace(facts, input.courier_id, 'courier_id', {
      of: ['courier'],
      sentence: 'metal on the way is with a courier.',
    });
    if (!courier.ok) return courier;
    const destination = findPlace(facts, input.destination_id, 'destination_id', OUTSIDE);
    if (!destination.ok) return destination;
    const once = eachLotOnce(input.lines, facts, 'lines');
    if (!once.ok) return once;
    const drawn = allOf(
      input.lines.map((line, index) => {
        const found = findLot(facts, line.lot_id, `lines.${index}.lot_id`);
        const lot = found.ok ? usableLot(found.value, `lines.${index}.lot_id`) : found;
        if (!lot.ok) return lot;
        return drawAmount(
          facts,
          { account: from.value, lot: lot.value, job_id: null },
          line.amount,
          `lines.${index}.amount`,
        );
      }),
    );
    if (!drawn.ok) return drawn;
    const variance = theAccount(facts, 'count_variance').id;
    const voucher = makeVoucher(facts, common.value, {
      kind: 'consign',
      detail: {
        code: input.code,
        destination_id: destination.value.id,
        courier_id: courier.value.id,
        counterparty_id: destination.value.party_id,
        packages: input.packages,
        declared_value: input.declared_value?.toFixed() ?? null,
        weighings: weighingRows(
          drawn.value.map((line, index) => ({ weighing: line.weighing, line: index + 1 })),
          facts,
          actor,
        ),
      },
      entries: drawn.value.flatMap((line) => drawnEntries(line, from.value.id, courier.value.id, variance)),
    });
    const second_signature =
      drawn.value.map((line) => remainderToSign(line, from.value)).find((reason) => reason !== null) ?? null;
    return accept({ records: [voucher], handovers: [], second_signature });
  },
};

const arriveSchema = z.strictObject({
  ...commonFields,
  consign_id: id,
  lines: z
    .array(z.strictObject({ lot_id: id, received_g: gramsAboveZero }))
    .min(1, 'Enter the weight that was received.')
    .max(100),
});
export type ArriveInput = z.output<typeof arriveSchema>;

/** Two readings stand against each other: the weight sent and the weight received. */
const READINGS = 2n;

export const arrive: EventDefinition<ArriveInput> = {
  name: 'arrive',
  schema: arriveSchema,
  action: 'book.consign',
  summary: 'Confirms that a consignment has arrived, with the weights that were received.',
  needs: (input) => ({
    voucher_ids: [input.consign_id],
    lot_ids: input.lines.map((line) => line.lot_id),
    document_ids: input.document_ids,
  }),
  draft(input, facts) {
    const common = readCommon(input, facts);
    if (!common.ok) return common;
    const way = findWay(input.consign_id, facts);
    if (!way.ok) return way;
    const once = eachLotOnce(input.lines, facts, 'lines');
    if (!once.ok) return once;
    const lines = allOf(
      input.lines.map((line, index) => arriveLine(line, way.value, `lines.${index}`, facts)),
    );
    if (!lines.ok) return lines;
    const voucher = makeVoucher(facts, common.value, {
      kind: 'arrive',
      detail: {
        consign_id: input.consign_id,
        destination_id: way.value.destination_id,
        courier_id: way.value.courier_id,
        counterparty_id: facts.accounts.get(way.value.destination_id)?.party_id ?? null,
        lines: lines.value.map((line) => line.detail),
      },
      entries: lines.value.flatMap((line) => line.entries),
    });
    return accept(recordsOnly([voucher]));
  },
};

interface Way {
  readonly courier_id: string;
  readonly destination_id: string;
}
const wayOf = z.object({ courier_id: z.string(), destination_id: z.string() });

function findWay(consign_id: string, facts: Facts): Outcome<Way> {
  const voucher = findVoucher(facts, consign_id, 'consign_id');
  if (!voucher.ok) return voucher;
  const way = wayOf.safeParse(voucher.value.detail);
  if (voucher.value.kind !== 'consign' || !way.success) {
    const sentence = `Voucher ${voucher.value.sequence} is no consignment. Choose the consignment that has arrived.`;
    return refuse({ code: 'invalid', field: 'consign_id', sentence });
  }
  if (voucher.value.reversed_by !== null) {
    return refuse({
      code: 'already_done',
      field: 'consign_id',
      sentence: 'That consignment was reversed. Nothing of it is on the way.',
    });
  }
  return accept(way.data);
}

function arriveLine(line: ArriveInput['lines'][number], way: Way, field: string, facts: Facts) {
  const held = heldOf(facts.holdings, way.courier_id, line.lot_id);
  const lot = facts.lots.get(line.lot_id);
  if (lot === undefined || isZeroMass(held.mass)) {
    const sentence = `Nothing of ${lot?.code ?? 'that lot'} is with the courier. It may have arrived already.`;
    return refuse({ code: 'not_enough', field: `${field}.lot_id`, sentence });
  }
  const off = lastOfIt(held.mass, line.received_g, {
    readings: READINGS,
    weighing_u_ug: facts.settings.weighing_u_ug,
  });
  const detail = {
    lot_id: lot.id,
    sent_g: printGrams(held.mass.gross),
    received_g: printGrams(line.received_g),
    limit_of_error_g: printGrams(limitOfReadings(READINGS, facts.settings.weighing_u_ug)),
    finding: off.within ? 'within_weighing_error' : 'unexplained',
  };
  const entries = (mass: typeof held.mass): readonly EntryDraft[] =>
    moveEntries({ lot_id: lot.id, mass, pieces: held.pieces }, way.courier_id, way.destination_id);
  if (off.within) {
    const variance = { lot_id: lot.id, mass: off.remainder, pieces: null };
    const onward = entries(held.mass).slice(0, 1);
    return accept({
      detail,
      entries: [
        ...onward,
        { account_id: way.destination_id, lot_id: lot.id, mass: off.moved, pieces: held.pieces },
        { account_id: theAccount(facts, 'count_variance').id, ...variance },
      ],
    });
  }
  const mass = line.received_g < held.mass.gross ? takeGross(held.mass, line.received_g) : held.mass;
  return accept({ detail, entries: entries(mass) });
}
