/** Reads the workshop's registers whole; each is bounded, since no workshop has thousands of places or alloys. */
import type { z } from '../../../shared/schemas/zod.ts';
import {
  accountRow,
  allowanceRow,
  alloyRow,
  jobRow,
  partyRow,
  periodRow,
  priceRow,
  settingRow,
} from '../../../shared/schemas/registers.ts';
import type { Tx } from '../../db/rows.ts';

const MOST = 2000;

const register =
  <T>(row: z.ZodType<T>, sql: string) =>
  (tx: Tx): Promise<T[]> =>
    tx.rows(row, `${sql} LIMIT ${MOST}`);

export const readAccounts = register(
  accountRow,
  `SELECT a.id::text, a.kind, a.name, a.custodian_id::text, c.name AS custodian_name, a.party_id::text, p.name AS party_name,
      a.operation, a.closed, count(h.lot_id)::text AS lots,
      grams(coalesce(sum(h.gross_ug), 0)::bigint) AS gross_g, grams(coalesce(sum(h.gold_ug), 0)::bigint) AS gold_g,
      grams(coalesce(sum(h.silver_ug), 0)::bigint) AS silver_g, grams(coalesce(sum(h.platinum_ug), 0)::bigint) AS platinum_g,
      grams(coalesce(sum(h.palladium_ug), 0)::bigint) AS palladium_g
    FROM account a
    LEFT JOIN person c ON c.workshop_id = a.workshop_id AND c.id = a.custodian_id
    LEFT JOIN party p ON p.workshop_id = a.workshop_id AND p.id = a.party_id
    LEFT JOIN holding h ON h.workshop_id = a.workshop_id AND h.account_id = a.id
      AND (h.gross_ug <> 0 OR h.gold_ug <> 0 OR h.silver_ug <> 0 OR h.platinum_ug <> 0 OR h.palladium_ug <> 0)
    WHERE a.workshop_id = current_workshop()
    GROUP BY a.workshop_id, a.id, c.name, p.name ORDER BY a.closed, a.name`,
);

export const readParties = register(
  partyRow,
  `SELECT id::text, kind, name, email, phone, address FROM party WHERE workshop_id = current_workshop() ORDER BY name`,
);

export const readAlloys = register(
  alloyRow,
  `SELECT id::text, name, trim_scale(gold_permille)::text AS gold_permille, trim_scale(silver_permille)::text AS silver_permille,
      trim_scale(platinum_permille)::text AS platinum_permille, trim_scale(palladium_permille)::text AS palladium_permille,
      colour, source, retired
    FROM alloy WHERE workshop_id = current_workshop() ORDER BY retired, name`,
);

export const readPrices = register(
  priceRow,
  `SELECT id::text, metal, currency, trim_scale(price_per_ozt)::text AS price_per_ozt, priced_on::text, source
    FROM price WHERE workshop_id = current_workshop() ORDER BY priced_on DESC, sequence DESC`,
);

export const readAllowances = register(
  allowanceRow,
  `SELECT id::text, operation, alloy, trim_scale(percent)::text AS percent, grams(fixed_ug) AS fixed_g, from_date::text
    FROM allowance WHERE workshop_id = current_workshop() ORDER BY operation, from_date DESC, sequence DESC`,
);

export const readJobs = register(
  jobRow,
  `SELECT j.id::text, j.code, j.title, j.customer_id::text, p.name AS customer_name, j.opened_on::text
    FROM job j LEFT JOIN party p ON p.workshop_id = j.workshop_id AND p.id = j.customer_id
    WHERE j.workshop_id = current_workshop() ORDER BY j.opened_on DESC, j.code DESC`,
);

export const readPeriods = register(
  periodRow,
  `SELECT id::text, first_day::text, last_day::text, closed FROM period WHERE workshop_id = current_workshop() ORDER BY first_day DESC`,
);

export const readSettingRows = register(
  settingRow,
  `SELECT name, detail FROM setting WHERE workshop_id = current_workshop() ORDER BY name`,
);
