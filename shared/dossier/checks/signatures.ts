/** Who recorded and who approved: both with a role at that time, and two people where two are asked for. */
import type { ChainRecord } from '../../chain/record-line.ts';
import type { Role } from '../../permissions.ts';
import { ROLES, may } from '../../permissions.ts';
import type { Finding } from '../finding.ts';
import type { PersonState } from '../replay.ts';
import { leafOf, nextPeople } from '../replay.ts';

/** Kinds that never stand with one signature, unless marked single-handed (or a dispute settled by the receiver's PIN). */
const TWO_SIGNATURES = ['reversal', 'write_off', 'period_closed', 'period_reopened', 'count', 'reassay'];

export function signatures(records: readonly ChainRecord[]): readonly Finding[] {
  const people = new Map<string, PersonState>();
  return records.flatMap((record) => {
    const findings = signedRightly(record, people);
    nextPeople(people, record);
    return findings;
  });
}

function signedRightly(record: ChainRecord, people: ReadonlyMap<string, PersonState>): readonly Finding[] {
  const at = record.sequence;
  const first =
    record.kind === 'role_given' && leafOf(record, 'person_id') === record.recorded_by && people.size === 0;
  const recorder = people.get(record.recorded_by);
  const findings: Finding[] = [];
  if (!first && (recorder === undefined || !recorder.active))
    findings.push({ at, sentence: `Record ${at} was recorded by somebody who had no role here then.` });
  if (!first && recorder?.role === 'auditor' && record.kind !== 'dossier_made')
    findings.push({
      at,
      sentence: `Record ${at} was recorded by an auditor, who writes nothing but that a dossier was made.`,
    });
  if (record.approved_by === null) {
    const settled = leafOf(record, 'single_handed') === 'yes';
    if (TWO_SIGNATURES.includes(record.kind) && !settled)
      findings.push({
        at,
        sentence: `Record ${at} (${record.kind}) carries one signature where two are asked for.`,
      });
    return findings;
  }
  const approver = people.get(record.approved_by);
  const role = roleOf(approver);
  if (approver === undefined || !approver.active || role === null || !may(role, 'signature.give'))
    findings.push({ at, sentence: `Record ${at} was approved by somebody who had no right to sign then.` });
  if (record.approved_by === record.recorded_by && leafOf(record, 'single_handed') !== 'yes')
    findings.push({ at, sentence: `Record ${at} was approved by who recorded it.` });
  return findings;
}

function roleOf(person: PersonState | undefined): Role | null {
  return ROLES.find((role) => role === person?.role) ?? null;
}
