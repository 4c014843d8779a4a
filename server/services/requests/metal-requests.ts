/** Goldsmiths' requests for metal: nothing is posted; they appear at the counter until they are answered. */
import { randomUUID } from 'node:crypto';
import { printGrams } from '../../../shared/mass/micrograms.ts';
import type { MetalRequest, MetalRequestBody } from '../../../shared/schemas/metal-request.ts';
import { metalRequest } from '../../../shared/schemas/metal-request.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { Tx } from '../../db/rows.ts';
import { ProblemError } from '../../problem.ts';
import type { PersonInWorkshop } from '../events/person.ts';

const MOST_WAITING = 200;

/** Asks for metal to a bench that one answers for. Throws `invalid` for a bench of somebody else's. */
export async function askForMetal(
  tx: Tx,
  body: MetalRequestBody,
  by: PersonInWorkshop,
): Promise<{ id: string }> {
  const own = await tx.maybe(z.object({ id: z.string() }), OWN_PLACE, [body.place_id, by.person_id]);
  if (own === null) {
    const sentence = 'That bench is not in your charge. Choose your own bench.';
    throw new ProblemError('invalid', sentence, { errors: [{ field: 'place_id', sentence }] });
  }
  const id = randomUUID();
  await tx.run(ASK, [
    id,
    by.person_id,
    body.place_id,
    body.alloy,
    body.form,
    printGrams(body.mass_g),
    body.job_id,
    body.note,
  ]);
  return { id };
}

/** Requests that wait, oldest first; a goldsmith's own only where `person_id` is given. */
export function waitingRequests(tx: Tx, person_id: string | null): Promise<MetalRequest[]> {
  return tx.rows(
    metalRequest,
    `${SELECT} AND q.state = 'waiting' AND ($1::uuid IS NULL OR q.person_id = $1::uuid)
    ORDER BY q.made_at LIMIT ${MOST_WAITING}`,
    [person_id],
  );
}

/** Ends a request: answered by a voucher, declined at the counter, or withdrawn by who asked. Decided once. */
export async function endRequest(
  tx: Tx,
  id: string,
  state: 'answered' | 'declined' | 'withdrawn',
  by: { readonly voucher_id?: string; readonly only_of?: string },
): Promise<void> {
  const ended = await tx.maybe(z.object({ id: z.string() }), END, [
    id,
    state,
    by.voucher_id ?? null,
    by.only_of ?? null,
  ]);
  if (ended !== null) return;
  const there = await tx.maybe(
    z.object({ id: z.string() }),
    'SELECT id::text FROM metal_request WHERE workshop_id = current_workshop() AND id = $1::uuid',
    [id],
  );
  throw there === null
    ? new ProblemError('not_found', 'There is no such request. Look at the list again.')
    : new ProblemError(
        'conflict',
        'That request was answered or withdrawn meanwhile. Look at the list again.',
      );
}

const OWN_PLACE = `SELECT id::text FROM account WHERE workshop_id = current_workshop() AND id = $1::uuid
  AND custodian_id = $2::uuid AND NOT closed`;

const ASK = `INSERT INTO metal_request (workshop_id, id, person_id, place_id, alloy, form, mass_ug, job_id, note)
  VALUES (current_workshop(), $1::uuid, $2::uuid, $3::uuid, $4, $5, ($6::numeric * 1000000)::bigint, $7::uuid, $8)`;

const SELECT = `SELECT q.id::text, q.person_id::text, p.name AS person_name, q.place_id::text, a.name AS place_name, q.alloy, q.form,
    grams(q.mass_ug) AS mass_g, q.job_id::text, j.code AS job_code, q.note, q.state,
    to_char(q.made_at AT TIME ZONE 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"') AS made_at
  FROM metal_request q
  JOIN person p ON p.workshop_id = q.workshop_id AND p.id = q.person_id
  JOIN account a ON a.workshop_id = q.workshop_id AND a.id = q.place_id
  LEFT JOIN job j ON j.workshop_id = q.workshop_id AND j.id = q.job_id
  WHERE q.workshop_id = current_workshop()`;

const END = `UPDATE metal_request SET state = $2, voucher_id = $3::uuid
  WHERE workshop_id = current_workshop() AND id = $1::uuid AND state = 'waiting' AND ($4::uuid IS NULL OR person_id = $4::uuid)
  RETURNING id::text`;
