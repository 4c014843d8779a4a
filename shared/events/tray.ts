/**
 * Trays (DESIGN section 2): a lot of one alloy, owner, origin class and place that stays open until it is melted,
 * consigned or closed. What is added joins it.
 */
import type { Account } from '../book/account.ts';
import { isPlace } from '../book/account.ts';
import type { Outcome } from '../book/draft.ts';
import { refuse } from '../book/draft.ts';
import type { Facts } from '../book/facts.ts';
import type { Basis, Lot, LotForm, Origin } from '../book/lot.ts';
import { isZeroMass } from '../mass/vector.ts';
import { findLot, usableLot } from './lookup.ts';

/** Forms that are gathered on a tray or in a bin. */
const TRAY_FORMS: readonly LotForm[] = ['clean_scrap', 'tree_scrap', 'filings', 'old_gold', 'grain'];

/** What is to join a tray, and where. */
export interface Joining {
  readonly form: LotForm;
  readonly alloy: string | null;
  readonly owner_id: string | null;
  readonly origin: Origin;
  readonly basis: Basis;
  readonly place: Account;
  /** Under a claim: it has to stay apart. */
  readonly claimed: boolean;
}

/** The tray's lot, where metal like this may join it. Refuses a lot of another alloy, owner, origin, form or place. */
export function joinTray(lot_id: string, joining: Joining, field: string, facts: Facts): Outcome<Lot> {
  const found = findLot(facts, lot_id, field);
  if (!found.ok) return found;
  const lot = usableLot(found.value, field);
  if (!lot.ok) return lot;
  const reason = whyNot(lot.value, joining, facts);
  if (reason === null) return lot;
  const sentence = `${reason} Choose another tray, or make it a lot of its own.`;
  return refuse({ code: 'lots_differ', field, sentence });
}

function whyNot(lot: Lot, joining: Joining, facts: Facts): string | null {
  if (joining.claimed) return 'Metal under a claim has to be kept apart, so it can’t join a tray.';
  if (!TRAY_FORMS.includes(lot.form) || lot.form !== joining.form) {
    return `${lot.code} is no tray of that form, so nothing can join it.`;
  }
  if (lot.owner_id !== joining.owner_id)
    return `${lot.code} has another owner. Metal of two owners is never in one lot.`;
  if (lot.alloy !== joining.alloy)
    return `${lot.code} is ${lot.alloy ?? 'of no alloy'}, and a tray is of one alloy.`;
  if (lot.origin !== joining.origin) return `${lot.code} is of another origin, and a tray is of one origin.`;
  if ((lot.basis === 'unknown') !== (joining.basis === 'unknown')) {
    return `The fineness of one is known and of the other not, so ${lot.code} can’t take it.`;
  }
  const lying = facts.holdings.filter((h) => h.lot_id === lot.id && !isZeroMass(h.mass));
  const elsewhere = lying.find((h) => {
    const account = facts.accounts.get(h.account_id);
    return account !== undefined && isPlace(account.kind) && account.id !== joining.place.id;
  });
  return elsewhere === undefined
    ? null
    : `${lot.code} lies in another place too, and a tray is in one place.`;
}
