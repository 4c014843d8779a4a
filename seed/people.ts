/** The demo's people: accounts, roles by acts of the chain, handover PINs. */
import { randomUUID } from 'node:crypto';
import type { Config } from '../server/config.ts';
import type { Database } from '../server/db/database.ts';
import { postRecords } from '../server/services/book/post.ts';
import type { PersonInWorkshop } from '../server/services/events/person.ts';
import { hashPassword } from '../server/services/identity/passwords.ts';
import { giveRole } from '../server/services/identity/roles.ts';
import { addUser, linkPerson, signUp } from '../server/services/identity/sign-up.ts';
import type { CastMember } from './cast.ts';
import { CAST, WORKSHOP } from './cast.ts';
import type { Who } from './recorder.ts';

/** Signs the workshop up and gives everybody a role. The auditor's access ends on a set date. */
export async function bringPeople(
  context: { readonly db: Database; readonly config: Config },
  at: Date,
  auditor_until: string,
): Promise<{ workshop_id: string; people: ReadonlyMap<Who, PersonInWorkshop> }> {
  const [proprietor, ...others] = CAST;
  if (proprietor === undefined) throw new Error('the demo has no proprietor');
  const { name, email, password } = proprietor;
  const signed = await signUp(
    context,
    {
      workshop_name: WORKSHOP.name,
      time_zone: WORKSHOP.time_zone,
      currency: WORKSHOP.currency,
      name,
      email,
      password,
    },
    at,
  );
  const { workshop_id } = signed;
  const people = new Map<Who, PersonInWorkshop>([
    ['proprietor', { workshop_id, person_id: signed.person_id, role: 'proprietor' }],
  ]);
  for (const member of others) {
    const person_id = await join(
      context,
      { workshop_id, proprietor_id: signed.person_id },
      member,
      at,
      auditor_until,
    );
    people.set(member.key, { workshop_id, person_id, role: member.role });
  }
  for (const member of CAST)
    await setPin(context, workshop_id, people.get(member.key)?.person_id ?? '', member.pin);
  return { workshop_id, people };
}

async function join(
  context: { readonly db: Database; readonly config: Config },
  into: { readonly workshop_id: string; readonly proprietor_id: string },
  member: CastMember,
  at: Date,
  auditor_until: string,
): Promise<string> {
  const ids = { user_id: randomUUID(), person_id: randomUUID() };
  const password_hash = await hashPassword(member.password, context.config.bcrypt_cost);
  await context.db.inScope({ workshop_id: into.workshop_id, user_id: ids.user_id }, async (tx) => {
    await addUser(tx, { id: ids.user_id, email: member.email, name: member.name, password_hash });
    const until = member.role === 'auditor' ? auditor_until : null;
    const draft = giveRole(
      { person_id: ids.person_id, name: member.name, role: member.role, until },
      at.toISOString().slice(0, 10),
    );
    await postRecords(tx, [draft], { person_id: into.proprietor_id, approved_by: null }, { at });
    await linkPerson(tx, ids.person_id, ids.user_id);
  });
  return ids.person_id;
}

async function setPin(
  context: { readonly db: Database; readonly config: Config },
  workshop_id: string,
  person_id: string,
  pin: string | null,
) {
  if (pin === null) return;
  const pin_hash = await hashPassword(pin, context.config.bcrypt_cost);
  await context.db.inScope({ workshop_id, user_id: null }, (tx) =>
    tx.run('UPDATE person SET pin_hash = $2 WHERE workshop_id = current_workshop() AND id = $1::uuid', [
      person_id,
      pin_hash,
    ]),
  );
}
