/**
 * What an operation may lose: a percentage of the fine metal worked plus a fixed mass, by operation and alloy, from a
 * date on. The figures are the workshop's own; no published table is to be had (TRADE-FACTS 6.1).
 */
import type { Allowance } from '../book/facts.ts';
import { Decimal } from '../decimal.ts';
import type { Micrograms } from '../mass/micrograms.ts';

/** The allowance in force: the alloy's own before the general one, then the newest that holds on the day. */
export function allowanceOn(
  allowances: readonly Allowance[],
  of: { readonly operation: string; readonly alloy: string | null; readonly date: string },
): Allowance | null {
  const inForce = allowances.filter(
    (a) => a.operation === of.operation && a.from <= of.date && (a.alloy === null || a.alloy === of.alloy),
  );
  const newest = (list: readonly Allowance[]) =>
    list.reduce<Allowance | null>((best, a) => (best === null || a.from >= best.from ? a : best), null);
  return newest(inForce.filter((a) => a.alloy !== null)) ?? newest(inForce);
}

/** The fine mass that may be lost of a fine mass worked, in micrograms, rounded down. */
export function allowedLoss(allowance: Allowance, worked_ug: Micrograms): Micrograms {
  const share = new Decimal(worked_ug.toString()).times(allowance.percent).div(100).floor();
  return BigInt(share.toFixed(0)) + allowance.fixed_ug;
}

/** Loss as a percentage of worked, both fine, in micrograms; null where nothing was worked. */
export function lossPercent(loss_ug: Micrograms, worked_ug: Micrograms): Decimal | null {
  if (worked_ug <= 0n) return null;
  return new Decimal(loss_ug.toString()).times(100).div(worked_ug.toString());
}
