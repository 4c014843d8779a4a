/** Vouchers and acts as the server shows them: a line of a list, and one whole, with what proves it. */
import { RECONCILIATION_LINES } from '../loss/reconciliation.ts';
import { massFieldsOut } from './primitives.ts';
import { recordKind } from './book.ts';
import { z } from './zod.ts';

export const voucherRow = z.object({
  id: z.string(),
  sequence: z.string(),
  kind: recordKind,
  business_date: z.string(),
  recorded_at: z.string(),
  recorded_by_name: z.string(),
  approved_by_name: z.string().nullable(),
  operation: z.string().nullable(),
  bench_name: z.string().nullable(),
  job_code: z.string().nullable(),
  counterparty_name: z.string().nullable(),
  reverses: z.string().nullable(),
  reversed_by: z.string().nullable(),
  note: z.string().nullable(),
  /** Sum of what came in anywhere, so that a list shows how much was moved. */
  ...massFieldsOut,
});
export type VoucherRow = z.output<typeof voucherRow>;

export const voucherPage = z.object({ rows: z.array(voucherRow), next_cursor: z.string().nullable() });

export const voucherEntry = z.object({
  line: z.string(),
  account_id: z.string(),
  account_name: z.string(),
  account_kind: z.string(),
  lot_id: z.string(),
  lot_code: z.string(),
  lot_description: z.string(),
  ...massFieldsOut,
  pieces: z.string().nullable(),
});
export type VoucherEntry = z.output<typeof voucherEntry>;

export const voucherWhole = voucherRow.extend({
  recorded_by: z.string(),
  approved_by: z.string().nullable(),
  detail: z.record(z.string(), z.unknown()),
  documents: z.array(z.object({ id: z.string(), sha256: z.string(), name: z.string().nullable() })),
  entries: z.array(voucherEntry),
  handovers: z.array(
    z.object({
      id: z.string(),
      place_name: z.string(),
      from_name: z.string(),
      to_name: z.string(),
      to_person_id: z.string(),
      state: z.string(),
    }),
  ),
  previous_hash: z.string(),
  hash: z.string(),
  line: z.string(),
});
export type VoucherWhole = z.output<typeof voucherWhole>;

const choice = z.string().max(40).optional();

/** Filters of the register of vouchers. */
export const voucherQuery = z.strictObject({
  cursor: z
    .string()
    .regex(/^\d{1,18}$/)
    .optional(),
  limit: z.coerce.number().int().min(1).max(200).default(50),
  kind: recordKind.optional(),
  /** Vouchers only, or acts too. */
  show: z.enum(['vouchers', 'all']).default('vouchers'),
  from: z.iso.date().optional(),
  to: z.iso.date().optional(),
  account_id: z.uuid().optional(),
  lot_id: z.uuid().optional(),
  job_id: z.uuid().optional(),
  person_id: z.uuid().optional(),
  operation: choice,
  /** The vouchers behind a figure of a reconciliation: its line, and whose metal. */
  line: z.enum(RECONCILIATION_LINES).optional(),
  owner: z.union([z.literal('house'), z.literal('all'), z.uuid()]).default('all'),
  format: z.enum(['json', 'csv']).default('json'),
});
export type VoucherQuery = z.output<typeof voucherQuery>;
