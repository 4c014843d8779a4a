/**
 * Lots: batches of like material, each with one owner, one origin class and a described fineness. Where a lot
 * lies and what its masses are now is told by holdings, never by the lot itself.
 */
import type { Decimal } from '../decimal.ts';
import type { Metal } from '../mass/vector.ts';

export const LOT_FORMS = [
  'grain',
  'bar',
  'sheet',
  'wire',
  'tube',
  'solder',
  'findings',
  'casting',
  'tree_scrap',
  'work',
  'finished_work',
  'clean_scrap',
  'filings',
  'polishings',
  'sweeps',
  'sludge',
  'plating_salts',
  'old_gold',
  'other_precious',
  'account',
] as const;
export type LotForm = (typeof LOT_FORMS)[number];

/** Forms that carry a count of pieces in each entry. */
export const PIECE_FORMS = [
  'findings',
  'casting',
  'work',
  'finished_work',
] as const satisfies readonly LotForm[];

/** Forms kept one lot per container and consigned whole: a part taken of them is always estimated. */
export const MIXED_FORMS = [
  'sweeps',
  'polishings',
  'filings',
  'sludge',
  'old_gold',
] as const satisfies readonly LotForm[];

/** How the fineness of a lot is known, from promised to measured. */
export const BASES = [
  'declared',
  'certificate',
  'computed',
  'estimated',
  'tested',
  'assayed',
  'unknown',
] as const;
export type Basis = (typeof BASES)[number];

export const ORIGINS = ['recycled', 'mined', 'customers_own', 'undeclared', 'mixed'] as const;
export type Origin = (typeof ORIGINS)[number];

export const STANDINGS = ['on_hold', 'released', 'spent'] as const;
export type Standing = (typeof STANDINGS)[number];

/** A lot as every part of the program sees it. Finenesses are those described at its opening, in per mille. */
export interface Lot {
  readonly id: string;
  readonly code: string;
  readonly form: LotForm;
  /** Name of the alloy in the workshop's register, or null where it is of none (sweeps, old gold). */
  readonly alloy: string | null;
  /** Party that owns it; null is the house. */
  readonly owner_id: string | null;
  readonly origin: Origin;
  readonly gold_permille: Decimal;
  readonly silver_permille: Decimal;
  readonly platinum_permille: Decimal;
  readonly palladium_permille: Decimal;
  readonly basis: Basis;
  readonly standing: Standing;
  readonly hold_reason: string | null;
  readonly hold_until: string | null;
  /** Short words for the eye: "750 yellow sheet, 1.2 mm". */
  readonly description: string;
}

export type PermilleKey = `${Metal}_permille`;
