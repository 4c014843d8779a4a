/**
 * Acts that wait for a second signature. Approving runs the same event again on the facts of the moment, so that a
 * stale request is refused with a reason instead of posting what no longer fits; each request is decided once.
 */
import { EVENTS } from '../../../shared/events/index.ts';
import { isEventName } from '../../../shared/events/definition.ts';
import type { EventAnswer } from '../../../shared/schemas/event-answer.ts';
import type { SignatureRequest } from '../../../shared/schemas/signature-request.ts';
import { signatureRequest } from '../../../shared/schemas/signature-request.ts';
import { ROLES } from '../../../shared/permissions.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { Tx } from '../../db/rows.ts';
import { ProblemError } from '../../problem.ts';
import type { PersonInWorkshop } from '../events/person.ts';
import { recordEvent } from '../events/record-event.ts';

/** The most that wait at once on one page; a workshop with more has other worries. */
const MOST_WAITING = 200;

/** What waits for a signature, oldest first. */
export function waitingSignatures(tx: Tx): Promise<SignatureRequest[]> {
  return tx.rows(
    signatureRequest,
    `${SELECT} AND q.state = 'waiting' ORDER BY q.requested_at LIMIT ${MOST_WAITING}`,
  );
}

/** One request, in whatever state. Throws `not_found`. */
export async function signatureRequestById(tx: Tx, id: string): Promise<SignatureRequest> {
  const found = await tx.maybe(signatureRequest, `${SELECT} AND q.id = $1::uuid`, [id]);
  if (found === null)
    throw new ProblemError('not_found', 'There is no such request. Look at the list again.');
  return found;
}

/**
 * Signs a request: the event is posted as recorded by who asked and approved by who signs.
 * Throws `not_permitted` for one's own request, `conflict` where it was decided before, and the event's own refusals.
 */
export async function approveSignature(tx: Tx, id: string, by: PersonInWorkshop): Promise<EventAnswer> {
  const waiting = await takeWaiting(tx, id, by);
  if (!isEventName(waiting.event)) throw new Error(`no event ${waiting.event}`);
  const { answer } = await recordEvent(tx, EVENTS[waiting.event], {
    body: waiting.input,
    key: `signature-${id}`,
    by: { workshop_id: by.workshop_id, person_id: waiting.requested_by, role: waiting.role },
    approved_by: by.person_id,
  });
  await decide(tx, id, 'approved', by, null, answer);
  return answer;
}

/** Refuses a request, with a word why; nothing is posted. */
export async function refuseSignature(tx: Tx, id: string, by: PersonInWorkshop, note: string): Promise<void> {
  await takeWaiting(tx, id, by);
  await decide(tx, id, 'refused', by, note, null);
}

/** Takes one's own request back before anybody has signed. */
export async function withdrawSignature(tx: Tx, id: string, by: PersonInWorkshop): Promise<void> {
  const waiting = await lockRequest(tx, id);
  if (waiting.requested_by !== by.person_id)
    throw new ProblemError('not_permitted', 'Only who asked can take it back.');
  await decide(tx, id, 'withdrawn', by, null, null);
}

const lockedRequest = z.object({
  event: z.string(),
  input: z.unknown(),
  requested_by: z.string(),
  role: z.enum(ROLES),
  state: z.string(),
});

async function lockRequest(tx: Tx, id: string) {
  const found = await tx.maybe(lockedRequest, LOCK, [id]);
  if (found === null)
    throw new ProblemError('not_found', 'There is no such request. Look at the list again.');
  if (found.state !== 'waiting') {
    throw new ProblemError('conflict', 'This was decided before. Look at the voucher, or ask again.');
  }
  return found;
}

async function takeWaiting(tx: Tx, id: string, by: PersonInWorkshop) {
  const waiting = await lockRequest(tx, id);
  if (waiting.requested_by === by.person_id) {
    throw new ProblemError('not_permitted', 'You recorded this, so someone else must sign it.');
  }
  return waiting;
}

function decide(
  tx: Tx,
  id: string,
  state: 'approved' | 'refused' | 'withdrawn',
  by: PersonInWorkshop,
  note: string | null,
  answer: EventAnswer | null,
): Promise<void> {
  return tx.run(DECIDE, [id, state, by.person_id, note, answer === null ? null : JSON.stringify(answer)]);
}

const SELECT = `SELECT q.id::text, q.event, q.input, q.preview, q.reason, q.requested_by::text, p.name AS requested_by_name,
    to_char(q.requested_at AT TIME ZONE 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"') AS requested_at, q.state,
    q.decided_by::text, q.decision_note
  FROM signature_request q JOIN person p ON p.workshop_id = q.workshop_id AND p.id = q.requested_by
  WHERE q.workshop_id = current_workshop()`;

const LOCK = `SELECT q.event, q.input, q.requested_by::text, p.role, q.state
  FROM signature_request q JOIN person p ON p.workshop_id = q.workshop_id AND p.id = q.requested_by
  WHERE q.workshop_id = current_workshop() AND q.id = $1::uuid FOR UPDATE OF q`;

const DECIDE = `UPDATE signature_request SET state = $2, decided_by = $3::uuid, decided_at = now(), decision_note = $4, answer = $5::jsonb
  WHERE workshop_id = current_workshop() AND id = $1::uuid`;
