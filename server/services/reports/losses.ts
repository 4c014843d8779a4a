/**
 * Losses by operation, bench, person, alloy, job or month: worked, gross loss, what the refiners gave back, net loss,
 * allowance and the word that judges. Told from the records alone.
 */
import { Decimal } from '../../../shared/decimal.ts';
import { judgeLoss } from '../../../shared/loss/judgement.ts';
import { lossPercent } from '../../../shared/loss/allowance.ts';
import { valueOf } from '../../../shared/insurance/valuation.ts';
import { gramsText } from '../../../shared/mass/grams-text.ts';
import { massVector } from '../../../shared/mass/vector.ts';
import type { LossesJson, LossesQuery } from '../../../shared/schemas/reports.ts';
import { lossRow } from '../../../shared/schemas/reports.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { Tx } from '../../db/rows.ts';
import { asPrices, pricesOn } from '../reads/prices.ts';

export async function readLosses(tx: Tx, query: LossesQuery): Promise<LossesJson> {
  const rows = await tx.rows(lossRow, lossesSql(query), [query.from, query.to]);
  const { currency } = await tx.one(
    z.object({ currency: z.string() }),
    'SELECT currency FROM workshop WHERE workshop_id = current_workshop()',
  );
  const prices = await pricesOn(tx, query.to);
  return {
    metal: query.metal,
    from: query.from,
    to: query.to,
    currency,
    price: prices.find((row) => row.metal === query.metal) ?? null,
    rows: rows.map((row) => {
      const [loss, worked] = [gramsText(row.loss_g), gramsText(row.worked_g)];
      const recovered = row.recovered_g === null ? null : gramsText(row.recovered_g);
      const allowed = row.allowance_g === null ? null : gramsText(row.allowance_g);
      return {
        ...row,
        gross_percent: percent(loss, worked),
        net_percent: recovered === null ? null : percent(loss - recovered, worked),
        finding: judgeLoss(loss, allowed, gramsText(row.limit_of_error_g)),
        value: valueOf(massVector({ [query.metal]: loss }), asPrices(prices))?.toFixed(2) ?? null,
      };
    }),
  };
}

const percent = (part: bigint, whole: bigint): string | null =>
  lossPercent(part, whole)?.toDecimalPlaces(3, Decimal.ROUND_HALF_EVEN).toFixed(3) ?? null;

/** Losses with what was worked and allowed on each weigh-back's paper. Independent limits of error add in squares. */
function lossesSql({ by, metal }: LossesQuery): string {
  const keys = {
    operation: [
      "coalesce(r.operation, '')",
      "coalesce((SELECT a.name FROM account a WHERE a.workshop_id = current_workshop() AND a.kind = 'working_loss' AND a.operation = r.operation), 'none named')",
    ],
    bench: ["coalesce(r.bench::text, '')", "coalesce(b.name, 'none named')"],
    person: ["coalesce(r.person_id::text, '')", "coalesce(p.name, 'none named')"],
    job: ["coalesce(r.job_id::text, '')", "coalesce(j.code || ', ' || j.title, 'stock work')"],
    alloy: ["coalesce(r.alloy, '')", "coalesce(r.alloy, 'of no alloy')"],
    month: ["to_char(r.business_date, 'YYYY-MM')", "to_char(r.business_date, 'YYYY-MM')"],
  } as const;
  const [key, name] = keys[by];
  const recovered =
    by === 'operation' || by === 'month' ? RECOVERED[by].replaceAll('METAL', metal) : 'NULL::text';
  return `SELECT x.*, ${recovered} AS recovered_g FROM (
    SELECT ${key} AS key, ${name} AS name, ${by === 'operation' ? 'max(r.operation)' : 'NULL::text'} AS operation,
      sum(r.vouchers)::text AS vouchers, grams(sum(r.worked)::bigint) AS worked_g, grams(sum(r.loss)::bigint) AS loss_g,
      CASE WHEN count(r.allowance) = 0 THEN NULL ELSE grams(sum(r.allowance)::bigint) END AS allowance_g,
      grams(round(sqrt(greatest(sum(coalesce(r.limit_squared, 0)), 0)))::bigint) AS limit_of_error_g,
      grams(coalesce(sum(r.loss) FILTER (WHERE r.of_before), 0)::bigint) AS corrected_g
    FROM (${WEIGH_BACKS.replaceAll('METAL', metal)}) r
    LEFT JOIN account b ON b.workshop_id = current_workshop() AND b.id = r.bench
    LEFT JOIN person p ON p.workshop_id = current_workshop() AND p.id = r.person_id
    LEFT JOIN job j ON j.workshop_id = current_workshop() AND j.id = r.job_id
    GROUP BY 1, 2 HAVING sum(r.worked) <> 0 OR sum(r.loss) <> 0
  ) x ORDER BY ${by === 'month' ? 'x.key' : 'x.loss_g::numeric DESC'} LIMIT 500`;
}

/**
 * Weigh-backs of the period, and what was corrected or reversed in it: a reversal takes back what its voucher counted,
 * a correction adds its difference; both under the names of the first voucher, in the period of their own date.
 */
const WEIGH_BACKS = `SELECT root.operation, root.bench, root.person_id, root.job_id, r.business_date, l.alloy, way.sign AS vouchers,
    way.sign * ((root.detail->>'worked_METAL_g')::numeric * 1000000)::bigint AS worked,
    CASE WHEN root.detail->>'judged_metal' = 'METAL' THEN nullif(way.sign, 0) * ((root.detail->>'allowance_g')::numeric * 1000000)::bigint END AS allowance,
    CASE WHEN root.detail->>'judged_metal' = 'METAL' THEN way.sign * ((root.detail->>'limit_of_error_g')::numeric * 1000000) ^ 2 END AS limit_squared,
    coalesce(e.METAL_ug, 0) AS loss, root.business_date < $1::date AS of_before
  FROM record r
  LEFT JOIN record first ON first.workshop_id = r.workshop_id AND first.id = coalesce(r.reverses, nullif(r.detail->>'corrects', '')::uuid)
  LEFT JOIN record second ON second.workshop_id = r.workshop_id AND second.id = nullif(first.detail->>'corrects', '')::uuid
  JOIN record root ON root.workshop_id = r.workshop_id AND root.sequence = coalesce(second.sequence, first.sequence, r.sequence)
  CROSS JOIN LATERAL (SELECT CASE WHEN r.kind = 'weigh_back' THEN 1 WHEN r.kind = 'reversal' AND second.id IS NULL THEN -1 ELSE 0 END AS sign) way
  LEFT JOIN LATERAL (
    SELECT sum(e.METAL_ug)::bigint AS METAL_ug, min(e.lot_id::text)::uuid AS lot_id FROM entry e
    JOIN account a ON a.workshop_id = e.workshop_id AND a.id = e.account_id AND a.kind = 'working_loss'
    WHERE e.workshop_id = r.workshop_id AND e.voucher_sequence = r.sequence
  ) e ON true
  LEFT JOIN lot l ON l.workshop_id = r.workshop_id AND l.id = e.lot_id
  WHERE r.workshop_id = current_workshop() AND r.kind IN ('weigh_back', 'correction', 'reversal') AND root.kind = 'weigh_back'
    AND r.business_date BETWEEN $1::date AND $2::date`;

/** What settled sweeps gave back: their estimate, mended by the outturn, once nothing of the lot is left at a place. */
const SETTLED = `FROM entry e JOIN account a ON a.workshop_id = e.workshop_id AND a.id = e.account_id AND a.kind = 'working_loss'
  JOIN record v ON v.workshop_id = e.workshop_id AND v.sequence = e.voucher_sequence AND v.kind IN ('sweep_up', 'outturn')
  WHERE e.workshop_id = current_workshop() AND EXISTS (SELECT 1 FROM entry o JOIN record s ON s.workshop_id = o.workshop_id
    AND s.sequence = o.voucher_sequence AND s.kind = 'outturn' AND s.business_date BETWEEN $1::date AND $2::date
    WHERE o.workshop_id = e.workshop_id AND o.lot_id = e.lot_id)`;

const RECOVERED = {
  operation: `(SELECT grams(coalesce(-sum(e.METAL_ug), 0)::bigint) ${SETTLED} AND a.operation = x.operation)`,
  month: `(SELECT grams(coalesce(-sum(e.METAL_ug), 0)::bigint) ${SETTLED} AND EXISTS (SELECT 1 FROM entry o JOIN record s
    ON s.workshop_id = o.workshop_id AND s.sequence = o.voucher_sequence AND s.kind = 'outturn'
    WHERE o.workshop_id = e.workshop_id AND o.lot_id = e.lot_id AND to_char(s.business_date, 'YYYY-MM') = x.key))`,
} as const;
