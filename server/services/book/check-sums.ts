/**
 * Recomputes what the program reads beside the chain: balances (whole, by job and by day) from the entries, and the
 * registers of accounts, lots and prices from the acts that set them. One statement each, so that a posting in between is seen whole or
 * not at all.
 */
import type { BookFault } from '../../../shared/schemas/book-check.ts';
import { MOST_FAULTS } from '../../../shared/schemas/book-check.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { Tx } from '../../db/rows.ts';

const MASSES = ['gross', 'gold', 'silver', 'platinum', 'palladium'] as const;
const sums = MASSES.map((m) => `sum(e.${m}_ug)::bigint AS ${m}_ug`).join(', ');
const differ = [...MASSES.map((m) => `${m}_ug`), 'pieces']
  .map((c) => `coalesce(h.${c}, 0) <> coalesce(s.${c}, 0)`)
  .join(' OR ');

const wrong = z.object({
  sequence: z.string().nullable(),
  kind: z.string().nullable(),
  what: z.string(),
  stored: z.string(),
  reckoned: z.string(),
});

/** Balances that are not the sum of their entries. The voucher named is the last that touched them. */
export async function balanceFaults(tx: Tx): Promise<{ balances: number; faults: BookFault[] }> {
  const { count } = await tx.one(
    z.object({ count: z.coerce.number() }),
    'SELECT count(*)::text AS count FROM holding WHERE workshop_id = current_workshop()',
  );
  const found = [await tx.rows(wrong, HOLDINGS), await tx.rows(wrong, BY_JOB), await tx.rows(wrong, BY_DAY)];
  const faults = found.flat().map(({ sequence, kind, what, stored, reckoned }) => ({
    check: 'balance' as const,
    sequence,
    kind,
    sentence: `${what}: the balance says ${stored} g, its entries ${reckoned} g; no. ${sequence ?? 'none'} was the last of them.`,
  }));
  return { balances: count, faults };
}

/** Accounts, lots and prices that are not what their acts made them. */
export async function registerFaults(tx: Tx): Promise<BookFault[]> {
  const rows = await tx.rows(wrong, REGISTERS);
  return rows.map(({ sequence, kind, what }) => ({
    check: 'register',
    sequence,
    kind,
    sentence: `${what} is not as no. ${sequence ?? 'none'} recorded it.`,
  }));
}

const WHAT = `coalesce((SELECT a.name FROM account a WHERE a.workshop_id = current_workshop() AND a.id = account_id), 'no account')
  || ', lot ' || coalesce((SELECT l.code FROM lot l WHERE l.workshop_id = current_workshop() AND l.id = lot_id), 'none')`;
const ROW = `s.last::text AS sequence, (SELECT r.kind FROM record r WHERE r.workshop_id = current_workshop() AND r.sequence = s.last) AS kind,
  ${WHAT} AS what, grams(coalesce(h.gross_ug, 0)) AS stored, grams(coalesce(s.gross_ug, 0)) AS reckoned`;
const SUMS = `SELECT e.account_id, e.lot_id, ${sums}, sum(e.pieces)::bigint AS pieces, max(e.voucher_sequence) AS last
  FROM entry e WHERE e.workshop_id = current_workshop() GROUP BY e.account_id, e.lot_id`;

const HOLDINGS = `SELECT ${ROW} FROM (SELECT * FROM holding WHERE workshop_id = current_workshop()) h
  FULL JOIN (${SUMS}) s USING (account_id, lot_id)
  LEFT JOIN account a ON a.workshop_id = current_workshop() AND a.id = account_id
  WHERE ${differ} OR h.in_place IS DISTINCT FROM is_place(a.kind) LIMIT ${MOST_FAULTS}`;

const BY_JOB = `SELECT ${ROW} FROM (SELECT e.account_id, e.lot_id, ${sums}, sum(e.pieces)::bigint AS pieces
    FROM job_holding e WHERE e.workshop_id = current_workshop() GROUP BY e.account_id, e.lot_id) h
  FULL JOIN (SELECT x.* FROM (${SUMS}) x JOIN account a ON a.workshop_id = current_workshop() AND a.id = x.account_id
    AND a.kind IN ('bench', 'station', 'outworker')) s USING (account_id, lot_id)
  WHERE ${differ} LIMIT ${MOST_FAULTS}`;

/** The sums by day, up to where they were last filled. */
const BY_DAY = `SELECT ${ROW} FROM (SELECT e.account_id, e.lot_id, ${sums}, NULL::bigint AS pieces
    FROM balance_day e WHERE e.workshop_id = current_workshop() GROUP BY e.account_id, e.lot_id) h
  FULL JOIN (SELECT e.account_id, e.lot_id, ${sums}, NULL::bigint AS pieces, max(e.voucher_sequence) AS last
    FROM entry e JOIN account a ON a.workshop_id = e.workshop_id AND a.id = e.account_id AND (is_place(a.kind) OR a.kind = 'metal_account')
    WHERE e.workshop_id = current_workshop()
      AND e.voucher_sequence <= (SELECT b.sequence FROM balance_roll b WHERE b.workshop_id = current_workshop())
    GROUP BY e.account_id, e.lot_id) s USING (account_id, lot_id)
  WHERE ${differ} LIMIT ${MOST_FAULTS}`;

const acts = (kinds: string, key: string) =>
  `(SELECT DISTINCT ON (r.detail->>'${key}') r.sequence, r.kind, r.detail, r.detail->>'${key}' AS key FROM record r
     WHERE r.workshop_id = current_workshop() AND r.kind IN (${kinds}) ORDER BY r.detail->>'${key}', r.sequence DESC)`;
const differs = (columns: readonly string[], cast = '') =>
  columns.map((c) => `t.${c}${cast} IS DISTINCT FROM (d.detail->>'${c}')${cast}`).join(' OR ');
const PERMILLES = ['gold_permille', 'silver_permille', 'platinum_permille', 'palladium_permille'];
const row = (what: string) => `d.sequence::text, d.kind, ${what} AS what, '' AS stored, '' AS reckoned`;

const REGISTERS = `
  SELECT ${row("'The account ' || coalesce(t.name, d.detail->>'name')")} FROM ${acts("'account_opened', 'account_renamed'", 'account_id')} d
    FULL JOIN (SELECT * FROM account WHERE workshop_id = current_workshop()) t ON t.id::text = d.key
    WHERE t.name IS DISTINCT FROM d.detail->>'name'
  UNION ALL
  SELECT ${row("'The account ' || coalesce(t.name, d.detail->>'name')")} FROM ${acts("'account_opened'", 'account_id')} d
    FULL JOIN (SELECT * FROM account WHERE workshop_id = current_workshop()) t ON t.id::text = d.key
    WHERE t.kind IS DISTINCT FROM d.detail->>'kind' OR t.operation IS DISTINCT FROM d.detail->>'operation'
  UNION ALL
  SELECT ${row("'The lot ' || coalesce(t.code, d.detail->>'code')")} FROM ${acts("'lot_described'", 'lot_id')} d
    FULL JOIN (SELECT * FROM lot WHERE workshop_id = current_workshop()) t ON t.id::text = d.key
    WHERE ${differs(['code', 'form', 'alloy', 'origin', 'basis'])}
      OR t.owner_id::text IS DISTINCT FROM d.detail->>'owner_id' OR ${differs(PERMILLES, '::numeric')}
  UNION ALL
  SELECT ${row("'The price of ' || coalesce(t.metal, d.detail->>'metal')")} FROM ${acts("'price_set'", 'price_id')} d
    FULL JOIN (SELECT * FROM price WHERE workshop_id = current_workshop()) t ON t.id::text = d.key
    WHERE ${differs(['metal', 'source'])} OR ${differs(['price_per_ozt'], '::numeric')}
      OR ${differs(['priced_on'], '::date')}
  LIMIT ${MOST_FAULTS}`;
