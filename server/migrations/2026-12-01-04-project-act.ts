/**
 * What an act changes in the tables that the program reads: accounts, lots, persons, parties, prices, settings.
 * Called by `post_records` only. An act that changes no table (a test recorded, a dossier made) stands in the chain alone.
 */
import type { Migration } from './migration.ts';

export const projectAct: Migration = {
  name: '2026-12-01-04-project-act',
  up: `
    CREATE FUNCTION project_act(w uuid, n bigint, k text, d jsonb, on_day date, moment timestamptz) RETURNS void
      LANGUAGE plpgsql SET search_path = public, pg_temp AS $$
    BEGIN
      CASE k
        WHEN 'account_opened' THEN
          INSERT INTO account (workshop_id, id, kind, name, custodian_id, party_id, operation)
            VALUES (w, (d->>'account_id')::uuid, d->>'kind', d->>'name', (d->>'custodian_id')::uuid,
              (d->>'party_id')::uuid, d->>'operation');
        WHEN 'account_renamed' THEN
          UPDATE account SET name = d->>'name' WHERE workshop_id = w AND id = (d->>'account_id')::uuid;
        WHEN 'account_closed' THEN
          IF EXISTS (SELECT 1 FROM holding h WHERE h.workshop_id = w AND h.account_id = (d->>'account_id')::uuid AND h.gross_ug <> 0) THEN
            RAISE EXCEPTION 'an account that holds metal is not closed' USING ERRCODE = 'GW006';
          END IF;
          UPDATE account SET closed = true WHERE workshop_id = w AND id = (d->>'account_id')::uuid;
        WHEN 'custodian_changed' THEN
          UPDATE account SET custodian_id = (d->>'custodian_id')::uuid WHERE workshop_id = w AND id = (d->>'account_id')::uuid;
        WHEN 'lot_described' THEN
          INSERT INTO lot (workshop_id, id, code, form, alloy, owner_id, origin, gold_permille, silver_permille,
              platinum_permille, palladium_permille, basis, standing, hold_reason, hold_until, description, described_on)
            VALUES (w, (d->>'lot_id')::uuid, d->>'code', d->>'form', d->>'alloy', (d->>'owner_id')::uuid, d->>'origin',
              (d->>'gold_permille')::numeric, (d->>'silver_permille')::numeric, (d->>'platinum_permille')::numeric,
              (d->>'palladium_permille')::numeric, d->>'basis', coalesce(d->>'standing', 'released'), d->>'hold_reason',
              (d->>'hold_until')::date, coalesce(d->>'description', ''), on_day);
          INSERT INTO lot_parent (workshop_id, lot_id, parent_id)
            SELECT DISTINCT w, (d->>'lot_id')::uuid, (p->>'lot_id')::uuid FROM jsonb_array_elements(d->'parents') p;
          UPDATE workshop_head SET lot_serial = greatest(lot_serial, split_part(d->>'code', '-', 2)::bigint) WHERE workshop_id = w;
        WHEN 'lot_held' THEN
          UPDATE lot SET standing = 'on_hold', hold_reason = d->>'reason', hold_until = (d->>'until')::date
            WHERE workshop_id = w AND id = (d->>'lot_id')::uuid;
        WHEN 'lot_released' THEN
          UPDATE lot SET standing = 'released', hold_reason = NULL, hold_until = NULL
            WHERE workshop_id = w AND id = (d->>'lot_id')::uuid;
        WHEN 'handover_acknowledged' THEN
          UPDATE handover SET state = 'acknowledged', answered_at = moment, answer_note = d->>'how'
            WHERE workshop_id = w AND voucher_id = (d->>'voucher_id')::uuid AND to_person_id = (d->>'person_id')::uuid;
        WHEN 'handover_disputed' THEN
          UPDATE handover SET state = 'disputed', answered_at = moment, answered_gross_ug = ((d->>'gross_g')::numeric * 1000000)::bigint,
              answer_note = d->>'note'
            WHERE workshop_id = w AND voucher_id = (d->>'voucher_id')::uuid AND to_person_id = (d->>'person_id')::uuid;
        WHEN 'role_given' THEN
          INSERT INTO person (workshop_id, id, name, role, until)
            VALUES (w, (d->>'person_id')::uuid, d->>'name', d->>'role', (d->>'until')::date)
            ON CONFLICT (workshop_id, id) DO UPDATE
              SET name = excluded.name, role = excluded.role, until = excluded.until, active = true;
        WHEN 'role_ended' THEN
          UPDATE person SET active = false WHERE workshop_id = w AND id = (d->>'person_id')::uuid;
        WHEN 'party_set' THEN
          INSERT INTO party (workshop_id, id, kind, name) VALUES (w, (d->>'party_id')::uuid, d->>'kind', d->>'name')
            ON CONFLICT (workshop_id, id) DO UPDATE SET name = excluded.name;
        WHEN 'alloy_set' THEN
          INSERT INTO alloy (workshop_id, id, name, gold_permille, silver_permille, platinum_permille, palladium_permille,
              colour, source, retired)
            VALUES (w, (d->>'alloy_id')::uuid, d->>'name', (d->>'gold_permille')::numeric, (d->>'silver_permille')::numeric,
              (d->>'platinum_permille')::numeric, (d->>'palladium_permille')::numeric, d->>'colour', d->>'source',
              coalesce(d->>'retired', 'no') = 'yes')
            ON CONFLICT (workshop_id, id) DO UPDATE SET name = excluded.name, gold_permille = excluded.gold_permille,
              silver_permille = excluded.silver_permille, platinum_permille = excluded.platinum_permille,
              palladium_permille = excluded.palladium_permille, colour = excluded.colour, source = excluded.source,
              retired = excluded.retired;
        WHEN 'price_set' THEN
          INSERT INTO price (workshop_id, id, metal, currency, price_per_ozt, priced_on, source, sequence)
            VALUES (w, (d->>'price_id')::uuid, d->>'metal', d->>'currency', (d->>'price_per_ozt')::numeric,
              (d->>'priced_on')::date, d->>'source', n);
        WHEN 'allowance_set' THEN
          INSERT INTO allowance (workshop_id, id, operation, alloy, percent, fixed_ug, from_date, sequence)
            VALUES (w, (d->>'allowance_id')::uuid, d->>'operation', d->>'alloy', (d->>'percent')::numeric,
              ((d->>'fixed_g')::numeric * 1000000)::bigint, (d->>'from')::date, n);
        WHEN 'limit_set', 'estimate_set' THEN
          INSERT INTO setting (workshop_id, name, detail) VALUES (w, d->>'name', d)
            ON CONFLICT (workshop_id, name) DO UPDATE SET detail = excluded.detail;
        WHEN 'job_opened' THEN
          INSERT INTO job (workshop_id, id, code, title, customer_id, opened_on)
            VALUES (w, (d->>'job_id')::uuid, d->>'code', d->>'title', (d->>'customer_id')::uuid, on_day);
        WHEN 'period_closed' THEN
          INSERT INTO period (workshop_id, id, first_day, last_day, closed)
            VALUES (w, (d->>'period_id')::uuid, (d->>'from')::date, (d->>'to')::date, true);
        WHEN 'period_reopened' THEN
          UPDATE period SET closed = false WHERE workshop_id = w AND id = (d->>'period_id')::uuid;
        ELSE NULL;
      END CASE;
    END $$;
  `,
  down: 'DROP FUNCTION project_act',
};
