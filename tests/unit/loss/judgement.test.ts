/** What may be lost, and the word for what was. */
import { describe, expect, it } from 'vitest';
import type { Allowance } from '../../../shared/book/facts.ts';
import { Decimal } from '../../../shared/decimal.ts';
import { allowanceOn, allowedLoss, lossPercent } from '../../../shared/loss/allowance.ts';
import { judgeLoss } from '../../../shared/loss/judgement.ts';

const allowance = (more: Partial<Allowance> = {}): Allowance => ({
  operation: 'filing',
  alloy: null,
  percent: new Decimal('1.5'),
  fixed_ug: 20_000n,
  from: '2026-01-01',
  ...more,
});

describe('an allowance', () => {
  it('is a share of worked fine metal plus a fixed mass, rounded down', () => {
    expect(allowedLoss(allowance(), 10_000_001n)).toBe(170_000n);
    expect(allowedLoss(allowance(), 0n)).toBe(20_000n);
  });

  it('is the newest that holds on the day, the alloy’s own before the general one', () => {
    const general = allowance();
    const newer = allowance({ from: '2026-03-01' });
    const own = allowance({ alloy: '750 yellow', from: '2026-02-01' });
    const all = [newer, own, general, allowance({ operation: 'setting', from: '2026-04-01' })];
    const on = (date: string, alloy: string | null = null) =>
      allowanceOn(all, { operation: 'filing', alloy, date });
    expect(on('2025-12-31')).toBeNull();
    expect(on('2026-02-28')).toBe(general);
    expect(on('2026-03-01')).toBe(newer);
    expect(on('2026-03-01', '750 yellow')).toBe(own);
    expect(on('2026-01-15', '750 yellow')).toBe(general);
  });

  it('gives no percentage where nothing was worked', () => {
    expect(lossPercent(234_000n, 11_250_000n)?.toFixed(2)).toBe('2.08');
    expect(lossPercent(1n, 0n)).toBeNull();
  });
});

describe('the word for a loss', () => {
  it('turns at the limit of error and at the allowance, each to the microgram', () => {
    const word = (loss: bigint) => judgeLoss(loss, 100n, 10n);
    expect([10n, 11n, 100n, 101n, 110n, 111n].map(word)).toEqual([
      'within_weighing_error',
      'within_allowance',
      'within_allowance',
      'over_within_error',
      'over_within_error',
      'over_allowance',
    ]);
    expect([-10n, -11n].map(word)).toEqual(['within_weighing_error', 'more_back']);
  });

  it('says so where no allowance is set', () => {
    expect(judgeLoss(11n, null, 10n)).toBe('no_allowance');
    expect(judgeLoss(10n, null, 10n)).toBe('within_weighing_error');
  });
});
