/** Reads vouchers and acts: the register, newest first, and one of them whole. */
import type { VoucherQuery, VoucherRow, VoucherWhole } from '../../../shared/schemas/vouchers.ts';
import { voucherEntry, voucherRow, voucherWhole } from '../../../shared/schemas/vouchers.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { Tx } from '../../db/rows.ts';
import { ProblemError } from '../../problem.ts';
import { FIRST, SIDE, VOUCHER_KIND, because, keysOfLine, ownedBy } from '../reports/reconciliation-line.ts';

const moved = (metal: string) =>
  `(SELECT grams(coalesce(sum(e.${metal}_ug) FILTER (WHERE e.${metal}_ug > 0), 0)::bigint) FROM entry e
     WHERE e.workshop_id = r.workshop_id AND e.voucher_sequence = r.sequence) AS ${metal}_g`;

const ROW = `r.id::text, r.sequence::text, r.kind, r.business_date::text,
  to_char(r.recorded_at AT TIME ZONE 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"') AS recorded_at, by.name AS recorded_by_name,
  ap.name AS approved_by_name, r.operation, b.name AS bench_name, j.code AS job_code, c.name AS counterparty_name,
  r.reverses::text, (SELECT v.id::text FROM record v WHERE v.workshop_id = r.workshop_id AND v.reverses = r.id) AS reversed_by, r.note,
  ${['gross', 'gold', 'silver', 'platinum', 'palladium'].map(moved).join(', ')}`;

const FROM = `FROM record r
  JOIN person by ON by.workshop_id = r.workshop_id AND by.id = r.recorded_by
  LEFT JOIN person ap ON ap.workshop_id = r.workshop_id AND ap.id = r.approved_by
  LEFT JOIN account b ON b.workshop_id = r.workshop_id AND b.id = r.bench
  LEFT JOIN job j ON j.workshop_id = r.workshop_id AND j.id = r.job_id
  LEFT JOIN party c ON c.workshop_id = r.workshop_id AND c.id = r.counterparty_id
  WHERE r.workshop_id = current_workshop()`;

/** One page of the register; `next_cursor` is the sequence to go on below. */
export async function voucherList(
  tx: Tx,
  query: VoucherQuery,
): Promise<{ rows: VoucherRow[]; next_cursor: string | null }> {
  const rows = await tx.rows(
    voucherRow,
    `SELECT ${ROW} ${FROM} ${FILTER} ORDER BY r.sequence DESC LIMIT $11`,
    [
      query.cursor ?? null,
      query.kind ?? null,
      query.show,
      query.from ?? null,
      query.to ?? null,
      query.account_id ?? null,
      query.lot_id ?? null,
      query.job_id ?? null,
      query.person_id ?? null,
      query.operation ?? null,
      query.limit + 1,
      query.line === undefined ? null : keysOfLine(query.line),
      query.owner,
    ],
  );
  const page = rows.slice(0, query.limit);
  return { rows: page, next_cursor: rows.length > query.limit ? (page.at(-1)?.sequence ?? null) : null };
}

const FILTER = `AND ($1::bigint IS NULL OR r.sequence < $1::bigint) AND ($2::text IS NULL OR r.kind = $2)
  AND ($3::text = 'all' OR is_voucher_kind(r.kind)) AND ($4::date IS NULL OR r.business_date >= $4::date)
  AND ($5::date IS NULL OR r.business_date <= $5::date)
  AND ($6::uuid IS NULL OR EXISTS (SELECT 1 FROM entry e WHERE e.workshop_id = r.workshop_id AND e.voucher_sequence = r.sequence AND e.account_id = $6::uuid))
  AND ($7::uuid IS NULL OR EXISTS (SELECT 1 FROM entry e WHERE e.workshop_id = r.workshop_id AND e.voucher_sequence = r.sequence AND e.lot_id = $7::uuid))
  AND ($8::uuid IS NULL OR r.job_id = $8::uuid) AND ($9::uuid IS NULL OR r.person_id = $9::uuid OR r.recorded_by = $9::uuid)
  AND ($10::text IS NULL OR r.operation = $10)
  AND ($12::text[] IS NULL OR EXISTS (SELECT 1 FROM entry e JOIN account a ON a.workshop_id = e.workshop_id AND a.id = e.account_id
    JOIN lot l ON l.workshop_id = e.workshop_id AND l.id = e.lot_id ${FIRST}
    WHERE e.workshop_id = r.workshop_id AND e.voucher_sequence = r.sequence AND ${ownedBy('$13::text')}
      AND concat_ws('|', a.kind, ${VOUCHER_KIND}, ${SIDE}, ${because('$4::date')}) = ANY ($12::text[])))`;

const head = voucherWhole.omit({ documents: true, entries: true, handovers: true });
const documentRow = z.object({ id: z.string(), sha256: z.string(), name: z.string().nullable() });

/** One record by its id or its number. Throws `not_found`. */
export async function voucherWholeOf(tx: Tx, id_or_sequence: string): Promise<VoucherWhole> {
  const byNumber = /^\d{1,18}$/.test(id_or_sequence);
  const found = await tx.maybe(
    head,
    `SELECT ${ROW}, r.recorded_by::text, r.approved_by::text, r.detail, r.previous_hash, r.hash, r.line ${FROM}
      AND ${byNumber ? 'r.sequence = $1::bigint' : 'r.id = $1::uuid'}`,
    [id_or_sequence],
  );
  if (found === null)
    throw new ProblemError('not_found', 'No voucher has that number. Look at the register again.');
  const entries = await tx.rows(voucherEntry, ENTRIES, [found.sequence]);
  const handovers = await tx.rows(voucherWhole.shape.handovers.element, HANDOVERS, [found.id]);
  const documents = await tx.rows(documentRow, DOCUMENTS, [found.sequence]);
  return { ...found, entries, handovers, documents };
}

const ENTRIES = `SELECT e.line::text, e.account_id::text, a.name AS account_name, a.kind AS account_kind, e.lot_id::text, l.code AS lot_code,
    l.description AS lot_description, grams(e.gross_ug) AS gross_g, grams(e.gold_ug) AS gold_g, grams(e.silver_ug) AS silver_g,
    grams(e.platinum_ug) AS platinum_g, grams(e.palladium_ug) AS palladium_g, e.pieces::text
  FROM entry e JOIN account a ON a.workshop_id = e.workshop_id AND a.id = e.account_id
  JOIN lot l ON l.workshop_id = e.workshop_id AND l.id = e.lot_id
  WHERE e.workshop_id = current_workshop() AND e.voucher_sequence = $1::bigint ORDER BY e.line`;

const HANDOVERS = `SELECT h.id::text, a.name AS place_name, f.name AS from_name, t.name AS to_name, h.to_person_id::text, h.state
  FROM handover h JOIN account a ON a.workshop_id = h.workshop_id AND a.id = h.place_id
  JOIN person f ON f.workshop_id = h.workshop_id AND f.id = h.from_person_id
  JOIN person t ON t.workshop_id = h.workshop_id AND t.id = h.to_person_id
  WHERE h.workshop_id = current_workshop() AND h.voucher_id = $1::uuid`;

const DOCUMENTS = `SELECT d.value->>'id' AS id, d.value->>'sha256' AS sha256, o.name
  FROM record r, jsonb_array_elements(r.documents) d
  LEFT JOIN document o ON o.workshop_id = current_workshop() AND o.id = (d.value->>'id')::uuid
  WHERE r.workshop_id = current_workshop() AND r.sequence = $1::bigint`;
