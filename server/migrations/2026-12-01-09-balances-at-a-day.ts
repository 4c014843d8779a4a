/**
 * Balances at the end of a past day without a scan of the book: sums by day, and a snapshot for the first of each month
 * that was asked for. Both are filled when somebody asks, up to a sequence number, never in a posting's transaction;
 * a voucher dated back drops the snapshots after its day. They are derived: `check-book` recomputes from the entries.
 */
import type { Migration } from './migration.ts';
import { wallRound } from './migration.ts';

const MASSES = ['gross', 'gold', 'silver', 'platinum', 'palladium'] as const;
const each = (make: (mass: string) => string, glue = ', ') => MASSES.map(make).join(glue);
const columns = each((m) => `${m}_ug`);
const sums = (alias: string) => each((m) => `sum(${alias}.${m}_ug)::bigint AS ${m}_ug`);
const anyLeft = (alias: string) => each((m) => `sum(${alias}.${m}_ug) <> 0`, ' OR ');

export const balancesAtADay: Migration = {
  name: '2026-12-01-09-balances-at-a-day',
  up: `
    CREATE TABLE balance_roll (
      workshop_id uuid PRIMARY KEY REFERENCES workshop,
      sequence    bigint NOT NULL
    );
    CREATE TABLE balance_day (
      workshop_id   uuid NOT NULL,
      business_date date NOT NULL,
      account_id    uuid NOT NULL,
      lot_id        uuid NOT NULL,
      ${each((m) => `${m}_ug bigint NOT NULL`)},
      PRIMARY KEY (workshop_id, business_date, account_id, lot_id)
    );
    -- What was held before a month's first day; only what is not nothing. The second table says which are made.
    CREATE TABLE balance_month (
      workshop_id uuid NOT NULL,
      first_day   date NOT NULL,
      account_id  uuid NOT NULL,
      lot_id      uuid NOT NULL,
      ${each((m) => `${m}_ug bigint NOT NULL`)},
      PRIMARY KEY (workshop_id, first_day, account_id, lot_id)
    );
    CREATE TABLE balance_month_made (
      workshop_id uuid NOT NULL REFERENCES workshop,
      first_day   date NOT NULL,
      PRIMARY KEY (workshop_id, first_day)
    );
    ${['balance_roll', 'balance_day', 'balance_month', 'balance_month_made'].map(wallRound).join('\n')}
    GRANT SELECT ON balance_roll, balance_day, balance_month, balance_month_made TO grainward_app;

    CREATE FUNCTION roll_balances() RETURNS void LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp AS $$
    DECLARE w uuid := current_workshop(); done bigint; newest bigint; first_new date;
    BEGIN
      INSERT INTO balance_roll (workshop_id, sequence) VALUES (w, 0) ON CONFLICT DO NOTHING;
      SELECT sequence INTO STRICT done FROM balance_roll WHERE workshop_id = w FOR UPDATE;
      SELECT sequence INTO STRICT newest FROM workshop_head WHERE workshop_id = w;
      IF newest = done THEN RETURN; END IF;
      SELECT min(business_date) INTO first_new FROM entry
        WHERE workshop_id = w AND voucher_sequence > done AND voucher_sequence <= newest;
      INSERT INTO balance_day AS d (workshop_id, business_date, account_id, lot_id, ${columns})
        SELECT w, e.business_date, e.account_id, e.lot_id, ${sums('e')}
        FROM entry e JOIN account a ON a.workshop_id = w AND a.id = e.account_id AND (is_place(a.kind) OR a.kind = 'metal_account')
        WHERE e.workshop_id = w AND e.voucher_sequence > done AND e.voucher_sequence <= newest
        GROUP BY e.business_date, e.account_id, e.lot_id
        ON CONFLICT (workshop_id, business_date, account_id, lot_id)
          DO UPDATE SET ${each((m) => `${m}_ug = d.${m}_ug + excluded.${m}_ug`)};
      DELETE FROM balance_month WHERE workshop_id = w AND first_day > first_new;
      DELETE FROM balance_month_made WHERE workshop_id = w AND first_day > first_new;
      UPDATE balance_roll SET sequence = newest WHERE workshop_id = w;
    END $$;

    CREATE FUNCTION make_month_snapshot(p_first_day date) RETURNS void LANGUAGE plpgsql SECURITY DEFINER
      SET search_path = public, pg_temp AS $$
    DECLARE w uuid := current_workshop(); prior date;
    BEGIN
      IF EXISTS (SELECT 1 FROM balance_month_made WHERE workshop_id = w AND first_day = p_first_day) THEN RETURN; END IF;
      SELECT coalesce(max(first_day), '-infinity') INTO prior FROM balance_month_made
        WHERE workshop_id = w AND first_day < p_first_day;
      INSERT INTO balance_month (workshop_id, first_day, account_id, lot_id, ${columns})
        SELECT w, p_first_day, x.account_id, x.lot_id, ${sums('x')} FROM (
          SELECT account_id, lot_id, ${columns} FROM balance_month WHERE workshop_id = w AND first_day = prior
          UNION ALL
          SELECT account_id, lot_id, ${columns} FROM balance_day
            WHERE workshop_id = w AND business_date >= prior AND business_date < p_first_day
        ) x GROUP BY x.account_id, x.lot_id HAVING ${anyLeft('x')};
      INSERT INTO balance_month_made (workshop_id, first_day) VALUES (w, p_first_day);
    END $$;

    -- What places and metal accounts held at the end of a day, by lot; only what is not nothing.
    CREATE FUNCTION balances_at(p_day date)
      RETURNS TABLE (workshop_id uuid, account_id uuid, lot_id uuid, ${each((m) => `${m}_ug bigint`)})
      LANGUAGE plpgsql SECURITY DEFINER SET search_path = public, pg_temp SET plan_cache_mode = force_custom_plan AS $$
    DECLARE w uuid := current_workshop(); first date := date_trunc('month', p_day)::date;
    BEGIN
      PERFORM roll_balances();
      PERFORM make_month_snapshot(first);
      RETURN QUERY SELECT w, x.account_id, x.lot_id, ${sums('x')} FROM (
          SELECT m.account_id, m.lot_id, ${each((m) => `m.${m}_ug`)} FROM balance_month m WHERE m.workshop_id = w AND m.first_day = first
          UNION ALL
          SELECT d.account_id, d.lot_id, ${each((m) => `d.${m}_ug`)} FROM balance_day d
            WHERE d.workshop_id = w AND d.business_date BETWEEN first AND p_day
        ) x GROUP BY x.account_id, x.lot_id HAVING ${anyLeft('x')};
    END $$;

    REVOKE EXECUTE ON FUNCTION roll_balances, make_month_snapshot, balances_at FROM PUBLIC;
    GRANT EXECUTE ON FUNCTION balances_at TO grainward_app;

    -- The check of the whole book is run by the owner of the tables, who may see which workshops there are.
    CREATE POLICY workshop_list_for_owner ON workshop FOR SELECT TO grainward_owner USING (true);
  `,
  down: `
    DROP POLICY workshop_list_for_owner ON workshop;
    DROP FUNCTION balances_at, make_month_snapshot, roll_balances;
    DROP TABLE balance_month_made, balance_month, balance_day, balance_roll;
  `,
};
