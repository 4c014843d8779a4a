/**
 * A weighing: gross on the balance, less tare, less stones and other parts that aren't stock metal. The net is
 * the mass that is booked; the weighing itself is kept in the voucher's detail, so that a limit of error can be
 * reckoned from the records alone.
 */
import type { DetailLeaf, Outcome } from '../book/draft.ts';
import { accept, refuse } from '../book/draft.ts';
import { fromUnit } from '../mass/units.ts';
import type { Micrograms } from '../mass/micrograms.ts';
import { printGrams } from '../mass/micrograms.ts';
import { Decimal } from '../decimal.ts';
import { gramsAboveZero, gramsOrNone, id } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';

export const weighingSchema = z.strictObject({
  gross_g: gramsAboveZero,
  tare_g: gramsOrNone.default(0n),
  /** Weighed now, read from the container's mark, or no container at all. */
  tare_kind: z.enum(['measured', 'marked', 'none']).default('none'),
  /** Stones and other parts taken off, in grams. */
  stones_g: gramsOrNone.default(0n),
  /** The same in metric carats (0.2 g each); both are taken off. */
  stones_ct: z
    .string()
    .regex(/^\d{1,6}(\.\d{1,4})?$/, 'Stones are entered in carats, such as 1.85.')
    .default('0'),
  balance_id: id.nullable().default(null),
  how: z.enum(['typed', 'read']).default('typed'),
  /** When it was weighed, where the client knows it; UTC, ISO 8601. */
  taken_at: z.iso.datetime().nullable().default(null),
});

export type Weighing = z.output<typeof weighingSchema>;

/** Micrograms of stones and other parts to take off a weighing: grams and carats together (1 ct = 0.2 g). */
export function stonesOf(weighing: Weighing): Micrograms {
  return weighing.stones_g + fromUnit(new Decimal(weighing.stones_ct), 'ct');
}

/**
 * The net mass of a weighing, in micrograms.
 * Refuses tare at or over gross, and stones that leave no metal. `field` is the path of the weighing in the input.
 */
export function netOf(weighing: Weighing, field: string): Outcome<Micrograms> {
  const stones = stonesOf(weighing);
  if (weighing.tare_g >= weighing.gross_g) {
    const sentence = 'Tare is as heavy as gross or heavier. Weigh the empty dish again.';
    return refuse({ code: 'tare_over_gross', field: `${field}.tare_g`, sentence });
  }
  const net = weighing.gross_g - weighing.tare_g - stones;
  if (net <= 0n) {
    const sentence = 'The stones weigh as much as the whole piece. Look at the carats again.';
    return refuse({ code: 'stones_over_net', field: `${field}.stones_ct`, sentence });
  }
  return accept(net);
}

/** A weighing as a row of a voucher's `detail.weighings`; `line` is the line of the voucher that it gave. */
export function weighingDetail(
  weighing: Weighing,
  at: { readonly id: string; readonly line: string; readonly taken_by: string },
): Readonly<Record<string, DetailLeaf>> {
  return {
    id: at.id,
    line: at.line,
    gross_g: printGrams(weighing.gross_g),
    tare_g: printGrams(weighing.tare_g),
    tare_kind: weighing.tare_kind,
    stones_g: printGrams(stonesOf(weighing)),
    balance_id: weighing.balance_id,
    how: weighing.how,
    taken_at: weighing.taken_at,
    taken_by: at.taken_by,
  };
}
