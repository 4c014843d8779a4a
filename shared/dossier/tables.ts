/** The tables of a dossier, made from the chain alone: their columns are the format's, version 1. */
import { isVoucherKind } from '../book/kinds.ts';
import { Decimal } from '../decimal.ts';
import { valueOf } from '../insurance/valuation.ts';
import type { Metal } from '../mass/vector.ts';
import { METALS, isZeroMass, massToJson } from '../mass/vector.ts';
import type { HashedRecord, PersonState } from './replay.ts';
import { accountsOf, holdingsOf, leafOf, nextPeople, pricesOf, rowsOfDetail } from './replay.ts';

export interface Table {
  readonly path: string;
  readonly columns: readonly string[];
  readonly rows: readonly (readonly (string | null)[])[];
}

const MASSES = ['gross_g', 'gold_g', 'silver_g', 'platinum_g', 'palladium_g'] as const;

/** Every table but the documents', whose names the chain doesn't hold. */
export function tablesOf(chain: readonly HashedRecord[]): readonly Table[] {
  return [
    accounts(chain),
    lots(chain),
    vouchers(chain),
    entries(chain),
    holdings(chain),
    counts(chain),
    tests(chain),
    weighings(chain),
    handovers(chain),
    prices(chain),
    people(chain),
  ];
}

/** By code units, so that the order is the same in every language of a reader's computer. */
const inOrder = (a: string, b: string): number => (a === b ? 0 : a < b ? -1 : 1);

const records = (chain: readonly HashedRecord[]) => chain.map(({ record }) => record);

function accounts(chain: readonly HashedRecord[]): Table {
  const rows = [...accountsOf(records(chain)).values()].map(({ id, kind, name, custodian_id }) => [
    id,
    kind,
    name,
    custodian_id,
  ]);
  return { path: 'data/accounts.csv', columns: ['id', 'kind', 'name', 'custodian_id'], rows };
}

function lots(chain: readonly HashedRecord[]): Table {
  const keys = [
    'lot_id',
    'code',
    'form',
    'alloy',
    'owner_id',
    'origin',
    'gold_permille',
    'silver_permille',
    'platinum_permille',
    'palladium_permille',
    'basis',
  ];
  const rows = records(chain)
    .filter(({ kind }) => kind === 'lot_described')
    .map((record) => keys.map((key) => leafOf(record, key)));
  return {
    path: 'data/lots.csv',
    columns: ['id', 'code', 'form', 'alloy', 'owner', 'origin', ...keys.slice(6)],
    rows,
  };
}

function vouchers(chain: readonly HashedRecord[]): Table {
  const columns = [
    'sequence',
    'id',
    'kind',
    'business_date',
    'recorded_at',
    'recorded_by',
    'approved_by',
    'reverses',
    'corrects',
    'operation',
    'bench',
    'person_id',
    'job_id',
    'counterparty_id',
    'note',
    'hash',
  ];
  const rows = chain
    .filter(({ record }) => isVoucherKind(record.kind))
    .map(({ record: r, hash }) => [
      r.sequence,
      r.id,
      r.kind,
      r.business_date,
      r.recorded_at,
      r.recorded_by,
      r.approved_by,
      r.reverses,
      ...['corrects', 'operation', 'bench', 'person_id', 'job_id', 'counterparty_id'].map((key) =>
        leafOf(r, key),
      ),
      r.note,
      hash,
    ]);
  return { path: 'data/vouchers.csv', columns, rows };
}

function entries(chain: readonly HashedRecord[]): Table {
  const rows = records(chain).flatMap((r) =>
    r.entries.map((e) => [
      r.sequence,
      e.line,
      e.account_id,
      e.lot_id,
      ...MASSES.map((key) => e[key]),
      e.pieces,
    ]),
  );
  return {
    path: 'data/entries.csv',
    columns: ['voucher_sequence', 'line', 'account_id', 'lot_id', ...MASSES, 'pieces'],
    rows,
  };
}

function holdings(chain: readonly HashedRecord[]): Table {
  const newest = pricesOf(records(chain));
  const priced = METALS.flatMap((metal: Metal) => {
    const price = newest.get(metal);
    return price === undefined
      ? []
      : [
          {
            metal,
            currency: price.currency,
            price_per_ozt: new Decimal(price.per_ozt),
            priced_on: price.priced_on,
            source: '',
          },
        ];
  });
  const rows = holdingsOf(records(chain))
    .filter(({ mass, pieces }) => !isZeroMass(mass) || (pieces ?? 0n) !== 0n)
    .sort((a, b) => inOrder(a.account_id, b.account_id) || inOrder(a.lot_id, b.lot_id))
    .map(({ account_id, lot_id, mass, pieces }) => {
      const json = massToJson(mass);
      return [
        account_id,
        lot_id,
        ...MASSES.map((key) => json[key]),
        pieces?.toString() ?? null,
        valueOf(mass, priced)?.toFixed(2) ?? null,
      ];
    });
  return { path: 'data/holdings.csv', columns: ['account_id', 'lot_id', ...MASSES, 'pieces', 'value'], rows };
}

function counts(chain: readonly HashedRecord[]): Table {
  const keys = ['what', 'bench', 'account_id', 'how', 'description', 'gross_g', 'pieces'];
  const rows = records(chain)
    .filter(({ kind }) => kind === 'count_taken')
    .map((r) => [r.sequence, r.id, r.business_date, r.recorded_by, ...keys.map((key) => leafOf(r, key))]);
  return {
    path: 'data/counts.csv',
    columns: ['sequence', 'id', 'business_date', 'recorded_by', ...keys],
    rows,
  };
}

function tests(chain: readonly HashedRecord[]): Table {
  const keys = ['lot_id', 'test', 'result'];
  const rows = records(chain)
    .filter(({ kind }) => kind === 'test_recorded')
    .map((r) => [r.sequence, r.id, r.business_date, r.recorded_by, ...keys.map((key) => leafOf(r, key))]);
  return {
    path: 'data/tests.csv',
    columns: ['sequence', 'id', 'business_date', 'recorded_by', ...keys],
    rows,
  };
}

function weighings(chain: readonly HashedRecord[]): Table {
  const keys = [
    'id',
    'line',
    'gross_g',
    'tare_g',
    'tare_kind',
    'stones_g',
    'balance_id',
    'how',
    'taken_at',
    'taken_by',
  ];
  const rows = records(chain).flatMap((r) =>
    rowsOfDetail(r, 'weighings').map((row) => [r.sequence, ...keys.map((key) => row[key] ?? null)]),
  );
  return { path: 'data/weighings.csv', columns: ['voucher_sequence', ...keys], rows };
}

function handovers(chain: readonly HashedRecord[]): Table {
  const rows = records(chain)
    .filter(({ kind }) => kind === 'handover_acknowledged' || kind === 'handover_disputed')
    .map((r) => [
      r.sequence,
      leafOf(r, 'voucher_id'),
      leafOf(r, 'person_id'),
      r.kind === 'handover_disputed' ? 'disputed' : 'acknowledged',
      leafOf(r, 'how'),
      leafOf(r, 'gross_g'),
      r.recorded_at,
    ]);
  return {
    path: 'data/handovers.csv',
    columns: ['sequence', 'voucher_id', 'person_id', 'state', 'how', 'gross_g', 'recorded_at'],
    rows,
  };
}

function prices(chain: readonly HashedRecord[]): Table {
  const keys = ['price_id', 'metal', 'currency', 'price_per_ozt', 'priced_on', 'source'];
  const rows = records(chain)
    .filter(({ kind }) => kind === 'price_set')
    .map((r) => keys.map((key) => leafOf(r, key)));
  return { path: 'data/prices.csv', columns: ['id', ...keys.slice(1)], rows };
}

function people(chain: readonly HashedRecord[]): Table {
  const known = new Map<string, PersonState>();
  for (const record of records(chain)) nextPeople(known, record);
  return {
    path: 'data/people.csv',
    columns: ['id', 'name', 'role'],
    rows: [...known.values()].map(({ id, name, role }) => [id, name, role]),
  };
}
