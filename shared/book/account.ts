/**
 * Accounts of the book: where metal can be, or where it went. The kind of an account decides whether it may
 * fall below zero; the database holds the same table (migration `book-tables`) and a test compares the two.
 */

/** Places: somebody has the metal in hand. Never below zero, per lot. */
export const PLACE_KINDS = [
  'safe',
  'bench',
  'station',
  'bin',
  'outworker',
  'approval',
  'courier',
  'refiner',
] as const;

/** Claims: metal that somebody owes the house, or the house owes. Below zero only to an agreed limit. */
export const CLAIM_KINDS = ['metal_account'] as const;

/** Outside: where metal came from or went to for good. */
export const OUTSIDE_KINDS = ['supplier', 'customer', 'sold', 'opening_stock'] as const;

/** Results: what became of metal that is no longer anywhere. */
export const RESULT_KINDS = [
  'working_loss',
  'count_variance',
  'assay_variance',
  'processors_deduction',
  'used_up',
  'written_off',
  'foreign_matter',
] as const;

export const ACCOUNT_KINDS = [...PLACE_KINDS, ...CLAIM_KINDS, ...OUTSIDE_KINDS, ...RESULT_KINDS] as const;

export type PlaceKind = (typeof PLACE_KINDS)[number];
export type AccountKind = (typeof ACCOUNT_KINDS)[number];
export type AccountGroup = 'place' | 'claim' | 'outside' | 'result';

/** Kinds of place where work is done and from which a weigh-back is made. */
export const WORK_KINDS = ['bench', 'station', 'outworker'] as const satisfies readonly PlaceKind[];

/** The group that a kind belongs to. */
export function accountGroup(kind: AccountKind): AccountGroup {
  if (contains(PLACE_KINDS, kind)) return 'place';
  if (contains(CLAIM_KINDS, kind)) return 'claim';
  if (contains(OUTSIDE_KINDS, kind)) return 'outside';
  return 'result';
}

/** Whether metal there is in somebody's hands, so that no lot may fall below nothing there. */
export function isPlace(kind: AccountKind): kind is PlaceKind {
  return accountGroup(kind) === 'place';
}

/** Whether work is done there: a bench, a station or an outworker. */
export function isWorkPlace(kind: AccountKind): boolean {
  return contains(WORK_KINDS, kind);
}

/** An account as every part of the program sees it. */
export interface Account {
  readonly id: string;
  readonly kind: AccountKind;
  readonly name: string;
  /** The person who answers for a place; null where nobody in particular does. */
  readonly custodian_id: string | null;
  /** The party behind a supplier, customer, refiner, outworker, courier, approval or metal account. */
  readonly party_id: string | null;
  /** For a working-loss account: the operation whose loss it holds. */
  readonly operation: string | null;
  readonly closed: boolean;
}

function contains<T extends string>(list: readonly T[], value: string): value is T {
  return list.some((item) => item === value);
}
