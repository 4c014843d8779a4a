/**
 * The book: accounts, lots, records, entries and holdings, with the rules of the book as constraints and triggers.
 * Only `post_records` (next migrations) writes here; the program's role may read.
 */
import type { Migration } from './migration.ts';
import { wallRound } from './migration.ts';

const masses = (suffix: string) =>
  ['gross_ug', 'gold_ug', 'silver_ug', 'platinum_ug', 'palladium_ug']
    .map((m) => `${m} bigint ${suffix}`)
    .join(',\n      ');

export const bookTables: Migration = {
  name: '2026-12-01-02-book-tables',
  up: `
    CREATE FUNCTION is_place(kind text) RETURNS boolean LANGUAGE sql IMMUTABLE AS $$
      SELECT kind IN ('safe', 'bench', 'station', 'bin', 'outworker', 'approval', 'courier', 'refiner') $$;
    CREATE FUNCTION is_voucher_kind(kind text) RETURNS boolean LANGUAGE sql IMMUTABLE AS $$
      SELECT kind IN ('opening', 'weigh_in', 'transfer', 'issue', 'weigh_back', 'melt', 'rework', 'delivery', 'sweep_up',
        'consign', 'arrive', 'outturn', 'settle', 'use_up', 'count', 'reassay', 'ownership', 'return_to_owner',
        'write_off', 'correction', 'reversal') $$;
    CREATE FUNCTION is_act_kind(kind text) RETURNS boolean LANGUAGE sql IMMUTABLE AS $$
      SELECT kind IN ('account_opened', 'account_renamed', 'account_closed', 'custodian_changed', 'lot_described',
        'lot_held', 'lot_released', 'handover_acknowledged', 'handover_disputed', 'test_recorded', 'count_taken',
        'role_given', 'role_ended', 'party_set', 'alloy_set', 'price_set', 'allowance_set', 'limit_set', 'balance_set',
        'balance_checked', 'estimate_set', 'job_opened', 'night_checked', 'dispute_opened', 'dispute_closed',
        'attribution_corrected', 'period_closed', 'period_reopened', 'dossier_made', 'key_changed') $$;

    CREATE TABLE account (
      workshop_id  uuid NOT NULL REFERENCES workshop,
      id           uuid NOT NULL,
      kind         text NOT NULL CHECK (is_place(kind) OR kind IN ('metal_account', 'supplier', 'customer', 'sold',
        'opening_stock', 'working_loss', 'count_variance', 'assay_variance', 'processors_deduction', 'used_up',
        'written_off', 'foreign_matter')),
      name         text NOT NULL,
      custodian_id uuid,
      party_id     uuid,
      operation    text,
      closed       boolean NOT NULL DEFAULT false,
      PRIMARY KEY (workshop_id, id),
      FOREIGN KEY (workshop_id, custodian_id) REFERENCES person (workshop_id, id)
    );
    CREATE UNIQUE INDEX account_one_per_operation ON account (workshop_id, operation) WHERE kind = 'working_loss';
    CREATE INDEX account_by_party ON account (workshop_id, party_id) WHERE party_id IS NOT NULL;

    CREATE TABLE lot (
      workshop_id uuid NOT NULL REFERENCES workshop,
      id          uuid NOT NULL,
      code        text NOT NULL,
      form        text NOT NULL,
      alloy       text,
      owner_id    uuid,
      origin      text NOT NULL,
      gold_permille      numeric(8, 4) NOT NULL CHECK (gold_permille BETWEEN 0 AND 1000),
      silver_permille    numeric(8, 4) NOT NULL CHECK (silver_permille BETWEEN 0 AND 1000),
      platinum_permille  numeric(8, 4) NOT NULL CHECK (platinum_permille BETWEEN 0 AND 1000),
      palladium_permille numeric(8, 4) NOT NULL CHECK (palladium_permille BETWEEN 0 AND 1000),
      basis       text NOT NULL,
      standing    text NOT NULL CHECK (standing IN ('on_hold', 'released', 'spent')),
      hold_reason text,
      hold_until  date,
      description text NOT NULL DEFAULT '',
      described_on date NOT NULL,
      PRIMARY KEY (workshop_id, id),
      UNIQUE (workshop_id, code),
      CHECK (gold_permille + silver_permille + platinum_permille + palladium_permille <= 1000)
    );
    CREATE TABLE lot_parent (
      workshop_id uuid NOT NULL,
      lot_id      uuid NOT NULL,
      parent_id   uuid NOT NULL,
      PRIMARY KEY (workshop_id, lot_id, parent_id),
      FOREIGN KEY (workshop_id, lot_id) REFERENCES lot (workshop_id, id),
      FOREIGN KEY (workshop_id, parent_id) REFERENCES lot (workshop_id, id)
    );
    CREATE INDEX lot_parent_by_parent ON lot_parent (workshop_id, parent_id);

    CREATE TABLE record (
      workshop_id   uuid NOT NULL REFERENCES workshop,
      sequence      bigint NOT NULL CHECK (sequence > 0),
      id            uuid NOT NULL,
      kind          text NOT NULL CHECK (is_voucher_kind(kind) OR is_act_kind(kind)),
      business_date date NOT NULL,
      recorded_at   timestamptz NOT NULL,
      recorded_by   uuid NOT NULL,
      approved_by   uuid,
      reverses      uuid,
      note          text,
      detail        jsonb NOT NULL,
      documents     jsonb NOT NULL,
      operation     text,
      bench         uuid,
      person_id     uuid,
      job_id        uuid,
      counterparty_id uuid,
      line          text NOT NULL,
      previous_hash char(64) NOT NULL,
      hash          char(64) NOT NULL,
      PRIMARY KEY (workshop_id, sequence),
      UNIQUE (workshop_id, id),
      FOREIGN KEY (workshop_id, recorded_by) REFERENCES person (workshop_id, id),
      FOREIGN KEY (workshop_id, approved_by) REFERENCES person (workshop_id, id),
      FOREIGN KEY (workshop_id, reverses) REFERENCES record (workshop_id, id),
      CHECK ((kind = 'reversal') = (reverses IS NOT NULL))
    );
    CREATE UNIQUE INDEX record_reversed_once ON record (workshop_id, reverses) WHERE reverses IS NOT NULL;
    CREATE INDEX record_by_kind ON record (workshop_id, kind, sequence DESC);
    CREATE INDEX record_by_date ON record (workshop_id, business_date, sequence);
    CREATE INDEX record_by_job ON record (workshop_id, job_id, sequence) WHERE job_id IS NOT NULL;

    CREATE TABLE entry (
      workshop_id      uuid NOT NULL,
      voucher_sequence bigint NOT NULL,
      line             integer NOT NULL CHECK (line > 0),
      account_id       uuid NOT NULL,
      lot_id           uuid NOT NULL,
      business_date    date NOT NULL,
      ${masses('NOT NULL')},
      pieces           bigint,
      PRIMARY KEY (workshop_id, voucher_sequence, line),
      FOREIGN KEY (workshop_id, voucher_sequence) REFERENCES record (workshop_id, sequence),
      FOREIGN KEY (workshop_id, account_id) REFERENCES account (workshop_id, id),
      FOREIGN KEY (workshop_id, lot_id) REFERENCES lot (workshop_id, id)
    );
    CREATE INDEX entry_by_account ON entry (workshop_id, account_id, lot_id, business_date);
    CREATE INDEX entry_by_lot ON entry (workshop_id, lot_id, voucher_sequence);
    CREATE INDEX entry_by_date ON entry (workshop_id, business_date);

    CREATE TABLE holding (
      workshop_id uuid NOT NULL,
      account_id  uuid NOT NULL,
      lot_id      uuid NOT NULL,
      in_place    boolean NOT NULL,
      ${masses('NOT NULL')},
      pieces      bigint,
      PRIMARY KEY (workshop_id, account_id, lot_id),
      FOREIGN KEY (workshop_id, account_id) REFERENCES account (workshop_id, id),
      FOREIGN KEY (workshop_id, lot_id) REFERENCES lot (workshop_id, id),
      CONSTRAINT place_never_below_nothing CHECK (NOT in_place OR (gross_ug >= 0 AND gold_ug >= 0 AND silver_ug >= 0
        AND platinum_ug >= 0 AND palladium_ug >= 0 AND coalesce(pieces, 0) >= 0)),
      CONSTRAINT place_fine_within_gross CHECK (NOT in_place
        OR gold_ug + silver_ug + platinum_ug + palladium_ug <= gross_ug)
    ) WITH (fillfactor = 70);
    CREATE INDEX holding_not_zero ON holding (workshop_id, lot_id, account_id)
      WHERE gross_ug <> 0 OR gold_ug <> 0 OR silver_ug <> 0 OR platinum_ug <> 0 OR palladium_ug <> 0;

    -- The same at a work place, told by job; the nil id stands for stock work.
    CREATE TABLE job_holding (
      workshop_id uuid NOT NULL,
      account_id  uuid NOT NULL,
      lot_id      uuid NOT NULL,
      job_id      uuid NOT NULL,
      ${masses('NOT NULL')},
      pieces      bigint,
      PRIMARY KEY (workshop_id, account_id, lot_id, job_id)
    ) WITH (fillfactor = 70);

    CREATE TABLE period (
      workshop_id uuid NOT NULL REFERENCES workshop,
      id          uuid NOT NULL,
      first_day   date NOT NULL,
      last_day    date NOT NULL,
      closed      boolean NOT NULL,
      PRIMARY KEY (workshop_id, id),
      CHECK (first_day <= last_day)
    );

    CREATE FUNCTION refuse_change() RETURNS trigger LANGUAGE plpgsql AS $$
      BEGIN
        RAISE EXCEPTION 'records and entries are never changed or removed' USING ERRCODE = 'GW002';
      END $$;
    CREATE TRIGGER record_unchanged BEFORE UPDATE OR DELETE OR TRUNCATE ON record
      FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();
    CREATE TRIGGER entry_unchanged BEFORE UPDATE OR DELETE OR TRUNCATE ON entry
      FOR EACH STATEMENT EXECUTE FUNCTION refuse_change();

    CREATE FUNCTION entries_balance() RETURNS trigger LANGUAGE plpgsql AS $$
      BEGIN
        IF EXISTS (
          SELECT 1 FROM added GROUP BY workshop_id, voucher_sequence
          HAVING count(*) < 2 OR sum(gross_ug) <> 0 OR sum(gold_ug) <> 0 OR sum(silver_ug) <> 0
            OR sum(platinum_ug) <> 0 OR sum(palladium_ug) <> 0
        ) THEN
          RAISE EXCEPTION 'a voucher has two entries or more and sums to zero in all five masses' USING ERRCODE = 'GW001';
        END IF;
        RETURN NULL;
      END $$;
    CREATE TRIGGER entry_balances AFTER INSERT ON entry REFERENCING NEW TABLE AS added
      FOR EACH STATEMENT EXECUTE FUNCTION entries_balance();

    ${['account', 'lot', 'lot_parent', 'record', 'entry', 'holding', 'job_holding', 'period'].map(wallRound).join('\n')}
    GRANT SELECT ON account, lot, lot_parent, record, entry, holding, job_holding, period TO grainward_app;
  `,
  down: null,
};
