/**
 * The line of a record: the exact bytes that are hashed. The program makes it in parts; the database puts the previous
 * hash, the time and the sequence between them under the workshop's lock, so that canonical JSON is written in one
 * language only.
 */
import type { Detail } from '../book/draft.ts';
import { parseGrams } from '../mass/micrograms.ts';
import { z } from '../schemas/zod.ts';
import { canonicalJson } from './canonical.ts';
import type { CanonicalValue } from './canonical.ts';

const leaf = z.string().nullable();
const hash = z.string().regex(/^[0-9a-f]{64}$/);
/** Six decimals, no zeros before, no minus nothing, within a tonne: one text for each mass. */
const gramsOfSix = z
  .string()
  .regex(/\.\d{6}$/)
  .refine((text) => parseGrams(text, { signed: true }).ok);

const chainEntry = z.strictObject({
  account_id: z.string(),
  gold_g: gramsOfSix,
  gross_g: gramsOfSix,
  line: z.string().regex(/^[1-9]\d*$/),
  lot_id: z.string(),
  palladium_g: gramsOfSix,
  pieces: z
    .string()
    .regex(/^(0|-?[1-9]\d{0,17})$/)
    .nullable(),
  platinum_g: gramsOfSix,
  silver_g: gramsOfSix,
});
export type ChainEntry = z.output<typeof chainEntry>;

/** A record as it stands in a line of `book.jsonl`. */
export const chainRecord = z.strictObject({
  approved_by: leaf,
  business_date: z.iso.date(),
  detail: z.record(z.string(), z.union([leaf, z.array(leaf), z.array(z.record(z.string(), leaf))])),
  documents: z.array(z.strictObject({ id: z.string(), sha256: hash })),
  entries: z.array(chainEntry),
  id: z.string(),
  kind: z.string(),
  note: leaf,
  previous_hash: hash,
  /** UTC with milliseconds, and a moment that is one. */
  recorded_at: z.iso.datetime({ precision: 3 }),
  recorded_by: z.string(),
  reverses: leaf,
  sequence: z.string().regex(/^[1-9]\d*$/),
});
export type ChainRecord = z.output<typeof chainRecord>;

/** A record before the database has chained it. */
export interface UnchainedRecord {
  readonly approved_by: string | null;
  readonly business_date: string;
  readonly detail: Detail;
  readonly documents: readonly { readonly id: string; readonly sha256: string }[];
  readonly entries: readonly ChainEntry[];
  readonly id: string;
  readonly kind: string;
  readonly note: string | null;
  readonly recorded_by: string;
  readonly reverses: string | null;
}

export interface LineParts {
  /** Everything up to and with the comma before `"previous_hash"`. */
  readonly head: string;
  /** `"recorded_by":…,"reverses":…,` */
  readonly middle: string;
}

/** The parts of a line. Throws for text that no store keeps (see `normaliseText`). */
export function recordLineParts(record: UnchainedRecord): LineParts {
  const { recorded_by, reverses, ...before } = record;
  return {
    head: `${members(before)},`,
    middle: `${canonicalJson({ recorded_by, reverses }).slice(1, -1)},`,
  };
}

function members(value: { readonly [key: string]: CanonicalValue }): string {
  return canonicalJson(value).slice(0, -1);
}

/** The line, as the database's `post_records` puts it together. */
export function assembleLine(
  parts: LineParts,
  previous_hash: string,
  recorded_at: string,
  sequence: bigint,
): string {
  return `${parts.head}"previous_hash":"${previous_hash}","recorded_at":"${recorded_at}",${parts.middle}"sequence":"${sequence}"}`;
}

/** Reads a line strictly: it must be canonical to the byte. Gives null where it is not. */
export function readLine(line: string): ChainRecord | null {
  try {
    const record = chainRecord.parse(JSON.parse(line));
    return canonicalJson(record) === line ? record : null;
  } catch {
    return null;
  }
}
