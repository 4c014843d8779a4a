/** The register of vouchers, newest first, by kind, days, operation, place and whatever a report's figure narrows it to. */
import { Link } from 'react-router-dom';
import { VOUCHER_KINDS } from '../../../shared/book/kinds.ts';
import { RECONCILIATION_LINES, RECONCILIATION_WORDS } from '../../../shared/loss/reconciliation.ts';
import type { VoucherRow } from '../../../shared/schemas/vouchers.ts';
import { FineCell } from '../../components/domain/fine-cell.tsx';
import { Button } from '../../components/ui/button.tsx';
import { CheckBox } from '../../components/ui/choice.tsx';
import { Grams } from '../../components/ui/figure.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import type { Column } from '../../components/ui/register-table.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { StatusWord } from '../../components/ui/status-word.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { dayText, momentText, numberText, words } from '../../lib/formats.ts';
import { useAccounts } from '../../queries/registers.ts';
import { useVouchers } from '../../queries/vouchers.ts';
import { paths } from '../../app/paths.ts';
import { ReportNav, useAddressFilter } from './nav.tsx';

const ANY = {
  kind: '',
  from: '',
  to: '',
  operation: '',
  account_id: '',
  lot_id: '',
  job_id: '',
  person_id: '',
  line: '',
  owner: '',
  show: 'vouchers',
};
type Filter = Readonly<typeof ANY>;

export function VouchersPage() {
  const [filter, set] = useAddressFilter(ANY);
  const query = new URLSearchParams(Object.entries(filter).filter(([, value]) => value !== '')).toString();
  const vouchers = useVouchers(query);
  const rows = vouchers.data?.pages.flatMap((page) => page.rows) ?? [];
  return (
    <Page
      title="Vouchers"
      lede="newest first"
      nav={<ReportNav />}
      margin={<p>Numbered without a gap, each carrying the hash of the one before.</p>}
      actions={
        <Button icon="print" onPress={() => window.print()}>
          Print
        </Button>
      }
      first={<Filters filter={filter} set={set} />}
    >
      <Section heading="Register" notes={<Narrowed filter={filter} set={set} />}>
        {vouchers.data === undefined ? (
          <p role="status">{vouchers.error === null ? 'Reading the book …' : vouchers.error.message}</p>
        ) : (
          <RegisterTable
            caption="Register of vouchers"
            columns={COLUMNS}
            rows={rows}
            rowKey={(row) => row.id}
            csv="vouchers"
            empty="No voucher fits that."
            emptyAction={<Button onPress={() => set(ANY)}>Show every voucher</Button>}
          />
        )}
        {vouchers.hasNextPage ? (
          <Button
            icon="down"
            busy={vouchers.isFetchingNextPage ? 'Reading the book …' : false}
            onPress={() => void vouchers.fetchNextPage()}
          >
            Show more
          </Button>
        ) : null}
      </Section>
    </Page>
  );
}

interface FilterProps {
  readonly filter: Filter;
  readonly set: (change: Partial<Filter>) => void;
}

function Filters({ filter, set }: FilterProps) {
  const accounts = useAccounts();
  const operations = accounts.flatMap(({ operation, name }) =>
    operation === null ? [] : [{ value: operation, label: name }],
  );
  return (
    <div className="filters mt-4">
      <SelectField
        label="Kind"
        none="Every kind"
        value={filter.kind}
        onChange={(kind) => set({ kind })}
        options={VOUCHER_KINDS.map((kind) => ({ value: kind, label: words(kind) }))}
      />
      <TextField label="From" type="date" value={filter.from} onChange={(from) => set({ from })} />
      <TextField label="To" type="date" value={filter.to} onChange={(to) => set({ to })} />
      <SelectField
        label="Operation"
        none="Every operation"
        value={filter.operation}
        onChange={(operation) => set({ operation })}
        options={operations}
      />
      <SelectField
        label="Place or account"
        none="Everywhere"
        value={filter.account_id}
        onChange={(account_id) => set({ account_id })}
        options={accounts.map(({ id, name, kind }) => ({ value: id, label: name, group: words(kind) }))}
      />
      <CheckBox
        label="Acts without metal too"
        checked={filter.show === 'all'}
        onChange={(all) => set({ show: all ? 'all' : 'vouchers' })}
      />
    </div>
  );
}

/** What the list is narrowed to beside the fields above it, with a way out. */
function Narrowed({ filter, set }: FilterProps) {
  const by = (['lot_id', 'job_id', 'person_id'] as const).filter((name) => filter[name] !== '');
  const line = RECONCILIATION_LINES.find((name) => name === filter.line);
  if (line !== undefined)
    return (
      <>
        <p>Only those behind “{RECONCILIATION_WORDS[line]}” of the reconciliation.</p>
        <Button kind="quiet" onPress={() => set({ line: '', owner: '' })}>
          Show the others too
        </Button>
      </>
    );
  if (by.length === 0) return <p>Open one by its number.</p>;
  return (
    <>
      <p>Only those of one {by.map((name) => name.replace('_id', '')).join(' and ')}.</p>
      <Button kind="quiet" onPress={() => set({ lot_id: '', job_id: '', person_id: '' })}>
        Show the others too
      </Button>
    </>
  );
}

const COLUMNS: readonly Column<VoucherRow>[] = [
  {
    id: 'sequence',
    head: 'Number',
    cell: (row) => <Link to={paths.voucher(row.id)}>{numberText(row.sequence)}</Link>,
    value: (row) => row.sequence,
    figure: 'plain',
  },
  {
    id: 'kind',
    head: 'Kind',
    cell: (row) => (
      <>
        {words(row.kind)} {row.reversed_by === null ? null : <StatusWord status="Reversed" />}
      </>
    ),
    value: (row) => row.kind,
  },
  {
    id: 'business_date',
    head: 'Date',
    cell: (row) => dayText(row.business_date),
    value: (row) => row.business_date,
  },
  { id: 'operation', head: 'For', cell: (row) => <What row={row} />, value: (row) => row.operation ?? '' },
  {
    id: 'recorded_by_name',
    head: 'Recorded',
    cell: (row) => (
      <>
        {row.recorded_by_name}
        <small className="block text-ink-2">
          {momentText(row.recorded_at)}
          {row.approved_by_name === null ? '' : `, signed by ${row.approved_by_name}`}
        </small>
      </>
    ),
    value: (row) => row.recorded_by_name,
  },
  { id: 'fine', head: 'Moved, g fine', figure: 'fine', cell: (row) => <FineCell masses={row} /> },
  {
    id: 'gross_g',
    head: 'Gross, g',
    figure: 'gross',
    cell: (row) => <Grams grams={row.gross_g} />,
    value: (row) => row.gross_g,
  },
];

function What({ row }: { readonly row: VoucherRow }) {
  const parts = [
    row.operation === null ? null : words(row.operation),
    row.bench_name,
    row.job_code,
    row.counterparty_name,
  ];
  const there = parts.filter((part) => part !== null);
  return there.length === 0 ? (row.note ?? <span className="none">none named</span>) : there.join(', ');
}
