/** Reports: balances, losses, reconciliation. Every figure carries the filter that opens its vouchers. */
import { ACCOUNT_KINDS } from '../book/account.ts';
import { FINDINGS } from '../loss/judgement.ts';
import { RECONCILIATION_LINES } from '../loss/reconciliation.ts';
import { METALS } from '../mass/vector.ts';
import { massFieldsOut } from './primitives.ts';
import { priceRow } from './registers.ts';
import { z } from './zod.ts';

/** Weighed metal, estimated metal and claims are never in one total. */
export const PARTS = ['weighed', 'estimated', 'claim'] as const;

export const balancesQuery = z.strictObject({
  by: z.enum(['place', 'metal', 'owner', 'lot']).default('place'),
  on: z.iso.date().optional(),
  format: z.enum(['json', 'csv']).default('json'),
});

export const balanceRow = z.object({
  key: z.string(),
  name: z.string(),
  kind: z.enum(ACCOUNT_KINDS).nullable(),
  part: z.enum(PARTS),
  ...massFieldsOut,
});
export type BalanceRow = z.output<typeof balanceRow>;

export const balancesJson = z.object({
  on: z.string(),
  currency: z.string(),
  prices: z.array(priceRow),
  rows: z.array(balanceRow.extend({ value: z.string().nullable() })),
  totals: z.array(z.object({ part: z.enum(PARTS), ...massFieldsOut, value: z.string().nullable() })),
});
export type BalancesJson = z.output<typeof balancesJson>;

export const lossesQuery = z.strictObject({
  by: z.enum(['operation', 'bench', 'person', 'alloy', 'job', 'month']).default('operation'),
  metal: z.enum(METALS).default('gold'),
  from: z.iso.date(),
  to: z.iso.date(),
  format: z.enum(['json', 'csv']).default('json'),
});
export type LossesQuery = z.output<typeof lossesQuery>;

export const lossRow = z.object({
  key: z.string(),
  name: z.string(),
  operation: z.string().nullable(),
  vouchers: z.string(),
  worked_g: z.string(),
  loss_g: z.string(),
  /** What of the loss corrects or reverses weigh-backs of before the period: shown apart from the period's own. */
  corrected_g: z.string(),
  allowance_g: z.string().nullable(),
  limit_of_error_g: z.string(),
  recovered_g: z.string().nullable(),
});

export const lossesJson = z.object({
  metal: z.enum(METALS),
  from: z.string(),
  to: z.string(),
  rows: z.array(
    lossRow.extend({
      gross_percent: z.string().nullable(),
      net_percent: z.string().nullable(),
      finding: z.enum(FINDINGS),
      value: z.string().nullable(),
    }),
  ),
  price: priceRow.nullable(),
  currency: z.string(),
});
export type LossesJson = z.output<typeof lossesJson>;

export const reconciliationQuery = z.strictObject({
  from: z.iso.date(),
  to: z.iso.date(),
  owner: z.union([z.literal('house'), z.literal('all'), z.uuid()]).default('house'),
  format: z.enum(['json', 'csv']).default('json'),
});
export type ReconciliationQuery = z.output<typeof reconciliationQuery>;

export const reconciliationJson = z.object({
  from: z.string(),
  to: z.string(),
  owner: z.string(),
  opening: z.object(massFieldsOut),
  lines: z.array(
    z.object({
      line: z.enum(RECONCILIATION_LINES),
      name: z.string(),
      account_kind: z.string().nullable(),
      ...massFieldsOut,
    }),
  ),
  closing: z.object(massFieldsOut),
  left_over: z.object(massFieldsOut),
  places: z.array(
    z.object({
      account_id: z.string(),
      name: z.string(),
      kind: z.enum(ACCOUNT_KINDS),
      metal: z.enum(METALS),
      opening_g: z.string(),
      in_g: z.string(),
      out_g: z.string(),
      loss_g: z.string(),
      closing_g: z.string(),
    }),
  ),
});
export type ReconciliationJson = z.output<typeof reconciliationJson>;
