/**
 * What became of each consignment to a refiner: sent and expected, received, found, kept, credited, charged, and how
 * long it took. Told from the consignment and from the arrivals and outturns that name it.
 */
import { Decimal } from '../../../shared/decimal.ts';
import type { ConsignmentRow, RefinersQuery } from '../../../shared/schemas/statements.ts';
import { consignmentFound } from '../../../shared/schemas/statements.ts';
import { METALS } from '../../../shared/mass/vector.ts';
import type { Tx } from '../../db/rows.ts';

const DAY_MS = 86_400_000;

/** One page, newest first; `next_cursor` is the number to go on below. */
export async function readRefiners(
  tx: Tx,
  query: RefinersQuery,
): Promise<{ rows: ConsignmentRow[]; next_cursor: string | null }> {
  const found = await tx.rows(consignmentFound, CONSIGNMENTS, [
    query.from ?? null,
    query.to ?? null,
    query.refiner_id ?? null,
    query.cursor ?? null,
    query.limit + 1,
  ]);
  const rows = found.slice(0, query.limit).map((row) => ({
    ...row,
    days: row.settled_on === null ? null : daysBetween(row.sent_on, row.settled_on),
    metals: row.metals.map((metal) => ({
      ...metal,
      credited_percent: row.settled_on === null ? null : percent(metal.credited_g, metal.expected_g),
    })),
  }));
  return { rows, next_cursor: found.length > query.limit ? (rows.at(-1)?.sequence ?? null) : null };
}

/** The same, a row for each metal of each consignment, for CSV. */
export function refinerLines(rows: readonly ConsignmentRow[]) {
  return rows.flatMap(({ metals, ...row }) => metals.map((metal) => ({ ...row, ...metal })));
}

const daysBetween = (from: string, to: string): string =>
  String(Math.round((Date.parse(to) - Date.parse(from)) / DAY_MS));

function percent(part: string, whole: string): string | null {
  const of = new Decimal(whole);
  return of.isZero() ? null : new Decimal(part).times(100).div(of).toFixed(2);
}

/** A sum over the rows "lines" of the outturns of a consignment, for one metal. */
const settled = (
  field: string,
) => `coalesce((SELECT to_char(sum((part.of->>'${field}')::numeric), 'FM999999999990.000000')
  FROM jsonb_array_elements(outs.lines) AS part(of) WHERE part.of->>'metal' = m.metal), '0.000000')`;
const SETTLED = ['weighing_difference', 'assayed', 'assay_difference', 'deduction', 'charge', 'credited'].map(
  (name) => `'${name}_g', ${settled(`${name}_g`)}`,
);
const STANDS = `NOT EXISTS (SELECT 1 FROM record v WHERE v.workshop_id = s.workshop_id AND v.reverses = s.id)`;

/** What of the consignment's lots lies in a place now. */
const lies = (
  place: string,
) => `EXISTS (SELECT 1 FROM entry e JOIN holding h ON h.workshop_id = e.workshop_id AND h.lot_id = e.lot_id
  AND h.account_id = ${place} AND h.gross_ug <> 0 WHERE e.workshop_id = r.workshop_id AND e.voucher_sequence = r.sequence)`;

const CONSIGNMENTS = `SELECT r.id::text, r.sequence::text, r.detail->>'code' AS code, a.id::text AS refiner_id, a.name AS refiner_name,
    c.name AS courier_name, r.detail->>'declared_value' AS declared_value, r.business_date::text AS sent_on, came.arrived_on, outs.settled_on,
    CASE WHEN ${lies('c.id')} THEN 'on_the_way' WHEN NOT ${lies('a.id')} AND outs.settled_on IS NOT NULL THEN 'settled'
      WHEN outs.settled_on IS NOT NULL THEN 'part_settled' ELSE 'at_refiner' END AS state,
    grams(sent.gross_ug) AS sent_gross_g, came.received_gross_g, outs.statements, outs.charges,
    (SELECT jsonb_agg(jsonb_build_object('metal', m.metal, 'expected_g', grams(m.ug), ${SETTLED.join(', ')}) ORDER BY m.place)
      FROM (VALUES ${METALS.map((m, place) => `('${m}', sent.${m}_ug, ${place})`).join(', ')}) m(metal, ug, place)
      WHERE m.ug <> 0 OR EXISTS (SELECT 1 FROM jsonb_array_elements(outs.lines) AS part(of) WHERE part.of->>'metal' = m.metal)
        OR (m.place = 0 AND ${METALS.map((m) => `sent.${m}_ug = 0`).join(' AND ')})) AS metals
  FROM record r
  JOIN account a ON a.workshop_id = r.workshop_id AND a.id = (r.detail->>'destination_id')::uuid AND a.kind = 'refiner'
  JOIN account c ON c.workshop_id = r.workshop_id AND c.id = (r.detail->>'courier_id')::uuid
  CROSS JOIN LATERAL (SELECT ${['gross', ...METALS].map((m) => `coalesce(sum(e.${m}_ug), 0)::bigint AS ${m}_ug`).join(', ')} FROM entry e
    WHERE e.workshop_id = r.workshop_id AND e.voucher_sequence = r.sequence AND e.account_id = c.id) sent
  CROSS JOIN LATERAL (SELECT max(s.business_date)::text AS arrived_on,
      to_char(sum((part.of->>'received_g')::numeric), 'FM999999999990.000000') AS received_gross_g
    FROM record s CROSS JOIN LATERAL jsonb_array_elements(s.detail->'lines') AS part(of)
    WHERE s.workshop_id = r.workshop_id AND s.kind = 'arrive' AND s.detail->>'consign_id' = r.id::text AND ${STANDS}) came
  CROSS JOIN LATERAL (SELECT max(s.business_date)::text AS settled_on, string_agg(s.detail->>'statement', ', ' ORDER BY s.sequence) AS statements,
      coalesce(jsonb_path_query_array(jsonb_agg(s.detail->'lines'), '$[*][*]'), '[]') AS lines,
      (SELECT trim_scale(sum((charge->>'amount')::numeric))::text FROM jsonb_array_elements(
        coalesce(jsonb_path_query_array(jsonb_agg(s.detail->'charges'), '$[*][*]'), '[]')) charge) AS charges
    FROM record s WHERE s.workshop_id = r.workshop_id AND s.kind = 'outturn' AND s.detail->>'consign_id' = r.id::text AND ${STANDS}) outs
  WHERE r.workshop_id = current_workshop() AND r.kind = 'consign'
    AND NOT EXISTS (SELECT 1 FROM record v WHERE v.workshop_id = r.workshop_id AND v.reverses = r.id)
    AND ($1::date IS NULL OR r.business_date >= $1::date) AND ($2::date IS NULL OR r.business_date <= $2::date)
    AND ($3::uuid IS NULL OR a.id = $3::uuid) AND ($4::bigint IS NULL OR r.sequence < $4::bigint)
  ORDER BY r.sequence DESC LIMIT $5`;
