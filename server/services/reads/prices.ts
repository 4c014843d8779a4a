/** The newest price of each metal on a day, in the workshop's currency. */
import { Decimal } from '../../../shared/decimal.ts';
import type { MetalPrice } from '../../../shared/book/facts.ts';
import { priceRow } from '../../../shared/schemas/registers.ts';
import type { PriceRow } from '../../../shared/schemas/registers.ts';
import type { Tx } from '../../db/rows.ts';

/** Prices that hold on a business date; a metal without one is missing. */
export function pricesOn(tx: Tx, date: string): Promise<PriceRow[]> {
  return tx.rows(
    priceRow,
    `SELECT DISTINCT ON (p.metal) p.id::text, p.metal, p.currency, trim_scale(p.price_per_ozt)::text AS price_per_ozt, p.priced_on::text, p.source
      FROM price p JOIN workshop w ON w.workshop_id = p.workshop_id AND w.currency = p.currency
      WHERE p.workshop_id = current_workshop() AND p.priced_on <= $1::date ORDER BY p.metal, p.priced_on DESC, p.sequence DESC`,
    [date],
  );
}

export const asPrices = (rows: readonly PriceRow[]): MetalPrice[] =>
  rows.map((row) => ({ ...row, price_per_ozt: new Decimal(row.price_per_ozt) }));
