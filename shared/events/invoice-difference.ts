/**
 * What a delivery weighs against what its invoice says: in grams gross and fine, in percent and in money. Beyond the
 * workshop's tolerance the keeper decides: accept at the weighed mass, claim, or send back (DESIGN section 3).
 */
import type { Fineness } from '../alloy/fineness.ts';
import type { MetalPrice, WorkshopSettings } from '../book/facts.ts';
import { Decimal } from '../decimal.ts';
import { massFromFineness } from '../mass/apportion.ts';
import type { Micrograms } from '../mass/micrograms.ts';
import { toUnit } from '../mass/units.ts';
import type { MassVector } from '../mass/vector.ts';
import { METALS, fineTotal, subtractMass } from '../mass/vector.ts';

/** A line of a delivery: what the invoice says, what the balance shows, and the fineness both are reckoned at. */
export interface InvoicedLine {
  readonly invoice_ug: Micrograms;
  readonly weighed_ug: Micrograms;
  readonly fineness: Fineness;
}

export interface InvoiceDifference {
  /** Weighed less invoiced, in micrograms gross: below zero less came than was invoiced. */
  readonly difference_ug: Micrograms;
  /** The same in fine metal. */
  readonly fine_difference_ug: Micrograms;
  /** Of the invoiced gross. */
  readonly percent: Decimal;
  /** The fine difference at the prices given, or null where a metal in it has no price. */
  readonly money: Decimal | null;
  /** Whether it is accepted without a decision. */
  readonly within: boolean;
}

/**
 * The difference of a line to its invoice. Money is valued with the newest price of each metal in the workshop's
 * currency.
 */
export function invoiceDifference(
  line: InvoicedLine,
  by: {
    readonly prices: readonly MetalPrice[];
    readonly settings: Pick<WorkshopSettings, 'currency' | 'invoice_tolerance_ug'>;
  },
): InvoiceDifference {
  const weighed = massFromFineness(line.weighed_ug, line.fineness);
  const difference = subtractMass(weighed, massFromFineness(line.invoice_ug, line.fineness));
  const off = difference.gross < 0n ? -difference.gross : difference.gross;
  const share = new Decimal(difference.gross.toString()).div(line.invoice_ug.toString());
  return {
    difference_ug: difference.gross,
    fine_difference_ug: fineTotal(difference),
    percent: share.times(100),
    money: valueOf(difference, by.prices, by.settings.currency),
    within: off <= by.settings.invoice_tolerance_ug,
  };
}

function valueOf(mass: MassVector, prices: readonly MetalPrice[], currency: string): Decimal | null {
  let sum = new Decimal(0);
  for (const metal of METALS) {
    if (mass[metal] === 0n) continue;
    const known = prices.filter((price) => price.metal === metal && price.currency === currency);
    const newest = known.reduce<MetalPrice | null>(
      (best, price) => (best === null || price.priced_on > best.priced_on ? price : best),
      null,
    );
    if (newest === null) return null;
    sum = sum.plus(toUnit(mass[metal], 'ozt').times(newest.price_per_ozt));
  }
  return sum;
}
