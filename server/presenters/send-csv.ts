/** Sends rows as a CSV file: the columns are the fields of the rows, in their order. */
import type { Request, Response } from 'express';
import { csvTable } from '../../shared/dossier/csv.ts';

type Cell = string | boolean | number | null;

/** Whether a list is wanted as CSV: by its address, or by what the asker accepts before JSON. */
export const wantsCsv = (request: Request, query: { readonly format: 'json' | 'csv' }): boolean =>
  query.format === 'csv' || request.accepts(['application/json', 'text/csv']) === 'text/csv';

/** Writes the response; gives null, since nothing is left to answer. */
export function sendCsv(
  response: Response,
  name: string,
  rows: readonly Readonly<Record<string, Cell>>[],
): null {
  const columns = Object.keys(rows[0] ?? {});
  const cells = rows.map((row) => columns.map((column) => cellText(row[column] ?? null)));
  response.setHeader('Content-Disposition', `attachment; filename="${name}.csv"`);
  response
    .status(200)
    .type('text/csv; charset=utf-8')
    .send(`\uFEFF${csvTable(columns, cells)}`);
  return null;
}

function cellText(value: Cell): string | null {
  return value === null || typeof value === 'string' ? value : String(value);
}
