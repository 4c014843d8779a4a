/** Reads the sums that a period's reconciliation is made of; the reckoning itself is `shared/loss/reconciliation.ts`. */
import { VOUCHER_KINDS } from '../../../shared/book/kinds.ts';
import { ACCOUNT_KINDS } from '../../../shared/book/account.ts';
import { RECONCILIATION_WORDS, reconcile } from '../../../shared/loss/reconciliation.ts';
import { massToJson } from '../../../shared/mass/vector.ts';
import { massFields, massOf } from '../../../shared/schemas/book.ts';
import type { ReconciliationJson, ReconciliationQuery } from '../../../shared/schemas/reports.ts';
import { reconciliationJson } from '../../../shared/schemas/reports.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { Tx } from '../../db/rows.ts';
import { FIRST, SIDE, VOUCHER_KIND, because, ownedBy } from './reconciliation-line.ts';

const METALS = ['gold', 'silver', 'platinum', 'palladium'] as const;
const MASSES = ['gross', ...METALS] as const;
const grams = (alias: string) =>
  MASSES.map((m) => `grams(coalesce(sum(${alias}.${m}_ug), 0)::bigint) AS ${m}_g`).join(', ');

const sumRow = z.object({
  account_kind: z.enum(ACCOUNT_KINDS),
  voucher_kind: z.enum(VOUCHER_KINDS),
  side: z.enum(['onto', 'from']),
  because: z.enum(['ordinary', 'change_of_owner', 'closed_period']),
  ...massFields,
});

/** The reconciliation of a period for one owner (the house, a party) or all. */
export async function readReconciliation(tx: Tx, query: ReconciliationQuery): Promise<ReconciliationJson> {
  const bind = [query.from, query.to, query.owner];
  const opening = massOf(await tx.one(z.object(massFields), placesAt('$1::date - 1'), bind));
  const closing = massOf(await tx.one(z.object(massFields), placesAt('$2::date'), bind));
  const sums = (await tx.rows(sumRow, SUMS, bind)).map((row) => ({ ...row, mass: massOf(row) }));
  const reckoned = reconcile(opening, closing, sums);
  return {
    ...query,
    opening: massToJson(reckoned.opening),
    lines: reckoned.lines.map(({ line, mass }) => ({
      line,
      name: RECONCILIATION_WORDS[line],
      account_kind: ACCOUNT_KINDS.find((kind) => kind === line) ?? null,
      ...massToJson(mass),
    })),
    closing: massToJson(reckoned.closing),
    left_over: massToJson(reckoned.left_over),
    places: await tx.rows(reconciliationJson.shape.places.element, PLACES, bind),
  };
}

const OWNED = ownedBy('$3::text');
const FROM = `FROM entry e JOIN account a ON a.workshop_id = e.workshop_id AND a.id = e.account_id
  JOIN lot l ON l.workshop_id = e.workshop_id AND l.id = e.lot_id
  WHERE e.workshop_id = current_workshop() AND ${OWNED}`;

/** What places held at the end of a day. The bound dates are named in every statement, so that one list of values serves them all. */
const placesAt = (day: string) => `SELECT ${grams('b')} FROM balances_at(${day}) b
  JOIN account a ON a.workshop_id = b.workshop_id AND a.id = b.account_id AND is_place(a.kind)
  JOIN lot l ON l.workshop_id = b.workshop_id AND l.id = b.lot_id
  WHERE ${OWNED} AND $1::date IS NOT NULL AND $2::date IS NOT NULL`;

const SUMS = `SELECT a.kind AS account_kind, ${VOUCHER_KIND} AS voucher_kind, ${SIDE} AS side, ${because('$1::date')} AS because, ${grams('e')}
  ${FROM.replace('WHERE', `JOIN record r ON r.workshop_id = e.workshop_id AND r.sequence = e.voucher_sequence ${FIRST} WHERE`)}
    AND e.business_date BETWEEN $1::date AND $2::date GROUP BY 1, 2, 3, 4`;

const byMetal = (alias: string) =>
  `CROSS JOIN LATERAL (VALUES ${METALS.map((m) => `('${m}', ${alias}.${m}_ug)`).join(', ')}) AS m(metal, ug)`;

/** What each place held before the period, and what came and went in it. */
const MOVED = `
  SELECT b.account_id, m.metal, m.ug AS opening, 0 AS came, 0 AS went FROM balances_at($1::date - 1) b
    JOIN lot l ON l.workshop_id = b.workshop_id AND l.id = b.lot_id ${byMetal('b')} WHERE ${OWNED}
  UNION ALL
  SELECT e.account_id, m.metal, 0, greatest(m.ug, 0), greatest(-m.ug, 0) FROM entry e
    JOIN lot l ON l.workshop_id = e.workshop_id AND l.id = e.lot_id ${byMetal('e')}
    WHERE e.workshop_id = current_workshop() AND e.business_date BETWEEN $1::date AND $2::date AND ${OWNED}`;

/** Working loss that was booked by vouchers of a bench. */
const LOSS = `SELECT r.bench AS account_id, m.metal, sum(m.ug) AS loss FROM record r
    JOIN entry e ON e.workshop_id = r.workshop_id AND e.voucher_sequence = r.sequence
    JOIN account a ON a.workshop_id = e.workshop_id AND a.id = e.account_id AND a.kind = 'working_loss'
    JOIN lot l ON l.workshop_id = e.workshop_id AND l.id = e.lot_id ${byMetal('e')}
    WHERE r.workshop_id = current_workshop() AND r.business_date BETWEEN $1::date AND $2::date AND ${OWNED} GROUP BY 1, 2`;

const PLACES = `SELECT a.id::text AS account_id, a.name, a.kind, x.metal, grams(sum(x.opening)::bigint) AS opening_g,
    grams(sum(x.came)::bigint) AS in_g, grams(sum(x.went)::bigint) AS out_g, grams(coalesce(max(y.loss), 0)::bigint) AS loss_g,
    grams(sum(x.opening + x.came - x.went)::bigint) AS closing_g
  FROM (${MOVED}) x JOIN account a ON a.workshop_id = current_workshop() AND a.id = x.account_id AND is_place(a.kind)
  LEFT JOIN (${LOSS}) y ON y.account_id = x.account_id AND y.metal = x.metal
  GROUP BY a.id, a.name, a.kind, x.metal HAVING sum(x.opening) <> 0 OR sum(x.came + x.went) <> 0
  ORDER BY array_position(ARRAY['gold', 'silver', 'platinum', 'palladium'], x.metal),
    array_position(ARRAY['safe', 'bench', 'station', 'bin', 'outworker', 'approval', 'courier', 'refiner'], a.kind), a.name`;
