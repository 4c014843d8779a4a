/**
 * A ruled table over TanStack Table: columns that sort are buttons, figures stand right, a total has a double rule
 * only where it was checked. On a phone each row becomes a small entry. Long tables show a part and offer the rest.
 * The links in it are one stop for the keyboard, then arrow keys go from row to row. The CSV is what is shown.
 */
import type { ReactNode } from 'react';
import { rowSortingFeature, tableFeatures, useTable, createSortedRowModel } from '@tanstack/react-table';
import type { ColumnDef, SortingState } from '@tanstack/react-table';
import { useMemo, useRef, useState } from 'react';
import { csvTable } from '../../../shared/dossier/csv.ts';
import { compareFigures, compareWords } from '../../lib/compare.ts';
import { saveFile } from '../../lib/save-file.ts';
import { Button } from './button.tsx';
import { Empty } from './empty.tsx';
import { Icon } from './icon.tsx';
import { useGridKeys } from './use-grid-keys.ts';

export interface Column<Row> {
  readonly id: string;
  readonly head: string;
  readonly cell: (row: Row) => ReactNode;
  /** What sorting and CSV go by; none: the column does neither. */
  readonly value?: (row: Row) => string;
  readonly figure?: 'fine' | 'gross' | 'plain';
  /** Repeats what the row's link shows: left out on a tablet, where width is short. */
  readonly repeats?: boolean;
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
  /** What is so where there are no rows: "Nothing is out of the safe." */
  readonly empty: string;
  /** What will show here, and one action, where there are no rows. */
  readonly emptyWords?: string;
  readonly emptyAction?: ReactNode;
}

const features = tableFeatures({ rowSortingFeature, sortedRowModel: createSortedRowModel() });
/** Rows shown at first, and added by each press of "Show more". */
const PART = 200;

export function RegisterTable<Row extends object>(props: RegisterTableProps<Row>) {
  const { caption, columns, rows, total, csv } = props;
  const [sorting, setSorting] = useState<SortingState>([]);
  const [shown, setShown] = useState(PART);
  const region = useRef<HTMLDivElement>(null);
  const onKeyDown = useGridKeys(region);
  const definitions = useMemo(
    () =>
      columns.map((column): ColumnDef<typeof features, Row> => {
        const { id, value, figure } = column;
        const compare = figure === undefined ? compareWords : compareFigures;
        return {
          id,
          accessorFn: (row) => value?.(row) ?? '',
          enableSorting: value !== undefined,
          sortDescFirst: false,
          sortFn: (a, b) => compare(value?.(a.original) ?? '', value?.(b.original) ?? ''),
        };
      }),
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
  if (rows.length === 0)
    return <Empty what={props.empty} words={props.emptyWords} action={props.emptyAction} />;
  const sorted = table.getRowModel().rows;
  return (
    <>
      <div
        className="table-region"
        role="region"
        aria-label={`Table: ${caption}`}
        ref={region}
        onKeyDown={onKeyDown}
      >
        <table className="register reflow">
          <caption className="sr-only">{caption}</caption>
          <thead>
            <tr>
              {columns.map((column) => (
                <Head
                  key={column.id}
                  column={column}
                  direction={sorting.find(({ id }) => id === column.id)}
                  onSort={() => table.getColumn(column.id)?.toggleSorting()}
                />
              ))}
            </tr>
          </thead>
          <tbody>
            {sorted.slice(0, shown).map(({ original }) => (
              <tr key={props.rowKey(original)} className={props.rowTone?.(original)}>
                <Cells columns={columns} content={(column) => column.cell(original)} />
              </tr>
            ))}
          </tbody>
          {total === undefined ? null : (
            <tfoot>
              <tr className="total">
                <Cells columns={columns} content={(_, index) => total[index]} />
              </tr>
            </tfoot>
          )}
        </table>
      </div>
      <div className="table-foot">
        {rows.length > shown ? (
          <Button icon="down" onPress={() => setShown(shown + PART)}>
            {`Show more, ${shown} of ${rows.length} are here`}
          </Button>
        ) : null}
        {csv === undefined ? null : (
          <Button
            kind="quiet"
            icon="save"
            onPress={() => saveFile(`${csv}.csv`, csvOf(columns, rows), 'text/csv')}
          >
            Take as CSV
          </Button>
        )}
      </div>
    </>
  );
}

interface HeadProps<Row> {
  readonly column: Column<Row>;
  readonly direction: { readonly desc: boolean } | undefined;
  readonly onSort: () => void;
}

function Head<Row>({ column, direction, onSort }: HeadProps<Row>) {
  const order = direction === undefined ? undefined : direction.desc ? 'descending' : 'ascending';
  if (column.head === '') return <td />;
  return (
    <th scope="col" className={cellClass({ ...column, figure: column.figure && 'plain' })} aria-sort={order}>
      {column.value === undefined ? (
        column.head
      ) : (
        <button type="button" className={`sort ${order ?? ''}`} onClick={onSort}>
          {column.head}
          <Icon name="down" size={12} />
        </button>
      )}
    </th>
  );
}

interface CellsProps<Row> {
  readonly columns: readonly Column<Row>[];
  readonly content: (column: Column<Row>, index: number) => ReactNode;
}

/** The cells of a row: the first names it, the others carry their head for a phone. */
function Cells<Row>({ columns, content }: CellsProps<Row>) {
  return columns.map((column, index) =>
    index === 0 ? (
      <th key={column.id} scope="row" className={`first ${cellClass(column)}`}>
        {content(column, index)}
      </th>
    ) : (
      <td key={column.id} data-label={column.head} className={cellClass(column)}>
        {content(column, index)}
      </td>
    ),
  );
}

type Look = Pick<Column<never>, 'figure' | 'repeats'>;

const cellClass = ({ figure, repeats = false }: Look): string =>
  `${figure === undefined ? '' : `num ${figure}`} ${repeats ? 'repeats' : ''}`;

function csvOf<Row>(columns: readonly Column<Row>[], rows: readonly Row[]): string {
  const kept = columns.filter((column) => column.value !== undefined);
  const cells = rows.map((row) => kept.map((column) => column.value?.(row) ?? null));
  return `\uFEFF${csvTable(
    kept.map((column) => column.id),
    cells,
  )}`;
}
