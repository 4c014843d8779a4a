/** What the statement says, as tables of text: made from the chain alone, like everything in a dossier. */
import { isPlace } from '../../../shared/book/account.ts';
import { isVoucherKind } from '../../../shared/book/kinds.ts';
import { Decimal } from '../../../shared/decimal.ts';
import type { HashedRecord, HoldingState } from '../../../shared/dossier/replay.ts';
import {
  accountsOf,
  gramsOrZero,
  holdingsOf,
  leafOf,
  nextPeople,
  pricesOf,
} from '../../../shared/dossier/replay.ts';
import type { PersonState } from '../../../shared/dossier/replay.ts';
import { valueOf } from '../../../shared/insurance/valuation.ts';
import { printGrams } from '../../../shared/mass/micrograms.ts';
import type { MassVector } from '../../../shared/mass/vector.ts';
import { METALS, ZERO_MASS, addMass, isZeroMass } from '../../../shared/mass/vector.ts';
import type { StatementFacts } from './statement.ts';

export interface StatementPart {
  readonly heading: string;
  readonly note: string;
  readonly columns: readonly string[];
  readonly rows: readonly (readonly string[])[];
  /** Share of the width that the first column takes. */
  readonly first_share: number;
  /** Whether the other columns are words and stand left. */
  readonly words: boolean;
}

const figures = { first_share: 0.3, words: false } as const;
const sentences = { first_share: 0.22, words: true } as const;
const grams = (ug: bigint) => (ug === 0n ? 'none' : printGrams(ug, 3));

export function statementParts(
  chain: readonly HashedRecord[],
  facts: StatementFacts,
): readonly StatementPart[] {
  return [
    ...holdingParts(chain),
    priceParts(chain),
    lossPart(chain),
    openPart(chain),
    changesPart(chain),
    chainPart(chain, facts),
  ];
}

function holdingParts(chain: readonly HashedRecord[]): readonly StatementPart[] {
  const records = chain.map(({ record }) => record);
  const accounts = accountsOf(records);
  const bases = new Map(
    records
      .filter(({ kind }) => kind === 'lot_described')
      .map((record) => [leafOf(record, 'lot_id') ?? '', leafOf(record, 'basis') ?? '']),
  );
  const prices = METALS.flatMap((metal) => {
    const price = pricesOf(records).get(metal);
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
  const held = holdingsOf(records).filter(({ mass }) => !isZeroMass(mass));
  const isEstimated = ({ lot_id }: HoldingState) =>
    ['estimated', 'unknown'].includes(bases.get(lot_id) ?? '');
  const kindOf = ({ account_id }: HoldingState) => accounts.get(account_id)?.kind;
  const inPlace = held.filter((row) => {
    const kind = kindOf(row);
    return kind !== undefined && isPlace(kind);
  });
  const part = (heading: string, note: string, rows: readonly HoldingState[]): StatementPart => ({
    ...figures,
    heading,
    note,
    columns: ['Place', 'Gross, g', 'Gold, g', 'Silver, g', 'Platinum, g', 'Palladium, g', 'Value'],
    rows: byAccount(rows).map(([account_id, mass]) => [
      accounts.get(account_id)?.name ?? account_id,
      grams(mass.gross),
      ...METALS.map((metal) => grams(mass[metal])),
      valueOf(mass, prices)?.toFixed(2) ?? 'not priced',
    ]),
  });
  return [
    part(
      'Weighed metal',
      'What the balance showed, at fineness declared, certified, computed, tested or assayed.',
      inPlace.filter((row) => !isEstimated(row)),
    ),
    part(
      'Estimated metal',
      'Sweeps, filings and other metal whose content is estimated. Not to be added to weighed metal.',
      inPlace.filter(isEstimated),
    ),
    part(
      'Claims',
      'Metal that others owe the house, or below nothing the house owes. Nothing of it lies in the house.',
      held.filter((row) => kindOf(row) === 'metal_account'),
    ),
  ];
}

function byAccount(rows: readonly HoldingState[]): readonly (readonly [string, MassVector])[] {
  const sums = new Map<string, MassVector>();
  for (const { account_id, mass } of rows)
    sums.set(account_id, addMass(sums.get(account_id) ?? ZERO_MASS, mass));
  return [...sums];
}

function priceParts(chain: readonly HashedRecord[]): StatementPart {
  const rows = [...pricesOf(chain.map(({ record }) => record))].map(([metal, price]) => [
    metal,
    price.per_ozt,
    price.currency,
    price.priced_on,
  ]);
  return {
    ...sentences,
    heading: 'Prices',
    note: 'Per troy ounce (31.1034768 g). The newest of each metal; its source stands in data/prices.csv.',
    columns: ['Metal', 'Price', 'Currency', 'Of'],
    rows,
  };
}

function lossPart(chain: readonly HashedRecord[]): StatementPart {
  const records = chain.map(({ record }) => record);
  const rows = [...accountsOf(records).values()]
    .filter(({ kind }) => kind === 'working_loss')
    .map((account) => {
      const backs = records.filter((record) => record.kind === 'weigh_back');
      const mass = backs
        .flatMap((record) => record.entries)
        .filter((entry) => entry.account_id === account.id);
      const gold = mass.reduce((sum, entry) => sum + gramsOrZero(entry.gold_g), 0n);
      const silver = mass.reduce((sum, entry) => sum + gramsOrZero(entry.silver_g), 0n);
      const now = holdingsOf(records)
        .filter((row) => row.account_id === account.id)
        .reduce((sum, row) => sum + row.mass.gold, 0n);
      return [account.name, grams(gold), grams(silver), grams(now)];
    })
    .filter(([, gold, silver]) => gold !== 'none' || silver !== 'none');
  return {
    ...figures,
    heading: 'Working losses',
    note: 'Booked at weigh-backs since the book began, and what of the gold is not recovered yet.',
    columns: ['Operation', 'Gold lost, g', 'Silver lost, g', 'Gold not recovered, g'],
    rows,
  };
}

function openPart(chain: readonly HashedRecord[]): StatementPart {
  const records = chain.map(({ record }) => record);
  const explained = new Set(
    records.filter(({ kind }) => kind === 'dispute_closed').map((record) => leafOf(record, 'voucher_id')),
  );
  const answered = new Set(
    records
      .filter(({ kind }) => kind === 'handover_acknowledged')
      .map((record) => leafOf(record, 'voucher_id')),
  );
  const losses = records
    .filter((record) => leafOf(record, 'to_explain') === 'yes' && !explained.has(record.id))
    .map((record) => [
      `Voucher ${record.sequence}`,
      'A loss over its allowance is not explained.',
      record.business_date,
    ]);
  const disputes = records
    .filter((record) => record.kind === 'handover_disputed' && !answered.has(leafOf(record, 'voucher_id')))
    .map((record) => [
      `Record ${record.sequence}`,
      'The weight of a handover is disputed.',
      record.business_date,
    ]);
  return {
    ...sentences,
    heading: 'Open discrepancies',
    note: 'Printed as they stand.',
    columns: ['Where', 'What', 'Since'],
    rows: [...losses, ...disputes],
  };
}

function changesPart(chain: readonly HashedRecord[]): StatementPart {
  const people = new Map<string, PersonState>();
  const nameOf = (id: string | null) => (id === null ? 'nobody' : (people.get(id)?.name ?? id));
  const rows = chain.flatMap(({ record }) => {
    nextPeople(people, record);
    const isShown = isVoucherKind(record.kind) && record.approved_by !== null;
    if (!isShown) return [];
    const single = leafOf(record, 'single_handed') === 'yes' ? ', single-handed' : '';
    return [
      [
        `${record.kind.replaceAll('_', ' ')} ${record.sequence}`,
        `recorded by ${nameOf(record.recorded_by)}, approved by ${nameOf(record.approved_by)}${single}`,
        record.business_date,
      ],
    ];
  });
  return {
    ...sentences,
    heading: 'Signed by two',
    note: 'Reversals, corrections, write-offs, changes of owner and other acts that need a second signature.',
    columns: ['Voucher', 'Signed by', 'On'],
    rows,
  };
}

function chainPart(chain: readonly HashedRecord[], facts: StatementFacts): StatementPart {
  const last = chain.at(-1);
  const rows = [
    ['Records', String(chain.length), ''],
    ['Head', last?.hash ?? 'none', last?.record.recorded_at ?? ''],
    ['Key', facts.key_id, 'SHA-256 of the public key’s DER'],
    ...facts.earlier_heads.map(({ sequence, hash, at }) => [`Earlier head ${sequence}`, hash, at]),
  ];
  return {
    ...sentences,
    heading: 'Chain',
    note: 'Keep this page. The fingerprint and the heads in your own hands are what later dossiers are held against. VERIFY.md in the dossier says how. Stones are not kept in this book.',
    columns: ['What', 'Value', 'Of'],
    rows,
  };
}
