/** The act that opens a lot in the book. Every event that makes a lot describes it here, before its voucher. */
import type { Fineness } from '../alloy/fineness.ts';
import type { ActDraft } from './draft.ts';
import type { Basis, LotForm, Origin } from './lot.ts';

export interface LotDescription {
  readonly lot_id: string;
  readonly code: string;
  readonly form: LotForm;
  readonly alloy: string | null;
  readonly owner_id: string | null;
  readonly origin: Origin;
  readonly fineness: Fineness;
  readonly basis: Basis;
  readonly description: string;
  /** Why it is on hold from the start, or null where it is released. */
  readonly hold_reason: string | null;
  /** Date until which it is on hold at least, or null. */
  readonly hold_until: string | null;
  /** Lots that it was made of. */
  readonly parents: readonly string[];
}

/** Drafts `lot_described`; `act_id` names the record, finenesses are per mille. */
export function describeLot(lot: LotDescription, act_id: string, business_date: string): ActDraft {
  return {
    type: 'act',
    id: act_id,
    kind: 'lot_described',
    business_date,
    note: null,
    documents: [],
    detail: {
      lot_id: lot.lot_id,
      code: lot.code,
      form: lot.form,
      alloy: lot.alloy,
      owner_id: lot.owner_id,
      origin: lot.origin,
      gold_permille: lot.fineness.gold.toFixed(),
      silver_permille: lot.fineness.silver.toFixed(),
      platinum_permille: lot.fineness.platinum.toFixed(),
      palladium_permille: lot.fineness.palladium.toFixed(),
      basis: lot.basis,
      standing: lot.hold_reason === null ? 'released' : 'on_hold',
      hold_reason: lot.hold_reason,
      hold_until: lot.hold_until,
      description: lot.description,
      parents: lot.parents.map((lot_id) => ({ lot_id })),
    },
  };
}

/** The letter of a lot code: by its chief metal, W for dust, B for base metal. */
export function codeLetter(form: LotForm, fineness: Fineness): string {
  if (form === 'sweeps' || form === 'polishings' || form === 'sludge') return 'W';
  const chief = (['gold', 'platinum', 'palladium', 'silver'] as const).find((metal) => fineness[metal].gt(0));
  return { gold: 'G', platinum: 'P', palladium: 'D', silver: 'A', none: 'B' }[chief ?? 'none'];
}
