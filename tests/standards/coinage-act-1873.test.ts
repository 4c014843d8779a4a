/**
 * US Coinage Act 1873 (17 Stat. 431), ss. 42–43 (read; worked example WE-131, whose 100 000 oz are an example): wastage of
 * the melter and refiner is allowed up to 1/1000 of gold and 1.5/1000 of silver delivered to him.
 */
import { expect, it } from 'vitest';
import type { Allowance } from '../../shared/book/facts.ts';
import { Decimal } from '../../shared/decimal.ts';
import { allowedLoss } from '../../shared/loss/allowance.ts';
import { fromUnit } from '../../shared/mass/units.ts';

const ounces = (count: number) => fromUnit(new Decimal(count), 'ozt');
const limit = (percent: string): Allowance => ({
  operation: 'refining',
  alloy: null,
  percent: new Decimal(percent),
  fixed_ug: 0n,
  from: '1873-04-01',
});

it.each([
  ['gold', '0.1', 100],
  ['silver', '0.15', 150],
])('of 100 000 oz of %s, %s %% may be wasted: %d oz', (_, percent, allowed) => {
  expect(allowedLoss(limit(percent), ounces(100_000))).toBe(ounces(allowed));
});
