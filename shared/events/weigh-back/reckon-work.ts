/** One job and operation of a weigh-back: reckoned, judged, and drafted as one voucher. */
import type { EntryDraft, Outcome, RecordDraft } from '../../book/draft.ts';
import { accept, refuse } from '../../book/draft.ts';
import { allOf } from '../../book/outcome.ts';
import type { Account } from '../../book/account.ts';
import { isWorkPlace } from '../../book/account.ts';
import { printGrams } from '../../mass/micrograms.ts';
import type { MassVector } from '../../mass/vector.ts';
import { addMass, isZeroMass, massVector, negateMass, subtractMass, sumMass } from '../../mass/vector.ts';
import type { Weighing } from '../../weighing/weighing.ts';
import { netOf } from '../../weighing/weighing.ts';
import type { EventDraft, HandoverDraft } from '../definition.ts';
import { handoverOf } from '../handover.ts';
import { readingsOf } from '../last-of-it.ts';
import { findJob, findPlace, lossAccount, theAccount } from '../lookup.ts';
import { makeVoucher, weighingRows } from '../make-voucher.ts';
import { ownershipRecords } from '../ownership-records.ts';
import { judge, judgedDetail } from './judge.ts';
import type { MadeLot, Making } from './lots-made.ts';
import { makeLot } from './lots-made.ts';
import type { OutLot, ReOwned } from './out.ts';
import { keptLots, outLots, ownerOf } from './out.ts';
import type { WorkInput } from './schema.ts';
import type { Shares, Weighed } from './shares.ts';
import { shareOut } from './shares.ts';
import type { Counter } from './weigh-back.ts';

/** Everything of a job that was found before anything is shared. */
interface Found {
  readonly lots: readonly OutLot[];
  readonly owner_id: string | null;
  readonly loss_account: Account;
  readonly destinations: readonly Account[];
}

/** Drafts one job. Refuses what can't have come back, and more back than out without a reason. */
export function reckonWork(work: WorkInput, field: string, counter: Counter): Outcome<EventDraft> {
  const found = findWork(work, field, counter);
  if (!found.ok) return found;
  const weighed = netsOf(work, field, counter);
  if (!weighed.ok) return weighed;
  const shares = shareOut(found.value.lots, weighed.value);
  if (!shares.ok) return shares;
  const { facts, common } = counter;
  const chief = found.value.lots.reduce((best, next) => (next.mass.gross > best.mass.gross ? next : best));
  const judged = judge(
    found.value.lots,
    shares.value,
    {
      operation: work.operation,
      alloy: chief.lot.alloy,
      date: common.business_date,
      readings: weighingsOf(work).reduce((sum, weighing) => sum + readingsOf(weighing), 0n),
    },
    facts,
  );
  const surplus = -shares.value.loss.gross;
  const moreBack = surplus > judged.limit_gross_ug;
  if (moreBack && work.reason === null) return refuseMoreBack(found.value.lots, field, counter);
  const owned = reOwn(work, found.value, shares.value, counter);
  const making: Making = {
    lots: owned.lots,
    owner_id: found.value.owner_id,
    alloy: chief.lot.alloy,
    business_date: common.business_date,
    facts,
  };
  const made = makeAll(work, found.value, shares.value, making, field, counter);
  if (!made.ok) return made;
  const lossLot =
    made.value.work[0]?.entry.lot_id ??
    owned.lots.find((out) => out.lot.alloy === chief.lot.alloy)?.lot.id ??
    chief.lot.id;
  const loss: EntryDraft = {
    account_id: found.value.loss_account.id,
    lot_id: lossLot,
    mass: shares.value.loss,
    pieces: null,
  };
  const all = [...made.value.unused, ...made.value.work, ...made.value.scrap, ...made.value.filings];
  const voucher = makeVoucher(facts, common, {
    kind: 'weigh_back',
    detail: {
      operation: work.operation,
      bench: counter.place.id,
      person_id: counter.place.custodian_id,
      job_id: work.job_id,
      owner_id: found.value.owner_id,
      counterparty_id: counter.place.party_id,
      ...judgedDetail(judged),
      reason: work.reason,
      giver_confirmed: counter.confirmed ? 'pin' : null,
      kept: owned.lots
        .filter((out) => out.held_for === null && work.job_id !== null)
        .map(({ lot }) => ({ lot_id: lot.id })),
      weighings: weighingRows(
        weighingsOf(work).map((weighing, index) => ({ weighing, line: index + 1 })),
        facts,
        counter.actor,
      ),
    },
    entries: [
      ...outEntries(found.value.lots, owned, shares.value, counter),
      ...all.flatMap((part) => [part.entry]),
      loss,
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

interface AllMade {
  readonly unused: readonly MadeLot[];
  readonly work: readonly MadeLot[];
  readonly scrap: readonly MadeLot[];
  readonly filings: readonly MadeLot[];
}

function makeAll(
  work: WorkInput,
  found: Found,
  shares: Shares,
  making: Making,
  field: string,
  counter: Counter,
): Outcome<AllMade> {
  const { safe, place } = counter;
  const nothing = { pieces: null, into_lot_id: null };
  const unused = work.unused.map((line, i) => ({
    records: [],
    entry: {
      account_id: safe.id,
      lot_id: line.lot_id,
      mass: shares.unused[i] ?? massVector({}),
      pieces: line.pieces,
    },
  }));
  const made = allOf(
    work.made.map((line, i) =>
      makeLot(
        {
          ...nothing,
          form: line.form,
          description: line.description,
          pieces: line.pieces,
          mass: shares.made[i] ?? massVector({}),
          place: found.destinations[i] ?? place,
          field: `${field}.made.${i}`,
        },
        making,
      ),
    ),
  );
  const scrap = allOf(
    work.scrap.map((line, i) => {
      const cut = found.lots.find((out) => out.lot.id === line.from_lot_id);
      const from =
        cut === undefined
          ? making
          : { ...making, lots: [cut], owner_id: cut.lot.owner_id, alloy: cut.lot.alloy };
      const description = `${from.alloy ?? 'Mixed'} scrap`;
      return makeLot(
        {
          ...nothing,
          form: 'clean_scrap',
          description,
          mass: shares.scrap[i] ?? massVector({}),
          place: safe,
          into_lot_id: line.into_lot_id,
          field: `${field}.scrap.${i}.into_lot_id`,
        },
        from,
      );
    }),
  );
  const filings = allOf(
    work.filings.map((line, i) => {
      const share = shares.filings[i];
      const mass =
        share === undefined ? massVector({}) : addMass(share.metal, massVector({ gross: share.dirt_ug }));
      const description = `${making.alloy ?? 'Mixed'} filings, ${place.name}`;
      return makeLot(
        {
          ...nothing,
          form: 'filings',
          description,
          mass,
          place: safe,
          into_lot_id: line.into_lot_id,
          field: `${field}.filings.${i}.into_lot_id`,
        },
        making,
      );
    }),
  );
  const all = allOf([made, scrap, filings]);
  if (!all.ok) return all;
  const [m = [], s = [], f = []] = all.value;
  return accept({ unused, work: m, scrap: s, filings: f });
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

/** What leaves the place: each lot that was out, the consumed part in the lot that it stands in now. */
function outEntries(
  before: readonly OutLot[],
  owned: ReOwned,
  shares: Shares,
  counter: Counter,
): readonly EntryDraft[] {
  const out = (lot_id: string, mass: MassVector, pieces: bigint | null): EntryDraft => ({
    account_id: counter.place.id,
    lot_id,
    mass: negateMass(mass),
    pieces: pieces === null ? null : -pieces,
  });
  return before.flatMap((lot, index) => {
    const now = owned.lots[index] ?? lot;
    if (now.lot.id === lot.lot.id) return [out(lot.lot.id, lot.mass, lot.pieces)];
    const consumed = shares.consumed[index] ?? lot.mass;
    return [out(lot.lot.id, subtractMass(lot.mass, consumed), lot.pieces), out(now.lot.id, consumed, null)];
  });
}

/** The dirt in filings is no metal of the house: its gross comes from foreign matter, in the filings' name. */
function dirtEntries(filings: readonly MadeLot[], shares: Shares, counter: Counter): readonly EntryDraft[] {
  const account_id = theAccount(counter.facts, 'foreign_matter').id;
  return filings.map((part, index) => ({
    account_id,
    lot_id: part.entry.lot_id,
    mass: massVector({ gross: -(shares.filings[index]?.dirt_ug ?? 0n) }),
    pieces: null,
  }));
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
