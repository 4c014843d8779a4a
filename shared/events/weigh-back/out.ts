/**
 * What was out: all that the place holds for the job, work in hand included, and what the stock kept for several jobs
 * is lighter by. Another owner's metal in it changes owner first.
 */
import type { Account } from '../../book/account.ts';
import type { Outcome, RecordDraft } from '../../book/draft.ts';
import { accept, refuse } from '../../book/draft.ts';
import type { Facts, Job } from '../../book/facts.ts';
import { heldOf } from '../../book/holding.ts';
import type { Lot } from '../../book/lot.ts';
import { takeGross } from '../../mass/apportion.ts';
import type { MassVector } from '../../mass/vector.ts';
import { isPossibleMass, isZeroMass, subtractMass } from '../../mass/vector.ts';
import { netOf } from '../../weighing/weighing.ts';
import type { WorkInput } from './schema.ts';

/** A lot that was out for a job. */
export interface OutLot {
  readonly lot: Lot;
  readonly mass: MassVector;
  readonly pieces: bigint | null;
  /** The job that it lies there for: null for stock kept for several jobs. */
  readonly held_for: string | null;
  /** Work that an earlier weigh-back of the same operation left there: it was counted as worked then. */
  readonly counted_before: boolean;
}

/** What the place holds for a job. Refuses a job that it holds nothing for, and lots that it doesn't hold. */
export function outLots(
  work: WorkInput,
  place: Account,
  field: string,
  facts: Facts,
): Outcome<readonly OutLot[]> {
  const rows = facts.job_holdings.filter(
    (row) => row.account_id === place.id && row.job_id === work.job_id && !isZeroMass(row.mass),
  );
  const kept = new Set(work.kept.map((line) => line.lot_id));
  const wanted = rows.filter((row) => !kept.has(row.lot_id) && (work.lot_ids?.includes(row.lot_id) ?? true));
  const missing = work.lot_ids?.find((lot_id) => !rows.some((row) => row.lot_id === lot_id));
  if (missing !== undefined) {
    const code = facts.lots.get(missing)?.code ?? 'That lot';
    const sentence = `${place.name} holds nothing of ${code} for this job. Look at the label again.`;
    return refuse({ code: 'not_enough', field: `${field}.lot_ids`, sentence });
  }
  if (wanted.length === 0) {
    const sentence = `${place.name} holds nothing for this job. Choose another job, or issue the metal first.`;
    return refuse({ code: 'not_enough', field: `${field}.job_id`, sentence });
  }
  const lots: OutLot[] = [];
  for (const row of wanted) {
    const lot = facts.lots.get(row.lot_id);
    if (lot === undefined || !isPossibleMass(row.mass)) {
      const sentence = `What ${place.name} holds of ${lot?.code ?? 'a lot'} is shared with another job. Move it to this job by a transfer first.`;
      return refuse({ code: 'not_enough', field: `${field}.job_id`, sentence });
    }
    const counted_before = row.came_by?.kind === 'weigh_back' && row.came_by.operation === work.operation;
    lots.push({ lot, mass: row.mass, pieces: row.pieces, held_for: work.job_id, counted_before });
  }
  return accept(lots);
}

/** What stock kept for several jobs is lighter by. Refuses a lot that is heavier than the book says. */
export function keptLots(
  work: WorkInput,
  place: Account,
  field: string,
  facts: Facts,
): Outcome<readonly OutLot[]> {
  const used: OutLot[] = [];
  for (const [index, line] of work.kept.entries()) {
    const at = `${field}.kept.${index}`;
    const net = netOf(line.weighing, `${at}.weighing`);
    if (!net.ok) return net;
    const lot = facts.lots.get(line.lot_id);
    const held = heldOf(facts.holdings, place.id, line.lot_id);
    if (lot === undefined || isZeroMass(held.mass)) {
      const sentence = `${place.name} holds nothing of that lot. Look at the label again.`;
      return refuse({ code: 'not_enough', field: `${at}.lot_id`, sentence });
    }
    if (net.value > held.mass.gross) {
      const sentence = `${lot.code} weighs more than ${place.name} holds of it. Weigh it again, without its container.`;
      return refuse({ code: 'not_enough', field: `${at}.weighing.gross_g`, sentence });
    }
    const mass = subtractMass(held.mass, takeGross(held.mass, net.value));
    if (!isZeroMass(mass)) used.push({ lot, mass, pieces: null, held_for: null, counted_before: false });
  }
  return accept(used);
}

/** Who owns what is made: the job's customer where any of the customer's own metal is in it, else the house. */
export function ownerOf(
  lots: readonly OutLot[],
  job: Job | null,
  field: string,
  facts: Facts,
): Outcome<string | null> {
  const owners = new Set(lots.map(({ lot }) => lot.owner_id).filter((owner) => owner !== null));
  if (owners.size === 0) return accept(null);
  const [owner = null] = owners;
  if (owners.size === 1 && owner === job?.customer_id) return accept(owner);
  const names = [...owners].map((id) => facts.parties.get(id)?.name ?? 'somebody').join(' and ');
  const sentence = `Metal of ${names} lies there for this job. Only metal of one owner is worked together, in a job of that owner. Name the lots that go together, or change the owner first.`;
  return refuse({ code: 'wrong_owner', field: `${field}.lot_ids`, sentence });
}

/** Records that must be posted before a voucher, and the lots as they stand after them. */
export interface ReOwned {
  readonly records: readonly RecordDraft[];
  readonly lots: readonly OutLot[];
}

/** Everything of a job that was found before anything is shared. */
export interface Found {
  readonly lots: readonly OutLot[];
  readonly owner_id: string | null;
  readonly loss_account: Account;
  readonly destinations: readonly Account[];
}
