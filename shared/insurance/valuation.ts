/** What metal is worth at a stated price: fine mass in troy ounces (31.1034768 g exactly) times the price of one. */
import type { MetalPrice } from '../book/facts.ts';
import { Decimal } from '../decimal.ts';
import { toUnit } from '../mass/units.ts';
import type { MassVector } from '../mass/vector.ts';
import { METALS } from '../mass/vector.ts';

/** The value of the fine metal of a mass, two decimals half to even; null where a metal in it has no price. */
export function valueOf(mass: MassVector, prices: readonly MetalPrice[]): Decimal | null {
  let sum = new Decimal(0);
  for (const metal of METALS) {
    if (mass[metal] === 0n) continue;
    const price = prices.find((known) => known.metal === metal);
    if (price === undefined) return null;
    sum = sum.plus(toUnit(mass[metal], 'ozt').times(price.price_per_ozt));
  }
  return sum.toDecimalPlaces(2);
}
