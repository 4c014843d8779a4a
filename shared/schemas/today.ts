/** The keeper's day: who holds what out of the safe, what waits at the counter, where the house's metal lies. */
import { ACCOUNT_KINDS } from '../book/account.ts';
import { LOT_FORMS, STANDINGS } from '../book/lot.ts';
import { METALS } from '../mass/vector.ts';
import { metalRequest } from './metal-request.ts';
import { massFieldsOut } from './primitives.ts';
import { priceRow } from './registers.ts';
import { z } from './zod.ts';

export const lotBrief = z.object({
  id: z.string(),
  code: z.string(),
  form: z.enum(LOT_FORMS),
  description: z.string(),
  standing: z.enum(STANDINGS),
});
export type LotBrief = z.output<typeof lotBrief>;

export const handoverRow = z.object({
  id: z.string(),
  voucher_id: z.string(),
  sequence: z.string(),
  kind: z.string(),
  place_id: z.string(),
  place_name: z.string(),
  from_name: z.string(),
  to_person_id: z.string(),
  to_name: z.string(),
  state: z.enum(['waiting', 'disputed']),
  recorded_at: z.string(),
  job_code: z.string().nullable(),
  lots: z.array(lotBrief),
  ...massFieldsOut,
});
export type HandoverRow = z.output<typeof handoverRow>;

export const holderRow = z.object({
  account_id: z.string(),
  kind: z.enum(ACCOUNT_KINDS),
  name: z.string(),
  custodian_name: z.string().nullable(),
  since: z.string(),
  lots: z.array(lotBrief),
  ...massFieldsOut,
});

export const todayJson = z.object({
  today: z.string(),
  currency: z.string(),
  night_limit: z.string().nullable(),
  prices: z.array(priceRow),
  holders: z.array(holderRow.extend({ value: z.string().nullable() })),
  value_out: z.string().nullable(),
  handovers: z.array(handoverRow),
  holds: z.array(lotBrief.extend({ hold_reason: z.string().nullable(), hold_until: z.string().nullable() })),
  requests: z.array(metalRequest),
  consignments: z.array(
    z.object({
      id: z.string(),
      code: z.string(),
      destination_name: z.string(),
      business_date: z.string(),
      state: z.enum(['on_the_way', 'to_settle']),
    }),
  ),
  to_explain: z.array(
    z.object({
      id: z.string(),
      sequence: z.string(),
      operation: z.string().nullable(),
      bench_name: z.string().nullable(),
      business_date: z.string(),
    }),
  ),
  signatures: z.number(),
  house: z.array(
    z.object({
      metal: z.enum(METALS),
      safe_g: z.string(),
      benches_g: z.string(),
      bins_g: z.string(),
      outside_g: z.string(),
      house_g: z.string(),
    }),
  ),
});
export type TodayJson = z.output<typeof todayJson>;

export const myBenchJson = z.object({
  places: z.array(z.object({ id: z.string(), name: z.string() })),
  holdings: z.array(
    z.object({
      account_id: z.string(),
      job_id: z.string().nullable(),
      job_code: z.string().nullable(),
      lot: lotBrief,
      ...massFieldsOut,
      pieces: z.string().nullable(),
    }),
  ),
  handovers: z.array(handoverRow),
  requests: z.array(metalRequest),
  jobs: z.array(z.object({ id: z.string(), code: z.string(), title: z.string() })),
  alloys: z.array(z.string()),
});
export type MyBenchJson = z.output<typeof myBenchJson>;
