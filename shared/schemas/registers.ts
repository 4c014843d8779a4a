/** What the workshop keeps in registers, as the server answers it. */
import { ACCOUNT_KINDS } from '../book/account.ts';
import { METALS } from '../mass/vector.ts';
import { massFieldsOut } from './primitives.ts';
import { z } from './zod.ts';

export const accountRow = z.object({
  id: z.string(),
  kind: z.enum(ACCOUNT_KINDS),
  name: z.string(),
  custodian_id: z.string().nullable(),
  custodian_name: z.string().nullable(),
  party_id: z.string().nullable(),
  party_name: z.string().nullable(),
  operation: z.string().nullable(),
  closed: z.boolean(),
  /** How many lots have anything there. */
  lots: z.string(),
  ...massFieldsOut,
});
export type AccountRow = z.output<typeof accountRow>;

export const partyRow = z.object({
  id: z.string(),
  kind: z.enum(['supplier', 'customer', 'refiner', 'outworker', 'courier']),
  name: z.string(),
  email: z.string().nullable(),
  phone: z.string().nullable(),
  address: z.string().nullable(),
});
export type PartyRow = z.output<typeof partyRow>;

export const alloyRow = z.object({
  id: z.string(),
  name: z.string(),
  gold_permille: z.string(),
  silver_permille: z.string(),
  platinum_permille: z.string(),
  palladium_permille: z.string(),
  colour: z.string().nullable(),
  source: z.string().nullable(),
  retired: z.boolean(),
});
export type AlloyRow = z.output<typeof alloyRow>;

export const priceRow = z.object({
  id: z.string(),
  metal: z.enum(METALS),
  currency: z.string(),
  price_per_ozt: z.string(),
  priced_on: z.string(),
  source: z.string(),
});
export type PriceRow = z.output<typeof priceRow>;

export const allowanceRow = z.object({
  id: z.string(),
  operation: z.string(),
  alloy: z.string().nullable(),
  percent: z.string(),
  fixed_g: z.string(),
  from_date: z.string(),
});
export type AllowanceRow = z.output<typeof allowanceRow>;

export const jobRow = z.object({
  id: z.string(),
  code: z.string(),
  title: z.string(),
  customer_id: z.string().nullable(),
  customer_name: z.string().nullable(),
  opened_on: z.string(),
});
export type JobRow = z.output<typeof jobRow>;

export const periodRow = z.object({
  id: z.string(),
  first_day: z.string(),
  last_day: z.string(),
  closed: z.boolean(),
});
export type PeriodRow = z.output<typeof periodRow>;

export const settingRow = z.object({ name: z.string(), detail: z.record(z.string(), z.unknown()) });
export type SettingRow = z.output<typeof settingRow>;

/** One answer per register: `{rows: […]}`. */
export const rowsOf = <T extends z.ZodType>(row: T) => z.object({ rows: z.array(row) });
