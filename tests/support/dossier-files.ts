/** The files of a dossier in a test: the means to alter them, chain them anew, and sign them again with the right key. */
import { createHash, createPrivateKey, createPublicKey, sign } from 'node:crypto';
import { canonicalJson } from '../../shared/chain/canonical.ts';
import type { ChainRecord } from '../../shared/chain/record-line.ts';
import { chainRecord } from '../../shared/chain/record-line.ts';
import { csvTable, readCsv } from '../../shared/dossier/csv.ts';
import { manifestSchema } from '../../shared/dossier/manifest.ts';
import { tablesOf } from '../../shared/dossier/tables.ts';
import { verifyDossier } from '../../shared/dossier/verify.ts';
import type { Outside } from '../../shared/dossier/verify.ts';
import { nodeCrypto } from '../../server/cli/node-crypto.ts';

export type Files = Map<string, Uint8Array>;

const sha256 = (bytes: Uint8Array | string) => createHash('sha256').update(bytes).digest('hex');

export const linesOf = (files: Files): string[] =>
  Buffer.from(files.get('book.jsonl') ?? [])
    .toString('utf8')
    .split('\n')
    .slice(0, -1);

/** Changes one record of a book by its place, and chains everything after it anew, as a forger would. */
export function forge(files: Files, at: number, change: (record: ChainRecord) => ChainRecord): Files {
  return rechain(
    files,
    linesOf(files).map((line, index) => {
      const record = chainRecord.parse(JSON.parse(line));
      return index === at ? change(record) : record;
    }),
  );
}

/** The lines of records, numbered and chained anew, with what each hashes to. */
export function chained(records: readonly ChainRecord[]) {
  let previous_hash = '0'.repeat(64);
  return records.map((each, index) => {
    const record = { ...each, sequence: String(index + 1), previous_hash };
    const line = canonicalJson(record);
    previous_hash = sha256(line);
    return { record, line, hash: previous_hash };
  });
}

/** A dossier of other records, numbered and chained anew, its tables made from them, signed with the right key. */
export function rechain(files: Files, records: readonly ChainRecord[]): Files {
  const chain = chained(records);
  const next = withBook(
    files,
    chain.map(({ line }) => line),
  );
  for (const table of tablesOf(chain)) next.set(table.path, Buffer.from(csvTable(table.columns, table.rows)));
  return next;
}

/** The same dossier with other lines in its book; neither chained nor tabled anew. */
export function withBook(files: Files, lines: readonly string[]): Files {
  return new Map(files).set('book.jsonl', Buffer.from(lines.map((line) => `${line}\n`).join('')));
}

/** Lists the files as they are now and signs the manifest again. */
export function resign(files: Files, signing_key_pem: string): Files {
  const key = createPrivateKey(signing_key_pem);
  const manifest = manifestSchema.parse(
    JSON.parse(Buffer.from(files.get('manifest.json') ?? []).toString('utf8')),
  );
  const last = linesOf(files).at(-1) ?? '';
  const next = {
    ...manifest,
    chain: { sequence: String(linesOf(files).length), hash: sha256(last) },
    files: manifest.files.map((file) => {
      const bytes = files.get(file.path) ?? new Uint8Array();
      const rows = file.rows === null ? null : rowsIn(file.path, bytes);
      return { ...file, rows, bytes: String(bytes.length), sha256: sha256(bytes) };
    }),
  };
  const bytes = Buffer.from(JSON.stringify(next, null, 2));
  const pem = createPublicKey(key).export({ type: 'spki', format: 'pem' }).toString();
  return new Map(files)
    .set('manifest.json', bytes)
    .set('manifest.sig', sign(null, bytes, key))
    .set('public-key.pem', Buffer.from(pem));
}

function rowsIn(path: string, bytes: Uint8Array): string {
  const text = Buffer.from(bytes).toString('utf8');
  return String((path.endsWith('.csv') ? readCsv(text) : text.split('\n')).length - 1);
}

const NOTHING: Outside = { key_ids: [], heads: [] };

/** The ids of the checks that fail, with their sentences. */
export async function failures(
  files: Files,
  outside: Outside = NOTHING,
): Promise<Record<string, readonly string[]>> {
  const { checks } = await verifyDossier(files, outside, nodeCrypto);
  return Object.fromEntries(
    checks
      .filter(({ verdict }) => verdict === 'fails')
      .map(({ id, findings }) => [id, findings.map(({ sentence }) => sentence)]),
  );
}
