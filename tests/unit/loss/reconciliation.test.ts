/** Reconciliation: every kind of account stands in exactly one line, so that nothing can be left out. */
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ACCOUNT_KINDS, isPlace } from '../../../shared/book/account.ts';
import type { AccountKind } from '../../../shared/book/account.ts';
import type { PeriodSum } from '../../../shared/loss/reconciliation.ts';
import {
  RECONCILIATION_LINES,
  againstCount,
  lineOf,
  reconcile,
} from '../../../shared/loss/reconciliation.ts';
import {
  MASS_KEYS,
  ZERO_MASS,
  addMass,
  isZeroMass,
  massVector,
  subtractMass,
} from '../../../shared/mass/vector.ts';

const gold = (ug: bigint) => massVector({ gross: ug, gold: ug });

function aSum(account_kind: AccountKind, ug: bigint, more: Partial<PeriodSum> = {}): PeriodSum {
  const side = ug > 0n ? 'onto' : 'from';
  return { account_kind, voucher_kind: 'transfer', side, because: 'ordinary', mass: gold(ug), ...more };
}

describe('reconciliation', () => {
  it('adds up every kind of account: each beyond the places is in one line, with its whole mass', () => {
    const sums = ACCOUNT_KINDS.map((kind, index) => aSum(kind, 10n ** BigInt(index)));
    const beyond = sums.filter((sum) => !isPlace(sum.account_kind));
    const closing = beyond.reduce((sum, { mass }) => subtractMass(sum, mass), ZERO_MASS);
    const { lines, left_over } = reconcile(ZERO_MASS, closing, sums);
    expect(left_over).toEqual(ZERO_MASS);
    const filled = lines.filter(({ mass }) => !isZeroMass(mass));
    expect(filled).toHaveLength(beyond.length);
  });

  it('fills each of its lines from some kind of account', () => {
    const because = ['ordinary', 'change_of_owner', 'closed_period'] as const;
    const lines = ACCOUNT_KINDS.flatMap((kind) =>
      (['onto', 'from'] as const).flatMap((side) =>
        (['sweep_up', 'weigh_back'] as const).flatMap((voucher_kind) =>
          because.map((why) => lineOf({ account_kind: kind, voucher_kind, side, because: why })),
        ),
      ),
    );
    expect([...new Set(lines.filter((line) => line !== null))].sort()).toEqual(
      [...RECONCILIATION_LINES].sort(),
    );
  });

  it('reads as the month went: 500 in, 120 sold, 2 lost, 1 swept up again', () => {
    const sums = [
      aSum('supplier', -500n, { voucher_kind: 'weigh_in' }),
      aSum('sold', 120n, { voucher_kind: 'delivery' }),
      aSum('working_loss', 2n, { voucher_kind: 'weigh_back' }),
      aSum('working_loss', -1n, { voucher_kind: 'sweep_up' }),
    ];
    const { lines, left_over } = reconcile(gold(40n), gold(419n), sums);
    expect(lines.filter(({ mass }) => !isZeroMass(mass))).toEqual([
      { line: 'from_suppliers', mass: gold(500n) },
      { line: 'sold', mass: gold(-120n) },
      { line: 'working_loss', mass: gold(-2n) },
      { line: 'swept_up', mass: gold(1n) },
    ]);
    expect(left_over).toEqual(ZERO_MASS);
  });

  it('gives a line of its own to what changed owner and to corrections of closed periods', () => {
    const sums = [
      aSum('bench', -30n, { voucher_kind: 'ownership', because: 'change_of_owner' }),
      aSum('safe', -7n, { voucher_kind: 'correction', because: 'closed_period' }),
      aSum('supplier', 7n, { voucher_kind: 'correction', because: 'closed_period' }),
    ];
    const { lines, left_over } = reconcile(gold(100n), gold(63n), sums);
    expect(lines.filter(({ mass }) => !isZeroMass(mass))).toEqual([
      { line: 'changed_owner', mass: gold(-30n) },
      { line: 'corrections', mass: gold(-7n) },
    ]);
    expect(left_over).toEqual(ZERO_MASS);
  });

  it('leaves nothing over whatever balanced sums a period has', () => {
    const beyond = ACCOUNT_KINDS.filter((kind) => !isPlace(kind));
    const mass = fc.record(
      Object.fromEntries(MASS_KEYS.map((key) => [key, fc.bigInt(-1_000_000_000_000n, 1_000_000_000_000n)])),
    );
    const rows = fc.array(
      fc.tuple(fc.constantFrom(...beyond), mass, fc.constantFrom('weigh_back', 'outturn', 'settle')),
      {
        maxLength: 40,
      },
    );
    fc.assert(
      fc.property(rows, mass, (drawn, start) => {
        const opening = massVector(start);
        const sums = drawn.map(([kind, of, voucher_kind]) =>
          aSum(kind, 1n, { voucher_kind, mass: massVector(of) }),
        );
        const closing = sums.reduce((sum, row) => subtractMass(sum, row.mass), opening);
        expect(reconcile(opening, closing, sums).left_over).toEqual(ZERO_MASS);
        expect(reconcile(opening, addMass(closing, gold(1n)), sums).left_over).toEqual(gold(1n));
      }),
    );
  });

  it('sets the closing book against the count', () => {
    expect(againstCount(gold(419n), gold(417n))).toEqual(gold(-2n));
  });
});
