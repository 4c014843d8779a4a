/** How the book's nouns stand in JSON: masses as grams, finenesses as decimal strings. */
import { ACCOUNT_KINDS } from '../book/account.ts';
import { BASES, LOT_FORMS, ORIGINS, STANDINGS } from '../book/lot.ts';
import { ACT_KINDS, VOUCHER_KINDS } from '../book/kinds.ts';
import { ROLES } from '../permissions.ts';
import { gramsSigned, permille } from './primitives.ts';
import { z } from './zod.ts';

/** The five masses of a row, signed, in grams. */
export const massFields = {
  gross_g: gramsSigned,
  gold_g: gramsSigned,
  silver_g: gramsSigned,
  platinum_g: gramsSigned,
  palladium_g: gramsSigned,
};

interface MassRow {
  readonly gross_g: bigint;
  readonly gold_g: bigint;
  readonly silver_g: bigint;
  readonly platinum_g: bigint;
  readonly palladium_g: bigint;
}

/** The mass vector of a parsed row. */
export const massOf = (row: MassRow) => ({
  gross: row.gross_g,
  gold: row.gold_g,
  silver: row.silver_g,
  platinum: row.platinum_g,
  palladium: row.palladium_g,
});

/** A mass vector by itself. */
export const massJson = z.object(massFields).transform(massOf);

export const piecesOrNull = z
  .string()
  .regex(/^-?\d+$/)
  .transform((text) => BigInt(text))
  .nullable();

export const recordKind = z.enum([...VOUCHER_KINDS, ...ACT_KINDS]);

export const accountJson = z.object({
  id: z.string(),
  kind: z.enum(ACCOUNT_KINDS),
  name: z.string(),
  custodian_id: z.string().nullable(),
  party_id: z.string().nullable(),
  operation: z.string().nullable(),
  closed: z.boolean(),
});

export const lotJson = z.object({
  id: z.string(),
  code: z.string(),
  form: z.enum(LOT_FORMS),
  alloy: z.string().nullable(),
  owner_id: z.string().nullable(),
  origin: z.enum(ORIGINS),
  gold_permille: permille,
  silver_permille: permille,
  platinum_permille: permille,
  palladium_permille: permille,
  basis: z.enum(BASES),
  standing: z.enum(STANDINGS),
  hold_reason: z.string().nullable(),
  hold_until: z.string().nullable(),
  description: z.string(),
});

const holdingFields = {
  account_id: z.string(),
  lot_id: z.string(),
  ...massFields,
  pieces: piecesOrNull,
};

export const holdingJson = z.object(holdingFields).transform((row) => ({
  account_id: row.account_id,
  lot_id: row.lot_id,
  mass: massOf(row),
  pieces: row.pieces,
}));

export const jobHoldingJson = z
  .object({
    ...holdingFields,
    job_id: z.string().nullable(),
    came_by: z.object({ kind: z.string(), operation: z.string().nullable() }).nullable(),
  })
  .transform((row) => ({
    account_id: row.account_id,
    lot_id: row.lot_id,
    job_id: row.job_id,
    came_by: row.came_by,
    mass: massOf(row),
    pieces: row.pieces,
  }));

export const recordedEntryJson = z
  .object({
    ...holdingFields,
    voucher_id: z.string(),
    voucher_sequence: z.string(),
    voucher_kind: recordKind,
    corrects: z.string().nullable(),
    business_date: z.string(),
    line: z.string(),
    operation: z.string().nullable(),
    bench: z.string().nullable(),
    reversed_by: z.string().nullable(),
  })
  .transform(({ gross_g, gold_g, silver_g, platinum_g, palladium_g, ...rest }) => ({
    ...rest,
    mass: massOf({ gross_g, gold_g, silver_g, platinum_g, palladium_g }),
  }));

export const recordedVoucherJson = z.object({
  id: z.string(),
  sequence: z.string(),
  kind: recordKind,
  business_date: z.string(),
  recorded_by: z.string(),
  approved_by: z.string().nullable(),
  reverses: z.string().nullable(),
  reversed_by: z.string().nullable(),
  note: z.string().nullable(),
  detail: z.record(z.string(), z.unknown()),
  entries: z.array(recordedEntryJson),
});

export const personJson = z.object({
  id: z.string(),
  name: z.string(),
  role: z.enum(ROLES),
  active: z.boolean(),
});

export const partyJson = z.object({
  id: z.string(),
  kind: z.enum(['supplier', 'customer', 'refiner', 'outworker', 'courier']),
  name: z.string(),
});

export const jobJson = z.object({
  id: z.string(),
  code: z.string(),
  title: z.string(),
  customer_id: z.string().nullable(),
});
