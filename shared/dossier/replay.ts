/**
 * What the chain alone tells, record by record: accounts, lots, people and their roles, prices, periods, balances. Both
 * the dossier's tables and its checks are made from this; nothing else in a dossier is trusted.
 */
import type { AccountKind } from '../book/account.ts';
import { ACCOUNT_KINDS } from '../book/account.ts';
import type { ChainEntry, ChainRecord } from '../chain/record-line.ts';
import { gramsText } from '../mass/grams-text.ts';
import type { MassVector } from '../mass/vector.ts';
import { ZERO_MASS, addMass, massFromJson } from '../mass/vector.ts';

/** A record with the hash of its line. */
export interface HashedRecord {
  readonly record: ChainRecord;
  readonly hash: string;
}

export interface AccountState {
  readonly id: string;
  readonly kind: AccountKind;
  readonly name: string;
  readonly custodian_id: string | null;
}

export interface PersonState {
  readonly id: string;
  readonly name: string;
  readonly role: string;
  /** Last day of the role; null for no end. */
  readonly until: string | null;
  readonly active: boolean;
}

/** A leaf of a record's detail as text, or null. */
export function leafOf(record: ChainRecord, key: string): string | null {
  const value = record.detail[key];
  return typeof value === 'string' ? value : null;
}

/** The flat rows of a list in a record's detail. */
export function rowsOfDetail(
  record: ChainRecord,
  key: string,
): readonly Readonly<Record<string, string | null>>[] {
  const value = record.detail[key];
  if (!Array.isArray(value)) return [];
  return value.flatMap((row) => (row !== null && typeof row === 'object' ? [row] : []));
}

export const entryMass = (entry: ChainEntry): MassVector => massFromJson(entry);
export const entryPieces = (entry: ChainEntry): bigint => (entry.pieces === null ? 0n : BigInt(entry.pieces));

/** Accounts after all records, in the order in which they were opened. */
export function accountsOf(records: readonly ChainRecord[]): ReadonlyMap<string, AccountState> {
  const accounts = new Map<string, AccountState>();
  for (const record of records) {
    const id = leafOf(record, 'account_id');
    if (id === null) continue;
    const known = accounts.get(id);
    if (record.kind === 'account_opened') {
      const kind = ACCOUNT_KINDS.find((name) => name === leafOf(record, 'kind'));
      if (kind !== undefined)
        accounts.set(id, {
          id,
          kind,
          name: leafOf(record, 'name') ?? '',
          custodian_id: leafOf(record, 'custodian_id'),
        });
    } else if (record.kind === 'account_renamed' && known !== undefined) {
      accounts.set(id, { ...known, name: leafOf(record, 'name') ?? '' });
    } else if (record.kind === 'custodian_changed' && known !== undefined) {
      accounts.set(id, { ...known, custodian_id: leafOf(record, 'custodian_id') });
    }
  }
  return accounts;
}

/** A person's standing after one more record. */
export function nextPeople(people: Map<string, PersonState>, record: ChainRecord): void {
  const id = leafOf(record, 'person_id');
  if (id === null) return;
  if (record.kind === 'role_given')
    people.set(id, {
      id,
      name: leafOf(record, 'name') ?? '',
      role: leafOf(record, 'role') ?? '',
      until: leafOf(record, 'until'),
      active: true,
    });
  const known = people.get(id);
  if (record.kind === 'role_ended' && known !== undefined) people.set(id, { ...known, active: false });
}

export interface HoldingState {
  readonly account_id: string;
  readonly lot_id: string;
  readonly mass: MassVector;
  /** Null where the lot was never counted. */
  readonly pieces: bigint | null;
}

/** Every balance after all records, by account and lot. */
export function holdingsOf(records: readonly ChainRecord[]): readonly HoldingState[] {
  const held = new Map<string, HoldingState>();
  for (const record of records) {
    for (const entry of record.entries) {
      const key = `${entry.account_id} ${entry.lot_id}`;
      const known = held.get(key) ?? {
        account_id: entry.account_id,
        lot_id: entry.lot_id,
        mass: ZERO_MASS,
        pieces: null,
      };
      const pieces = entry.pieces === null ? known.pieces : (known.pieces ?? 0n) + BigInt(entry.pieces);
      held.set(key, { ...known, mass: addMass(known.mass, entryMass(entry)), pieces });
    }
  }
  return [...held.values()];
}

/** A price as our records write it; what is none can't value anything. */
const PRICE = /^\d{1,15}(\.\d{1,15})?$/;

/** The newest price of each metal among price_set acts, by date and then by order. */
export function pricesOf(
  records: readonly ChainRecord[],
): ReadonlyMap<string, { readonly per_ozt: string; readonly priced_on: string; readonly currency: string }> {
  const newest = new Map<string, { per_ozt: string; priced_on: string; currency: string }>();
  for (const record of records) {
    const metal = leafOf(record, 'metal');
    const per_ozt = leafOf(record, 'price_per_ozt') ?? '';
    if (record.kind !== 'price_set' || metal === null || !PRICE.test(per_ozt)) continue;
    const price = {
      per_ozt,
      priced_on: leafOf(record, 'priced_on') ?? '',
      currency: leafOf(record, 'currency') ?? '',
    };
    const known = newest.get(metal);
    if (known === undefined || price.priced_on >= known.priced_on) newest.set(metal, price);
  }
  return newest;
}

/** Grams of a leaf as micrograms, nothing where there is none. */
export const gramsOrZero = (text: string | null): bigint => (text === null ? 0n : gramsText(text));
