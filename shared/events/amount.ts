/**
 * How much of a lot leaves a place: what the balance shows, so many pieces at the lot's mean mass, or all of it. One
 * schema and one reckoning for every event that takes from a place. A partial quantity takes fine metal in
 * proportion to gross; taking all takes exactly what is there (DESIGN section 2).
 */
import type { Account } from '../book/account.ts';
import { isWorkPlace } from '../book/account.ts';
import type { EntryDraft, Outcome } from '../book/draft.ts';
import { accept, refuse } from '../book/draft.ts';
import type { Facts } from '../book/facts.ts';
import type { Holding } from '../book/holding.ts';
import { heldOf } from '../book/holding.ts';
import type { Lot } from '../book/lot.ts';
import { apportion, takeGross } from '../mass/apportion.ts';
import type { Micrograms } from '../mass/micrograms.ts';
import { printGrams } from '../mass/micrograms.ts';
import type { MassVector } from '../mass/vector.ts';
import { MASS_KEYS, ZERO_MASS, hasNegative, isZeroMass, subtractMass } from '../mass/vector.ts';
import { gramsAboveZero, pieces } from '../schemas/primitives.ts';
import { z } from '../schemas/zod.ts';
import type { Weighing } from '../weighing/weighing.ts';
import { netOf, weighingSchema } from '../weighing/weighing.ts';
import type { LastOfIt } from './last-of-it.ts';
import { lastOfIt, readingsOf } from './last-of-it.ts';
import { moveEntries } from './make-voucher.ts';

const weighed = z.strictObject({
  how: z.literal('weighed'),
  weighing: weighingSchema,
  /** For lots that are counted too. */
  pieces: pieces.nullable().default(null),
  /** The container is now empty: what is missing or over goes to count variance. */
  emptied: z.boolean().default(false),
});
const counted = z.strictObject({ how: z.literal('pieces'), pieces });
const all = z.strictObject({ how: z.literal('all') });
const stated = z.strictObject({
  how: z.literal('stated'),
  gross_g: gramsAboveZero,
  pieces: pieces.nullable().default(null),
});

/** What leaves a place by the balance, by count, or whole. */
export const amountSchema = z.discriminatedUnion('how', [weighed, counted, all]);

/** The same, or a mass that nobody could weigh (stolen, lost, plated, changed of owner only). */
export const statedAmountSchema = z.discriminatedUnion('how', [weighed, counted, all, stated]);

export type Amount = z.output<typeof statedAmountSchema>;

/** What is taken from a place of one lot. */
export interface Drawn {
  readonly lot: Lot;
  readonly mass: MassVector;
  readonly pieces: bigint | null;
  readonly weighing: Weighing | null;
  /** At the lot's mean mass, not weighed. */
  readonly by_count: boolean;
  /** Where the container is now empty: what differs from the book, and how many pieces. */
  readonly last: (LastOfIt & { readonly pieces: bigint | null }) | null;
}

export interface DrawnFrom {
  readonly account: Account;
  readonly lot: Lot;
  /** The job whose metal it is; only told apart where work is done. */
  readonly job_id: string | null;
}

/** What a place has of a lot for a job: all of it at a safe or bin, the job's own at a bench, station or outworker. */
export function availableOf(facts: Facts, from: DrawnFrom): Holding {
  const { account, lot, job_id } = from;
  const held = heldOf(facts.holdings, account.id, lot.id);
  if (!isWorkPlace(account.kind)) return held;
  const row = facts.job_holdings.find(
    (h) => h.account_id === account.id && h.lot_id === lot.id && h.job_id === job_id,
  );
  if (row === undefined) return { ...held, mass: ZERO_MASS, pieces: held.pieces === null ? null : 0n };
  const within = MASS_KEYS.every((key) => row.mass[key] <= held.mass[key]);
  return within ? row : held;
}

/** Reckons what an amount takes. Refuses what is not there, a count that does not fit, and an impossible weighing. */
export function drawAmount(facts: Facts, from: DrawnFrom, amount: Amount, field: string): Outcome<Drawn> {
  const available = availableOf(facts, from);
  const empty = isZeroMass(available.mass) && (available.pieces ?? 0n) === 0n;
  if (empty || hasNegative(available.mass)) return nothingThere(from, field);
  const blank = { lot: from.lot, weighing: null, by_count: false, last: null };
  switch (amount.how) {
    case 'all':
      return accept({ ...blank, mass: available.mass, pieces: available.pieces });
    case 'pieces':
      return byCount(from, available, amount.pieces, field);
    case 'stated':
      return byMass(from, available, { gross: amount.gross_g, pieces: amount.pieces }, `${field}.gross_g`);
    case 'weighed': {
      const net = netOf(amount.weighing, `${field}.weighing`);
      if (!net.ok) return net;
      const asked = { gross: net.value, pieces: amount.pieces };
      const drawn = amount.emptied
        ? emptied(facts, available, { ...asked, weighing: amount.weighing, lot: from.lot }, field)
        : byMass(from, available, asked, `${field}.weighing.gross_g`);
      return drawn.ok ? accept({ ...drawn.value, weighing: amount.weighing }) : drawn;
    }
  }
}

/**
 * Entries for what was drawn: from the place, to where it goes, and what differs at an emptied container to count
 * variance.
 */
export function drawnEntries(
  drawn: Drawn,
  from_id: string,
  to_id: string,
  variance_id: string,
): readonly EntryDraft[] {
  const lot_id = drawn.lot.id;
  const moved = moveEntries({ lot_id, mass: drawn.mass, pieces: drawn.pieces }, from_id, to_id);
  if (drawn.last === null) return moved;
  const { remainder, pieces: missing } = drawn.last;
  if (isZeroMass(remainder) && (missing ?? 0n) === 0n) return moved;
  const whole = subtractMass(subtractMass(ZERO_MASS, drawn.mass), remainder);
  const wholePieces = drawn.pieces === null ? null : -drawn.pieces - (missing ?? 0n);
  return [
    { account_id: from_id, lot_id, mass: whole, pieces: wholePieces },
    ...moved.slice(1),
    { account_id: variance_id, lot_id, mass: remainder, pieces: missing },
  ];
}

/** Why an emptied container needs a recount and a second person, or null where the remainder is within error. */
export function remainderToSign(drawn: Drawn, place: Account): string | null {
  if (drawn.last === null || drawn.last.within) return null;
  const { remainder, limit_ug } = drawn.last;
  const short = remainder.gross > 0n;
  const off = printGrams(short ? remainder.gross : -remainder.gross, 3);
  const what = `${place.name} is ${off} g ${short ? 'short' : 'over'} of ${drawn.lot.code} now that it is empty`;
  return `${what}, which is beyond the limit of error of ${printGrams(limit_ug, 3)} g. Count it again and have a second person sign.`;
}

function nothingThere(from: DrawnFrom, field: string): Outcome<never> {
  const forJob = isWorkPlace(from.account.kind)
    ? from.job_id === null
      ? ' as stock work'
      : ' for this job'
    : '';
  const sentence = `${from.account.name} holds nothing of ${from.lot.code}${forJob}. Look at the label and the place again.`;
  return refuse({ code: 'not_enough', field, sentence });
}

function tooMuch(from: DrawnFrom, available: Holding, field: string): Outcome<never> {
  const left = `${from.account.name} holds ${printGrams(available.mass.gross, 3)} g of ${from.lot.code}`;
  const sentence = `${left}. More can’t leave than is there. Weigh again, or say that the container is now empty.`;
  return refuse({ code: 'not_enough', field, sentence });
}

function byMass(
  from: DrawnFrom,
  available: Holding,
  asked: { readonly gross: Micrograms; readonly pieces: bigint | null },
  field: string,
): Outcome<Drawn> {
  if (asked.gross > available.mass.gross) return tooMuch(from, available, field);
  const pieces = asked.pieces;
  if (available.pieces !== null) {
    if (pieces === null) {
      const sentence = `${from.lot.code} is kept by pieces too. Count what is on the balance.`;
      return refuse({ code: 'pieces_needed', field, sentence });
    }
    if (pieces > available.pieces) {
      const sentence = `${from.account.name} holds ${available.pieces} pieces of ${from.lot.code}. More can’t leave than are there. Count again.`;
      return refuse({ code: 'not_enough', field, sentence });
    }
    if ((pieces === available.pieces) !== (asked.gross === available.mass.gross)) {
      const sentence = `Either all pieces of ${from.lot.code} leave ${from.account.name} or some mass stays with some pieces. Count again, or say that the container is now empty.`;
      return refuse({ code: 'pieces_needed', field, sentence });
    }
  }
  const mass = takeGross(available.mass, asked.gross);
  const counted = available.pieces === null ? null : pieces;
  return accept({ lot: from.lot, mass, pieces: counted, weighing: null, by_count: false, last: null });
}

function byCount(from: DrawnFrom, available: Holding, count: bigint, field: string): Outcome<Drawn> {
  if (available.pieces === null) {
    const sentence = `${from.lot.code} is not kept by pieces. Put it on the balance.`;
    return refuse({ code: 'pieces_needed', field, sentence });
  }
  if (count > available.pieces) {
    const sentence = `${from.account.name} holds ${available.pieces} pieces of ${from.lot.code}. More can’t leave than are there. Count again.`;
    return refuse({ code: 'not_enough', field: `${field}.pieces`, sentence });
  }
  const [gross] = apportion(available.mass.gross, [count, available.pieces - count]);
  const mass = takeGross(available.mass, gross ?? 0n);
  return accept({ lot: from.lot, mass, pieces: count, weighing: null, by_count: true, last: null });
}

function emptied(
  facts: Facts,
  available: Holding,
  asked: {
    readonly gross: Micrograms;
    readonly pieces: bigint | null;
    readonly weighing: Weighing;
    readonly lot: Lot;
  },
  field: string,
): Outcome<Drawn> {
  const by = { readings: readingsOf(asked.weighing), weighing_u_ug: facts.settings.weighing_u_ug };
  if (available.mass.gross <= 0n) {
    const sentence = `The book has no weight of ${asked.lot.code} there. Enter what was found by a count.`;
    return refuse({ code: 'not_enough', field, sentence });
  }
  const last = lastOfIt(available.mass, asked.gross, by);
  const pieces = available.pieces === null ? null : (asked.pieces ?? available.pieces);
  const missing = available.pieces === null || pieces === null ? null : available.pieces - pieces;
  return accept({
    lot: asked.lot,
    mass: last.moved,
    pieces,
    weighing: asked.weighing,
    by_count: false,
    last: { ...last, within: last.within && (missing ?? 0n) === 0n, pieces: missing },
  });
}
