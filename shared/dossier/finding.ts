/** What a check of a dossier finds: whether it holds, and each failure with its record. */

export type Verdict = 'holds' | 'fails' | 'cannot_be_shown';

export interface Finding {
  /** Sequence of the record, or path of the file; null for the whole. */
  readonly at: string | null;
  readonly sentence: string;
}

export interface Check {
  readonly id: string;
  readonly name: string;
  readonly verdict: Verdict;
  readonly findings: readonly Finding[];
}

/** A check that fails where anything was found, and else holds. */
export const checkOf = (id: string, name: string, findings: readonly Finding[]): Check => ({
  id,
  name,
  verdict: findings.length === 0 ? 'holds' : 'fails',
  findings,
});
