/** Statements beside the reports: an owner's metal, and what became of each consignment to a refiner. */
import { VOUCHER_KINDS } from '../book/kinds.ts';
import { RECONCILIATION_LINES } from '../loss/reconciliation.ts';
import { METALS } from '../mass/vector.ts';
import { massFieldsOut } from './primitives.ts';
import { reconciliationJson } from './reports.ts';
import { z } from './zod.ts';

const masses = z.object(massFieldsOut);
const format = z.enum(['json', 'csv']).default('json');

export const ownerStatementQuery = z.strictObject({ from: z.iso.date(), to: z.iso.date(), format });
export type OwnerStatementQuery = z.output<typeof ownerStatementQuery>;

/** What one voucher added to the owner's metal in the house (below zero: took from it). */
export const ownerMovement = z.object({
  sequence: z.string(),
  id: z.string(),
  kind: z.enum(VOUCHER_KINDS),
  business_date: z.string(),
  line: z.enum(RECONCILIATION_LINES),
  name: z.string(),
  lot_code: z.string(),
  lot_description: z.string(),
  job_code: z.string().nullable(),
  note: z.string().nullable(),
  ...massFieldsOut,
});

export const ownerStatementJson = z.object({
  owner: z.object({ id: z.string(), name: z.string(), kind: z.string() }),
  from: z.string(),
  to: z.string(),
  opening: masses,
  lines: reconciliationJson.shape.lines,
  closing: masses,
  movements: z.array(ownerMovement),
  /** Whether there are more movements than are shown; then a shorter period shows them. */
  more: z.boolean(),
  /** Written off and not found again, up to the last day. */
  lost: masses,
  /** House metal that became the owner's outside any job, up to the last day. */
  made_good: masses,
  /** Lost and not yet made good. */
  owed: masses,
});
export type OwnerStatementJson = z.output<typeof ownerStatementJson>;

export const CONSIGNMENT_STATES = ['on_the_way', 'at_refiner', 'part_settled', 'settled'] as const;

export const refinersQuery = z.strictObject({
  from: z.iso.date().optional(),
  to: z.iso.date().optional(),
  refiner_id: z.uuid().optional(),
  /** Consignments before this number. */
  cursor: z
    .string()
    .regex(/^\d{1,18}$/)
    .optional(),
  limit: z.coerce.number().int().min(1).max(200).default(50),
  format,
});
export type RefinersQuery = z.output<typeof refinersQuery>;

/** Sent − credited = weighing difference + assay difference + deduction + charge in metal, to the last figure. */
export const consignmentMetal = z.object({
  metal: z.enum(METALS),
  /** What the book had in it when it was sent. */
  expected_g: z.string(),
  weighing_difference_g: z.string(),
  assayed_g: z.string(),
  assay_difference_g: z.string(),
  deduction_g: z.string(),
  charge_g: z.string(),
  credited_g: z.string(),
});

const consignmentFields = {
  id: z.string(),
  sequence: z.string(),
  code: z.string().nullable(),
  refiner_id: z.string(),
  refiner_name: z.string(),
  courier_name: z.string(),
  declared_value: z.string().nullable(),
  sent_on: z.string(),
  arrived_on: z.string().nullable(),
  settled_on: z.string().nullable(),
  state: z.enum(CONSIGNMENT_STATES),
  sent_gross_g: z.string(),
  received_gross_g: z.string().nullable(),
  statements: z.string().nullable(),
  /** Charges in money, from the statements. */
  charges: z.string().nullable(),
};
export const consignmentFound = z.object({ ...consignmentFields, metals: z.array(consignmentMetal) });

export const consignmentRow = z.object({
  ...consignmentFields,
  /** Days from sending to the last outturn. */
  days: z.string().nullable(),
  metals: z.array(
    consignmentMetal.extend({
      /** Credited of expected, in percent; none before the outturn. */
      credited_percent: z.string().nullable(),
    }),
  ),
});
export type ConsignmentRow = z.output<typeof consignmentRow>;

export const refinersJson = z.object({ rows: z.array(consignmentRow), next_cursor: z.string().nullable() });
