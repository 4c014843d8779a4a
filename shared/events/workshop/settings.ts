/** Limits and estimates that the workshop sets: tolerance, filings' share, what feeds a bin, credit on a metal account. */
import type { Detail } from '../../book/draft.ts';
import { accept } from '../../book/draft.ts';
import { LOT_FORMS } from '../../book/lot.ts';
import { METALS } from '../../mass/vector.ts';
import { printGrams } from '../../mass/micrograms.ts';
import { gramsOrNone, id, money, percent, permille, shortText } from '../../schemas/primitives.ts';
import { z } from '../../schemas/zod.ts';
import type { EventDefinition } from '../definition.ts';
import { recordsOnly } from '../definition.ts';
import { act } from './act.ts';

const schema = z.discriminatedUnion('what', [
  z.strictObject({ what: z.literal('filings'), metal_permille: permille }),
  z.strictObject({ what: z.literal('invoice_tolerance'), mass_g: gramsOrNone }),
  z.strictObject({ what: z.literal('weighing'), mass_g: gramsOrNone }),
  z.strictObject({ what: z.literal('night_limit'), amount: money }),
  z.strictObject({ what: z.literal('claim'), account_id: id, metal: z.enum(METALS), mass_g: gramsOrNone }),
  z.strictObject({
    what: z.literal('acceptance'),
    form: z.enum(LOT_FORMS),
    checks: z.array(shortText).max(10),
  }),
  z.strictObject({
    what: z.literal('bin_feed'),
    bin_id: id,
    operation: shortText,
    bench_id: id.nullable().default(null),
    gold_percent: percent,
    silver_percent: percent,
    platinum_percent: percent,
    palladium_percent: percent,
  }),
]);
type SettingInput = z.output<typeof schema>;

/** Sets one limit or estimate. The rates of the bins that one operation feeds never add up to more than the whole. */
export const setSetting: EventDefinition<SettingInput> = {
  name: 'set-setting',
  schema,
  action: 'settings.set',
  summary: 'Sets a limit or an estimate.',
  needs: (input) => ({ account_ids: accountsOf(input) }),
  draft(input, facts) {
    const kind =
      input.what === 'filings' || input.what === 'bin_feed' || input.what === 'weighing'
        ? 'estimate_set'
        : 'limit_set';
    return accept(recordsOnly([act(kind, { name: settingName(input), ...settingDetail(input) }, facts)]));
  },
};

function accountsOf(input: SettingInput): string[] {
  if (input.what === 'claim') return [input.account_id];
  if (input.what === 'bin_feed') return [input.bin_id, ...(input.bench_id === null ? [] : [input.bench_id])];
  return [];
}

/** The name under which a setting stands: a new value of the same name takes its place. */
function settingName(input: SettingInput): string {
  switch (input.what) {
    case 'claim':
      return `claim:${input.account_id}:${input.metal}`;
    case 'acceptance':
      return `acceptance:${input.form}`;
    case 'bin_feed':
      return `bin:${input.bin_id}:${input.operation}:${input.bench_id ?? 'all'}`;
    case 'filings':
    case 'invoice_tolerance':
    case 'weighing':
    case 'night_limit':
      return input.what;
  }
}

function settingDetail(input: SettingInput): Detail {
  switch (input.what) {
    case 'filings':
      return { what: input.what, metal_permille: input.metal_permille.toFixed() };
    case 'invoice_tolerance':
    case 'weighing':
      return { what: input.what, mass_g: printGrams(input.mass_g) };
    case 'night_limit':
      return { what: input.what, amount: input.amount.toFixed() };
    case 'claim':
      return {
        what: input.what,
        account_id: input.account_id,
        metal: input.metal,
        mass_g: printGrams(input.mass_g),
      };
    case 'acceptance':
      return { what: input.what, form: input.form, checks: input.checks };
    case 'bin_feed':
      return {
        what: input.what,
        bin_id: input.bin_id,
        operation: input.operation,
        bench_id: input.bench_id,
        gold_percent: input.gold_percent.toFixed(),
        silver_percent: input.silver_percent.toFixed(),
        platinum_percent: input.platinum_percent.toFixed(),
        palladium_percent: input.palladium_percent.toFixed(),
      };
  }
}
