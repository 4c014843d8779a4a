/**
 * Workshops, the persons in them and the head of each workshop's chain. Sign-in accounts stand in a migration of
 * their own; a person here is somebody whom the book names.
 */
import type { Migration } from './migration.ts';
import { wallRound } from './migration.ts';

export const workshopsAndPersons: Migration = {
  name: '2026-12-01-01-workshops-and-persons',
  up: `
    CREATE FUNCTION current_workshop() RETURNS uuid LANGUAGE sql STABLE AS
      $$ SELECT nullif(current_setting('grainward.workshop', true), '')::uuid $$;
    CREATE FUNCTION current_login() RETURNS uuid LANGUAGE sql STABLE AS
      $$ SELECT nullif(current_setting('grainward.user', true), '')::uuid $$;

    CREATE TABLE workshop (
      workshop_id uuid PRIMARY KEY,
      name        text NOT NULL CHECK (length(name) BETWEEN 1 AND 120),
      time_zone   text NOT NULL,
      currency    char(3) NOT NULL,
      mass_unit   text NOT NULL DEFAULT 'g',
      second_factor_roles text[] NOT NULL DEFAULT '{}',
      created_at  timestamptz NOT NULL DEFAULT now()
    );

    CREATE TABLE person (
      workshop_id uuid NOT NULL REFERENCES workshop,
      id          uuid NOT NULL,
      name        text NOT NULL,
      role        text NOT NULL CHECK (role IN ('proprietor', 'keeper', 'goldsmith', 'auditor')),
      active      boolean NOT NULL DEFAULT true,
      until       date,
      user_id     uuid,
      pin_hash    text,
      pin_failures integer NOT NULL DEFAULT 0,
      pin_paused_until timestamptz,
      PRIMARY KEY (workshop_id, id),
      UNIQUE (workshop_id, user_id)
    );

    -- One row per workshop, locked by every posting: it gives number and hash, and orders the writers.
    CREATE TABLE workshop_head (
      workshop_id      uuid PRIMARY KEY REFERENCES workshop,
      sequence         bigint NOT NULL DEFAULT 0,
      hash             char(64) NOT NULL DEFAULT repeat('0', 64),
      last_recorded_at timestamptz NOT NULL DEFAULT '-infinity',
      lot_serial       bigint NOT NULL DEFAULT 0
    );

    ${wallRound('person')}
    ${wallRound('workshop_head')}
    ALTER TABLE workshop ENABLE ROW LEVEL SECURITY;
    ALTER TABLE workshop FORCE ROW LEVEL SECURITY;
    CREATE POLICY workshop_itself ON workshop
      USING (workshop_id = current_workshop()) WITH CHECK (workshop_id = current_workshop());
    -- Somebody who has signed in may see in which workshops he or she has a role, and nothing else of them.
    CREATE POLICY person_own_roles ON person FOR SELECT USING (user_id = current_login());
    CREATE POLICY workshop_of_own_role ON workshop FOR SELECT
      USING (EXISTS (SELECT 1 FROM person p WHERE p.workshop_id = workshop.workshop_id AND p.user_id = current_login()));

    CREATE FUNCTION open_workshop(p_name text, p_time_zone text, p_currency text) RETURNS void
      LANGUAGE sql SECURITY DEFINER SET search_path = public, pg_temp AS $$
        INSERT INTO workshop (workshop_id, name, time_zone, currency)
          VALUES (current_workshop(), p_name, p_time_zone, p_currency);
        INSERT INTO workshop_head (workshop_id) VALUES (current_workshop());
      $$;

    GRANT SELECT ON workshop, person, workshop_head TO grainward_app;
    GRANT UPDATE (name, time_zone, currency, mass_unit, second_factor_roles) ON workshop TO grainward_app;
    GRANT UPDATE (user_id, pin_hash, pin_failures, pin_paused_until) ON person TO grainward_app;
    GRANT EXECUTE ON FUNCTION open_workshop TO grainward_app;
  `,
  down: null,
};
