/**
 * The facts that an event is decided on: the part of the book that it concerns. The server reads them under the
 * workshop's lock, a form reads them for its preview, a test makes them up; the same functions serve all three.
 */
import type { Decimal } from '../decimal.ts';
import type { Metal } from '../mass/vector.ts';
import type { MassVector } from '../mass/vector.ts';
import type { Micrograms } from '../mass/micrograms.ts';
import type { Account } from './account.ts';
import type { DetailLeaf, DocumentRef } from './draft.ts';
import type { Holding, JobHolding } from './holding.ts';
import type { RecordKind } from './kinds.ts';
import type { Lot, LotForm } from './lot.ts';

/**
 * What an event asks to be read before it can be drafted. Result accounts, sold, opening stock, people and settings
 * are always read; so is every account, lot and party that something else read here names (a holding's account and
 * lot, a lot's owner, a job's customer), and every account of a party, owner or customer among them.
 */
export interface FactsNeeded {
  readonly account_ids?: readonly string[];
  /** Lots by id: the lot and every holding of it. */
  readonly lot_ids?: readonly string[];
  /** Places of which every holding is wanted, with the lots held and the holdings by job. */
  readonly place_ids?: readonly string[];
  /** Parties whose accounts of any kind are wanted. */
  readonly party_ids?: readonly string[];
  /** Vouchers with their entries, and the handovers they made. */
  readonly voucher_ids?: readonly string[];
  /** Vouchers that are to be undone or mended: as `voucher_ids`, with every holding and entry of their lots. */
  readonly trace_voucher_ids?: readonly string[];
  /** Files that are to be kept with the record. */
  readonly document_ids?: readonly string[];
  /** Lots of which every entry is wanted, oldest first (where did these sweeps come from?). */
  readonly history_lot_ids?: readonly string[];
  readonly job_ids?: readonly string[];
  /** Bins whose loss since the last sweep-up is wanted. */
  readonly bin_ids?: readonly string[];
}

/** A voucher as it stands in the book, with its entries. */
export interface RecordedVoucher {
  readonly id: string;
  readonly sequence: string;
  readonly kind: RecordKind;
  readonly business_date: string;
  readonly recorded_by: string;
  readonly approved_by: string | null;
  readonly reverses: string | null;
  /** The voucher that reversed this one, if any. */
  readonly reversed_by: string | null;
  readonly note: string | null;
  readonly detail: Readonly<Record<string, unknown>>;
  readonly entries: readonly RecordedEntry[];
}

export interface RecordedEntry extends Holding {
  readonly voucher_id: string;
  readonly voucher_sequence: string;
  readonly voucher_kind: RecordKind;
  readonly business_date: string;
  readonly line: string;
  readonly operation: string | null;
  readonly bench: string | null;
  /** The voucher that reversed the one this entry belongs to, if any. */
  readonly reversed_by: string | null;
  /** The voucher that the one this entry belongs to corrects, if any. */
  readonly corrects: string | null;
}

/** A handover that a voucher made, as it stands. */
export interface Handover {
  readonly id: string;
  readonly voucher_id: string;
  readonly place_id: string;
  readonly from_person_id: string;
  readonly to_person_id: string;
  readonly state: 'waiting' | 'acknowledged' | 'disputed';
}

/** Days that were closed together, and whether they still are. */
export interface Period {
  readonly id: string;
  readonly first_day: string;
  readonly last_day: string;
  readonly closed: boolean;
}

export interface Party {
  readonly id: string;
  readonly kind: 'supplier' | 'customer' | 'refiner' | 'outworker' | 'courier';
  readonly name: string;
}

export interface Job {
  readonly id: string;
  readonly code: string;
  readonly title: string;
  /** Customer party, or null for stock work. */
  readonly customer_id: string | null;
}

export interface Person {
  readonly id: string;
  readonly name: string;
  readonly role: 'proprietor' | 'keeper' | 'goldsmith' | 'auditor';
  readonly active: boolean;
}

/** Loss that an operation may make: a percentage of worked fine metal plus a fixed mass. */
export interface Allowance {
  readonly operation: string;
  /** Alloy name, or null for every alloy. */
  readonly alloy: string | null;
  readonly percent: Decimal;
  readonly fixed_ug: Micrograms;
  readonly from: string;
}

/** That a bin takes the loss of an operation (at a bench, or everywhere), and the share expected back. */
export interface BinFeed {
  readonly bin_id: string;
  readonly operation: string;
  readonly bench_id: string | null;
  readonly rate_percent: Readonly<Record<Metal, Decimal>>;
}

/** Loss booked by an operation at a bench since the bin was last swept up, per metal. */
export interface UnsweptLoss {
  readonly bin_id: string;
  readonly operation: string;
  readonly bench_id: string | null;
  readonly loss: MassVector;
}

export interface MetalPrice {
  readonly metal: Metal;
  readonly currency: string;
  readonly price_per_ozt: Decimal;
  readonly priced_on: string;
  readonly source: string;
}

export interface WorkshopSettings {
  readonly currency: string;
  readonly time_zone: string;
  /** Share of filings' gross that is metal of the blend, in per mille (the rest is dirt). */
  readonly filings_metal_permille: Decimal;
  /** Difference to an invoice line that is accepted without a decision. */
  readonly invoice_tolerance_ug: Micrograms;
  /** One weighing's standard uncertainty where no balance is named. */
  readonly weighing_u_ug: Micrograms;
  /** Largest debt to a party on a metal account, per metal; missing is none. */
  readonly claim_limits: readonly {
    readonly account_id: string;
    readonly metal: Metal;
    readonly limit_ug: Micrograms;
  }[];
  /** Acceptance checks that a received lot owes before release, by form. */
  readonly acceptance: readonly {
    readonly form: LotForm;
    readonly checks: readonly string[];
  }[];
}

/** Makes the ids and lot codes of what an event opens; the preview hands in one that makes provisional ones. */
export interface IdSource {
  id(): string;
  /** Next free lot code for a letter ("G" gold, "A" silver, "P" platinum, "D" palladium, "W" sweeps, "B" base, "M" mixed). */
  lotCode(letter: string): string;
}

export interface Facts {
  /** Today's business date in the workshop's zone. */
  readonly today: string;
  /** Last day of the latest closed period, or null where none is closed. */
  readonly closed_through: string | null;
  readonly periods: readonly Period[];
  readonly accounts: ReadonlyMap<string, Account>;
  readonly lots: ReadonlyMap<string, Lot>;
  readonly holdings: readonly Holding[];
  readonly job_holdings: readonly JobHolding[];
  readonly vouchers: ReadonlyMap<string, RecordedVoucher>;
  readonly handovers: readonly Handover[];
  readonly documents: ReadonlyMap<string, DocumentRef>;
  readonly lot_entries: readonly RecordedEntry[];
  readonly parties: ReadonlyMap<string, Party>;
  readonly jobs: ReadonlyMap<string, Job>;
  readonly people: ReadonlyMap<string, Person>;
  readonly allowances: readonly Allowance[];
  readonly bin_feeds: readonly BinFeed[];
  readonly unswept: readonly UnsweptLoss[];
  readonly prices: readonly MetalPrice[];
  readonly settings: WorkshopSettings;
  readonly ids: IdSource;
}

/** A leaf of a recorded detail as text, or null where it is not there or not text. */
export function detailLeaf(detail: Readonly<Record<string, unknown>>, key: string): DetailLeaf {
  const value = detail[key];
  return typeof value === 'string' ? value : null;
}
