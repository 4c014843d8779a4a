/** The files: each listed with its size, rows and digest, none unlisted, and every table equal to what the chain gives. */
import { readCsv, unquoteCell } from '../csv.ts';
import type { Finding } from '../finding.ts';
import type { Manifest } from '../manifest.ts';
import type { HashedRecord } from '../replay.ts';
import type { Table } from '../tables.ts';
import { tablesOf } from '../tables.ts';

/** Files beside the manifest that carry it: they can't list themselves. */
const ABOUT_THE_MANIFEST = ['manifest.json', 'manifest.sig', 'public-key.pem', 'manifest.tsr'];
const DOCUMENTS = 'data/documents.csv';

export function listedFiles(
  files: ReadonlyMap<string, Uint8Array>,
  manifest: Manifest,
  sha256: (bytes: Uint8Array) => string,
): readonly Finding[] {
  const findings: Finding[] = [];
  const listed = new Set(manifest.files.map(({ path }) => path));
  for (const { path, bytes, rows, sha256: expected } of manifest.files) {
    const file = files.get(path);
    if (file === undefined) findings.push({ at: path, sentence: `${path} is listed and is not there.` });
    else if (String(file.length) !== bytes)
      findings.push({ at: path, sentence: `${path} has ${file.length} bytes where ${bytes} are listed.` });
    else if (sha256(file) !== expected)
      findings.push({ at: path, sentence: `${path} is not the file that was signed.` });
    else if (rows !== null && String(rowsIn(path, file)) !== rows)
      findings.push({ at: path, sentence: `${path} has other rows than the ${rows} that are listed.` });
  }
  for (const path of files.keys()) {
    if (!listed.has(path) && !ABOUT_THE_MANIFEST.includes(path))
      findings.push({ at: path, sentence: `${path} is not listed. It is no part of the dossier.` });
  }
  if (listed.size !== manifest.files.length)
    findings.push({ at: 'manifest.json', sentence: 'A file is listed twice.' });
  return findings;
}

/** Lines of the book, or rows of a table without its head. */
function rowsIn(path: string, file: Uint8Array): number {
  if (path.endsWith('.csv')) return readTable(file).length - 1;
  return file.reduce((lines, byte) => (byte === 0x0a ? lines + 1 : lines), 0);
}

/** Compares each table, row by row, with what the chain gives. */
export function tablesAgree(
  files: ReadonlyMap<string, Uint8Array>,
  chain: readonly HashedRecord[],
): readonly Finding[] {
  const named = tablesOf(chain).flatMap((table) => tableFindings(files, table));
  return [...named, ...documentFindings(files.get(DOCUMENTS), chain)];
}

function tableFindings(files: ReadonlyMap<string, Uint8Array>, table: Table): readonly Finding[] {
  const at = table.path;
  const file = files.get(at);
  if (file === undefined) return [{ at, sentence: `${at} is missing.` }];
  const [head = [], ...rows] = readTable(file);
  if (head.join(',') !== table.columns.join(','))
    return [{ at, sentence: `${at} has other columns than the format.` }];
  if (rows.length !== table.rows.length)
    return [{ at, sentence: `${at} has ${rows.length} rows where the chain gives ${table.rows.length}.` }];
  const off = table.rows.findIndex((row, index) => !isSameRow(row, rows[index] ?? []));
  return off < 0 ? [] : [{ at, sentence: `Row ${off + 1} of ${at} is not what the chain gives.` }];
}

function isSameRow(given: readonly (string | null)[], read: readonly string[]): boolean {
  return (
    read.length === given.length && given.every((cell, at) => (cell ?? '') === unquoteCell(read[at] ?? ''))
  );
}

/** Documents that records name stand in the table with the digest that was recorded. Their names the chain doesn't hold. */
function documentFindings(file: Uint8Array | undefined, chain: readonly HashedRecord[]): readonly Finding[] {
  if (file === undefined) return [{ at: DOCUMENTS, sentence: `${DOCUMENTS} is missing.` }];
  const digests = new Map(
    readTable(file)
      .slice(1)
      .map(([id = '', , sha256 = '']) => [id, sha256]),
  );
  return chain.flatMap(({ record }) =>
    record.documents.flatMap(({ id, sha256 }) => {
      const at = record.sequence;
      const listed = digests.get(id);
      if (listed === sha256) return [];
      const what = listed === undefined ? 'is not in' : 'has another digest in';
      return [{ at, sentence: `A document that record ${at} names ${what} ${DOCUMENTS}.` }];
    }),
  );
}

function readTable(file: Uint8Array): string[][] {
  try {
    return readCsv(new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(file));
  } catch {
    return [];
  }
}
