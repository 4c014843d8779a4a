/** Balances by place, metal, owner or lot, now or at the end of any past day, in three parts that are never mixed. */
import { valueOf } from '../../../shared/insurance/valuation.ts';
import { ZERO_MASS, addMass, massFromJson, massToJson } from '../../../shared/mass/vector.ts';
import type { BalanceRow, BalancesJson } from '../../../shared/schemas/reports.ts';
import { PARTS, balanceRow } from '../../../shared/schemas/reports.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { Tx } from '../../db/rows.ts';
import { asPrices, pricesOn } from '../reads/prices.ts';

const METALS = ['gold', 'silver', 'platinum', 'palladium'] as const;
const MASSES = ['gross', ...METALS] as const;

export type BalancesBy = 'place' | 'metal' | 'owner' | 'lot';

/** Balances with their values at the prices of that day. A date of today or later is now. */
export async function readBalances(tx: Tx, by: BalancesBy, on: string | undefined): Promise<BalancesJson> {
  const { today, currency } = await tx.one(
    z.object({ today: z.string(), currency: z.string() }),
    'SELECT (clock_timestamp() AT TIME ZONE time_zone)::date::text AS today, currency FROM workshop WHERE workshop_id = current_workshop()',
  );
  const date = on === undefined || on > today ? today : on;
  const prices = await pricesOn(tx, date);
  const rows = await tx.rows(balanceRow, balancesSql(by, date < today), date < today ? [date] : []);
  const worth = (row: Pick<BalanceRow, `${(typeof MASSES)[number]}_g`>) =>
    valueOf(massFromJson(row), asPrices(prices))?.toFixed(2) ?? null;
  const totals = PARTS.map((part) => {
    const masses = massToJson(
      rows
        .filter((row) => row.part === part)
        .reduce((sum, row) => addMass(sum, massFromJson(row)), ZERO_MASS),
    );
    return { part, ...masses, value: worth(masses) };
  });
  return { on: date, currency, prices, rows: rows.map((row) => ({ ...row, value: worth(row) })), totals };
}

/** Holdings now, or what the snapshots and sums by day say of a past one. */
function balancesSql(by: BalancesBy, past: boolean): string {
  const sums = MASSES.map((m) => `sum(h.${m}_ug)::bigint AS ${m}_ug`).join(', ');
  const held = past
    ? 'SELECT * FROM balances_at($1::date)'
    : `SELECT h.workshop_id, h.account_id, h.lot_id, ${MASSES.map((m) => `h.${m}_ug`).join(', ')} FROM holding h
       WHERE h.workshop_id = current_workshop() AND (h.gross_ug <> 0 OR h.gold_ug <> 0 OR h.silver_ug <> 0 OR h.platinum_ug <> 0 OR h.palladium_ug <> 0)`;
  const part = `CASE WHEN a.kind = 'metal_account' THEN 'claim' WHEN l.basis IN ('estimated', 'unknown') THEN 'estimated' ELSE 'weighed' END`;
  const from = `FROM (${held}) h JOIN account a ON a.workshop_id = h.workshop_id AND a.id = h.account_id
    JOIN lot l ON l.workshop_id = h.workshop_id AND l.id = h.lot_id LEFT JOIN party o ON o.workshop_id = l.workshop_id AND o.id = l.owner_id
    WHERE is_place(a.kind) OR a.kind = 'metal_account'`;
  const grams = MASSES.map((m) => `grams(x.${m}_ug) AS ${m}_g`).join(', ');
  const outer = (inner: string) => `SELECT x.key, x.name, x.kind, x.part, ${grams} FROM (${inner}) x
    WHERE x.gross_ug <> 0 OR x.gold_ug <> 0 OR x.silver_ug <> 0 OR x.platinum_ug <> 0 OR x.palladium_ug <> 0 ORDER BY x.kind NULLS LAST, x.name, x.part DESC LIMIT 5000`;
  switch (by) {
    case 'place':
      return outer(
        `SELECT a.id::text AS key, a.name, a.kind, ${part} AS part, ${sums} ${from} GROUP BY a.id, a.name, a.kind, ${part}`,
      );
    case 'owner':
      return outer(
        `SELECT coalesce(l.owner_id::text, 'house') AS key, coalesce(o.name, 'House') AS name, NULL AS kind, ${part} AS part, ${sums} ${from} GROUP BY l.owner_id, o.name, ${part}`,
      );
    case 'lot':
      return outer(
        `SELECT l.id::text AS key, l.code || ' ' || l.description AS name, NULL AS kind, ${part} AS part, ${sums} ${from} GROUP BY l.id, l.code, l.description, ${part}`,
      );
    case 'metal': {
      const columns = MASSES.map((m) =>
        m === 'gross'
          ? 'sum(m.ug)::bigint AS gross_ug'
          : `(sum(m.ug) FILTER (WHERE m.metal = '${m}'))::bigint AS ${m}_ug`,
      );
      return outer(
        `SELECT m.metal AS key, initcap(m.metal) AS name, NULL AS kind, ${part} AS part, ${columns.map((c) => c.replace(/\((sum.*)\)::bigint/, 'coalesce($1, 0)::bigint')).join(', ')}
         ${from.replace('WHERE is_place', `CROSS JOIN LATERAL (VALUES ${METALS.map((m) => `('${m}', h.${m}_ug)`).join(', ')}) AS m(metal, ug) WHERE is_place`)} GROUP BY m.metal, ${part}`,
      );
    }
  }
}
