/** Roles are given and ended by acts of the chain, so that who might do what, and when, can be read from the book. */
import { randomUUID } from 'node:crypto';
import type { ActDraft } from '../../../shared/book/draft.ts';
import type { Role } from '../../../shared/permissions.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { Tx } from '../../db/rows.ts';
import { ProblemError } from '../../problem.ts';
import { postRecords } from '../book/post.ts';
import type { PersonInWorkshop } from '../events/person.ts';

export interface RoleGiven {
  readonly person_id: string;
  readonly name: string;
  readonly role: Role;
  readonly until: string | null;
}

/** The act that gives a role, or changes it. */
export function giveRole(given: RoleGiven, business_date: string): ActDraft {
  const { person_id, name, role, until } = given;
  return act('role_given', { person_id, name, role, until }, business_date);
}

const member = z.object({ id: z.string(), name: z.string(), role: z.string(), active: z.boolean() });

/** Gives somebody another role or end date. Refuses to leave a workshop without a proprietor. */
export async function changeRole(
  tx: Tx,
  person_id: string,
  to: { role: Role; until: string | null },
  by: PersonInWorkshop,
): Promise<void> {
  const who = await memberById(tx, person_id);
  if (who.role === 'proprietor' && to.role !== 'proprietor') await keepOneProprietor(tx, person_id);
  const draft = giveRole({ person_id, name: who.name, ...to }, await workshopToday(tx));
  await postRecords(tx, [draft], { person_id: by.person_id, approved_by: null });
}

/** Ends somebody's role at once. Refuses to leave a workshop without a proprietor. */
export async function endRole(tx: Tx, person_id: string, by: PersonInWorkshop): Promise<void> {
  const who = await memberById(tx, person_id);
  if (!who.active) throw new ProblemError('already_done', `${who.name} has no role here any more.`);
  if (who.role === 'proprietor') await keepOneProprietor(tx, person_id);
  const draft = act('role_ended', { person_id }, await workshopToday(tx));
  await postRecords(tx, [draft], { person_id: by.person_id, approved_by: null });
}

/** Today's business date in the workshop's zone. */
export async function workshopToday(tx: Tx): Promise<string> {
  const { today } = await tx.one(
    z.object({ today: z.string() }),
    'SELECT (clock_timestamp() AT TIME ZONE time_zone)::date::text AS today FROM workshop WHERE workshop_id = current_workshop()',
  );
  return today;
}

async function memberById(tx: Tx, person_id: string) {
  const found = await tx.maybe(
    member,
    'SELECT id::text, name, role, active FROM person WHERE workshop_id = current_workshop() AND id = $1::uuid',
    [person_id],
  );
  if (found === null)
    throw new ProblemError('not_found', 'There is no such person here. Look at the list again.');
  return found;
}

async function keepOneProprietor(tx: Tx, but: string): Promise<void> {
  const other = await tx.maybe(
    z.object({ id: z.string() }),
    `SELECT id::text FROM person WHERE workshop_id = current_workshop() AND role = 'proprietor' AND active AND id <> $1::uuid LIMIT 1`,
    [but],
  );
  if (other !== null) return;
  throw new ProblemError(
    'conflict',
    'A workshop has at least one proprietor. Make somebody else proprietor first.',
  );
}

function act(kind: 'role_given' | 'role_ended', detail: ActDraft['detail'], business_date: string): ActDraft {
  return { type: 'act', id: randomUUID(), kind, business_date, note: null, documents: [], detail };
}
