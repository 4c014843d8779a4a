/** Puts the keeper's day together: holders, what waits, where the house's metal lies, and what it is worth. */
import { Decimal } from '../../../shared/decimal.ts';
import { valueOf } from '../../../shared/insurance/valuation.ts';
import { massFromJson } from '../../../shared/mass/vector.ts';
import { readSettings } from '../../../shared/book/settings.ts';
import type { TodayJson } from '../../../shared/schemas/today.ts';
import { holderRow, todayJson } from '../../../shared/schemas/today.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { Tx } from '../../db/rows.ts';
import { waitingRequests } from '../requests/metal-requests.ts';
import { waitingSignatures } from '../signatures/signature-requests.ts';
import { LOT_BRIEF, openHandovers } from './handovers.ts';
import { asPrices, pricesOn } from './prices.ts';
import { readSettingRows } from './registers.ts';

const METALS = ['gold', 'silver', 'platinum', 'palladium'] as const;
const place = z.object({ today: z.string(), currency: z.string(), time_zone: z.string() });

export async function readToday(tx: Tx): Promise<TodayJson> {
  const { today, currency, time_zone } = await tx.one(place, PLACE);
  const prices = await pricesOn(tx, today);
  const settings = await readSettingRows(tx);
  const { night_limit } = readSettings(
    settings.map((row) => row.detail),
    currency,
    time_zone,
  );
  const holders = (await tx.rows(holderRow, HOLDERS)).map((row) => ({
    ...row,
    value: valueOf(massFromJson(row), asPrices(prices))?.toFixed(2) ?? null,
  }));
  const value_out = holders.reduce<Decimal | null>(
    (sum, { value }) => (sum === null || value === null ? null : sum.plus(value)),
    new Decimal(0),
  );
  return {
    today,
    currency,
    night_limit: night_limit?.toFixed() ?? null,
    prices,
    holders,
    value_out: value_out?.toFixed(2) ?? null,
    handovers: await openHandovers(tx, null),
    holds: await tx.rows(todayJson.shape.holds.element, HOLDS),
    requests: await waitingRequests(tx, null),
    consignments: await tx.rows(todayJson.shape.consignments.element, CONSIGNMENTS),
    to_explain: await tx.rows(todayJson.shape.to_explain.element, TO_EXPLAIN),
    signatures: (await waitingSignatures(tx)).length,
    house: await tx.rows(todayJson.shape.house.element, HOUSE),
  };
}

const PLACE = `SELECT (clock_timestamp() AT TIME ZONE time_zone)::date::text AS today, currency, time_zone FROM workshop
  WHERE workshop_id = current_workshop()`;

const sums = ['gross', ...METALS].map((m) => `grams(sum(h.${m}_ug)::bigint) AS ${m}_g`).join(', ');

const HOLDERS = `SELECT a.id::text AS account_id, a.kind, a.name, c.name AS custodian_name,
    (SELECT min(x.day)::text FROM (SELECT max(e.business_date) AS day FROM entry e WHERE e.workshop_id = a.workshop_id AND e.account_id = a.id
      AND e.gross_ug > 0 AND e.lot_id = ANY (array_agg(h.lot_id)) GROUP BY e.lot_id) x) AS since,
    jsonb_agg(${LOT_BRIEF} ORDER BY h.gross_ug DESC) AS lots, ${sums}
  FROM holding h
  JOIN account a ON a.workshop_id = h.workshop_id AND a.id = h.account_id AND a.kind IN ('bench', 'station', 'outworker', 'approval')
  JOIN lot l ON l.workshop_id = h.workshop_id AND l.id = h.lot_id
  LEFT JOIN person c ON c.workshop_id = a.workshop_id AND c.id = a.custodian_id
  WHERE h.workshop_id = current_workshop() AND h.gross_ug <> 0
  GROUP BY a.workshop_id, a.id, a.kind, a.name, c.name ORDER BY a.kind, a.name`;

const HOLDS = `SELECT l.id::text, l.code, l.form, l.description, l.standing, l.hold_reason, l.hold_until::text FROM lot l
  WHERE l.workshop_id = current_workshop() AND l.standing = 'on_hold' AND EXISTS (SELECT 1 FROM holding h
    WHERE h.workshop_id = l.workshop_id AND h.lot_id = l.id AND h.in_place AND h.gross_ug <> 0) ORDER BY l.code LIMIT 100`;

/** A consignment is open while any of its lots is with the courier or still at its destination. */
const CONSIGNMENTS = `SELECT r.id::text, r.detail->>'code' AS code, d.name AS destination_name, r.business_date::text,
    CASE WHEN EXISTS (SELECT 1 FROM entry e JOIN holding h ON h.workshop_id = e.workshop_id AND h.lot_id = e.lot_id
      AND h.account_id = (r.detail->>'courier_id')::uuid AND h.gross_ug <> 0
      WHERE e.workshop_id = r.workshop_id AND e.voucher_sequence = r.sequence) THEN 'on_the_way' ELSE 'to_settle' END AS state
  FROM record r JOIN account d ON d.workshop_id = r.workshop_id AND d.id = (r.detail->>'destination_id')::uuid
  WHERE r.workshop_id = current_workshop() AND r.kind = 'consign'
    AND NOT EXISTS (SELECT 1 FROM record v WHERE v.workshop_id = r.workshop_id AND v.reverses = r.id)
    AND EXISTS (SELECT 1 FROM entry e JOIN holding h ON h.workshop_id = e.workshop_id AND h.lot_id = e.lot_id
      AND h.account_id IN ((r.detail->>'courier_id')::uuid, (r.detail->>'destination_id')::uuid) AND h.gross_ug <> 0
      WHERE e.workshop_id = r.workshop_id AND e.voucher_sequence = r.sequence)
  ORDER BY r.sequence LIMIT 100`;

const TO_EXPLAIN = `SELECT r.id::text, r.sequence::text, r.operation, b.name AS bench_name, r.business_date::text FROM record r
  LEFT JOIN account b ON b.workshop_id = r.workshop_id AND b.id = r.bench
  WHERE r.workshop_id = current_workshop() AND r.kind = 'weigh_back' AND r.detail->>'to_explain' = 'yes'
    AND NOT EXISTS (SELECT 1 FROM record v WHERE v.workshop_id = r.workshop_id AND v.reverses = r.id)
    AND NOT EXISTS (SELECT 1 FROM record d WHERE d.workshop_id = r.workshop_id AND d.kind = 'dispute_closed' AND d.detail->>'voucher_id' = r.id::text)
  ORDER BY r.sequence LIMIT 100`;

const group = (kinds: string) => `grams(coalesce(sum(x.ug) FILTER (WHERE x.kind IN (${kinds})), 0)::bigint)`;

const HOUSE = `SELECT x.metal, ${group("'safe'")} AS safe_g, ${group("'bench', 'station', 'outworker', 'approval'")} AS benches_g,
    ${group("'bin'")} AS bins_g, ${group("'courier', 'refiner'")} AS outside_g, grams(coalesce(sum(x.ug), 0)::bigint) AS house_g
  FROM (
    SELECT a.kind, m.metal, m.ug FROM holding h
    JOIN account a ON a.workshop_id = h.workshop_id AND a.id = h.account_id
    JOIN lot l ON l.workshop_id = h.workshop_id AND l.id = h.lot_id AND l.owner_id IS NULL
    CROSS JOIN LATERAL (VALUES ${METALS.map((m) => `('${m}', h.${m}_ug)`).join(', ')}) AS m(metal, ug)
    WHERE h.workshop_id = current_workshop() AND h.in_place AND h.gross_ug <> 0
  ) x GROUP BY x.metal HAVING sum(x.ug) <> 0 ORDER BY array_position(ARRAY['gold', 'silver', 'platinum', 'palladium'], x.metal)`;
