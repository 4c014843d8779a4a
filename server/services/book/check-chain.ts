/**
 * Walks the chain from its first record to its last, in pages: each line hashes to what stands beside it and names the
 * hash before, and columns and entries say what the line says. So whoever changes an old weight by hand is found out,
 * with the number of the voucher.
 */
import { createHash } from 'node:crypto';
import { isVoucherKind } from '../../../shared/book/kinds.ts';
import { canonicalJson } from '../../../shared/chain/canonical.ts';
import { readLine } from '../../../shared/chain/record-line.ts';
import type { ChainRecord } from '../../../shared/chain/record-line.ts';
import { isZeroMass, massFromJson, sumMass } from '../../../shared/mass/vector.ts';
import { massFieldsOut } from '../../../shared/schemas/primitives.ts';
import type { BookFault } from '../../../shared/schemas/book-check.ts';
import { MOST_FAULTS } from '../../../shared/schemas/book-check.ts';
import { z } from '../../../shared/schemas/zod.ts';
import type { Tx } from '../../db/rows.ts';

const PAGE = 500;
const START = '0'.repeat(64);

const storedEntry = z.object({
  account_id: z.string(),
  lot_id: z.string(),
  line: z.string(),
  pieces: z.string().nullable(),
  ...massFieldsOut,
});
const leaf = z.string().nullable();
const stored = z.object({
  sequence: z.string(),
  kind: z.string(),
  line: z.string(),
  hash: z.string(),
  previous_hash: z.string(),
  columns: z.record(z.string(), z.json()),
  named: z.record(z.string(), leaf),
  entries: z.array(storedEntry),
  same_day: z.boolean(),
});
type Stored = z.output<typeof stored>;

export interface ChainWalk {
  readonly records: number;
  readonly entries: number;
  readonly last: { readonly sequence: bigint; readonly hash: string };
  readonly faults: readonly BookFault[];
}

/** Checks every record up to a sequence. */
export async function walkChain(tx: Tx, up_to: bigint): Promise<ChainWalk> {
  const faults: BookFault[] = [];
  let last = { sequence: 0n, hash: START };
  let [records, entries] = [0, 0];
  for (;;) {
    const page = await tx.rows(stored, RECORDS, [String(last.sequence), String(up_to)]);
    for (const record of page) {
      faults.push(...faultsOf(record, last));
      last = { sequence: BigInt(record.sequence), hash: record.hash };
      records += 1;
      entries += record.entries.length;
    }
    if (page.length < PAGE || faults.length >= MOST_FAULTS) return { records, entries, last, faults };
  }
}

function faultsOf(record: Stored, before: ChainWalk['last']): BookFault[] {
  const { sequence, kind } = record;
  const fault = (check: BookFault['check'], sentence: string): BookFault => ({
    check,
    sequence,
    kind,
    sentence,
  });
  const faults: BookFault[] = [];
  if (BigInt(sequence) !== before.sequence + 1n)
    faults.push(fault('chain', `Records ${before.sequence + 1n} to ${BigInt(sequence) - 1n} are missing.`));
  if (createHash('sha256').update(record.line, 'utf8').digest('hex') !== record.hash)
    faults.push(fault('chain', `The line of no. ${sequence} does not hash to what stands beside it.`));
  if (record.previous_hash !== before.hash)
    faults.push(fault('chain', `No. ${sequence} does not name the hash of the record before it.`));
  const line = readLine(record.line);
  if (line === null) return [...faults, fault('line', `The line of no. ${sequence} can’t be read.`)];
  if (!saysTheSame(record, line))
    faults.push(fault('line', `The register says something else of no. ${sequence} than its line.`));
  if (canonicalJson(line.entries) !== canonicalJson(record.entries))
    faults.push(fault('entries', `The entries of no. ${sequence} are not those of its line.`));
  if (isVoucherKind(kind) && !balances(record))
    faults.push(fault('sum', `The entries of no. ${sequence} do not sum to nothing.`));
  return faults;
}

/** Whether the columns beside a line, and those taken from its detail, say what the line says. */
function saysTheSame(record: Stored, { entries, ...line }: ChainRecord): boolean {
  const columns = z.record(z.string(), z.json()).parse(line);
  const same = Object.keys(columns).every((key) => sorted(columns[key]) === sorted(record.columns[key]));
  const named = Object.entries(record.named).every(([key, value]) => leafOf(line.detail, key) === value);
  return same && named && (record.same_day || entries.length === 0);
}

const leafOf = (detail: ChainRecord['detail'], key: string) => leaf.parse(detail[key] ?? null);

/** Values of JSON as one text, whatever the order of their keys. */
function sorted(value: unknown): string {
  return JSON.stringify(value ?? null, (_key, inner: unknown) =>
    typeof inner === 'object' && inner !== null && !Array.isArray(inner)
      ? Object.fromEntries(Object.entries(inner).sort(([a], [b]) => (a < b ? -1 : 1)))
      : inner,
  );
}

const balances = ({ entries }: Stored): boolean =>
  entries.length >= 2 && isZeroMass(sumMass(entries.map(massFromJson)));

const NAMED = ['operation', 'bench', 'person_id', 'job_id', 'counterparty_id'];
const PLAIN = [
  'approved_by',
  'detail',
  'documents',
  'id',
  'kind',
  'note',
  'previous_hash',
  'recorded_by',
  'reverses',
];

const RECORDS = `SELECT r.sequence::text, r.kind, r.line, r.hash, r.previous_hash,
    jsonb_build_object(${PLAIN.map((c) => `'${c}', r.${c}`).join(', ')}, 'sequence', r.sequence::text, 'business_date', r.business_date::text,
      'recorded_at', to_char(r.recorded_at AT TIME ZONE 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"')) AS columns,
    jsonb_build_object(${NAMED.map((c) => `'${c}', r.${c}::text`).join(', ')}) AS named,
    coalesce((SELECT jsonb_agg(jsonb_build_object('account_id', e.account_id, 'lot_id', e.lot_id, 'line', e.line::text, 'pieces', e.pieces::text,
        'gross_g', grams(e.gross_ug), 'gold_g', grams(e.gold_ug), 'silver_g', grams(e.silver_ug), 'platinum_g', grams(e.platinum_ug),
        'palladium_g', grams(e.palladium_ug)) ORDER BY e.line)
      FROM entry e WHERE e.workshop_id = r.workshop_id AND e.voucher_sequence = r.sequence), '[]') AS entries,
    NOT EXISTS (SELECT 1 FROM entry e WHERE e.workshop_id = r.workshop_id AND e.voucher_sequence = r.sequence
      AND e.business_date <> r.business_date) AS same_day
  FROM record r WHERE r.workshop_id = current_workshop() AND r.sequence > $1::bigint AND r.sequence <= $2::bigint
  ORDER BY r.sequence LIMIT ${PAGE}`;
