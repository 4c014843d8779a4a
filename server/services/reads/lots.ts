/** Reads lots: the list, and one whole, with where it lies, its custody trail and its family both ways. */
import type { LotQuery, LotRow, LotWhole } from '../../../shared/schemas/lots.ts';
import { lotHolding, lotRelative, lotRow, lotTrail, lotWhole } from '../../../shared/schemas/lots.ts';
import type { Tx } from '../../db/rows.ts';
import { ProblemError } from '../../problem.ts';

const METALS = ['gross', 'gold', 'silver', 'platinum', 'palladium'] as const;
const sums = (alias: string) =>
  METALS.map(
    (m) => `coalesce(sum(${alias}.${m}_ug) FILTER (WHERE ${alias}.in_place), 0)::bigint AS ${m}_ug`,
  ).join(', ');

/** Lots with what lies in places; a lot is spent where nothing of it lies anywhere. */
const LOT = `SELECT l.*, o.name AS owner_name, s.gross_ug, s.gold_ug, s.silver_ug, s.platinum_ug, s.palladium_ug, s.pieces,
    CASE WHEN s.gross_ug = 0 AND s.claim_ug = 0 THEN 'spent' ELSE l.standing END AS now_standing
  FROM lot l
  LEFT JOIN party o ON o.workshop_id = l.workshop_id AND o.id = l.owner_id
  CROSS JOIN LATERAL (
    SELECT ${sums('h')}, sum(h.pieces) FILTER (WHERE h.in_place)::bigint AS pieces,
      coalesce(sum(abs(h.gross_ug)) FILTER (WHERE a.kind = 'metal_account'), 0) AS claim_ug
    FROM holding h JOIN account a ON a.workshop_id = h.workshop_id AND a.id = h.account_id
    WHERE h.workshop_id = l.workshop_id AND h.lot_id = l.id AND (h.gross_ug <> 0 OR h.gold_ug <> 0 OR h.silver_ug <> 0 OR h.platinum_ug <> 0 OR h.palladium_ug <> 0)
  ) s WHERE l.workshop_id = current_workshop()`;

const COLUMNS = `x.id::text, x.code, x.form, x.alloy, x.owner_id::text, x.owner_name, x.origin, x.basis, x.now_standing AS standing,
  x.hold_reason, x.hold_until::text, x.description, x.described_on::text,
  ${METALS.map((m) => `grams(x.${m}_ug) AS ${m}_g`).join(', ')}, x.pieces::text`;

/** One page of lots, newest code first; `next_cursor` is the code to go on below. */
export async function lotList(
  tx: Tx,
  query: LotQuery,
): Promise<{ rows: LotRow[]; next_cursor: string | null }> {
  const rows = await tx.rows(
    lotRow,
    `SELECT ${COLUMNS} FROM (${LOT}) x
      WHERE ($1::text IS NULL OR split_part(x.code, '-', 2)::bigint < $1::bigint)
        AND ($2::text IS NULL OR x.code ILIKE '%' || $2 || '%' OR x.description ILIKE '%' || $2 || '%' OR x.alloy ILIKE '%' || $2 || '%')
        AND ($3::text IS NULL OR x.form = $3)
        AND ($4::text IS NULL OR (CASE $4 WHEN 'gold' THEN x.gold_ug WHEN 'silver' THEN x.silver_ug WHEN 'platinum' THEN x.platinum_ug ELSE x.palladium_ug END) > 0)
        AND ($5::text IS NULL OR ($5 = 'house' AND x.owner_id IS NULL) OR x.owner_id::text = $5)
        AND ($6::uuid IS NULL OR EXISTS (SELECT 1 FROM holding h WHERE h.workshop_id = x.workshop_id AND h.account_id = $6::uuid AND h.lot_id = x.id AND h.gross_ug <> 0))
        AND ($7::text IS NULL OR x.now_standing = $7)
      ORDER BY split_part(x.code, '-', 2)::bigint DESC LIMIT $8`,
    [
      query.cursor ?? null,
      query.q === undefined ? null : escapeLike(query.q),
      query.form ?? null,
      query.metal ?? null,
      query.owner ?? null,
      query.place_id ?? null,
      query.standing ?? null,
      query.limit + 1,
    ],
  );
  const page = rows.slice(0, query.limit);
  return {
    rows: page,
    next_cursor: rows.length > query.limit ? (page.at(-1)?.code.split('-')[1] ?? null) : null,
  };
}

/** Search words stand for themselves: the marks that LIKE knows are no wildcards. */
const escapeLike = (text: string): string => text.replaceAll(/[\\%_]/g, (mark) => `\\${mark}`);

const head = lotWhole.omit({ holdings: true, trail: true, family: true });

/** One lot by its id or code. Throws `not_found`. */
export async function lotWholeOf(
  tx: Tx,
  by: { readonly id: string } | { readonly code: string },
): Promise<LotWhole> {
  const found = await tx.maybe(
    head,
    `SELECT ${COLUMNS}, trim_scale(x.gold_permille)::text AS gold_permille, trim_scale(x.silver_permille)::text AS silver_permille,
        trim_scale(x.platinum_permille)::text AS platinum_permille, trim_scale(x.palladium_permille)::text AS palladium_permille
      FROM (${LOT}) x WHERE ${'id' in by ? 'x.id = $1::uuid' : 'x.code = $1'}`,
    ['id' in by ? by.id : by.code],
  );
  if (found === null)
    throw new ProblemError('not_found', 'That lot is not in the book. Look at the label again, or scan it.');
  const [holdings, trail, family] = [
    await tx.rows(lotHolding, HOLDINGS, [found.id]),
    await tx.rows(lotTrail, TRAIL, [found.id]),
    await tx.rows(lotRelative, FAMILY, [found.id]),
  ];
  return { ...found, holdings, trail, family };
}

const HOLDINGS = `SELECT h.account_id::text, a.name AS account_name, a.kind AS account_kind, c.name AS custodian_name,
    (SELECT max(e.business_date)::text FROM entry e WHERE e.workshop_id = h.workshop_id AND e.account_id = h.account_id
      AND e.lot_id = h.lot_id AND e.gross_ug > 0) AS since,
    ${METALS.map((m) => `grams(h.${m}_ug) AS ${m}_g`).join(', ')}, h.pieces::text
  FROM holding h JOIN account a ON a.workshop_id = h.workshop_id AND a.id = h.account_id
  LEFT JOIN person c ON c.workshop_id = a.workshop_id AND c.id = a.custodian_id
  WHERE h.workshop_id = current_workshop() AND h.lot_id = $1::uuid AND (h.in_place OR a.kind = 'metal_account')
    AND (h.gross_ug <> 0 OR h.gold_ug <> 0 OR h.silver_ug <> 0 OR h.platinum_ug <> 0 OR h.palladium_ug <> 0)
  ORDER BY h.gross_ug DESC`;

const LIES = "(is_place(a.kind) OR a.kind = 'metal_account')";

/** What a voucher brought to places, or took from them where it brought nothing: a loss in the lot's name is no metal there. */
const moved = (m: string) =>
  `grams(coalesce(sum(e.${m}_ug) FILTER (WHERE e.${m}_ug > 0 AND ${LIES}), -sum(e.${m}_ug) FILTER (WHERE e.${m}_ug < 0 AND ${LIES}), 0)::bigint) AS ${m}_g`;
const TRAIL = `SELECT r.id::text AS voucher_id, r.sequence::text, r.kind, r.business_date::text,
    to_char(r.recorded_at AT TIME ZONE 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"') AS recorded_at, p.name AS recorded_by_name,
    string_agg(DISTINCT a.name, ', ') FILTER (WHERE e.gross_ug < 0 OR e.gold_ug < 0) AS from_names,
    string_agg(DISTINCT a.name, ', ') FILTER (WHERE e.gross_ug > 0 OR e.gold_ug > 0) AS to_names, j.code AS job_code,
    ${moved('gross')}, ${moved('gold')},
    EXISTS (SELECT 1 FROM record v WHERE v.workshop_id = r.workshop_id AND v.reverses = r.id) AS reversed
  FROM entry e JOIN record r ON r.workshop_id = e.workshop_id AND r.sequence = e.voucher_sequence
  JOIN account a ON a.workshop_id = e.workshop_id AND a.id = e.account_id
  JOIN person p ON p.workshop_id = r.workshop_id AND p.id = r.recorded_by
  LEFT JOIN job j ON j.workshop_id = r.workshop_id AND j.id = r.job_id
  WHERE e.workshop_id = current_workshop() AND e.lot_id = $1::uuid
  GROUP BY r.workshop_id, r.id, r.sequence, r.kind, r.business_date, r.recorded_at, p.name, j.code
  ORDER BY r.sequence DESC LIMIT 200`;

/** What a lot began with in places, by its first voucher. */
const began = (m: string) =>
  `(SELECT grams(coalesce(sum(e.${m}_ug), 0)::bigint) FROM entry e JOIN account a ON a.workshop_id = e.workshop_id AND a.id = e.account_id AND ${LIES}
    WHERE e.workshop_id = current_workshop() AND e.lot_id = f.id AND e.${m}_ug > 0
      AND e.voucher_sequence = (SELECT min(x.voucher_sequence) FROM entry x WHERE x.workshop_id = current_workshop() AND x.lot_id = f.id)) AS ${m}_g`;

const FAMILY = `WITH RECURSIVE before AS (
    SELECT p.parent_id AS id, -1 AS depth, p.lot_id AS next_id FROM lot_parent p WHERE p.workshop_id = current_workshop() AND p.lot_id = $1::uuid
    UNION SELECT p.parent_id, b.depth - 1, p.lot_id FROM before b JOIN lot_parent p ON p.workshop_id = current_workshop() AND p.lot_id = b.id WHERE b.depth > -6
  ), after AS (
    SELECT p.lot_id AS id, 1 AS depth, p.parent_id AS next_id FROM lot_parent p WHERE p.workshop_id = current_workshop() AND p.parent_id = $1::uuid
    UNION SELECT p.lot_id, a.depth + 1, p.parent_id FROM after a JOIN lot_parent p ON p.workshop_id = current_workshop() AND p.parent_id = a.id WHERE a.depth < 6
  )
  SELECT f.id::text, l.code, l.form, l.description, f.depth, f.next_id::text,
    ${began('gross')}, ${began('gold')}
  FROM (SELECT * FROM before UNION SELECT * FROM after) f JOIN lot l ON l.workshop_id = current_workshop() AND l.id = f.id
  ORDER BY f.depth, l.code LIMIT 500`;
