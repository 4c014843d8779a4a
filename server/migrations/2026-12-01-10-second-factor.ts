/**
 * Where a workshop demands a second factor of a role, each request is told whether the person still lacks it. It
 * stands beside the role in the same statement, so that the demand holds at once in every process.
 */
import type { Migration } from './migration.ts';

export const secondFactor: Migration = {
  name: '2026-12-01-10-second-factor',
  up: `
    DROP FUNCTION who_is(uuid, uuid);
    CREATE FUNCTION who_is(p_session uuid, p_user uuid) RETURNS TABLE
        (workshop_id uuid, person_id uuid, role text, role_ended boolean, second_factor_missing boolean)
      LANGUAGE plpgsql AS $$
    BEGIN
      PERFORM set_config('grainward.user', p_user::text, true);
      RETURN QUERY SELECT s.workshop_id, p.id, p.role,
          p.id IS NOT NULL AND (NOT p.active OR p.until < (now() AT TIME ZONE w.time_zone)::date),
          p.role = ANY (w.second_factor_roles) AND u.totp_secret IS NULL
        FROM session s
        JOIN user_account u ON u.id = s.user_id
        LEFT JOIN person p ON p.workshop_id = s.workshop_id AND p.user_id = s.user_id
        LEFT JOIN workshop w ON w.workshop_id = s.workshop_id
        WHERE s.id = p_session AND s.user_id = p_user AND s.ended_at IS NULL
          AND s.rotated_at > now() - interval '8 hours' AND s.made_at > now() - interval '7 days';
    END $$;
    GRANT EXECUTE ON FUNCTION who_is(uuid, uuid) TO grainward_app;
  `,
  down: null,
};
