/**
 * Transfer: metal goes from one place to another without any work done: a part of a lot, a whole tray, several lots,
 * or everything that lies in a place. Where the custodian changes it is a handover. At a work place metal is told
 * apart by job, so everything of a bench leaves in a voucher for each job.
 */
import type { Account, AccountKind } from '../book/account.ts';
import { isWorkPlace } from '../book/account.ts';
import type { EntryDraft, Outcome, VoucherDraft } from '../book/draft.ts';
import { accept, refuse } from '../book/draft.ts';
import type { Facts } from '../book/facts.ts';
import { allOf } from '../book/outcome.ts';
import { isZeroMass } from '../mass/vector.ts';
import { id, shortText } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';
import type { Amount, Drawn } from './amount.ts';
import { amountSchema, drawAmount, drawnEntries, remainderToSign } from './amount.ts';
import type { Common } from './common-fields.ts';
import { commonFields, readCommon } from './common-fields.ts';
import type { Actor, EventDefinition, HandoverDraft } from './definition.ts';
import { handoverOf, receiverAt } from './handover.ts';
import { eachLotOnce, findJob, findLot, findPlace, lossAccount, theAccount, usableLot } from './lookup.ts';
import { makeVoucher, weighingRows } from './make-voucher.ts';

const transferSchema = z.strictObject({
  ...commonFields,
  from_id: id,
  to_id: id,
  /** Everything that lies there, instead of lines. */
  everything: z.boolean().default(false),
  lines: z
    .array(z.strictObject({ lot_id: id, amount: amountSchema }))
    .max(100, 'At most 100 lines go into one voucher. Enter the rest in another.')
    .default([]),
  /** The job that it lies at a work place for; none is stock work. */
  job_id: id.nullable().default(null),
  /** The operation that work is handed on to, where it goes to a work place. */
  operation: shortText.nullable().default(null),
  person_id: id.nullable().default(null),
});
export type TransferInput = z.output<typeof transferSchema>;

const KINDS: readonly AccountKind[] = ['safe', 'bench', 'station', 'bin', 'outworker'];
const HERE = {
  of: KINDS,
  sentence: 'metal there moves by a delivery or a consignment. Use that instead of a transfer.',
} as const;

/** From where, to where, by whom: found once for all vouchers of a transfer. */
interface Way {
  readonly from: Account;
  readonly to: Account;
  readonly receiver_id: string | null;
  readonly common: Common;
}

/** Lines that go into one voucher: one job's. */
interface Load {
  readonly job_id: string | null;
  readonly lines: readonly { readonly lot_id: string; readonly amount: Amount; readonly field: string }[];
}

export const transfer: EventDefinition<TransferInput> = {
  name: 'transfer',
  schema: transferSchema,
  action: 'book.transfer',
  summary: 'Moves metal from one place to another.',
  needs: (input) => ({
    place_ids: [input.from_id],
    account_ids: [input.to_id],
    lot_ids: input.lines.map((line) => line.lot_id),
    job_ids: input.job_id === null ? [] : [input.job_id],
    document_ids: input.document_ids,
  }),
  draft(input, facts, actor) {
    const way = findWay(input, facts);
    if (!way.ok) return way;
    const loads = loadsOf(input, way.value, facts);
    if (!loads.ok) return loads;
    const vouchers: VoucherDraft[] = [];
    const handovers: HandoverDraft[] = [];
    let second_signature: string | null = null;
    for (const load of loads.value) {
      const lines = allOf(load.lines.map((line) => drawLine(line, load.job_id, way.value, facts)));
      if (!lines.ok) return lines;
      const voucher = transferVoucher(load, lines.value, way.value, { input, facts, actor });
      const giver_id = way.value.from.custodian_id ?? actor.person_id;
      const of = {
        voucher_id: voucher.id,
        place_id: way.value.to.id,
        giver_id,
        receiver_id: way.value.receiver_id,
      };
      vouchers.push(voucher);
      handovers.push(...handoverOf(facts, of));
      second_signature ??=
        lines.value.map((line) => remainderToSign(line, way.value.from)).find((s) => s !== null) ?? null;
    }
    return accept({ records: vouchers, handovers, second_signature });
  },
};

function findWay(input: TransferInput, facts: Facts): Outcome<Way> {
  const common = readCommon(input, facts);
  if (!common.ok) return common;
  const from = findPlace(facts, input.from_id, 'from_id', HERE);
  if (!from.ok) return from;
  const to = findPlace(facts, input.to_id, 'to_id', HERE);
  if (!to.ok) return to;
  if (from.value.id === to.value.id) {
    const sentence = `${from.value.name} is both where it comes from and where it goes. Choose another place.`;
    return refuse({ code: 'wrong_place', field: 'to_id', sentence });
  }
  if (isWorkPlace(to.value.kind) && !isWorkPlace(from.value.kind)) {
    const sentence = `${to.value.name} gets its metal by an issue, for a job and an operation. Issue it instead.`;
    return refuse({ code: 'wrong_place', field: 'to_id', sentence });
  }
  const operation =
    input.operation === null ? accept(null) : lossAccount(facts, input.operation, 'operation');
  if (!operation.ok) return operation;
  const job = findJob(facts, input.job_id, 'job_id');
  if (!job.ok) return job;
  const receiver = receiverAt(facts, to.value, input.person_id, 'person_id');
  if (!receiver.ok) return receiver;
  return accept({ from: from.value, to: to.value, receiver_id: receiver.value, common: common.value });
}

function loadsOf(input: TransferInput, way: Way, facts: Facts): Outcome<readonly Load[]> {
  if (input.everything) return everythingAt(way.from, facts);
  const once = eachLotOnce(input.lines, facts, 'lines');
  if (!once.ok) return once;
  if (input.lines.length === 0) {
    const sentence = 'No lot is chosen yet. Choose one, or move everything that lies there.';
    return refuse({ code: 'nothing_to_post', field: 'lines', sentence });
  }
  const lines = input.lines.map((line, index) => ({ ...line, field: `lines.${index}` }));
  return accept([{ job_id: input.job_id, lines }]);
}

function everythingAt(from: Account, facts: Facts): Outcome<readonly Load[]> {
  const rows = isWorkPlace(from.kind)
    ? facts.job_holdings
    : facts.holdings.map((holding) => ({ ...holding, job_id: null }));
  const here = rows.filter((row) => row.account_id === from.id && !isZeroMass(row.mass));
  if (here.length === 0) {
    const sentence = `${from.name} is empty, so there is nothing to move. Look at the place again.`;
    return refuse({ code: 'nothing_to_post', field: 'from_id', sentence });
  }
  const jobs = [...new Set(here.map((row) => row.job_id))];
  const whole: Amount = { how: 'all' };
  return accept(
    jobs.map((job_id) => ({
      job_id,
      lines: here
        .filter((row) => row.job_id === job_id)
        .map((row) => ({ lot_id: row.lot_id, amount: whole, field: 'everything' })),
    })),
  );
}

function drawLine(
  line: Load['lines'][number],
  job_id: string | null,
  way: Way,
  facts: Facts,
): Outcome<Drawn> {
  const lot = findLot(facts, line.lot_id, `${line.field}.lot_id`);
  if (!lot.ok) return lot;
  const usable = isWorkPlace(way.to.kind) ? usableLot(lot.value, `${line.field}.lot_id`) : lot;
  if (!usable.ok) return usable;
  return drawAmount(
    facts,
    { account: way.from, lot: lot.value, job_id },
    line.amount,
    `${line.field}.amount`,
  );
}

function transferVoucher(
  load: Load,
  lines: readonly Drawn[],
  way: Way,
  by: { readonly input: TransferInput; readonly facts: Facts; readonly actor: Actor },
): VoucherDraft {
  const { input, facts, actor } = by;
  const variance = theAccount(facts, 'count_variance').id;
  const entries: readonly EntryDraft[] = lines.flatMap((line) =>
    drawnEntries(line, way.from.id, way.to.id, variance),
  );
  const weighings = lines.map((line, index) => ({ weighing: line.weighing, line: index + 1 }));
  return makeVoucher(facts, way.common, {
    kind: 'transfer',
    detail: {
      operation: input.operation,
      bench: isWorkPlace(way.to.kind) ? way.to.id : null,
      person_id: way.receiver_id,
      job_id: load.job_id,
      single_handed:
        way.receiver_id === actor.person_id && way.from.custodian_id !== actor.person_id ? 'yes' : null,
      weighings: weighingRows(weighings, facts, actor),
    },
    entries,
  });
}
