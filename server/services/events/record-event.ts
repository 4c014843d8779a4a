/**
 * Records an event: takes the request key and the workshop's lock, reads the facts, lets the event's pure function
 * draft the records, and posts them, all in one transaction. Where a second signature is owed and somebody else can
 * give it, the act waits instead and nothing is posted.
 */
import { createHash, randomUUID } from 'node:crypto';
import type { Facts } from '../../../shared/book/facts.ts';
import type { RecordDraft } from '../../../shared/book/draft.ts';
import type { EventDefinition, EventDraft } from '../../../shared/events/definition.ts';
import { may } from '../../../shared/permissions.ts';
import type { EventAnswer } from '../../../shared/schemas/event-answer.ts';
import { eventAnswer } from '../../../shared/schemas/event-answer.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { Tx } from '../../db/rows.ts';
import { presentDrafts } from '../../presenters/draft-preview.ts';
import { ProblemError } from '../../problem.ts';
import { parseFacts } from '../book/facts.ts';
import { postRecords } from '../book/post.ts';
import type { PersonInWorkshop } from './person.ts';
import { checkBody } from './check-body.ts';

export interface EventRequest {
  /** The JSON body, as it came. */
  readonly body: unknown;
  readonly key: string;
  readonly by: PersonInWorkshop;
  /** Set when a second person approves what `by` recorded. */
  readonly approved_by?: string;
  /** A seed's own time. */
  readonly at?: Date | null;
}

const opened = z.discriminatedUnion('state', [
  z.object({ state: z.literal('new'), facts: z.unknown() }),
  z.object({
    state: z.literal('answered'),
    status: z.number().nullable(),
    answer: z.unknown(),
  }),
  z.object({ state: z.literal('other_body') }),
]);

/**
 * Records one event for a person. Gives the answer and its status (201 posted, 202 waits for a signature).
 * Throws ProblemError with the event's refusals, `key_reused` where the key came with another body.
 */
export async function recordEvent<Input>(
  tx: Tx,
  event: EventDefinition<Input>,
  request: EventRequest,
): Promise<{ status: number; answer: EventAnswer }> {
  const input = checkBody(event.schema, request.body);
  const { open } = await tx.one(z.object({ open: opened }), OPEN, [
    request.key,
    request.by.person_id,
    createHash('sha256')
      .update(`${event.name}\n${JSON.stringify(request.body)}`)
      .digest('hex'),
    JSON.stringify(event.needs(input)),
    request.at ?? null,
  ]);
  if (open.state === 'other_body') throw new ProblemError('key_reused', KEY_REUSED);
  if (open.state === 'answered') {
    return {
      status: open.status ?? 201,
      answer: eventAnswer.parse(open.answer),
    };
  }
  const facts = parseFacts(open.facts);
  const outcome = event.draft(input, facts, {
    person_id: request.by.person_id,
    role: request.by.role,
  });
  if (!outcome.ok) throw ProblemError.ofRefusals(outcome.refusals);
  const result = await postOrWait(tx, event, request, outcome.value, facts);
  await tx.run(
    'UPDATE request_key SET status = $2, answer = $3::jsonb WHERE workshop_id = current_workshop() AND key = $1',
    [request.key, result.status, JSON.stringify(result.answer)],
  );
  return result;
}

async function postOrWait<Input>(
  tx: Tx,
  event: EventDefinition<Input>,
  request: EventRequest,
  draft: EventDraft,
  facts: Facts,
): Promise<{ status: number; answer: EventAnswer }> {
  if (draft.second_signature !== null && request.approved_by === undefined) {
    if (someoneElseMaySign(facts, request.by.person_id)) {
      const id = await waitForSignature(tx, event.name, request, draft, draft.second_signature);
      return {
        status: 202,
        answer: { records: [], lots: [], signature_request_id: id },
      };
    }
    return post(tx, request, { ...draft, records: draft.records.map(singleHanded) }, request.by.person_id);
  }
  return post(tx, request, draft, request.approved_by ?? null);
}

async function post(tx: Tx, request: EventRequest, draft: EventDraft, approved_by: string | null) {
  const records = await postRecords(
    tx,
    draft.records,
    { person_id: request.by.person_id, approved_by },
    { handovers: draft.handovers, at: request.at ?? null },
  );
  return {
    status: 201,
    answer: {
      records,
      lots: lotsOf(draft.records),
      signature_request_id: null,
    },
  };
}

function someoneElseMaySign(facts: Facts, person_id: string): boolean {
  return [...facts.people.values()].some(
    (person) => person.active && person.id !== person_id && may(person.role, 'signature.give'),
  );
}

/** Marks a record that one person alone could sign, wherever it will be shown. */
function singleHanded(record: RecordDraft): RecordDraft {
  return { ...record, detail: { ...record.detail, single_handed: 'yes' } };
}

function lotsOf(records: readonly RecordDraft[]) {
  return records
    .filter((record) => record.kind === 'lot_described')
    .map(({ detail }) => lotNamed.parse({ id: detail['lot_id'], code: detail['code'] }));
}

async function waitForSignature(
  tx: Tx,
  name: string,
  request: EventRequest,
  draft: EventDraft,
  reason: string,
) {
  const id = randomUUID();
  await tx.run(ASK, [
    id,
    name,
    JSON.stringify(request.body),
    JSON.stringify(presentDrafts(draft.records)),
    reason,
    request.by.person_id,
  ]);
  return id;
}

const lotNamed = z.object({ id: z.string(), code: z.string() });

const OPEN = 'SELECT open_event($1, $2::uuid, $3, $4::jsonb, $5::timestamptz) AS open';

const ASK = `INSERT INTO signature_request (workshop_id, id, event, input, preview, reason, requested_by)
  VALUES (current_workshop(), $1::uuid, $2, $3::jsonb, $4::jsonb, $5, $6::uuid)`;

const KEY_REUSED =
  'This request was sent before with other figures, and those are in the book. Look at the voucher; enter what is missing as a new one.';
