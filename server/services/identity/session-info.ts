/** What the client needs to know of who is signed in: the person, the workshop, what he or she may do. */
import { PERMISSIONS, ROLES, may } from '../../../shared/permissions.ts';
import type { MemberJson, SessionJson } from '../../../shared/schemas/identity.ts';
import { memberJson } from '../../../shared/schemas/identity.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { AppContext } from '../../context.ts';
import type { SignedIn } from '../../routes/route.ts';

const row = z.object({
  user_id: z.string(),
  email: z.string(),
  user_name: z.string(),
  person_name: z.string(),
  has_pin: z.boolean(),
  workshop_name: z.string(),
  currency: z.string(),
  time_zone: z.string(),
  mass_unit: z.string(),
  second_factor: z.boolean(),
  second_factor_roles: z.array(z.enum(ROLES)),
  today: z.string(),
  sequence: z.string(),
  balanced: z.boolean(),
});

export function sessionInfo(context: AppContext, who: SignedIn): Promise<SessionJson> {
  return context.db.inScope(who, async (tx) => {
    const me = await tx.one(row, ME, [who.user_id, who.person_id]);
    const workshops = await tx.rows(
      z.object({ id: z.string(), name: z.string(), role: z.enum(ROLES) }),
      `SELECT w.workshop_id::text AS id, w.name, p.role FROM person p JOIN workshop w ON w.workshop_id = p.workshop_id
        WHERE p.user_id = $1::uuid AND p.active ORDER BY w.name`,
      [who.user_id],
    );
    return {
      user: { id: me.user_id, email: me.email, name: me.user_name, second_factor: me.second_factor },
      person: { id: who.person_id, name: me.person_name, role: who.role, has_pin: me.has_pin },
      workshop: {
        id: who.workshop_id,
        name: me.workshop_name,
        currency: me.currency,
        time_zone: me.time_zone,
        mass_unit: me.mass_unit,
        second_factor_roles: me.second_factor_roles,
      },
      workshops,
      may: Object.keys(PERMISSIONS).filter((action) => may(who.role, actionOf(action))),
      today: me.today,
      book: { sequence: me.sequence, balanced: me.balanced },
    };
  });
}

const actionOf = (name: string) => z.enum(keysOf(PERMISSIONS)).parse(name);

function keysOf<T extends object>(table: T): (keyof T & string)[] {
  return Object.keys(table).filter((key): key is keyof T & string => key in table);
}

/** Everybody who has or had a role here. */
export function members(context: AppContext, who: SignedIn): Promise<MemberJson[]> {
  return context.db.inScope(who, (tx) =>
    tx.rows(
      memberJson,
      `SELECT id::text, name, role, active AND coalesce(until >= current_date, true) AS active, until::text,
          user_id IS NOT NULL AS signs_in
        FROM person WHERE workshop_id = current_workshop() ORDER BY active DESC, name LIMIT 500`,
    ),
  );
}

const ME = `SELECT u.id::text AS user_id, u.email, u.name AS user_name, p.name AS person_name, p.pin_hash IS NOT NULL AS has_pin,
    w.name AS workshop_name, w.currency, w.time_zone, w.mass_unit, u.totp_secret IS NOT NULL AS second_factor, w.second_factor_roles,
    (clock_timestamp() AT TIME ZONE w.time_zone)::date::text AS today, h.sequence::text,
    (SELECT coalesce(sum(gross_ug), 0) = 0 AND coalesce(sum(gold_ug), 0) = 0 AND coalesce(sum(silver_ug), 0) = 0
       AND coalesce(sum(platinum_ug), 0) = 0 AND coalesce(sum(palladium_ug), 0) = 0
     FROM holding WHERE workshop_id = current_workshop()
       AND (gross_ug <> 0 OR gold_ug <> 0 OR silver_ug <> 0 OR platinum_ug <> 0 OR palladium_ug <> 0)) AS balanced
  FROM user_account u, person p, workshop w, workshop_head h
  WHERE u.id = $1::uuid AND p.workshop_id = current_workshop() AND p.id = $2::uuid
    AND w.workshop_id = current_workshop() AND h.workshop_id = current_workshop()`;
