/** The line of a record: made in parts as the database joins them, and read back strictly. */
import { describe, expect, it } from 'vitest';
import { canonicalJson } from '../../../shared/chain/canonical.ts';
import { assembleLine, readLine, recordLineParts } from '../../../shared/chain/record-line.ts';
import type { ChainRecord } from '../../../shared/chain/record-line.ts';
import { aRecord, goodRecords } from '../../support/dossier-book.ts';
import { chained } from '../../support/dossier-files.ts';

function assembled({ previous_hash, recorded_at, sequence, ...record }: ChainRecord): string {
  return assembleLine(recordLineParts(record), previous_hash, recorded_at, BigInt(sequence));
}

describe('the parts of a line', () => {
  it('join to the canonical JSON of the whole record, of every kind', () => {
    for (const { record, line } of chained(goodRecords)) expect(assembled(record)).toBe(line);
  });

  it('keep odd characters as canonical JSON writes them', () => {
    const record = aRecord({
      id: 'odd',
      kind: 'party_set',
      note: 'Ring “à jour”, 5″ \\ "quoted"\n\t€ 😀',
      detail: { '\u00e9': 'x', a: null, list: [{ b: '1', a: null }] },
    });
    expect(assembled(record)).toBe(canonicalJson(record));
    expect(readLine(assembled(record))).toEqual(record);
  });

  it('end the head at the comma before previous_hash, and the middle at the one before sequence', () => {
    const { previous_hash, recorded_at, sequence, ...record } = aRecord({ id: 'r', kind: 'job_opened' });
    const { head, middle } = recordLineParts(record);
    expect(head).toBe(
      '{"approved_by":null,"business_date":"2026-03-01","detail":{},"documents":[],"entries":[],"id":"r","kind":"job_opened","note":null,',
    );
    expect(middle).toBe('"recorded_by":"ann","reverses":null,');
    expect([previous_hash.length, recorded_at.length, sequence]).toEqual([64, 24, '1']);
  });
});

describe('a line is refused', () => {
  const [good = ''] = chained(goodRecords.slice(9, 10)).map(({ line }) => line);

  it('never while it is as it was written', () => {
    expect(readLine(good)?.kind).toBe('weigh_in');
  });

  it.each([
    ['with a blank', (line: string) => line.replace('"detail":', '"detail": ')],
    ['with a key too many', (line: string) => line.replace('{"approved_by"', '{"a":null,"approved_by"')],
    ['with a key too few', (line: string) => line.replace('"note":null,', '')],
    ['with a key twice', (line: string) => line.replace('"note":null,', '"note":"x","note":null,')],
    [
      'with its keys in another order',
      (line: string) => line.replace(/"kind":"weigh_in","note":null/, '"note":null,"kind":"weigh_in"'),
    ],
    ['with a mass as a number', (line: string) => line.replace('"100.000000"', '100.000000')],
    ['with five decimals', (line: string) => line.replace('"100.000000"', '"100.00000"')],
    ['with a zero before', (line: string) => line.replace('"100.000000"', '"0100.000000"')],
    ['with minus nothing', (line: string) => line.replace('"0.000000"', '"-0.000000"')],
    ['with more than a tonne', (line: string) => line.replace('"100.000000"', '"1000000.000001"')],
    ['with a mass in exponents', (line: string) => line.replace('"100.000000"', '"1e2"')],
    ['with pieces that are not whole', (line: string) => line.replace('"pieces":null', '"pieces":"1.5"')],
    ['with seconds only', (line: string) => line.replace('09:00:00.000Z', '09:00:00Z')],
    ['with a zone', (line: string) => line.replace('09:00:00.000Z', '09:00:00.000+01:00')],
    ['with a day that is none', (line: string) => line.replace('"2026-03-01"', '"2026-02-30"')],
    ['with a hash in capitals', (line: string) => line.replace('ababab', 'ABABAB')],
    [
      'with detail nested deeper than two',
      (line: string) => line.replace('"detail":{}', '"detail":{"a":[{"b":["c"]}]}'),
    ],
    ['with text that is not NFC', (line: string) => line.replace('"note":null', '"note":"e\u0301"')],
    [
      'with an escape that canonical JSON does not use',
      (line: string) => line.replace('"weigh_in"', '"weigh\\u005fin"'),
    ],
    ['with a byte order mark', (line: string) => `\ufeff${line}`],
    ['cut in half', (line: string) => line.slice(0, 200)],
    ['nested past reason', () => '['.repeat(200_000)],
  ])('%s', (_what, alter) => {
    expect(alter(good)).not.toBe(good);
    expect(readLine(alter(good))).toBeNull();
  });
});
