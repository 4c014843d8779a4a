/** Balances on any day: weighed metal, estimated metal and claims each by itself, never in one total. */
import { Segments } from '../../components/ui/segments.tsx';
import { FineCell } from '../../components/domain/fine-cell.tsx';
import { Grams } from '../../components/ui/figure.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import type { Column } from '../../components/ui/register-table.tsx';
import { Swatch, metalName } from '../../components/ui/metal-key.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { Button } from '../../components/ui/button.tsx';
import { dateText, today } from '../../lib/days.ts';
import { dayText, moneyText, words } from '../../lib/formats.ts';
import { takeCsv } from '../../lib/take-csv.ts';
import { useBalances } from '../../queries/reports.ts';
import { paths } from '../../app/paths.ts';
import { Link } from 'react-router-dom';
import type { BalancesJson } from '../../../shared/schemas/reports.ts';
import { ReportNav, useAddressFilter } from './nav.tsx';

const BY = [
  { value: 'place', label: 'By place' },
  { value: 'metal', label: 'By metal' },
  { value: 'owner', label: 'By owner' },
  { value: 'lot', label: 'By lot' },
] as const;

const PARTS = [
  {
    part: 'weighed',
    heading: 'Weighed metal',
    notes: 'On a balance, of a fineness that was declared, computed, tested or assayed.',
    empty: 'Nothing weighed lies anywhere on that day.',
  },
  {
    part: 'estimated',
    heading: 'Estimated metal',
    notes: 'Dust, filings and baths: their content is an estimate until the refiner says.',
    empty: 'Nothing of estimated content lies anywhere on that day.',
  },
  {
    part: 'claim',
    heading: 'Claims',
    notes: 'Metal accounts with refiners and suppliers. Below nothing the house owes.',
    empty: 'No metal account holds or owes anything on that day.',
  },
] as const;

type Row = BalancesJson['rows'][number];

export function BalancesPage() {
  const [filter, set] = useAddressFilter({ by: 'place', on: today() });
  const report = useBalances(filter);
  return (
    <Page
      title="Balances"
      lede={`at the end of ${dateText(report.on)}`}
      nav={<ReportNav />}
      margin={
        <p>The three parts are never in one total: what was weighed, what is estimated, what is owed.</p>
      }
      actions={
        <>
          <Button icon="print" onPress={() => window.print()}>
            Print
          </Button>
          <Button icon="save" onPress={() => void takeCsv('/reports/balances', filter)}>
            CSV
          </Button>
        </>
      }
      first={
        <div className="filters mt-4">
          <TextField label="On" type="date" value={filter.on} onChange={(on) => set({ on: on || today() })} />
          <Segments legend="Show as" value={filter.by} options={BY} onChange={(by) => set({ by })} />
        </div>
      }
    >
      {PARTS.map(({ part, heading, notes, empty }) => (
        <Section key={part} heading={heading} notes={<p>{notes}</p>}>
          <Part report={report} part={part} heading={heading} empty={empty} by={filter.by} />
        </Section>
      ))}
      <Section heading="Prices" notes={<p>A value names its price, its date and its source.</p>}>
        <Prices report={report} />
      </Section>
    </Page>
  );
}

interface PartProps {
  readonly report: BalancesJson;
  readonly part: Row['part'];
  readonly heading: string;
  readonly empty: string;
  readonly by: string;
}

function Part({ report, part, heading, empty, by }: PartProps) {
  const rows = report.rows.filter((row) => row.part === part);
  const total = report.totals.find((row) => row.part === part);
  const money = (value: string | null) =>
    value === null ? <span className="none">no price</span> : moneyText(value, report.currency);
  const columns: readonly Column<Row>[] = [
    {
      id: 'name',
      head: NAMES[by] ?? 'Place',
      cell: (row) => <Name row={row} by={by} />,
      value: (row) => row.name,
    },
    {
      id: 'fine',
      head: 'Fine, g',
      figure: 'fine',
      cell: (row) => <FineCell masses={row} />,
    },
    {
      id: 'gross_g',
      head: 'Gross, g',
      figure: 'gross',
      cell: (row) => <Grams grams={row.gross_g} />,
      value: (row) => row.gross_g,
    },
    {
      id: 'value',
      head: 'Value',
      figure: 'plain',
      cell: (row) => money(row.value),
      value: (row) => row.value ?? '',
    },
  ];
  return (
    <RegisterTable
      caption={`${heading}, ${dateText(report.on)}`}
      columns={columns}
      rows={rows}
      rowKey={(row) => row.key}
      empty={empty}
      {...(total === undefined
        ? {}
        : {
            total: [
              heading,
              <FineCell key="fine" masses={total} />,
              <Grams key="gross" grams={total.gross_g} />,
              money(total.value),
            ],
          })}
    />
  );
}

const NAMES: Readonly<Record<string, string>> = {
  place: 'Place',
  metal: 'Metal',
  owner: 'Owner',
  lot: 'Lot',
};

function Name({ row, by }: { readonly row: Row; readonly by: string }) {
  if (by === 'lot') return <Link to={paths.lot(row.key)}>{row.name}</Link>;
  if (by !== 'place') return row.name;
  return (
    <>
      <Link className="plain" to={`${paths.vouchers}?account_id=${row.key}`}>
        {row.name}
      </Link>
      {row.kind === null ? null : <small className="block text-ink-2">{words(row.kind)}</small>}
    </>
  );
}

function Prices({ report }: { readonly report: BalancesJson }) {
  return (
    <RegisterTable
      caption="Prices that the values rest on"
      rows={report.prices}
      rowKey={(row) => row.id}
      empty="No price is set for that day, so no value can be told."
      emptyWords="Set the day’s prices under Workshop, prices."
      columns={[
        {
          id: 'metal',
          head: 'Metal',
          cell: (row) => (
            <>
              <Swatch metal={row.metal} /> {metalName(row.metal)}
            </>
          ),
        },
        {
          id: 'price_per_ozt',
          head: 'Per troy ounce',
          figure: 'plain',
          cell: (row) => moneyText(row.price_per_ozt, row.currency, true),
        },
        { id: 'priced_on', head: 'Of', cell: (row) => dayText(row.priced_on) },
        { id: 'source', head: 'Source', cell: (row) => row.source },
      ]}
    />
  );
}
