/** The files: each listed with its size and digest, none unlisted, and every table equal to what the chain gives. */
import { readCsv, unquoteCell, isFigureColumn } from '../csv.ts';
import type { Finding } from '../finding.ts';
import type { Manifest } from '../manifest.ts';
import type { HashedRecord } from '../replay.ts';
import { tablesOf } from '../tables.ts';

/** Files beside the manifest that carry it: they can't list themselves. */
const ABOUT_THE_MANIFEST = ['manifest.json', 'manifest.sig', 'public-key.pem', 'manifest.tsr'];

export function listedFiles(
  files: ReadonlyMap<string, Uint8Array>,
  manifest: Manifest,
  sha256: (bytes: Uint8Array) => string,
): readonly Finding[] {
  const findings: Finding[] = [];
  const listed = new Set(manifest.files.map(({ path }) => path));
  for (const { path, bytes, sha256: expected } of manifest.files) {
    const file = files.get(path);
    if (file === undefined) findings.push({ at: path, sentence: `${path} is listed and is not there.` });
    else if (String(file.length) !== bytes)
      findings.push({ at: path, sentence: `${path} has ${file.length} bytes where ${bytes} are listed.` });
    else if (sha256(file) !== expected)
      findings.push({ at: path, sentence: `${path} is not the file that was signed.` });
  }
  for (const path of files.keys()) {
    if (!listed.has(path) && !ABOUT_THE_MANIFEST.includes(path))
      findings.push({ at: path, sentence: `${path} is not listed. It is no part of the dossier.` });
  }
  if (listed.size !== manifest.files.length)
    findings.push({ at: 'manifest.json', sentence: 'A file is listed twice.' });
  return findings;
}

/** Compares each table, row by row, with what the chain gives. */
export function tablesAgree(
  files: ReadonlyMap<string, Uint8Array>,
  chain: readonly HashedRecord[],
): readonly Finding[] {
  return tablesOf(chain).flatMap((table) => {
    const file = files.get(table.path);
    if (file === undefined) return [{ at: table.path, sentence: `${table.path} is missing.` }];
    const [head = [], ...rows] = readTable(file);
    if (head.join(',') !== table.columns.join(','))
      return [{ at: table.path, sentence: `${table.path} has other columns than the format.` }];
    if (rows.length !== table.rows.length)
      return [
        {
          at: table.path,
          sentence: `${table.path} has ${rows.length} rows where the chain gives ${table.rows.length}.`,
        },
      ];
    const figures = table.columns.map(isFigureColumn);
    const off = table.rows.findIndex((row, index) =>
      row.some((cell, at) => (cell ?? '') !== readCell(rows[index]?.[at] ?? '', figures[at] === true)),
    );
    return off < 0
      ? []
      : [{ at: table.path, sentence: `Row ${off + 1} of ${table.path} is not what the chain gives.` }];
  });
}

const readCell = (text: string, figure: boolean): string => (figure ? text : unquoteCell(text));

function readTable(file: Uint8Array): string[][] {
  try {
    return readCsv(new TextDecoder('utf-8', { fatal: true }).decode(file));
  } catch {
    return [];
  }
}
