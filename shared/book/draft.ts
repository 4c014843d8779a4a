/**
 * What an event proposes to record. Events in `shared/events` make drafts, forms show them, the server posts
 * them. A draft carries no sequence, time or hash: the database gives those.
 */
import type { MassVector } from '../mass/vector.ts';
import { METALS, ZERO_MASS, addMass, isZeroMass } from '../mass/vector.ts';
import type { ProblemCode } from '../problems.ts';
import type { ActKind, VoucherKind } from './kinds.ts';

/** A leaf of a record's detail. Numbers are decimal strings. */
export type DetailLeaf = string | null;
/** A record's detail: leaves, or flat lists of flat rows, never nested more than two deep. */
export type Detail = Readonly<
  Record<string, DetailLeaf | readonly DetailLeaf[] | readonly Readonly<Record<string, DetailLeaf>>[]>
>;

export interface DocumentRef {
  readonly id: string;
  readonly sha256: string;
}

export interface EntryDraft {
  readonly account_id: string;
  readonly lot_id: string;
  readonly mass: MassVector;
  /** Count of pieces for forms that carry one, else null. */
  readonly pieces: bigint | null;
}

export interface VoucherDraft {
  readonly type: 'voucher';
  readonly id: string;
  readonly kind: VoucherKind;
  readonly business_date: string;
  readonly note: string | null;
  readonly detail: Detail;
  readonly documents: readonly DocumentRef[];
  /** The voucher that a reversal mirrors. */
  readonly reverses: string | null;
  readonly entries: readonly EntryDraft[];
}

export interface ActDraft {
  readonly type: 'act';
  readonly id: string;
  readonly kind: ActKind;
  readonly business_date: string;
  readonly note: string | null;
  readonly detail: Detail;
  readonly documents: readonly DocumentRef[];
}

export type RecordDraft = VoucherDraft | ActDraft;

/** Why an event can't be recorded: what is so, why it can't be, what to do next, and the field it is about. */
export interface Refusal {
  /** Stable code of the refusal, listed in `shared/problems.ts`. */
  readonly code: ProblemCode;
  /** Path of the field in the input ("lines.0.gross_g"), or null for the whole act. */
  readonly field: string | null;
  readonly sentence: string;
}

export type Outcome<T> =
  { readonly ok: true; readonly value: T } | { readonly ok: false; readonly refusals: readonly Refusal[] };

export const accept = <T>(value: T): Outcome<T> => ({ ok: true, value });
export const refuse = (...refusals: readonly Refusal[]): Outcome<never> => ({
  ok: false,
  refusals,
});

/** The sum of a draft's entries: zero in all five masses where it balances. */
export function draftSum(entries: readonly EntryDraft[]): MassVector {
  return entries.reduce((sum, entry) => addMass(sum, entry.mass), ZERO_MASS);
}

/** Whether entries make a voucher: at least two, none of them empty, summing to zero in all five masses. */
export function isBalanced(entries: readonly EntryDraft[]): boolean {
  return entries.length >= 2 && isZeroMass(draftSum(entries));
}

/** Whether a draft moves any of the four precious metals. */
export function movesFineMetal(entries: readonly EntryDraft[]): boolean {
  return entries.some((entry) => METALS.some((metal) => entry.mass[metal] !== 0n));
}
