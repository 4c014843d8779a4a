/** What a goldsmith sees: the own benches, what lies there by job, what waits to be taken over, the own requests. */
import type { MyBenchJson } from '../../../shared/schemas/today.ts';
import { myBenchJson } from '../../../shared/schemas/today.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { Tx } from '../../db/rows.ts';
import { waitingRequests } from '../requests/metal-requests.ts';
import { LOT_BRIEF, openHandovers } from './handovers.ts';

export async function readMyBench(tx: Tx, person_id: string): Promise<MyBenchJson> {
  return {
    places: await tx.rows(myBenchJson.shape.places.element, PLACES, [person_id]),
    holdings: await tx.rows(myBenchJson.shape.holdings.element, HOLDINGS, [person_id]),
    handovers: await openHandovers(tx, person_id),
    requests: await waitingRequests(tx, person_id),
    jobs: await tx.rows(
      myBenchJson.shape.jobs.element,
      'SELECT id::text, code, title FROM job WHERE workshop_id = current_workshop() ORDER BY opened_on DESC, code DESC LIMIT 100',
    ),
    alloys: (
      await tx.rows(
        z.object({ name: z.string() }),
        'SELECT name FROM alloy WHERE workshop_id = current_workshop() AND NOT retired ORDER BY name LIMIT 200',
      )
    ).map(({ name }) => name),
  };
}

const PLACES = `SELECT id::text, name FROM account WHERE workshop_id = current_workshop() AND custodian_id = $1::uuid
  AND kind IN ('bench', 'station') AND NOT closed ORDER BY name`;

const HOLDINGS = `SELECT j.account_id::text, nullif(j.job_id, '00000000-0000-0000-0000-000000000000')::text AS job_id, b.code AS job_code,
    ${LOT_BRIEF} AS lot, grams(j.gross_ug) AS gross_g, grams(j.gold_ug) AS gold_g, grams(j.silver_ug) AS silver_g,
    grams(j.platinum_ug) AS platinum_g, grams(j.palladium_ug) AS palladium_g, j.pieces::text
  FROM job_holding j
  JOIN account a ON a.workshop_id = j.workshop_id AND a.id = j.account_id AND a.custodian_id = $1::uuid
  JOIN lot l ON l.workshop_id = j.workshop_id AND l.id = j.lot_id
  LEFT JOIN job b ON b.workshop_id = j.workshop_id AND b.id = j.job_id
  WHERE j.workshop_id = current_workshop() AND j.gross_ug <> 0 ORDER BY b.code NULLS FIRST, l.code`;
