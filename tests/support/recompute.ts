/**
 * An independent reading of a dossier, written from the format's description alone: it imports nothing of the program
 * but Node's own hash. What it finds must be what the program says.
 */
import { createHash } from 'node:crypto';

type Json = string | number | boolean | null | Json[] | { [key: string]: Json };

const member = (value: Json | undefined, key: string): Json | undefined =>
  typeof value === 'object' && value !== null && !Array.isArray(value) ? value[key] : undefined;
const textOf = (value: Json | undefined): string => (typeof value === 'string' ? value : '');
const MASSES = ['gross_g', 'gold_g', 'silver_g', 'platinum_g', 'palladium_g'];

export interface Recomputed {
  /** Hash of the last line, and its number; the first line where a link is broken. */
  readonly head: string;
  readonly records: number;
  readonly broken_at: number | null;
  /** "account,lot,gross,gold,silver,platinum,palladium" in micrograms of all that is not nothing, sorted. */
  readonly holdings: readonly string[];
  /** Numbers of the vouchers that don't sum to nothing. */
  readonly unbalanced: readonly number[];
}

/** Reads the bytes of `book.jsonl`. */
export function recompute(book: Uint8Array): Recomputed {
  const held = new Map<string, bigint[]>();
  const unbalanced: number[] = [];
  let head = '0'.repeat(64);
  let broken_at: number | null = null;
  const lines = Buffer.from(book).toString('utf8').split('\n').slice(0, -1);
  lines.forEach((line, index) => {
    const record: Json = JSON.parse(line);
    if (member(record, 'previous_hash') !== head || member(record, 'sequence') !== String(index + 1))
      broken_at ??= index + 1;
    head = createHash('sha256').update(line, 'utf8').digest('hex');
    const entries = member(record, 'entries');
    const sums = MASSES.map(() => 0n);
    for (const entry of Array.isArray(entries) ? entries : []) {
      const key = `${textOf(member(entry, 'account_id'))},${textOf(member(entry, 'lot_id'))}`;
      const sum = held.get(key) ?? MASSES.map(() => 0n);
      MASSES.forEach((mass, at) => {
        const micrograms = BigInt(textOf(member(entry, mass)).replace('.', ''));
        sum[at] = (sum[at] ?? 0n) + micrograms;
        sums[at] = (sums[at] ?? 0n) + micrograms;
      });
      held.set(key, sum);
    }
    if (sums.some((sum) => sum !== 0n)) unbalanced.push(index + 1);
  });
  const holdings = [...held]
    .filter(([, sum]) => sum.some((mass) => mass !== 0n))
    .map(([key, sum]) => [key, ...sum].join(','))
    .sort();
  return { head, records: lines.length, broken_at, holdings, unbalanced };
}
