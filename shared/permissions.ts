/**
 * What each role may do: one table that the server guards with, the client hides buttons by, and the tests read.
 * Nothing is allowed that does not stand here.
 */
export const ROLES = ['proprietor', 'keeper', 'goldsmith', 'auditor'] as const;
export type Role = (typeof ROLES)[number];

const EVERYONE = ROLES;
const STAFF = ['proprietor', 'keeper', 'goldsmith'] as const;
const COUNTER = ['proprietor', 'keeper'] as const;
const OWNER = ['proprietor'] as const;
const READERS = ['proprietor', 'keeper', 'auditor'] as const;

/** Action → the roles that may do it. "own" actions are further held to the actor's own bench by the event. */
export const PERMISSIONS = {
  'session.read': EVERYONE,
  'book.read': READERS,
  'bench.read_own': STAFF,
  'book.opening': COUNTER,
  'book.weigh_in': COUNTER,
  'book.hold': COUNTER,
  'book.transfer': COUNTER,
  'book.issue': COUNTER,
  'book.weigh_back': COUNTER,
  'book.deliver': COUNTER,
  'book.sweep_up': COUNTER,
  'book.consign': COUNTER,
  'book.outturn': COUNTER,
  'book.settle': COUNTER,
  'book.use_up': COUNTER,
  'book.ownership': COUNTER,
  'book.write_off': COUNTER,
  'book.correct': COUNTER,
  'book.reverse': COUNTER,
  'handover.acknowledge': STAFF,
  'request.make': STAFF,
  'request.answer': COUNTER,
  'signature.give': COUNTER,
  'loss.explain': COUNTER,
  'document.add': STAFF,
  'job.open': COUNTER,
  'party.set': COUNTER,
  'price.set': COUNTER,
  'place.set': OWNER,
  'alloy.set': COUNTER,
  'allowance.set': OWNER,
  'settings.set': OWNER,
  'people.read': READERS,
  'people.invite': OWNER,
  'people.end': OWNER,
  'period.close': COUNTER,
  'report.read': READERS,
  'dossier.make': ['proprietor', 'keeper', 'auditor'],
  'dossier.read': READERS,
} as const satisfies Record<string, readonly Role[]>;

export type Action = keyof typeof PERMISSIONS;

/** Whether a role may do an action. */
export function may(role: Role, action: Action): boolean {
  const roles: readonly Role[] = PERMISSIONS[action];
  return roles.includes(role);
}
