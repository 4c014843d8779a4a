/** The lots that a weigh-back gives: work, castings, scrap and filings, each new or joining an open tray. */
import { finenessOf, fineness } from '../../alloy/fineness.ts';
import type { Account } from '../../book/account.ts';
import type { EntryDraft, Outcome, RecordDraft } from '../../book/draft.ts';
import { accept } from '../../book/draft.ts';
import type { Facts } from '../../book/facts.ts';
import type { Basis, LotForm, Origin } from '../../book/lot.ts';
import type { MassVector } from '../../mass/vector.ts';
import { openLot } from '../new-lot.ts';
import { joinTray } from '../tray.ts';
import type { OutLot } from './out.ts';

/** What the parts of a job have alike. */
export interface Making {
  readonly lots: readonly OutLot[];
  readonly owner_id: string | null;
  readonly alloy: string | null;
  readonly business_date: string;
  readonly facts: Facts;
}

export interface Part {
  readonly form: LotForm;
  readonly description: string;
  readonly mass: MassVector;
  readonly pieces: bigint | null;
  readonly place: Account;
  readonly into_lot_id: string | null;
  readonly field: string;
}

export interface MadeLot {
  readonly records: readonly RecordDraft[];
  readonly entry: EntryDraft;
}

/** Opens the part's lot, or lets it join its tray; gives the entry that puts it in its place. */
export function makeLot(part: Part, making: Making): Outcome<MadeLot> {
  const { mass, pieces, place } = part;
  const { facts, owner_id } = making;
  const basis = basisOf(part.form, making.lots);
  const origin = originOf(making.lots);
  if (part.into_lot_id !== null) {
    const like = { form: part.form, alloy: making.alloy, owner_id, origin, basis, place, claimed: false };
    const tray = joinTray(part.into_lot_id, like, part.field, facts);
    if (!tray.ok) return tray;
    return accept({ records: [], entry: { account_id: place.id, lot_id: tray.value.id, mass, pieces } });
  }
  const opened = openLot(facts, making.business_date, {
    form: part.form,
    alloy: making.alloy,
    owner_id,
    origin,
    fineness: finenessOf(mass) ?? fineness({}),
    basis,
    description: part.description,
    hold_reason: null,
    hold_until: null,
    parents: making.lots.map(({ lot }) => lot.id),
  });
  return accept({
    records: [opened.act],
    entry: { account_id: place.id, lot_id: opened.lot_id, mass, pieces },
  });
}

/** Filings hold dirt by estimate; the rest is reckoned from what went in, and no surer than that. */
function basisOf(form: LotForm, lots: readonly OutLot[]): Basis {
  if (lots.some(({ lot }) => lot.basis === 'unknown')) return 'unknown';
  if (form === 'filings' || lots.some(({ lot }) => lot.basis === 'estimated')) return 'estimated';
  return 'computed';
}

function originOf(lots: readonly OutLot[]): Origin {
  const [first, ...others] = new Set(lots.map(({ lot }) => lot.origin));
  return first === undefined || others.length > 0 ? 'mixed' : first;
}
