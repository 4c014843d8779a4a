/**
 * What the workshop has set, read from the details of its limit_set and estimate_set acts. Each setting has a name
 * of its own; what was never set has the default here, which is common practice without a source, for the workshop
 * to change.
 */
import { Decimal } from '../decimal.ts';
import { METALS } from '../mass/vector.ts';
import { gramsOrNone, percent, permille } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';
import type { BinFeed, WorkshopSettings } from './facts.ts';
import { LOT_FORMS } from './lot.ts';

const settingDetail = z.discriminatedUnion('what', [
  z.object({
    what: z.literal('filings'),
    name: z.string(),
    metal_permille: permille,
  }),
  z.object({
    what: z.literal('invoice_tolerance'),
    name: z.string(),
    mass_g: gramsOrNone,
  }),
  z.object({
    what: z.literal('weighing'),
    name: z.string(),
    mass_g: gramsOrNone,
  }),
  z.object({
    what: z.literal('night_limit'),
    name: z.string(),
    amount: z.string(),
  }),
  z.object({
    what: z.literal('claim'),
    name: z.string(),
    account_id: z.string(),
    metal: z.enum(METALS),
    mass_g: gramsOrNone,
  }),
  z.object({
    what: z.literal('acceptance'),
    name: z.string(),
    form: z.enum(LOT_FORMS),
    checks: z.array(z.string()),
  }),
  z.object({
    what: z.literal('bin_feed'),
    name: z.string(),
    bin_id: z.string(),
    operation: z.string(),
    bench_id: z.string().nullable(),
    gold_percent: percent,
    silver_percent: percent,
    platinum_percent: percent,
    palladium_percent: percent,
  }),
]);
export type SettingDetail = z.output<typeof settingDetail>;

export interface ReadSettings {
  readonly settings: WorkshopSettings;
  readonly bin_feeds: readonly BinFeed[];
  /** Most value that may be out of the safe at night, in the workshop's currency; null where none is set. */
  readonly night_limit: Decimal | null;
}

/** Reads the details as they stand in the table `setting`. Throws where one is not of a known kind. */
export function readSettings(details: readonly unknown[], currency: string, time_zone: string): ReadSettings {
  const known = details.map((detail) => settingDetail.parse(detail));
  const of = <W extends SettingDetail['what']>(what: W) =>
    known.filter((detail): detail is Extract<SettingDetail, { what: W }> => detail.what === what);
  return {
    settings: {
      currency,
      time_zone,
      filings_metal_permille: of('filings')[0]?.metal_permille ?? new Decimal(985),
      invoice_tolerance_ug: of('invoice_tolerance')[0]?.mass_g ?? 100_000n,
      weighing_u_ug: of('weighing')[0]?.mass_g ?? 1_000n,
      claim_limits: of('claim').map(({ account_id, metal, mass_g }) => ({
        account_id,
        metal,
        limit_ug: mass_g,
      })),
      acceptance: of('acceptance').map(({ form, checks }) => ({
        form,
        checks,
      })),
    },
    bin_feeds: of('bin_feed').map((feed) => ({
      bin_id: feed.bin_id,
      operation: feed.operation,
      bench_id: feed.bench_id,
      rate_percent: {
        gold: feed.gold_percent,
        silver: feed.silver_percent,
        platinum: feed.platinum_percent,
        palladium: feed.palladium_percent,
      },
    })),
    night_limit: of('night_limit').map(({ amount }) => new Decimal(amount))[0] ?? null,
  };
}
