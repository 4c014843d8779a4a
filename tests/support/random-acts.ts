/**
 * Random acts at the counter, for property tests: from a few dice each makes the body of an event that fits what the
 * book holds now, or may be refused. An act knows nothing of what should come out: the in-memory book checks that.
 */
import type { RecordDraft } from '../../shared/book/draft.ts';
import type { Handover } from '../../shared/book/facts.ts';
import type { Holding, JobHolding } from '../../shared/book/holding.ts';
import { acknowledge } from '../../shared/events/acknowledge.ts';
import { correction } from '../../shared/events/correction.ts';
import type { Actor, EventDefinition } from '../../shared/events/definition.ts';
import { delivery } from '../../shared/events/delivery.ts';
import { disputeHandover } from '../../shared/events/dispute-handover.ts';
import { hold } from '../../shared/events/hold.ts';
import { issue } from '../../shared/events/issue.ts';
import { opening } from '../../shared/events/opening.ts';
import { ownership } from '../../shared/events/ownership.ts';
import { release } from '../../shared/events/release.ts';
import { returnToOwner } from '../../shared/events/return-to-owner.ts';
import { reversal } from '../../shared/events/reversal.ts';
import { settleDispute } from '../../shared/events/settle-dispute.ts';
import { transfer } from '../../shared/events/transfer.ts';
import { useUp } from '../../shared/events/use-up.ts';
import { weighIn } from '../../shared/events/weigh-in.ts';
import { writeOff } from '../../shared/events/write-off.ts';
import { isCounted } from '../../shared/events/new-lot.ts';
import { printGrams } from '../../shared/mass/micrograms.ts';
import type { aWorkshop } from './workshop.ts';

/** A workshop with what random acts need: two jobs, the house's and a customer's. */
export interface Scene extends ReturnType<typeof aWorkshop> {
  readonly houseJob: string;
  readonly customerJob: string;
}

/** What the dice say: three choices, a share of what is there in parts of a million, and two coins. */
export interface Dice {
  readonly a: number;
  readonly b: number;
  readonly c: number;
  readonly share: bigint;
  readonly coin: boolean;
  readonly other: boolean;
}

export interface Act {
  readonly event: EventDefinition<unknown>;
  readonly body: unknown;
  readonly actor: Actor;
}

type MakeAct = (scene: Scene, dice: Dice) => Act | null;

function pick<T>(list: readonly T[], at: number): T | null {
  return list[at % Math.max(list.length, 1)] ?? null;
}

/** A share of a mass, in grams: now and then all of it, or a little more than there is. */
function part(gross: bigint, dice: Dice): string {
  const share = (gross * dice.share) / 1_000_000n;
  return printGrams(share > 0n ? share : 1n);
}

function lying(scene: Scene, kinds: readonly string[]): readonly Holding[] {
  const { state } = scene.book;
  return state
    .allHoldings()
    .filter((h) => kinds.includes(state.account(h.account_id).kind) && h.mass.gross > 0n);
}

function amountOf(scene: Scene, holding: Holding, dice: Dice): object {
  const counted = isCounted(scene.book.lot(holding.lot_id).form);
  const pieces = counted ? String(BigInt(1 + (dice.c % 5))) : null;
  if (counted && dice.coin) return { how: 'pieces', pieces };
  if (dice.c % 7 === 0) return { how: 'all' };
  const emptied = dice.c % 5 === 1;
  return { how: 'weighed', weighing: { gross_g: part(holding.mass.gross, dice) }, pieces, emptied };
}

function newLine(dice: Dice, scene: Scene) {
  const forms = ['grain', 'sheet', 'findings', 'old_gold', 'finished_work', 'solder'] as const;
  const form = pick(forms, dice.a) ?? 'grain';
  const fine = [
    { gold_permille: '999.9' },
    { gold_permille: '333.3333', silver_permille: '333.3333', platinum_permille: '333.3333' },
    { gold_permille: '585', silver_permille: '207.5', palladium_permille: '0.0001' },
    {},
  ];
  return {
    form,
    description: `${form} ${dice.b}`,
    basis: 'declared',
    ...pick(fine, dice.b),
    pieces: isCounted(form) ? String(1 + (dice.c % 30)) : null,
    owner_id: dice.coin ? scene.customer : null,
    weighing: { gross_g: printGrams(dice.share * BigInt(1 + (dice.c % 90)) + 1n) },
  };
}

function lastRecords(scene: Scene, test: (draft: RecordDraft) => boolean): readonly RecordDraft[] {
  return scene.book.state.records.map((record) => record.draft).filter(test);
}

const vouchers = (scene: Scene) =>
  lastRecords(scene, (draft) => draft.type === 'voucher' && Object.keys(draft.detail).length > 1);

/** Mostly handovers that wait; now and then any. */
function answerable(scene: Scene, dice: Dice): readonly Handover[] {
  const { handovers } = scene.book.state;
  return dice.c % 5 === 0 ? handovers : handovers.filter((handover) => handover.state === 'waiting');
}

const work = ['bench', 'station', 'outworker'];

/** A row of a work place's holdings by job, or a holding of another place with no job. */
function row(scene: Scene, kinds: readonly string[], at: number): JobHolding | null {
  const { state } = scene.book;
  const here = lying(scene, kinds).filter((h) => !work.includes(state.account(h.account_id).kind));
  const byJob = state.allJobHoldings().filter((h) => kinds.includes(state.account(h.account_id).kind));
  return pick(
    [...here.map((h) => ({ ...h, job_id: null, came_by: null })), ...byJob.filter((h) => h.mass.gross > 0n)],
    at,
  );
}

/** Every act, by the name of its event. */
export const RANDOM_ACTS: Readonly<Record<string, MakeAct>> = {
  opening: (scene, dice) => {
    const place_id = pick([scene.safe, scene.bench2, scene.sweepsBin, scene.casting], dice.c);
    return { event: opening, body: { lines: [{ ...newLine(dice, scene), place_id }] }, actor: scene.mara };
  },
  'weigh-in': (scene, dice) => {
    const line = { ...newLine(dice, scene), decision: dice.other ? 'accept' : null };
    const invoiced = { ...line, invoice_gross_g: dice.other ? '10' : null };
    const body = { party_id: scene.customer, safe_id: scene.safe, lines: [invoiced] };
    return { event: weighIn, body, actor: scene.mara };
  },
  issue: (scene, dice) => {
    const holding = pick(lying(scene, ['safe']), dice.a);
    if (holding === null) return null;
    const own = scene.book.lot(holding.lot_id).owner_id !== null;
    const body = {
      from_id: scene.safe,
      to_id: pick([scene.bench2, scene.bench4, scene.casting, scene.setter], dice.b),
      lot_id: holding.lot_id,
      amount: amountOf(scene, holding, dice),
      operation: dice.other ? 'filing' : 'sheet_work',
      job_id: own ? scene.customerJob : dice.other ? scene.houseJob : null,
    };
    return { event: issue, body, actor: scene.mara };
  },
  transfer: (scene, dice) => {
    const from = row(scene, ['safe', 'bench', 'station', 'bin', 'outworker'], dice.a);
    if (from === null) return null;
    const to_id = pick([scene.safe, scene.bench2, scene.bench4, scene.casting, scene.sweepsBin], dice.b);
    const lines = [{ lot_id: from.lot_id, amount: amountOf(scene, from, dice) }];
    const what = dice.other ? { everything: true } : { lines, job_id: from.job_id };
    return { event: transfer, body: { from_id: from.account_id, to_id, ...what }, actor: scene.mara };
  },
  delivery: (scene, dice) => {
    const way =
      pick(['deliver', 'out_on_approval', 'back_from_approval', 'returned'] as const, dice.b) ?? 'deliver';
    const kinds = {
      deliver: ['safe', 'bench', 'approval'],
      out_on_approval: ['safe', 'bench'],
      back_from_approval: ['approval'],
      returned: ['sold', 'customer'],
    }[way];
    const from = row(scene, kinds, dice.a);
    if (from === null) return null;
    const leaving = way === 'deliver' || way === 'out_on_approval';
    const lines = [{ lot_id: from.lot_id, amount: amountOf(scene, from, dice) }];
    const place_id = leaving ? from.account_id : scene.safe;
    const body = { way, party_id: scene.customer, place_id, job_id: from.job_id, lines };
    return { event: delivery, body, actor: scene.mara };
  },
  ownership: (scene, dice) => {
    const from = row(scene, ['safe', 'bench', 'station'], dice.a);
    if (from === null) return null;
    const own = scene.book.lot(from.lot_id).owner_id !== null;
    const body = {
      place_id: from.account_id,
      lot_id: from.lot_id,
      amount: dice.coin ? amountOf(scene, from, dice) : { how: 'all' },
      new_owner_id: own ? null : scene.customer,
      what_for: 'agreed',
      job_id: from.job_id,
    };
    return { event: ownership, body, actor: scene.hanna };
  },
  'return-to-owner': (scene, dice) => {
    const from = row(scene, ['safe', 'bench', 'station'], dice.a);
    if (from === null) return null;
    const { lot_id, account_id: place_id, job_id } = from;
    const body = { place_id, lot_id, job_id, amount: amountOf(scene, from, dice) };
    return { event: returnToOwner, body, actor: scene.mara };
  },
  'use-up': (scene, dice) => {
    const from = row(scene, ['safe', 'station', 'bench'], dice.a);
    if (from === null) return null;
    const { lot_id, account_id: place_id, job_id } = from;
    const body = {
      place_id,
      lot_id,
      job_id,
      amount: amountOf(scene, from, dice),
      what_for: 'plating',
      reference: 'bath',
    };
    return { event: useUp, body, actor: scene.mara };
  },
  'write-off': (scene, dice) => {
    const gone = dice.other
      ? row(scene, ['safe', 'bin', 'bench'], dice.a)
      : row(scene, ['written_off'], dice.a);
    if (gone === null) return null;
    const body = {
      way: dice.other ? 'from_place' : 'found_again',
      place_id: dice.other ? gone.account_id : scene.safe,
      cause: 'theft',
      number: 'VJ/1',
      reason: 'The lock was broken.',
      job_id: gone.job_id,
      lines: [
        {
          lot_id: gone.lot_id,
          amount: { how: 'stated', gross_g: part(gone.mass.gross, dice), pieces: dice.coin ? '1' : null },
        },
      ],
    };
    return { event: writeOff, body, actor: scene.hanna };
  },
  correction: (scene, dice) => {
    const voucher = pick(vouchers(scene), dice.a);
    if (voucher?.type !== 'voucher') return null;
    const at = dice.b % voucher.entries.length;
    const gross = voucher.entries[at]?.mass.gross ?? 0n;
    const right = (gross * dice.share) / 1_000_000n;
    const rest = (at + 1) % voucher.entries.length;
    const lines = [{ line: String(at + 1), gross_g: printGrams(right) }];
    const body = { voucher_id: voucher.id, reason: 'Typed wrong.', lines, rest_line: String(rest + 1) };
    return { event: correction, body, actor: scene.hanna };
  },
  reversal: (scene, dice) => {
    const voucher = pick(vouchers(scene), dice.a);
    if (voucher === null) return null;
    return { event: reversal, body: { voucher_id: voucher.id, reason: 'Wrong line.' }, actor: scene.hanna };
  },
  hold: (scene, dice) => {
    const lot_id = pick(lying(scene, ['safe']), dice.a)?.lot_id;
    if (lot_id === undefined || dice.b % 4 !== 0) return null;
    return { event: hold, body: { lot_id, reason: 'looked at' }, actor: scene.mara };
  },
  release: (scene, dice) => {
    const held = [...scene.book.state.lots.values()].filter((lot) => lot.standing === 'on_hold');
    const lot_id = pick(held, dice.a)?.id;
    return lot_id === undefined
      ? null
      : { event: release, body: { lot_id, reason: 'seen' }, actor: scene.mara };
  },
  acknowledge: (scene, dice) => {
    const handover = pick(answerable(scene, dice), dice.a);
    if (handover === null) return null;
    const body = { voucher_id: handover.voucher_id, how: 'pin', pin: '1234' };
    return { event: acknowledge, body, actor: scene.mara };
  },
  'dispute-handover': (scene, dice) => {
    const handover = pick(answerable(scene, dice), dice.a);
    if (handover === null) return null;
    const weighing = { gross_g: printGrams(dice.share + 1n) };
    const body = { voucher_id: handover.voucher_id, how: 'pin', pin: '1234', weighing };
    return { event: disputeHandover, body, actor: scene.mara };
  },
  'settle-dispute': (scene, dice) => {
    const disputed = scene.book.state.handovers.filter((handover) => handover.state === 'disputed');
    const handover = pick(disputed, dice.a);
    const voucher = lastRecords(scene, (draft) => draft.id === handover?.voucher_id)[0];
    const entry =
      voucher?.type === 'voucher'
        ? voucher.entries.find((e) => e.account_id === handover?.place_id)
        : undefined;
    if (handover === null || entry === undefined) return null;
    const lines = [{ lot_id: entry.lot_id, weighing: { gross_g: part(entry.mass.gross, dice) } }];
    const body = { voucher_id: handover.voucher_id, how: 'pin', pin: '1234', lines };
    return { event: settleDispute, body, actor: scene.mara };
  },
};
