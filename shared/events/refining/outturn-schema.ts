/** What a refiner's statement says, as it is entered: per lot and metal, how it is paid, what is charged. */
import { METALS } from '../../mass/vector.ts';
import { gramsAboveZero, gramsOrNone, id, money, shortText } from '../../schemas/primitives.ts';
import { z } from '../../schemas/zod.ts';
import { commonFields } from '../common-fields.ts';

const metal = z.enum(METALS);

const settledMetal = z.strictObject({
  metal,
  /** Fine metal that the refiner found, by assay of the bar. */
  assayed_g: gramsOrNone,
  /** Fine metal that the refiner's paper credits, to its last figure. */
  credited_g: gramsOrNone,
  /** Charges taken in metal. */
  charge_g: gramsOrNone.default(0n),
});

const lineSchema = z.strictObject({
  lot_id: id,
  /** All that lies there, or a part of it (an advance); what is not settled stays at the refiner. */
  settle: z.discriminatedUnion('how', [
    z.strictObject({ how: z.literal('all') }),
    z.strictObject({ how: z.literal('part'), gross_g: gramsAboveZero }),
  ]),
  /** Weight of the poured bar, where the paper names it. */
  after_melt_g: gramsAboveZero.nullable().default(null),
  metals: z.array(settledMetal).min(1, 'Enter at least one metal of the statement.').max(METALS.length),
});

const paymentSchema = z.discriminatedUnion('way', [
  z.strictObject({ way: z.literal('metal_account'), account_id: id, metal, mass_g: gramsAboveZero }),
  z.strictObject({ way: z.literal('returned'), metal, mass_g: gramsAboveZero }),
  z.strictObject({ way: z.literal('money'), metal, mass_g: gramsAboveZero, amount: money }),
]);

export const outturnSchema = z.strictObject({
  ...commonFields,
  refiner_id: id,
  consign_id: id.nullable().default(null),
  statement: shortText,
  stage: z.enum(['advance', 'settlement', 'control_assay', 'umpire']).default('settlement'),
  lines: z.array(lineSchema).min(1, 'Nothing is settled yet. Add the first lot of the statement.').max(50),
  payments: z.array(paymentSchema).max(20).default([]),
  /** Charges in money; recorded, not booked. */
  charges: z
    .array(z.strictObject({ what: shortText, amount: money }))
    .max(20)
    .default([]),
});

export type OutturnInput = z.output<typeof outturnSchema>;
export type OutturnLine = OutturnInput['lines'][number];
export type OutturnPayment = OutturnInput['payments'][number];
