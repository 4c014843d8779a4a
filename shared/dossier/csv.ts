/**
 * CSV after RFC 4180: UTF-8, CRLF, quotes where they are needed. Against formula injection a text cell that begins
 * with a quote mark, =, +, -, @, tab or carriage return gets one more ' in front; a reader takes one ' off. Columns
 * of figures are left plain, so that a spreadsheet reads them as figures.
 */

/** Columns of figures stay plain; every other column is text. */
const FIGURES = /(_g|_permille|_percent|_per_ozt)$|^(pieces|value|sequence|voucher_sequence|line)$/;
const RISKY = /^['=+\-@\t\r]/;

/** Whether a column holds figures, by its name. */
export const isFigureColumn = (column: string): boolean => FIGURES.test(column);

/** One cell: empty for null. */
export function csvCell(value: string | null, figure: boolean): string {
  if (value === null) return '';
  const text = !figure && RISKY.test(value) ? `'${value}` : value;
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

/** A table with its head; every line ends with CRLF. */
export function csvTable(columns: readonly string[], rows: readonly (readonly (string | null)[])[]): string {
  const line = (cells: readonly string[]) => `${cells.join(',')}\r\n`;
  const figures = columns.map(isFigureColumn);
  const head = line(columns.map((column) => csvCell(column, false)));
  return (
    head + rows.map((row) => line(row.map((cell, index) => csvCell(cell, figures[index] === true)))).join('')
  );
}

/** The text of a cell as it was before it was written: one leading ' less. */
export const unquoteCell = (text: string): string => (text.startsWith("'") ? text.slice(1) : text);

/** Reads a table written by `csvTable` (or any after RFC 4180). Throws for an open quote. */
export function readCsv(text: string): string[][] {
  const rows: string[][] = [];
  let row: string[] = [];
  let cell = '';
  let quoted = false;
  for (let at = 0; at < text.length; at += 1) {
    const mark = text.charAt(at);
    if (quoted) {
      if (mark !== '"') cell += mark;
      else if (text.charAt(at + 1) === '"') {
        cell += '"';
        at += 1;
      } else quoted = false;
    } else if (mark === '"') quoted = true;
    else if (mark === ',') {
      row.push(cell);
      cell = '';
    } else if (mark === '\n') {
      row.push(cell.endsWith('\r') ? cell.slice(0, -1) : cell);
      rows.push(row);
      row = [];
      cell = '';
    } else cell += mark;
  }
  if (quoted) throw new RangeError('a quote is never closed');
  if (cell !== '' || row.length > 0) rows.push([...row, cell]);
  return rows;
}
