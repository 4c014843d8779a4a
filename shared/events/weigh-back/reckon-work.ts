/** One job and operation of a weigh-back: reckoned, judged, and drafted as one voucher. */
import type { Outcome, RecordDraft } from '../../book/draft.ts';
import { accept, refuse } from '../../book/draft.ts';
import { allOf } from '../../book/outcome.ts';
import type { Account } from '../../book/account.ts';
import { isWorkPlace } from '../../book/account.ts';
import { printGrams } from '../../mass/micrograms.ts';
import { isZeroMass, sumMass } from '../../mass/vector.ts';
import type { Weighing } from '../../weighing/weighing.ts';
import { netOf } from '../../weighing/weighing.ts';
import type { EventDraft, HandoverDraft } from '../definition.ts';
import { handoverOf } from '../handover.ts';
import { limitOfReadings, readingsOf } from '../last-of-it.ts';
import { findJob, findPlace, lossAccount } from '../lookup.ts';
import type { VoucherParts } from '../make-voucher.ts';
import { makeVoucher, weighingRows } from '../make-voucher.ts';
import { ownershipRecords } from '../ownership-records.ts';
import type { Judged } from './judge.ts';
import { judge, judgedDetail } from './judge.ts';
import type { Making } from './lots-made.ts';
import { makeAll } from './made-parts.ts';
import type { Found, OutLot, ReOwned } from './out.ts';
import { keptLots, outLots, ownerOf } from './out.ts';
import type { WorkInput } from './schema.ts';
import type { Shares, Weighed } from './shares.ts';
import { shareOut } from './shares.ts';
import type { Counter } from './weigh-back.ts';
import { dirtEntries, lossEntries, outEntries } from './work-entries.ts';

/** Drafts one job. Refuses what can't have come back, and more back than out without a reason. */
export function reckonWork(work: WorkInput, field: string, counter: Counter): Outcome<EventDraft> {
  const found = findWork(work, field, counter);
  if (!found.ok) return found;
  const weighed = netsOf(work, field, counter);
  if (!weighed.ok) return weighed;
  const { facts, common } = counter;
  const readings = weighingsOf(work).reduce((sum, weighing) => sum + readingsOf(weighing), 0n);
  const limit_gross_ug = limitOfReadings(readings, facts.settings.weighing_u_ug);
  const slack = { limit_ug: limit_gross_ug, reasoned: work.reason !== null };
  const shares = shareOut(found.value.lots, weighed.value, slack);
  if (!shares.ok) return shares;
  const owned = reOwn(work, found.value, shares.value, counter);
  const worked = workedLots(owned.lots, shares.value);
  const chief = worked.reduce((best, next) => (next.mass.gross > best.mass.gross ? next : best)).lot;
  const by = { operation: work.operation, alloy: chief.alloy, date: common.business_date, limit_gross_ug };
  const judged = judge(found.value.lots, shares.value, by, facts);
  const beyond = [-shares.value.loss.gross, ...shares.value.more.map(({ mass }) => mass.gross)];
  const moreBack = beyond.some((surplus) => surplus > limit_gross_ug);
  if (moreBack && work.reason === null) return refuseMoreBack(found.value.lots, field, counter);
  const making: Making = {
    lots: worked,
    owner_id: found.value.owner_id,
    alloy: chief.alloy,
    business_date: common.business_date,
    facts,
  };
  const made = makeAll({ work, found: found.value, shares: shares.value, making, field, counter });
  if (!made.ok) return made;
  const loss = lossEntries(made.value, chief, shares.value, found.value.loss_account);
  const all = [...made.value.unused, ...made.value.work, ...made.value.scrap, ...made.value.filings];
  const voucher = makeVoucher(facts, common, {
    kind: 'weigh_back',
    detail: workDetail(work, found.value, owned, judged, counter),
    entries: [
      ...outEntries(found.value.lots, owned, shares.value, counter),
      ...all.flatMap((part) => [part.entry]),
      ...loss,
      ...dirtEntries(made.value.filings, shares.value, counter),
    ],
  });
  return accept({
    records: [...owned.records, ...all.flatMap((part) => part.records), voucher],
    handovers: handovers(voucher.id, found.value.destinations, counter),
    second_signature: moreBack
      ? `More came back from ${counter.place.name} than went out, so a second person signs.`
      : null,
  });
}

function workDetail(
  work: WorkInput,
  found: Found,
  owned: ReOwned,
  judged: Judged,
  counter: Counter,
): VoucherParts['detail'] {
  const weighings = weighingsOf(work).map((weighing, index) => ({ weighing, line: index + 1 }));
  return {
    operation: work.operation,
    bench: counter.place.id,
    person_id: counter.place.custodian_id,
    job_id: work.job_id,
    owner_id: found.owner_id,
    counterparty_id: counter.place.party_id,
    ...judgedDetail(judged),
    reason: work.reason,
    giver_confirmed: counter.confirmed ? 'pin' : null,
    kept: owned.lots
      .filter((out) => out.held_for === null && work.job_id !== null)
      .map(({ lot }) => ({ lot_id: lot.id })),
    weighings: weighingRows(weighings, counter.facts, counter.actor),
  };
}

/** The lots that something was made of, each with what went in; where everything came back, all that was out. */
function workedLots(lots: readonly OutLot[], shares: Shares): readonly OutLot[] {
  const used = lots.flatMap((out, index) => {
    const mass = shares.consumed[index] ?? out.mass;
    return mass.gross > 0n ? [{ ...out, mass }] : [];
  });
  return used.length > 0 ? used : lots;
}

function findWork(work: WorkInput, field: string, counter: Counter): Outcome<Found> {
  const { facts, place } = counter;
  const job = findJob(facts, work.job_id, `${field}.job_id`);
  if (!job.ok) return job;
  const loss_account = lossAccount(facts, work.operation, `${field}.operation`);
  if (!loss_account.ok) return loss_account;
  const out = outLots(work, place, field, facts);
  if (!out.ok) return out;
  const kept = keptLots(work, place, field, facts);
  if (!kept.ok) return kept;
  const lots = [...out.value, ...kept.value];
  const counted = checkPieces(work, lots, field);
  if (!counted.ok) return counted;
  const owner = ownerOf(lots, job.value, field, facts);
  if (!owner.ok) return owner;
  const destinations = allOf(
    work.made.map((made, index) =>
      made.to_id === null ? accept(place) : findPlace(facts, made.to_id, `${field}.made.${index}.to_id`),
    ),
  );
  if (!destinations.ok) return destinations;
  return accept({
    lots,
    owner_id: owner.value,
    loss_account: loss_account.value,
    destinations: destinations.value,
  });
}

function netsOf(work: WorkInput, field: string, counter: Counter): Outcome<Weighed> {
  const net = (list: string, index: number, weighing: Weighing) => {
    const at = `${field}.${list}.${index}.weighing`;
    const read = netOf(weighing, at);
    return read.ok ? accept({ net: read.value, field: `${at}.gross_g` }) : read;
  };
  const unused = allOf(work.unused.map((line, i) => net('unused', i, line.weighing)));
  const scrap = allOf(work.scrap.map((line, i) => net('scrap', i, line.weighing)));
  const filings = allOf(work.filings.map((line, i) => net('filings', i, line.weighing)));
  const made = allOf(work.made.map((line, i) => net('made', i, line.weighing)));
  const all = allOf([unused, scrap, filings, made]);
  if (!all.ok) return all;
  const [u = [], s = [], f = [], m = []] = all.value;
  return accept({
    unused: u.map((line, i) => ({ ...line, lot_id: work.unused[i]?.lot_id ?? '' })),
    scrap: s.map((line, i) => ({ ...line, from_lot_id: work.scrap[i]?.from_lot_id ?? null })),
    filings: f.map((line, i) => ({
      ...line,
      metal_permille: work.filings[i]?.metal_permille ?? counter.facts.settings.filings_metal_permille,
    })),
    made: m,
  });
}

function weighingsOf(work: WorkInput): readonly Weighing[] {
  return [...work.unused, ...work.scrap, ...work.filings, ...work.made, ...work.kept].map(
    (line) => line.weighing,
  );
}

/** Lots that are counted come back by count too; and no more pieces than went out. */
function checkPieces(work: WorkInput, lots: readonly OutLot[], field: string): Outcome<null> {
  for (const [index, line] of work.unused.entries()) {
    const out = lots.find(({ lot }) => lot.id === line.lot_id);
    if (out === undefined || (out.pieces === null) !== (line.pieces === null)) {
      const sentence =
        out === undefined
          ? 'That lot was not out for this job.'
          : out.pieces === null
            ? 'Metal of this form is not kept by pieces. Leave the count empty.'
            : 'This lot is kept by pieces too. Count what came back.';
      return refuse({ code: 'pieces_needed', field: `${field}.unused.${index}.pieces`, sentence });
    }
    if ((line.pieces ?? 0n) > (out.pieces ?? 0n)) {
      const sentence = `${out.pieces} pieces of ${out.lot.code} were out, and ${line.pieces} are entered. Count again.`;
      return refuse({ code: 'not_enough', field: `${field}.unused.${index}.pieces`, sentence });
    }
  }
  return accept(null);
}

/** Work that goes on to another person waits there for an acknowledgement. */
function handovers(
  voucher_id: string,
  destinations: readonly Account[],
  counter: Counter,
): readonly HandoverDraft[] {
  const onward = [...new Set(destinations)].filter(
    (to) => to.id !== counter.place.id && isWorkPlace(to.kind),
  );
  return onward.flatMap((to) =>
    handoverOf(counter.facts, {
      voucher_id,
      place_id: to.id,
      giver_id: counter.place.custodian_id ?? counter.actor.person_id,
      receiver_id: to.custodian_id,
    }),
  );
}

function refuseMoreBack(lots: readonly OutLot[], field: string, counter: Counter): Outcome<never> {
  const out = printGrams(sumMass(lots.map(({ mass }) => mass)).gross, 3);
  const sentence = `${counter.place.name} holds ${out} g for this job. More can’t come back than went out. Weigh again, or give a reason and a second signature.`;
  return refuse({ code: 'more_back', field: `${field}.made`, sentence });
}

/** House metal that goes into a customer's piece changes owner first: what is consumed of it, in a new lot. */
function reOwn(work: WorkInput, found: Found, shares: Shares, counter: Counter): ReOwned {
  const records: RecordDraft[] = [];
  const lots = found.lots.map((out, index) => {
    const consumed = shares.consumed[index] ?? out.mass;
    if (out.lot.owner_id === found.owner_id || isZeroMass(consumed)) return out;
    const changed = ownershipRecords(counter.facts, counter.common, counter.actor, {
      place: counter.place,
      lot: out.lot,
      mass: consumed,
      pieces: null,
      weighing: null,
      new_owner_id: found.owner_id,
      what_for: work.reason ?? 'worked into the owner’s piece',
      job_id: out.held_for,
    });
    records.push(...changed.records);
    return { ...out, lot: changed.lot };
  });
  return { records, lots };
}
