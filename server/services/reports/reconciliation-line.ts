/**
 * Which line of a reconciliation an entry stands in, in SQL: the words that `lineOf` decides by. The sums of a period
 * and the list of the vouchers behind one of its figures are told by the same.
 */
import { ACCOUNT_KINDS, isPlace } from '../../../shared/book/account.ts';
import { VOUCHER_KINDS } from '../../../shared/book/kinds.ts';
import type { PeriodSum, ReconciliationLine } from '../../../shared/loss/reconciliation.ts';
import { lineOf } from '../../../shared/loss/reconciliation.ts';

/** The voucher that a record reverses or corrects. */
export const FIRST = `LEFT JOIN record first ON first.workshop_id = r.workshop_id
    AND first.id = coalesce(r.reverses, nullif(r.detail->>'corrects', '')::uuid)`;

export const VOUCHER_KIND = 'coalesce(first.kind, r.kind)';
export const SIDE = "CASE WHEN e.gross_ug < 0 THEN 'from' ELSE 'onto' END";

/** A voucher that mends one of a period that was closed when it was recorded is told apart; so is a change of owner. */
export const because = (from: string) => `CASE WHEN ${VOUCHER_KIND} = 'ownership' THEN 'change_of_owner'
      WHEN first.business_date < ${from} AND EXISTS (SELECT 1 FROM period p WHERE p.workshop_id = r.workshop_id AND p.closed
        AND first.business_date BETWEEN p.first_day AND p.last_day) THEN 'closed_period'
      ELSE 'ordinary' END`;

/** Whether a lot is the house's, one party's or anybody's: "house", an id, "all". */
export const ownedBy = (owner: string, lot = 'l') =>
  `(${owner} = 'all' OR (${owner} = 'house' AND ${lot}.owner_id IS NULL) OR ${lot}.owner_id::text = ${owner})`;

const BECAUSE = ['ordinary', 'change_of_owner', 'closed_period'] as const;
const SIDES = ['onto', 'from'] as const;

/** "account kind|voucher kind|side|because" of every entry that counts in a line. */
export function keysOfLine(line: ReconciliationLine): string[] {
  const all: Omit<PeriodSum, 'mass'>[] = ACCOUNT_KINDS.flatMap((account_kind) =>
    VOUCHER_KINDS.flatMap((voucher_kind) =>
      SIDES.flatMap((side) => BECAUSE.map((why) => ({ account_kind, voucher_kind, side, because: why }))),
    ),
  );
  return all
    .filter((sum) => isPlace(sum.account_kind) === (sum.because !== 'ordinary') && lineOf(sum) === line)
    .map((sum) => `${sum.account_kind}|${sum.voucher_kind}|${sum.side}|${sum.because}`);
}
