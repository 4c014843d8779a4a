/**
 * Sign-in: accounts with an e-mail address, sessions, invitations, resets and the brake on guessing. A person of a
 * workshop is linked to an account; the account itself belongs to no workshop.
 */
import type { Migration } from './migration.ts';

export const identity: Migration = {
  name: '2026-12-01-06-identity',
  up: `
    CREATE TABLE user_account (
      id            uuid PRIMARY KEY,
      email         text NOT NULL UNIQUE CHECK (email = lower(email) AND length(email) <= 254),
      name          text NOT NULL,
      password_hash text NOT NULL,
      totp_secret   text,
      totp_last_step bigint,
      recovery_hashes text[] NOT NULL DEFAULT '{}',
      made_at       timestamptz NOT NULL DEFAULT now()
    );

    CREATE TABLE session (
      id             uuid PRIMARY KEY,
      user_id        uuid NOT NULL REFERENCES user_account,
      workshop_id    uuid REFERENCES workshop,
      refresh_hash   char(64) NOT NULL,
      previous_hash  char(64),
      rotated_at     timestamptz NOT NULL DEFAULT now(),
      made_at        timestamptz NOT NULL DEFAULT now(),
      ended_at       timestamptz
    );
    CREATE INDEX session_of_user ON session (user_id) WHERE ended_at IS NULL;

    CREATE TABLE invitation (
      workshop_id uuid NOT NULL REFERENCES workshop,
      id          uuid NOT NULL,
      email       text NOT NULL,
      name        text NOT NULL,
      role        text NOT NULL CHECK (role IN ('proprietor', 'keeper', 'goldsmith', 'auditor')),
      until       date,
      token_hash  char(64) NOT NULL UNIQUE,
      invited_by  uuid NOT NULL,
      expires_at  timestamptz NOT NULL,
      used_at     timestamptz,
      PRIMARY KEY (workshop_id, id),
      FOREIGN KEY (workshop_id, invited_by) REFERENCES person (workshop_id, id)
    );
    ALTER TABLE invitation ENABLE ROW LEVEL SECURITY;
    ALTER TABLE invitation FORCE ROW LEVEL SECURITY;
    CREATE POLICY invitation_of_workshop ON invitation
      USING (workshop_id = current_workshop()) WITH CHECK (workshop_id = current_workshop());
    -- Who holds the link may see the one invitation that it belongs to.
    CREATE POLICY invitation_by_link ON invitation FOR SELECT
      USING (token_hash = nullif(current_setting('grainward.token_hash', true), ''));

    CREATE TABLE password_reset (
      token_hash char(64) PRIMARY KEY,
      user_id    uuid NOT NULL REFERENCES user_account,
      expires_at timestamptz NOT NULL,
      used_at    timestamptz
    );

    -- What slows guessing down: a row per account and per address, told by a hash.
    CREATE TABLE sign_in_brake (
      subject      char(64) PRIMARY KEY,
      failures     integer NOT NULL,
      last_failure timestamptz NOT NULL,
      paused_until timestamptz
    );

    GRANT SELECT, INSERT ON user_account, session, invitation, password_reset, sign_in_brake TO grainward_app;
    GRANT UPDATE (password_hash, name, totp_secret, totp_last_step, recovery_hashes) ON user_account TO grainward_app;
    GRANT UPDATE (workshop_id, refresh_hash, previous_hash, rotated_at, ended_at) ON session TO grainward_app;
    GRANT UPDATE (used_at) ON invitation, password_reset TO grainward_app;
    GRANT UPDATE, DELETE ON sign_in_brake TO grainward_app;

    CREATE TABLE document (
      workshop_id uuid NOT NULL REFERENCES workshop,
      id          uuid NOT NULL,
      name        text NOT NULL,
      media_type  text NOT NULL,
      bytes       bigint NOT NULL CHECK (bytes > 0),
      sha256      char(64) NOT NULL,
      added_by    uuid NOT NULL,
      added_at    timestamptz NOT NULL DEFAULT now(),
      PRIMARY KEY (workshop_id, id),
      FOREIGN KEY (workshop_id, added_by) REFERENCES person (workshop_id, id)
    );
    ALTER TABLE document ENABLE ROW LEVEL SECURITY;
    ALTER TABLE document FORCE ROW LEVEL SECURITY;
    CREATE POLICY document_of_workshop ON document
      USING (workshop_id = current_workshop()) WITH CHECK (workshop_id = current_workshop());
    GRANT SELECT, INSERT ON document TO grainward_app;

    -- Who a session is, at this request, in one round trip: the user is set for this statement alone.
    CREATE FUNCTION who_is(p_session uuid, p_user uuid) RETURNS TABLE (workshop_id uuid, person_id uuid, role text, role_ended boolean)
      LANGUAGE plpgsql AS $$
    BEGIN
      PERFORM set_config('grainward.user', p_user::text, true);
      RETURN QUERY SELECT s.workshop_id, p.id, p.role,
          p.id IS NOT NULL AND (NOT p.active OR p.until < (now() AT TIME ZONE w.time_zone)::date)
        FROM session s
        LEFT JOIN person p ON p.workshop_id = s.workshop_id AND p.user_id = s.user_id
        LEFT JOIN workshop w ON w.workshop_id = s.workshop_id
        WHERE s.id = p_session AND s.user_id = p_user AND s.ended_at IS NULL
          AND s.rotated_at > now() - interval '8 hours' AND s.made_at > now() - interval '7 days';
    END $$;
    GRANT EXECUTE ON FUNCTION who_is TO grainward_app;

    ALTER TABLE person ADD FOREIGN KEY (user_id) REFERENCES user_account;
  `,
  down: null,
};
