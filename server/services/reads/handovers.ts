/** Handovers that wait or are disputed: everybody's, or one receiver's. */
import type { HandoverRow } from '../../../shared/schemas/today.ts';
import { handoverRow } from '../../../shared/schemas/today.ts';
import type { Tx } from '../../db/rows.ts';

/** A lot in a few words, as JSON. */
export const LOT_BRIEF = `jsonb_build_object('id', l.id, 'code', l.code, 'form', l.form, 'description', l.description, 'standing', l.standing)`;

/** Oldest first; only those that a person receives where one is named. */
export function openHandovers(tx: Tx, to_person_id: string | null): Promise<HandoverRow[]> {
  return tx.rows(handoverRow, SQL, [to_person_id]);
}

const SUMS = ['gross', 'gold', 'silver', 'platinum', 'palladium']
  .map(
    (
      m,
    ) => `(SELECT grams(coalesce(sum(e.${m}_ug), 0)::bigint) FROM entry e WHERE e.workshop_id = h.workshop_id
    AND e.voucher_sequence = r.sequence AND e.account_id = h.place_id) AS ${m}_g`,
  )
  .join(', ');

const SQL = `SELECT h.id::text, h.voucher_id::text, r.sequence::text, r.kind, h.place_id::text, a.name AS place_name, f.name AS from_name,
    h.to_person_id::text, t.name AS to_name, h.state,
    to_char(r.recorded_at AT TIME ZONE 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"') AS recorded_at, j.code AS job_code,
    (SELECT coalesce(jsonb_agg(DISTINCT ${LOT_BRIEF}), '[]') FROM entry e JOIN lot l ON l.workshop_id = e.workshop_id AND l.id = e.lot_id
      WHERE e.workshop_id = h.workshop_id AND e.voucher_sequence = r.sequence AND e.account_id = h.place_id AND e.gross_ug > 0) AS lots,
    ${SUMS}
  FROM handover h
  JOIN record r ON r.workshop_id = h.workshop_id AND r.id = h.voucher_id
  JOIN account a ON a.workshop_id = h.workshop_id AND a.id = h.place_id
  JOIN person f ON f.workshop_id = h.workshop_id AND f.id = h.from_person_id
  JOIN person t ON t.workshop_id = h.workshop_id AND t.id = h.to_person_id
  LEFT JOIN job j ON j.workshop_id = r.workshop_id AND j.id = r.job_id
  WHERE h.workshop_id = current_workshop() AND h.state IN ('waiting', 'disputed')
    AND ($1::uuid IS NULL OR h.to_person_id = $1::uuid)
    AND NOT EXISTS (SELECT 1 FROM record v WHERE v.workshop_id = r.workshop_id AND v.reverses = r.id)
  ORDER BY r.sequence LIMIT 200`;
