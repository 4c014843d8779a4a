/** Who recorded and who approved: both with a role at that time, and two people where two are asked for. */
import type { RecordKind } from '../../book/kinds.ts';
import { ACT_KINDS, VOUCHER_KINDS } from '../../book/kinds.ts';
import type { ChainRecord } from '../../chain/record-line.ts';
import type { Action, Role } from '../../permissions.ts';
import { ROLES, may } from '../../permissions.ts';
import type { Finding } from '../finding.ts';
import type { PersonState } from '../replay.ts';
import { leafOf, nextPeople } from '../replay.ts';

/** Kinds that never stand with one signature, unless marked single-handed. */
const TWO_SIGNATURES = ['reversal', 'write_off', 'period_closed', 'period_reopened', 'count', 'reassay'];

/** What whoever records must be allowed to. A kind that stands not here is recorded by who works at the counter. */
const AT_THE_COUNTER: Action = 'book.transfer';
const RIGHTS: Partial<Record<RecordKind, Action>> = {
  handover_acknowledged: 'handover.acknowledge',
  handover_disputed: 'handover.acknowledge',
  dispute_opened: 'handover.acknowledge',
  dossier_made: 'dossier.make',
  role_given: 'people.invite',
  role_ended: 'people.end',
  account_closed: 'place.set',
  custodian_changed: 'place.set',
  allowance_set: 'allowance.set',
  limit_set: 'settings.set',
  estimate_set: 'settings.set',
  key_changed: 'settings.set',
};
const KINDS: readonly RecordKind[] = [...VOUCHER_KINDS, ...ACT_KINDS];

export function signatures(records: readonly ChainRecord[]): readonly Finding[] {
  const people = new Map<string, PersonState>();
  return records.flatMap((record) => {
    const findings = [...recordedRightly(record, people), ...approvedRightly(record, people)];
    nextPeople(people, record);
    return findings;
  });
}

function recordedRightly(record: ChainRecord, people: ReadonlyMap<string, PersonState>): readonly Finding[] {
  const at = record.sequence;
  const kind = KINDS.find((known) => known === record.kind);
  if (kind === undefined) return [{ at, sentence: `Record ${at} is of a kind that this book doesn’t know.` }];
  // The first act of a book makes its own recorder the proprietor.
  if (people.size === 0 && kind === 'role_given' && leafOf(record, 'person_id') === record.recorded_by)
    return [];
  const role = roleThen(people.get(record.recorded_by), record);
  if (role === null)
    return [{ at, sentence: `Record ${at} was recorded by somebody who had no role here then.` }];
  return may(role, RIGHTS[kind] ?? AT_THE_COUNTER)
    ? []
    : [
        {
          at,
          sentence: `Record ${at} (${kind}) was recorded by ${role === 'auditor' ? 'an' : 'a'} ${role}, who has no right to it.`,
        },
      ];
}

function approvedRightly(record: ChainRecord, people: ReadonlyMap<string, PersonState>): readonly Finding[] {
  const at = record.sequence;
  const isSingleHanded = leafOf(record, 'single_handed') === 'yes';
  if (record.approved_by === null)
    return needsTwo(record) && !isSingleHanded
      ? [{ at, sentence: `Record ${at} (${record.kind}) carries one signature where two are asked for.` }]
      : [];
  const role = roleThen(people.get(record.approved_by), record);
  const findings: Finding[] = [];
  if (role === null || !may(role, 'signature.give'))
    findings.push({ at, sentence: `Record ${at} was approved by somebody who had no right to sign then.` });
  if (record.approved_by === record.recorded_by && !isSingleHanded)
    findings.push({ at, sentence: `Record ${at} was approved by who recorded it.` });
  return findings;
}

/** A correction too, but for the one that a second weighing before both makes of a disputed handover. */
const needsTwo = (record: ChainRecord): boolean =>
  TWO_SIGNATURES.includes(record.kind) ||
  (record.kind === 'correction' && leafOf(record, 'handover_id') === null);

/** The role that somebody held when a record was made; null for none, ended, or past its last day. */
function roleThen(person: PersonState | undefined, record: ChainRecord): Role | null {
  if (person === undefined || !person.active) return null;
  if (person.until !== null && person.until < dayBefore(record.recorded_at)) return null;
  return ROLES.find((role) => role === person.role) ?? null;
}

/** Times are in UTC and last days in the workshop's zone, which no record names: a day's grace covers every zone. */
function dayBefore(recorded_at: string): string {
  const day = 24 * 60 * 60 * 1000;
  return new Date(Date.parse(recorded_at) - day).toISOString().slice(0, 10);
}
