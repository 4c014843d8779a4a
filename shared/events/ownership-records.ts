/**
 * Changing the owner of metal that stays where it is. An owner belongs to a lot, so a new lot is described and the
 * mass moves from the old lot to the new one in the same place. Other events put these records before a voucher that
 * needs them (house solder that goes into a customer's piece).
 */
import { finenessOf } from '../alloy/fineness.ts';
import type { Account } from '../book/account.ts';
import { isWorkPlace } from '../book/account.ts';
import type { ActDraft, VoucherDraft } from '../book/draft.ts';
import type { Facts } from '../book/facts.ts';
import type { Basis, Lot, Origin } from '../book/lot.ts';
import { MIXED_FORMS } from '../book/lot.ts';
import type { MassVector } from '../mass/vector.ts';
import { equalMass, negateMass } from '../mass/vector.ts';
import type { Weighing } from '../weighing/weighing.ts';
import type { Common } from './common-fields.ts';
import type { Actor } from './definition.ts';
import { makeVoucher, weighingRows } from './make-voucher.ts';
import { describedFineness, openLot } from './new-lot.ts';

export interface OwnershipChange {
  readonly place: Account;
  readonly lot: Lot;
  readonly mass: MassVector;
  readonly pieces: bigint | null;
  readonly weighing: Weighing | null;
  /** Party that owns it from now on; null is the house. */
  readonly new_owner_id: string | null;
  readonly what_for: string;
  /** The job that it lies at a work place for. */
  readonly job_id: string | null;
}

export interface OwnershipRecords {
  /** The new lot's description, then the voucher: to be posted in this order. */
  readonly records: readonly [ActDraft, VoucherDraft];
  /** The lot that the metal is in from now on, as it will stand in the book. */
  readonly lot: Lot;
}

/** Drafts the change of owner of a mass that lies in a place. The caller has made sure that it is there. */
export function ownershipRecords(
  facts: Facts,
  common: Common,
  actor: Actor,
  change: OwnershipChange,
): OwnershipRecords {
  const { place, lot, mass, pieces } = change;
  const fineness = finenessOf(mass) ?? describedFineness(lot);
  const basis = basisOfPart(change, facts);
  const origin = originFor(lot.origin, change.new_owner_id);
  const opened = openLot(facts, common.business_date, {
    form: lot.form,
    alloy: lot.alloy,
    owner_id: change.new_owner_id,
    origin,
    fineness,
    basis,
    description: lot.description,
    hold_reason: lot.standing === 'on_hold' ? lot.hold_reason : null,
    hold_until: lot.standing === 'on_hold' ? lot.hold_until : null,
    parents: [lot.id],
  });
  const voucher = makeVoucher(facts, common, {
    kind: 'ownership',
    detail: {
      what_for: change.what_for,
      from_owner_id: lot.owner_id,
      to_owner_id: change.new_owner_id,
      counterparty_id: change.new_owner_id ?? lot.owner_id,
      bench: isWorkPlace(place.kind) ? place.id : null,
      job_id: change.job_id,
      weighings: weighingRows([{ weighing: change.weighing, line: 1 }], facts, actor),
    },
    entries: [
      {
        account_id: place.id,
        lot_id: lot.id,
        mass: negateMass(mass),
        pieces: pieces === null ? null : -pieces,
      },
      { account_id: place.id, lot_id: opened.lot_id, mass, pieces },
    ],
  });
  const next: Lot = {
    ...lot,
    id: opened.lot_id,
    code: opened.code,
    owner_id: change.new_owner_id,
    origin,
    basis,
    gold_permille: fineness.gold,
    silver_permille: fineness.silver,
    platinum_permille: fineness.platinum,
    palladium_permille: fineness.palladium,
  };
  return { records: [opened.act, voucher], lot: next };
}

/** A part of mixed metal is only estimated, whatever was known of the whole. */
function basisOfPart(change: OwnershipChange, facts: Facts): Basis {
  const { lot, place, mass } = change;
  const mixed = MIXED_FORMS.some((form) => form === lot.form);
  const held = facts.holdings.filter((h) => h.lot_id === lot.id && h.account_id === place.id);
  const whole = held.some((h) => equalMass(h.mass, mass));
  return mixed && !whole && lot.basis !== 'unknown' ? 'estimated' : lot.basis;
}

/** What a customer brought is the customer's own no longer once the house has it: it is recycled metal. */
function originFor(origin: Origin, new_owner_id: string | null): Origin {
  return origin === 'customers_own' && new_owner_id === null ? 'recycled' : origin;
}
