/**
 * Reconciliation of a period (DESIGN section 4): opening, what came and went, closing. Each line is the sum of one
 * group of accounts, so that nothing can be left out: whatever stands on no place stands in exactly one line. Reading
 * the sums from the book, for which days and whose metal, is left to the caller.
 */
import type { AccountKind } from '../book/account.ts';
import { isPlace } from '../book/account.ts';
import type { VoucherKind } from '../book/kinds.ts';
import type { MassVector } from '../mass/vector.ts';
import { ZERO_MASS, addMass, negateMass, subtractMass, sumMass } from '../mass/vector.ts';

export const RECONCILIATION_LINES = [
  'opening_stock',
  'from_suppliers',
  'from_customers',
  'drawn',
  'sold',
  'to_customers',
  'handed_over',
  'changed_owner',
  'working_loss',
  'swept_up',
  'deductions',
  'used_up',
  'written_off',
  'count_variance',
  'assay_variance',
  'foreign_matter',
  'corrections',
] as const;
export type ReconciliationLine = (typeof RECONCILIATION_LINES)[number];

/** The words of a line, as on screen and in print. */
export const RECONCILIATION_WORDS: Readonly<Record<ReconciliationLine, string>> = {
  opening_stock: 'Opening stock',
  from_suppliers: 'From suppliers',
  from_customers: 'From customers',
  drawn: 'Drawn from metal accounts',
  sold: 'Sold',
  to_customers: 'To customers',
  handed_over: 'Onto metal accounts',
  changed_owner: 'Changed owner',
  working_loss: 'Working loss',
  swept_up: 'Swept up',
  deductions: 'Processor’s deductions',
  used_up: 'Used up',
  written_off: 'Written off',
  count_variance: 'Count variance',
  assay_variance: 'Assay variance',
  foreign_matter: 'Foreign matter',
  corrections: 'Corrections of closed periods',
};

/** The sum of a period's entries on accounts of one kind, by vouchers of one kind. */
export interface PeriodSum {
  readonly account_kind: AccountKind;
  readonly voucher_kind: VoucherKind;
  /** Whether these entries brought metal onto the account or took it from there; told by the sign of their gross. */
  readonly side: 'onto' | 'from';
  /**
   * Vouchers that change an owner (and what undoes or mends one), and those that mend a closed period, each have a line
   * of their own: of them the places' entries count, of all others those beyond the places.
   */
  readonly because: 'ordinary' | 'change_of_owner' | 'closed_period';
  readonly mass: MassVector;
}

export interface Reconciliation {
  readonly opening: MassVector;
  /** What each line added to the places: below zero where metal left them. Every line is there. */
  readonly lines: readonly { readonly line: ReconciliationLine; readonly mass: MassVector }[];
  readonly closing: MassVector;
  /** Closing book less opening and lines: nothing, unless the book itself is broken. */
  readonly left_over: MassVector;
}

/**
 * Reconciles the places of one owner, or of all: what they held at the period's opening and closing, and every sum of
 * its entries. Rows of places are needed only where `because` is not ordinary; others of them change nothing.
 */
export function reconcile(
  opening: MassVector,
  closing: MassVector,
  sums: readonly PeriodSum[],
): Reconciliation {
  const lines = RECONCILIATION_LINES.map((line) => ({
    line,
    mass: sumMass(sums.filter((sum) => lineOf(sum) === line).map(effectOf)),
  }));
  const reckoned = lines.reduce((sum, { mass }) => addMass(sum, mass), opening);
  return { opening, lines, closing, left_over: subtractMass(closing, reckoned) };
}

/** What a sum does to the places: what stands elsewhere has left them. */
function effectOf(sum: PeriodSum): MassVector {
  if (sum.because === 'ordinary') return isPlace(sum.account_kind) ? ZERO_MASS : negateMass(sum.mass);
  return isPlace(sum.account_kind) ? sum.mass : ZERO_MASS;
}

/** The one line in which a sum stands; null for what only moved between places. */
export function lineOf(sum: Omit<PeriodSum, 'mass'>): ReconciliationLine | null {
  if (sum.because === 'change_of_owner') return 'changed_owner';
  if (sum.because === 'closed_period') return 'corrections';
  switch (sum.account_kind) {
    case 'supplier':
      return 'from_suppliers';
    case 'customer':
      return sum.side === 'from' ? 'from_customers' : 'to_customers';
    case 'metal_account':
      return sum.side === 'from' ? 'drawn' : 'handed_over';
    case 'working_loss':
      return ['sweep_up', 'outturn'].includes(sum.voucher_kind) ? 'swept_up' : 'working_loss';
    case 'processors_deduction':
      return 'deductions';
    case 'opening_stock':
    case 'sold':
    case 'count_variance':
    case 'assay_variance':
    case 'used_up':
    case 'written_off':
    case 'foreign_matter':
      return sum.account_kind;
    case 'safe':
    case 'bench':
    case 'station':
    case 'bin':
    case 'outworker':
    case 'approval':
    case 'courier':
    case 'refiner':
      return null;
  }
}

/** What was counted less what the book says, per mass. */
export function againstCount(closing: MassVector, counted: MassVector): MassVector {
  return subtractMass(counted, closing);
}
