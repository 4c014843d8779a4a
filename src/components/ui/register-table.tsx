/**
 * A ruled table over TanStack Table: columns that sort are buttons, figures stand right, a total has a double rule
 * only where it was checked. On a phone each row becomes a small entry. The CSV is what is shown.
 */
import type { ReactNode } from 'react';
import {
  rowSortingFeature,
  tableFeatures,
  useTable,
  createSortedRowModel,
  sortFns,
} from '@tanstack/react-table';
import type { ColumnDef, SortingState } from '@tanstack/react-table';
import { useMemo, useState } from 'react';
import { csvTable } from '../../../shared/dossier/csv.ts';
import { saveFile } from '../../lib/save-file.ts';
import { Button } from './button.tsx';

export interface Column<Row> {
  readonly id: string;
  readonly head: string;
  readonly cell: (row: Row) => ReactNode;
  /** What sorting and CSV go by; none: the column does neither. */
  readonly value?: (row: Row) => string;
  readonly figure?: 'fine' | 'gross' | 'plain';
}

interface RegisterTableProps<Row> {
  readonly caption: string;
  readonly columns: readonly Column<Row>[];
  readonly rows: readonly Row[];
  readonly rowKey: (row: Row) => string;
  readonly rowTone?: (row: Row) => 'waiting' | 'chosen' | '';
  /** A cell for each column, under a single and over a double line. */
  readonly total?: readonly ReactNode[];
  readonly csv?: string;
  readonly empty: string;
}

const features = tableFeatures({ rowSortingFeature, sortedRowModel: createSortedRowModel(), sortFns });

export function RegisterTable<Row extends object>({
  caption,
  columns,
  rows,
  rowKey,
  rowTone,
  total,
  csv,
  empty,
}: RegisterTableProps<Row>) {
  const [sorting, setSorting] = useState<SortingState>([]);
  const definitions = useMemo(
    () =>
      columns.map((column): ColumnDef<typeof features, Row> => ({
        id: column.id,
        accessorFn: (row) => column.value?.(row) ?? '',
        enableSorting: column.value !== undefined,
        sortFn: column.figure === undefined ? 'text' : 'alphanumeric',
      })),
    [columns],
  );
  const data = useMemo(() => [...rows], [rows]);
  const table = useTable({
    features,
    columns: definitions,
    data,
    state: { sorting },
    onSortingChange: setSorting,
  });
  const sorted = new Map(
    sorting.map(({ id, desc }) => [id, desc ? ('descending' as const) : ('ascending' as const)]),
  );
  if (rows.length === 0) return <p className="none">{empty}</p>;
  return (
    <>
      <div className="table-region" role="region" aria-label={caption} tabIndex={0}>
        <table className="register reflow">
          <caption className="sr-only">{caption}</caption>
          <thead>
            <tr>
              {columns.map((column) => (
                <th
                  key={column.id}
                  scope="col"
                  className={column.figure === undefined ? '' : 'num'}
                  aria-sort={sorted.get(column.id)}
                >
                  {column.value === undefined ? (
                    column.head
                  ) : (
                    <button type="button" onClick={() => table.getColumn(column.id)?.toggleSorting()}>
                      {column.head}
                    </button>
                  )}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {table.getRowModel().rows.map(({ original }) => (
              <tr key={rowKey(original)} className={rowTone?.(original)}>
                {columns.map((column, index) => (
                  <td
                    key={column.id}
                    data-label={column.head}
                    className={`${index === 0 ? 'first' : ''} ${figureClass(column.figure)}`}
                  >
                    {column.cell(original)}
                  </td>
                ))}
              </tr>
            ))}
          </tbody>
          {total === undefined ? null : (
            <tfoot>
              <tr className="total">
                {columns.map((column, index) => (
                  <td
                    key={column.id}
                    data-label={column.head}
                    className={`${index === 0 ? 'first' : ''} ${figureClass(column.figure)}`}
                  >
                    {total[index]}
                  </td>
                ))}
              </tr>
            </tfoot>
          )}
        </table>
      </div>
      {csv === undefined ? null : (
        <p>
          <Button
            kind="quiet"
            icon="save"
            onPress={() => saveFile(`${csv}.csv`, csvOf(columns, rows), 'text/csv')}
          >
            Take as CSV
          </Button>
        </p>
      )}
    </>
  );
}

const figureClass = (figure: Column<object>['figure']): string =>
  figure === undefined ? '' : `num ${figure}`;

function csvOf<Row>(columns: readonly Column<Row>[], rows: readonly Row[]): string {
  const kept = columns.filter((column) => column.value !== undefined);
  const cells = rows.map((row) => kept.map((column) => column.value?.(row) ?? null));
  return `\uFEFF${csvTable(
    kept.map((column) => column.id),
    cells,
  )}`;
}
