/** CSV after RFC 4180, against an independent reader, and the rule against formulas (FAULTS S-18, F-18). */
import { parse } from 'csv-parse/sync';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { csvCell, csvTable, readCsv, unquoteCell } from '../../../shared/dossier/csv.ts';

const cell = fc.oneof(
  fc.string(),
  fc.constantFrom('', '"', '""', ',', '\r\n', '\n', '\r', '=1+1', '+1', '-1', '@x', '\tx', "'x", "''"),
);
const table = fc
  .integer({ min: 1, max: 4 })
  .chain((width) => fc.array(fc.array(cell, { minLength: width, maxLength: width }), { maxLength: 6 }));
const columnsFor = (rows: readonly (readonly string[])[]) =>
  (rows[0] ?? ['']).map((_, index) => `column_${String.fromCharCode(97 + index)}`);

describe('a table', () => {
  it('is read by another reader and by ours as the very same cells', () => {
    fc.assert(
      fc.property(table, (rows) => {
        const text = csvTable(columnsFor(rows), rows);
        const other: unknown = parse(text, { relax_column_count: true, record_delimiter: '\r\n' });
        expect(readCsv(text)).toEqual(other);
        expect(
          readCsv(text)
            .slice(1)
            .map((row) => row.map(unquoteCell)),
        ).toEqual(rows);
      }),
    );
  });

  it('has a head, ends every line with CRLF, and leaves a cell empty for nothing', () => {
    expect(
      csvTable(
        ['id', 'gold_g'],
        [
          ['a', null],
          [null, '1.000000'],
        ],
      ),
    ).toBe('id,gold_g\r\na,\r\n,1.000000\r\n');
  });

  it.each([
    ['a,"b', 'never closed'],
    ['a,b"c', 'inside a cell'],
    ['"a"b,c', 'follows a closing quote'],
  ])('that two readers would read differently is refused: %j', (text, reason) => {
    expect(() => readCsv(text)).toThrow(reason);
  });
});

describe('a cell that a spreadsheet would run', () => {
  it.each(['=HYPERLINK("x")', '+1', '-1', '@SUM(A1)', '\tx', '\rx', "'x"])('is text: %j', (text) => {
    const written = csvCell(text, false).replace(/^"|"$/g, '').replaceAll('""', '"');
    expect(written).toBe(`'${text}`);
    expect(unquoteCell(written)).toBe(text);
  });

  it('is text in a column of figures too, where only figures stay plain', () => {
    expect(csvCell('-12.500000', true)).toBe('-12.500000');
    expect(csvCell('=1+1', true)).toBe("'=1+1");
    expect(csvCell('-1+1', true)).toBe("'-1+1");
  });
});
