/** Lots as the server shows them: a line of a list, and one whole with where it lies, its trail and its family. */
import { BASES, LOT_FORMS, ORIGINS, STANDINGS } from '../book/lot.ts';
import { METALS } from '../mass/vector.ts';
import { recordKind } from './book.ts';
import { massFieldsOut } from './primitives.ts';
import { z } from './zod.ts';

export const lotRow = z.object({
  id: z.string(),
  code: z.string(),
  form: z.enum(LOT_FORMS),
  alloy: z.string().nullable(),
  owner_id: z.string().nullable(),
  owner_name: z.string().nullable(),
  origin: z.enum(ORIGINS),
  basis: z.enum(BASES),
  /** Spent where nothing of it is in any place. */
  standing: z.enum(STANDINGS),
  hold_reason: z.string().nullable(),
  hold_until: z.string().nullable(),
  description: z.string(),
  described_on: z.string(),
  /** In the places of the house and outside, now. */
  ...massFieldsOut,
  pieces: z.string().nullable(),
});
export type LotRow = z.output<typeof lotRow>;

export const lotPage = z.object({ rows: z.array(lotRow), next_cursor: z.string().nullable() });

export const lotQuery = z.strictObject({
  /** The running number of the code to go on below. */
  cursor: z
    .string()
    .regex(/^\d{1,15}$/)
    .optional(),
  limit: z.coerce.number().int().min(1).max(200).default(50),
  q: z.string().max(60).optional(),
  form: z.enum(LOT_FORMS).optional(),
  metal: z.enum(METALS).optional(),
  owner: z.string().max(40).optional(),
  place_id: z.uuid().optional(),
  standing: z.enum(STANDINGS).optional(),
  format: z.enum(['json', 'csv']).default('json'),
});
export type LotQuery = z.output<typeof lotQuery>;

export const lotHolding = z.object({
  account_id: z.string(),
  account_name: z.string(),
  account_kind: z.string(),
  custodian_name: z.string().nullable(),
  since: z.string(),
  ...massFieldsOut,
  pieces: z.string().nullable(),
});

export const lotTrail = z.object({
  voucher_id: z.string(),
  sequence: z.string(),
  kind: recordKind,
  business_date: z.string(),
  recorded_at: z.string(),
  recorded_by_name: z.string(),
  from_names: z.string().nullable(),
  to_names: z.string().nullable(),
  job_code: z.string().nullable(),
  gross_g: z.string(),
  gold_g: z.string(),
  reversed: z.boolean(),
});

export const lotRelative = z.object({
  id: z.string(),
  code: z.string(),
  form: z.enum(LOT_FORMS),
  description: z.string(),
  /** Steps away from this lot: below zero came before, above zero came of it. */
  depth: z.number(),
  next_id: z.string(),
  gross_g: z.string(),
  gold_g: z.string(),
});
export type LotRelative = z.output<typeof lotRelative>;

export const lotWhole = lotRow.extend({
  gold_permille: z.string(),
  silver_permille: z.string(),
  platinum_permille: z.string(),
  palladium_permille: z.string(),
  holdings: z.array(lotHolding),
  trail: z.array(lotTrail),
  family: z.array(lotRelative),
});
export type LotWhole = z.output<typeof lotWhole>;
