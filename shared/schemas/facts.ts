/** Facts as they go from the server to a form: what `FactsNeeded` asks for, and the answer to it. */
import type { Facts, IdSource } from '../book/facts.ts';
import { readSettings } from '../book/settings.ts';
import { METALS } from '../mass/vector.ts';
import {
  accountJson,
  holdingJson,
  jobHoldingJson,
  jobJson,
  lotJson,
  massJson,
  partyJson,
  personJson,
  recordedEntryJson,
  recordedVoucherJson,
} from './book.ts';
import { gramsOrNone, id, percent } from './primitives.ts';
import { z } from './zod.ts';
import { Decimal } from '../decimal.ts';

const some = z.array(id).max(500, 'That is more than 500 at once. Do it in parts.').optional();

export const factsNeededSchema = z.strictObject({
  account_ids: some,
  lot_ids: some,
  place_ids: some,
  party_ids: some,
  voucher_ids: some,
  trace_voucher_ids: some,
  document_ids: some,
  history_lot_ids: some,
  job_ids: some,
  bin_ids: some,
});

export const factsJson = z.object({
  today: z.string(),
  closed_through: z.string().nullable(),
  periods: z.array(
    z.object({ id: z.string(), first_day: z.string(), last_day: z.string(), closed: z.boolean() }),
  ),
  lot_serial: z.string(),
  currency: z.string(),
  time_zone: z.string(),
  accounts: z.array(accountJson),
  lots: z.array(lotJson),
  holdings: z.array(holdingJson),
  job_holdings: z.array(jobHoldingJson),
  vouchers: z.array(recordedVoucherJson),
  lot_entries: z.array(recordedEntryJson),
  handovers: z.array(
    z.object({
      id: z.string(),
      voucher_id: z.string(),
      place_id: z.string(),
      from_person_id: z.string(),
      to_person_id: z.string(),
      state: z.enum(['waiting', 'acknowledged', 'disputed']),
    }),
  ),
  documents: z.array(z.object({ id: z.string(), sha256: z.string() })),
  parties: z.array(partyJson),
  jobs: z.array(jobJson),
  people: z.array(personJson),
  allowances: z.array(
    z.object({
      operation: z.string(),
      alloy: z.string().nullable(),
      percent,
      fixed_g: gramsOrNone,
      from: z.string(),
    }),
  ),
  settings: z.array(z.unknown()),
  unswept: z.array(
    z.object({
      bin_id: z.string(),
      operation: z.string(),
      bench_id: z.string().nullable(),
      loss: massJson,
    }),
  ),
  prices: z.array(
    z.object({
      metal: z.enum(METALS),
      currency: z.string(),
      price_per_ozt: z.string().transform((text) => new Decimal(text)),
      priced_on: z.string(),
      source: z.string(),
    }),
  ),
});
export type FactsJson = z.output<typeof factsJson>;

/** The facts of an answer; `ids` makes the ids and codes of what the event opens. */
export function factsOf(json: FactsJson, ids: IdSource): Facts {
  const { settings, bin_feeds } = readSettings(json.settings, json.currency, json.time_zone);
  return {
    today: json.today,
    closed_through: json.closed_through,
    periods: json.periods,
    accounts: byId(json.accounts),
    lots: byId(json.lots),
    holdings: json.holdings,
    job_holdings: json.job_holdings,
    vouchers: byId(json.vouchers),
    handovers: json.handovers,
    documents: byId(json.documents),
    lot_entries: json.lot_entries,
    parties: byId(json.parties),
    jobs: byId(json.jobs),
    people: byId(json.people),
    allowances: json.allowances.map(({ fixed_g, ...rest }) => ({
      ...rest,
      fixed_ug: fixed_g,
    })),
    bin_feeds,
    unswept: json.unswept,
    prices: json.prices,
    settings,
    ids,
  };
}

function byId<T extends { readonly id: string }>(rows: readonly T[]): ReadonlyMap<string, T> {
  return new Map(rows.map((row) => [row.id, row]));
}
