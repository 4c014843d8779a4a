/**
 * Issue: metal leaves the safe for a bench, a station or an outworker, for a job or for stock work and repairs, and
 * waits there for the receiver's acknowledgement. Metal that a keeper issues to himself is marked single-handed.
 */
import type { Outcome } from '../book/draft.ts';
import { accept, refuse } from '../book/draft.ts';
import { WORK_KINDS } from '../book/account.ts';
import type { Facts, Job } from '../book/facts.ts';
import type { Lot } from '../book/lot.ts';
import { id, shortText } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';
import { amountSchema, drawAmount, drawnEntries, remainderToSign } from './amount.ts';
import { commonFields, readCommon } from './common-fields.ts';
import type { EventDefinition } from './definition.ts';
import { handoverOf, receiverAt } from './handover.ts';
import { findJob, findLot, findPlace, lossAccount, theAccount, usableLot } from './lookup.ts';
import { makeVoucher, weighingRows } from './make-voucher.ts';

const issueSchema = z.strictObject({
  ...commonFields,
  from_id: id,
  to_id: id,
  lot_id: id,
  amount: amountSchema,
  operation: shortText,
  /** None: stock work or repairs. */
  job_id: id.nullable().default(null),
  /** Who takes it, where a station is shared; else the place's custodian. */
  person_id: id.nullable().default(null),
});
export type IssueInput = z.output<typeof issueSchema>;

const SAFES = {
  of: ['safe'],
  sentence: 'metal is issued from a safe. Use a transfer between other places.',
} as const;
const WORK = {
  of: WORK_KINDS,
  sentence: 'metal is issued to a bench, a station or an outworker. Use a transfer between other places.',
} as const;

export const issue: EventDefinition<IssueInput> = {
  name: 'issue',
  schema: issueSchema,
  action: 'book.issue',
  summary: 'Issues metal from a safe to a bench, a station or an outworker.',
  needs: (input) => ({
    account_ids: [input.from_id, input.to_id],
    lot_ids: [input.lot_id],
    job_ids: input.job_id === null ? [] : [input.job_id],
    document_ids: input.document_ids,
  }),
  draft(input, facts, actor) {
    const common = readCommon(input, facts);
    if (!common.ok) return common;
    const from = findPlace(facts, input.from_id, 'from_id', SAFES);
    if (!from.ok) return from;
    const to = findPlace(facts, input.to_id, 'to_id', WORK);
    if (!to.ok) return to;
    const operation = lossAccount(facts, input.operation, 'operation');
    if (!operation.ok) return operation;
    const lot = lotForJob(input, facts);
    if (!lot.ok) return lot;
    const receiver = receiverAt(facts, to.value, input.person_id, 'person_id');
    if (!receiver.ok) return receiver;
    const source = { account: from.value, lot: lot.value, job_id: null };
    const drawn = drawAmount(facts, source, input.amount, 'amount');
    if (!drawn.ok) return drawn;
    const toOneself = receiver.value === actor.person_id;
    const voucher = makeVoucher(facts, common.value, {
      kind: 'issue',
      detail: {
        operation: input.operation,
        bench: to.value.id,
        person_id: receiver.value,
        job_id: input.job_id,
        counterparty_id: to.value.party_id,
        by_count: drawn.value.by_count ? 'yes' : null,
        single_handed: toOneself ? 'yes' : null,
        weighings: weighingRows([{ weighing: drawn.value.weighing, line: 1 }], facts, actor),
      },
      entries: drawnEntries(drawn.value, from.value.id, to.value.id, theAccount(facts, 'count_variance').id),
    });
    const giver_id = actor.person_id;
    const place_id = to.value.id;
    return accept({
      records: [voucher],
      handovers: handoverOf(facts, {
        voucher_id: voucher.id,
        place_id,
        giver_id,
        receiver_id: receiver.value,
      }),
      second_signature: remainderToSign(drawn.value, from.value),
    });
  },
};

function lotForJob(input: IssueInput, facts: Facts): Outcome<Lot> {
  const job = findJob(facts, input.job_id, 'job_id');
  if (!job.ok) return job;
  const found = findLot(facts, input.lot_id, 'lot_id');
  if (!found.ok) return found;
  const lot = usableLot(found.value, 'lot_id');
  if (!lot.ok) return lot;
  return ownedByJob(lot.value, job.value, facts);
}

/** Another's metal only goes into a job of its owner. Refuses it for stock work and for anybody else's job. */
function ownedByJob(lot: Lot, job: Job | null, facts: Facts): Outcome<Lot> {
  if (lot.owner_id === null || lot.owner_id === job?.customer_id) return accept(lot);
  const owner = facts.parties.get(lot.owner_id)?.name ?? 'somebody else';
  const sentence = `Lot ${lot.code} belongs to ${owner}. It can only be issued for a job of its owner. Choose that job, or change the owner first.`;
  return refuse({ code: 'wrong_owner', field: 'lot_id', sentence });
}
