/**
 * Weigh-back: what a bench, station or outworker has of a job comes back, stays as work, or is loss. It is reckoned job
 * by job; each job and operation is a voucher of its own, posted together.
 */
import type { Account } from '../../book/account.ts';
import { WORK_KINDS } from '../../book/account.ts';
import type { Outcome, RecordDraft } from '../../book/draft.ts';
import { accept, refuse } from '../../book/draft.ts';
import { allOf } from '../../book/outcome.ts';
import type { Facts } from '../../book/facts.ts';
import type { Common } from '../common-fields.ts';
import { readCommon } from '../common-fields.ts';
import type { Actor, EventDefinition, EventDraft } from '../definition.ts';
import { findPlace } from '../lookup.ts';
import { overnight } from './overnight.ts';
import { reckonWork } from './reckon-work.ts';
import type { WeighBackInput } from './schema.ts';
import { weighBackSchema } from './schema.ts';

const WORK = {
  of: WORK_KINDS,
  sentence: 'metal is weighed back from a bench, a station or an outworker.',
} as const;
const SAFE = { of: ['safe'], sentence: 'what comes back goes into a safe.' } as const;

/** The places of a weigh-back, found once for all its jobs. */
export interface Counter {
  readonly place: Account;
  readonly safe: Account;
  readonly common: Common;
  readonly actor: Actor;
  readonly facts: Facts;
  /** The goldsmith has confirmed the figures with the own PIN. */
  readonly confirmed: boolean;
}

export const weighBack: EventDefinition<WeighBackInput> = {
  name: 'weigh-back',
  schema: weighBackSchema,
  action: 'book.weigh_back',
  summary: 'Weighs back what a bench, station or outworker holds, job by job, with its working loss.',
  needs: (input) => ({
    place_ids: [input.place_id],
    account_ids: [
      input.safe_id,
      ...input.works.flatMap((work) => work.made.flatMap((made) => made.to_id ?? [])),
    ],
    lot_ids: input.works.flatMap((work) =>
      [...work.scrap, ...work.filings].flatMap((line) => line.into_lot_id ?? []),
    ),
    job_ids: input.works.flatMap((work) => work.job_id ?? []),
    document_ids: input.document_ids,
  }),
  draft(input, facts, actor) {
    const counter = findCounter(input, facts, actor);
    if (!counter.ok) return counter;
    const once = eachOnce(input);
    if (!once.ok) return once;
    const works = allOf(input.works.map((work, index) => reckonWork(work, `works.${index}`, counter.value)));
    if (!works.ok) return works;
    const stays = overnight(input, counter.value);
    return stays.ok ? accept(together(works.value, stays.value)) : stays;
  },
};

function findCounter(input: WeighBackInput, facts: Facts, actor: Actor): Outcome<Counter> {
  const common = readCommon(input, facts);
  if (!common.ok) return common;
  const place = findPlace(facts, input.place_id, 'place_id', WORK);
  if (!place.ok) return place;
  const safe = findPlace(facts, input.safe_id, 'safe_id', SAFE);
  if (!safe.ok) return safe;
  const confirmed = input.pin !== null;
  return accept({ place: place.value, safe: safe.value, common: common.value, actor, facts, confirmed });
}

/** A job is reckoned once unless its lots are told apart, and stock kept for several jobs goes into one of them. */
function eachOnce(input: WeighBackInput): Outcome<null> {
  const lots = new Set<string>();
  const jobs = new Set<string>();
  for (const [index, work] of input.works.entries()) {
    if (work.lot_ids === null && jobs.has(work.job_id ?? '')) {
      const sentence = 'That job stands here twice. Put it together, or name the lots that go with each.';
      return refuse({ code: 'lot_twice', field: `works.${index}.job_id`, sentence });
    }
    jobs.add(work.job_id ?? '');
    for (const lot_id of [...(work.lot_ids ?? []), ...work.kept.map((line) => line.lot_id)]) {
      if (lots.has(lot_id)) {
        const sentence =
          'The same lot stands in two jobs of this weigh-back. Weigh the jobs back one after the other.';
        return refuse({ code: 'lot_twice', field: `works.${index}.lot_ids`, sentence });
      }
      lots.add(lot_id);
    }
  }
  return accept(null);
}

function together(works: readonly EventDraft[], stays: readonly RecordDraft[]): EventDraft {
  const reasons = works.flatMap((work) => work.second_signature ?? []);
  return {
    records: [...works.flatMap((work) => work.records), ...stays],
    handovers: works.flatMap((work) => work.handovers),
    second_signature: reasons[0] ?? null,
  };
}
