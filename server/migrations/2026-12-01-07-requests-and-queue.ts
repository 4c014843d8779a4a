/**
 * What is asked but not yet in the book: request keys (so that the same request records once), acts that wait for a
 * second signature, goldsmiths' requests for metal, and the queue of long work.
 */
import type { Migration } from './migration.ts';
import { wallRound } from './migration.ts';

export const requestsAndQueue: Migration = {
  name: '2026-12-01-07-requests-and-queue',
  up: `
    CREATE TABLE request_key (
      workshop_id uuid NOT NULL REFERENCES workshop,
      key         text NOT NULL CHECK (length(key) BETWEEN 8 AND 100),
      person_id   uuid NOT NULL,
      body_sha256 char(64) NOT NULL,
      status      integer,
      answer      jsonb,
      made_at     timestamptz NOT NULL DEFAULT now(),
      PRIMARY KEY (workshop_id, key)
    );

    CREATE TABLE signature_request (
      workshop_id  uuid NOT NULL REFERENCES workshop,
      id           uuid NOT NULL,
      event        text NOT NULL,
      input        jsonb NOT NULL,
      preview      jsonb NOT NULL,
      reason       text NOT NULL,
      requested_by uuid NOT NULL,
      requested_at timestamptz NOT NULL DEFAULT now(),
      state        text NOT NULL DEFAULT 'waiting' CHECK (state IN ('waiting', 'approved', 'refused', 'withdrawn')),
      decided_by   uuid,
      decided_at   timestamptz,
      decision_note text,
      answer       jsonb,
      PRIMARY KEY (workshop_id, id),
      FOREIGN KEY (workshop_id, requested_by) REFERENCES person (workshop_id, id),
      FOREIGN KEY (workshop_id, decided_by) REFERENCES person (workshop_id, id)
    );
    CREATE INDEX signature_request_waiting ON signature_request (workshop_id, requested_at) WHERE state = 'waiting';

    CREATE TABLE metal_request (
      workshop_id uuid NOT NULL REFERENCES workshop,
      id          uuid NOT NULL,
      person_id   uuid NOT NULL,
      place_id    uuid NOT NULL,
      alloy       text,
      form        text,
      mass_ug     bigint NOT NULL CHECK (mass_ug > 0),
      job_id      uuid,
      note        text,
      state       text NOT NULL DEFAULT 'waiting' CHECK (state IN ('waiting', 'answered', 'declined', 'withdrawn')),
      voucher_id  uuid,
      made_at     timestamptz NOT NULL DEFAULT now(),
      PRIMARY KEY (workshop_id, id),
      FOREIGN KEY (workshop_id, person_id) REFERENCES person (workshop_id, id),
      FOREIGN KEY (workshop_id, place_id) REFERENCES account (workshop_id, id),
      FOREIGN KEY (workshop_id, job_id) REFERENCES job (workshop_id, id)
    );

    CREATE TABLE background_job (
      workshop_id uuid NOT NULL REFERENCES workshop,
      id          uuid NOT NULL,
      kind        text NOT NULL,
      input       jsonb NOT NULL,
      state       text NOT NULL DEFAULT 'queued' CHECK (state IN ('queued', 'running', 'done', 'failed')),
      step        text NOT NULL DEFAULT '',
      done_parts  integer NOT NULL DEFAULT 0,
      all_parts   integer NOT NULL DEFAULT 0,
      result      jsonb,
      attempts    integer NOT NULL DEFAULT 0,
      made_by     uuid NOT NULL,
      made_at     timestamptz NOT NULL DEFAULT now(),
      heartbeat_at timestamptz,
      ended_at    timestamptz,
      PRIMARY KEY (workshop_id, id),
      FOREIGN KEY (workshop_id, made_by) REFERENCES person (workshop_id, id)
    );
    CREATE INDEX background_job_waiting ON background_job (made_at) WHERE state IN ('queued', 'running');

    ${['request_key', 'signature_request', 'metal_request', 'background_job'].map(wallRound).join('\n')}
    GRANT SELECT, INSERT, UPDATE (status, answer) ON request_key TO grainward_app;
    GRANT SELECT, INSERT, UPDATE (state, decided_by, decided_at, decision_note, answer) ON signature_request TO grainward_app;
    GRANT SELECT, INSERT, UPDATE (state, voucher_id) ON metal_request TO grainward_app;
    GRANT SELECT, INSERT, UPDATE (state, step, done_parts, all_parts, result, heartbeat_at, ended_at) ON background_job TO grainward_app;

    -- The worker serves every workshop; this one function sees over the wall, and tells only which job is next.
    CREATE POLICY background_job_for_worker ON background_job TO grainward_owner USING (true) WITH CHECK (true);
    CREATE FUNCTION take_background_job() RETURNS TABLE (workshop_id uuid, id uuid) LANGUAGE sql SECURITY DEFINER
      SET search_path = public, pg_temp AS $$
        UPDATE background_job b SET state = 'running', attempts = attempts + 1, heartbeat_at = now()
        WHERE (b.workshop_id, b.id) = (
          SELECT j.workshop_id, j.id FROM background_job j
          WHERE j.attempts < 3 AND (j.state = 'queued' OR (j.state = 'running' AND j.heartbeat_at < now() - interval '60 seconds'))
          ORDER BY j.made_at LIMIT 1 FOR UPDATE SKIP LOCKED)
        RETURNING b.workshop_id, b.id;
      $$;
    REVOKE EXECUTE ON FUNCTION take_background_job FROM PUBLIC;
    GRANT EXECUTE ON FUNCTION take_background_job TO grainward_app;
  `,
  down: null,
};
