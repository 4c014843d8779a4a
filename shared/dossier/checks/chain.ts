/** The chain: each line canonical to the byte, numbered without a gap, and carrying the hash of the one before. */
import { readLine } from '../../chain/record-line.ts';
import type { Finding } from '../finding.ts';
import type { HashedRecord } from '../replay.ts';

const BEGINNING = '0'.repeat(64);

export interface ReadChain {
  readonly chain: readonly HashedRecord[];
  readonly findings: readonly Finding[];
}

/** Reads `book.jsonl` and follows its links. */
export function readChain(book: string, sha256: (text: string) => string): ReadChain {
  const findings: Finding[] = [];
  const chain: HashedRecord[] = [];
  const ids = new Set<string>();
  if (!book.endsWith('\n'))
    findings.push({ at: 'book.jsonl', sentence: 'The last line is not ended. The file may have been cut.' });
  let previous = BEGINNING;
  const lines = book.split('\n').slice(0, -1);
  for (const [index, line] of lines.entries()) {
    const record = readLine(line);
    const at = String(index + 1);
    if (record === null) {
      findings.push({ at, sentence: `Line ${at} is not a record in canonical form.` });
      previous = sha256(line);
      continue;
    }
    if (record.sequence !== at)
      findings.push({
        at,
        sentence: `Record ${record.sequence} stands where ${at} belongs: a record is missing, twice, or moved.`,
      });
    if (record.previous_hash !== previous)
      findings.push({ at, sentence: `Record ${at} does not carry the hash of the record before it.` });
    if (ids.has(record.id)) findings.push({ at, sentence: `Record ${at} has the id of an earlier one.` });
    ids.add(record.id);
    previous = sha256(line);
    chain.push({ record, hash: previous });
  }
  if (chain.length === 0) findings.push({ at: null, sentence: 'The book holds no record.' });
  return { chain, findings };
}
