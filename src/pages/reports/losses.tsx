/** Losses of a period against their allowance: the months as a chart, then the table that it is drawn from. */
import { Link } from 'react-router-dom';
import { Decimal } from '../../../shared/decimal.ts';
import { FINDING_WORDS } from '../../../shared/loss/judgement.ts';
import type { Finding } from '../../../shared/loss/judgement.ts';
import { METALS } from '../../../shared/mass/vector.ts';
import type { LossesJson } from '../../../shared/schemas/reports.ts';
import { Button } from '../../components/ui/button.tsx';
import { Empty } from '../../components/ui/empty.tsx';
import { SmallIndex } from '../../components/ui/index-plate.tsx';
import { LineChart } from '../../components/ui/line-chart.tsx';
import { metalName } from '../../components/ui/metal-key.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import type { Column } from '../../components/ui/register-table.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { StatusWord } from '../../components/ui/status-word.tsx';
import type { Status } from '../../components/ui/status-word.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { dateText, firstOfMonth, monthText, today } from '../../lib/days.ts';
import { gramsFigure, moneyText } from '../../lib/formats.ts';
import { takeCsv } from '../../lib/take-csv.ts';
import { useLosses } from '../../queries/reports.ts';
import { paths } from '../../app/paths.ts';
import { ReportNav, useAddressFilter } from './nav.tsx';

const BY = [
  { value: 'operation', label: 'Operation' },
  { value: 'bench', label: 'Bench' },
  { value: 'person', label: 'Person' },
  { value: 'alloy', label: 'Alloy' },
  { value: 'job', label: 'Job' },
  { value: 'month', label: 'Month' },
] as const;

const FINDING_STATUS: Readonly<Record<Finding, Status>> = {
  within_weighing_error: 'Within weighing error',
  within_allowance: 'Within allowance',
  over_within_error: 'Over, within error',
  over_allowance: 'Over allowance',
  no_allowance: 'No allowance set',
  more_back: 'More back than out',
};

type Row = LossesJson['rows'][number];

export function LossesPage() {
  const day = today();
  const [filter, set] = useAddressFilter({
    by: 'operation',
    metal: 'gold',
    from: firstOfMonth(day, 5),
    to: day,
  });
  const report = useLosses(filter);
  const months = useLosses({ ...filter, by: 'month' });
  const by = BY.find(({ value }) => value === filter.by)?.label ?? 'Operation';
  return (
    <Page
      title="Losses"
      lede={`${dateText(report.from)} to ${dateText(report.to)}`}
      nav={<ReportNav />}
      margin={<p>Gross loss % = working loss ÷ worked, both fine metal, told from the weigh-backs.</p>}
      actions={
        <>
          <Button icon="print" onPress={() => window.print()}>
            Print
          </Button>
          <Button icon="save" onPress={() => void takeCsv('/reports/losses', filter)}>
            CSV
          </Button>
        </>
      }
      first={<Filters filter={filter} set={set} />}
    >
      <Section
        heading="Gross loss by month"
        notes={
          <p>
            All benches, {metalName(report.metal).toLowerCase()}. What came back stands in the table, since an
            outturn settles other months than its own.
          </p>
        }
      >
        <MonthChart rows={months.rows} />
      </Section>
      <Section
        heading={`By ${by.toLowerCase()}`}
        notes={
          <>
            <p>Worked = issued − returned unused. An upright stroke marks the allowance.</p>
            <Price report={report} />
          </>
        }
      >
        <LossTable report={report} head={by} by={filter.by} />
      </Section>
    </Page>
  );
}

interface FiltersProps {
  readonly filter: Readonly<Record<'by' | 'metal' | 'from' | 'to', string>>;
  readonly set: (change: Partial<FiltersProps['filter']>) => void;
}

function Filters({ filter, set }: FiltersProps) {
  return (
    <div className="filters mt-4">
      <TextField label="From" type="date" value={filter.from} onChange={(from) => from && set({ from })} />
      <TextField label="To" type="date" value={filter.to} onChange={(to) => to && set({ to })} />
      <SelectField
        label="Metal"
        value={filter.metal}
        onChange={(metal) => set({ metal })}
        options={METALS.map((metal) => ({ value: metal, label: metalName(metal) }))}
      />
      <SelectField label="By" value={filter.by} onChange={(by) => set({ by })} options={BY} />
    </div>
  );
}

const drawn = (text: string | null): number | null => (text === null ? null : new Decimal(text).toNumber());

/** What was allowed of a month's worked metal, in per cent; none where no allowance is set. */
function allowedPercent({ allowance_g, worked_g }: Row): number | null {
  const worked = new Decimal(worked_g);
  return allowance_g === null || worked.isZero()
    ? null
    : new Decimal(allowance_g).times(100).div(worked).toNumber();
}

function MonthChart({ rows }: { readonly rows: readonly Row[] }) {
  if (rows.length === 0)
    return (
      <Empty
        what="Nothing was weighed back in these days."
        words="Each month’s loss shows here once a bench has weighed back."
      />
    );
  return (
    <LineChart
      title="Gross loss by month"
      unit="per cent of worked"
      labels={rows.map((row) => monthText(row.key))}
      lines={[
        { name: 'gross', tone: 'rouge', points: rows.map((row) => drawn(row.gross_percent)) },
        { name: 'allowance', tone: 'ink', points: rows.map(allowedPercent) },
      ]}
    />
  );
}

function LossTable({
  report,
  head,
  by,
}: {
  readonly report: LossesJson;
  readonly head: string;
  readonly by: string;
}) {
  const columns: readonly Column<Row>[] = [
    {
      id: 'name',
      head,
      cell: (row) => <RowName row={row} report={report} by={by} />,
      value: (row) => row.name,
    },
    figure('worked_g', 'Worked, g', (row) => gramsFigure(row.worked_g), 'gross'),
    figure('loss_g', 'Loss, g fine', (row) => gramsFigure(row.loss_g), 'fine'),
    figure('gross_percent', 'Loss %', (row) => percentText(row.gross_percent), 'fine'),
    figure('allowance_g', 'Allowed, g', (row) => gramsOrNot(row.allowance_g), 'gross'),
    figure('recovered_g', 'Recovered, g', (row) => gramsOrNot(row.recovered_g), 'plain'),
    figure('net_percent', 'Net %', (row) => percentText(row.net_percent), 'plain'),
    figure(
      'value',
      'Value',
      (row) => (row.value === null ? 'no price' : moneyText(row.value, report.currency)),
      'plain',
    ),
    { id: 'index', head: 'Against allowance', cell: (row) => <Against row={row} /> },
    {
      id: 'finding',
      head: 'Finding',
      cell: (row) => <StatusWord status={FINDING_STATUS[row.finding]} />,
      value: (row) => FINDING_WORDS[row.finding],
    },
  ];
  return (
    <RegisterTable
      caption={`Losses by ${head.toLowerCase()}`}
      columns={columns.filter(
        ({ id }) => !['recovered_g', 'net_percent'].includes(id) || by === 'operation' || by === 'month',
      )}
      rows={report.rows}
      rowKey={(row) => row.key}
      empty="Nothing was weighed back in these days."
      emptyWords="Choose other days, or another metal."
    />
  );
}

function figure(
  id: keyof Row,
  head: string,
  text: (row: Row) => string,
  look: 'fine' | 'gross' | 'plain',
): Column<Row> {
  return {
    id,
    head,
    figure: look,
    cell: (row) => (row[id] === null ? <span className="none">{text(row)}</span> : text(row)),
    value: (row) => row[id] ?? '',
  };
}

const percentText = (text: string | null): string => (text === null ? 'none' : new Decimal(text).toFixed(2));
const gramsOrNot = (grams: string | null): string => (grams === null ? 'none' : gramsFigure(grams));

/** Opens the vouchers of a row, where the register can be filtered so. */
function RowName({
  row,
  report,
  by,
}: {
  readonly row: Row;
  readonly report: LossesJson;
  readonly by: string;
}) {
  const name = by === 'month' ? monthText(row.key) : row.name;
  const span = { from: report.from, to: report.to, kind: 'weigh_back' };
  const narrowed = narrow(row, by);
  if (narrowed === null) return name;
  return (
    <Link
      className="plain"
      to={`${paths.vouchers}?${new URLSearchParams({ ...span, ...narrowed }).toString()}`}
    >
      {name}
    </Link>
  );
}

function narrow(row: Row, by: string): Readonly<Record<string, string>> | null {
  if (row.key === '') return null;
  switch (by) {
    case 'operation':
      return { operation: row.key };
    case 'bench':
      return { account_id: row.key };
    case 'person':
      return { person_id: row.key };
    case 'job':
      return { job_id: row.key };
    case 'month':
      return { from: `${row.key}-01`, to: lastDay(row.key) };
    default:
      return null;
  }
}

function lastDay(month: string): string {
  const [year = 0, at = 1] = month.split('-').map((part) => Number.parseInt(part, 10));
  return new Date(Date.UTC(year, at, 0)).toISOString().slice(0, 10);
}

function Against({ row }: { readonly row: Row }) {
  const allowed = row.allowance_g === null ? null : new Decimal(row.allowance_g);
  if (allowed === null || allowed.isZero()) return <span className="none">none set</span>;
  const share = new Decimal(row.loss_g).div(allowed).toNumber();
  return (
    <SmallIndex
      share={share}
      finding={`Loss of ${gramsFigure(row.loss_g)} g against an allowance of ${gramsFigure(allowed.toFixed())} g`}
    />
  );
}

function Price({ report }: { readonly report: LossesJson }) {
  if (report.price === null) return <p>No price is set, so the loss has no value here.</p>;
  const { price_per_ozt, currency, priced_on, source } = report.price;
  return (
    <p>
      Value at {moneyText(price_per_ozt, currency, true)} per troy ounce, {dateText(priced_on)}, {source}.
    </p>
  );
}
