/**
 * What the workshop has set: parties, alloys, prices, allowances, settings, jobs, handovers. All of it is written by
 * acts of the chain (`project_act`), so that nobody relabels a price or a party unseen; addresses are not in the chain.
 */
import type { Migration } from './migration.ts';
import { wallRound } from './migration.ts';

export const masterData: Migration = {
  name: '2026-12-01-03-master-data',
  up: `
    CREATE TABLE party (
      workshop_id uuid NOT NULL REFERENCES workshop,
      id          uuid NOT NULL,
      kind        text NOT NULL CHECK (kind IN ('supplier', 'customer', 'refiner', 'outworker', 'courier')),
      name        text NOT NULL,
      email       text,
      phone       text,
      address     text,
      PRIMARY KEY (workshop_id, id)
    );
    CREATE TABLE alloy (
      workshop_id uuid NOT NULL REFERENCES workshop,
      id          uuid NOT NULL,
      name        text NOT NULL,
      gold_permille      numeric(8, 4) NOT NULL,
      silver_permille    numeric(8, 4) NOT NULL,
      platinum_permille  numeric(8, 4) NOT NULL,
      palladium_permille numeric(8, 4) NOT NULL,
      colour      text,
      source      text,
      retired     boolean NOT NULL DEFAULT false,
      PRIMARY KEY (workshop_id, id),
      UNIQUE (workshop_id, name),
      CHECK (gold_permille + silver_permille + platinum_permille + palladium_permille <= 1000)
    );
    CREATE TABLE price (
      workshop_id uuid NOT NULL REFERENCES workshop,
      id          uuid NOT NULL,
      metal       text NOT NULL,
      currency    char(3) NOT NULL,
      price_per_ozt numeric(18, 6) NOT NULL CHECK (price_per_ozt > 0),
      priced_on   date NOT NULL,
      source      text NOT NULL,
      sequence    bigint NOT NULL,
      PRIMARY KEY (workshop_id, id)
    );
    CREATE INDEX price_newest ON price (workshop_id, metal, currency, priced_on DESC, sequence DESC);
    CREATE TABLE allowance (
      workshop_id uuid NOT NULL REFERENCES workshop,
      id          uuid NOT NULL,
      operation   text NOT NULL,
      alloy       text,
      percent     numeric(8, 4) NOT NULL CHECK (percent BETWEEN 0 AND 100),
      fixed_ug    bigint NOT NULL CHECK (fixed_ug >= 0),
      from_date   date NOT NULL,
      sequence    bigint NOT NULL,
      PRIMARY KEY (workshop_id, id)
    );
    -- Limits and estimates by name: "filings", "invoice_tolerance", "claim:<account>:<metal>", "bin:<bin>:<operation>:<bench>".
    CREATE TABLE setting (
      workshop_id uuid NOT NULL REFERENCES workshop,
      name        text NOT NULL CHECK (length(name) BETWEEN 1 AND 200),
      detail      jsonb NOT NULL,
      PRIMARY KEY (workshop_id, name)
    );
    CREATE TABLE job (
      workshop_id uuid NOT NULL REFERENCES workshop,
      id          uuid NOT NULL,
      code        text NOT NULL,
      title       text NOT NULL,
      customer_id uuid,
      opened_on   date NOT NULL,
      PRIMARY KEY (workshop_id, id),
      UNIQUE (workshop_id, code),
      FOREIGN KEY (workshop_id, customer_id) REFERENCES party (workshop_id, id)
    );
    CREATE TABLE handover (
      workshop_id    uuid NOT NULL REFERENCES workshop,
      id             uuid NOT NULL,
      voucher_id     uuid NOT NULL,
      place_id       uuid NOT NULL,
      from_person_id uuid NOT NULL,
      to_person_id   uuid NOT NULL,
      state          text NOT NULL DEFAULT 'waiting' CHECK (state IN ('waiting', 'acknowledged', 'disputed')),
      answered_at    timestamptz,
      answered_gross_ug bigint,
      answer_note    text,
      PRIMARY KEY (workshop_id, id),
      FOREIGN KEY (workshop_id, voucher_id) REFERENCES record (workshop_id, id),
      FOREIGN KEY (workshop_id, place_id) REFERENCES account (workshop_id, id),
      FOREIGN KEY (workshop_id, from_person_id) REFERENCES person (workshop_id, id),
      FOREIGN KEY (workshop_id, to_person_id) REFERENCES person (workshop_id, id)
    );
    CREATE INDEX handover_by_voucher ON handover (workshop_id, voucher_id);
    CREATE INDEX handover_waiting ON handover (workshop_id, to_person_id) WHERE state IN ('waiting', 'disputed');

    ${['party', 'alloy', 'price', 'allowance', 'setting', 'job', 'handover'].map(wallRound).join('\n')}
    GRANT SELECT ON party, alloy, price, allowance, setting, job, handover TO grainward_app;
    GRANT UPDATE (email, phone, address) ON party TO grainward_app;
  `,
  down: null,
};
