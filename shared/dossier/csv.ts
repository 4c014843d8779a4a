/**
 * CSV after RFC 4180: UTF-8, CRLF, quotes where they are needed. Against formula injection a text cell that begins
 * with a quote mark, =, +, -, @, tab or carriage return gets one more ' in front; a reader takes one ' off. Figures in
 * columns of figures are left plain, so that a spreadsheet reads them as figures.
 */

/** Columns of figures stay plain; every other column is text. */
const FIGURES = /(_g|_permille|_percent|_per_ozt)$|^(pieces|value|sequence|voucher_sequence|line)$/;
const PLAIN_FIGURE = /^-?\d+(\.\d+)?$/;
const RISKY = /^['=+\-@\t\r]/;

/** Whether a column holds figures, by its name. */
export const isFigureColumn = (column: string): boolean => FIGURES.test(column);

/** One cell: empty for null. What is no figure in a column of figures is written as text. */
export function csvCell(value: string | null, figure: boolean): string {
  if (value === null) return '';
  const text = !(figure && PLAIN_FIGURE.test(value)) && RISKY.test(value) ? `'${value}` : value;
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

/**
 * Reads a table strictly after RFC 4180, so that every reader sees the same cells. Throws a RangeError for a quote that
 * is never closed, or that stands inside a cell.
 */
export function readCsv(text: string): string[][] {
  const rows: string[][] = [];
  let row: string[] = [];
  let at = 0;
  while (at < text.length) {
    const { cell, end } = readCell(text, at);
    row.push(cell);
    at = end;
    if (text.charAt(at) === ',') {
      at += 1;
      if (at === text.length) row.push('');
      continue;
    }
    at += text.startsWith('\r\n', at) ? 2 : 1;
    rows.push(row);
    row = [];
  }
  if (row.length > 0) rows.push(row);
  return rows;
}

/** One cell from `at`, and where it ends: at a comma, a line end or the end of the text. */
function readCell(text: string, at: number): { readonly cell: string; readonly end: number } {
  if (text.charAt(at) === '"') return readQuoted(text, at);
  const rest = /[,\r\n]/g;
  rest.lastIndex = at;
  const end = rest.exec(text)?.index ?? text.length;
  const cell = text.slice(at, end);
  if (cell.includes('"')) throw new RangeError('a quote stands inside a cell');
  return { cell, end };
}

function readQuoted(text: string, at: number): { readonly cell: string; readonly end: number } {
  let cell = '';
  let from = at + 1;
  for (;;) {
    const quote = text.indexOf('"', from);
    if (quote < 0) throw new RangeError('a quote is never closed');
    cell += text.slice(from, quote);
    const next = text.charAt(quote + 1);
    if (next === '"') {
      cell += '"';
      from = quote + 2;
    } else if (next === '' || /[,\r\n]/.test(next)) return { cell, end: quote + 1 };
    else throw new RangeError('something follows a closing quote');
  }
}
