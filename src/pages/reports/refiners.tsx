/** Consignments to refiners: what was expected of each metal, what was found, kept and credited, and the days it took. */
import { Link } from 'react-router-dom';
import type { ConsignmentRow } from '../../../shared/schemas/statements.ts';
import { Button } from '../../components/ui/button.tsx';
import { Grams } from '../../components/ui/figure.tsx';
import { Swatch, metalSymbol } from '../../components/ui/metal-key.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import type { Column } from '../../components/ui/register-table.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { dayText, words } from '../../lib/formats.ts';
import { takeCsv } from '../../lib/take-csv.ts';
import { useAccounts } from '../../queries/registers.ts';
import { useRefiners } from '../../queries/reports.ts';
import { paths } from '../../app/paths.ts';
import { ReportNav, useAddressFilter } from './nav.tsx';

const ANY = { refiner_id: '', from: '', to: '' };

export function RefinersPage() {
  const [filter, set] = useAddressFilter(ANY);
  const given = Object.fromEntries(Object.entries(filter).filter(([, value]) => value !== ''));
  const pages = useRefiners(new URLSearchParams(given).toString());
  const refiners = useAccounts().filter(({ kind }) => kind === 'refiner');
  return (
    <Page
      title="Refiners"
      lede="newest first"
      nav={<ReportNav />}
      margin={
        <p>Expected − credited = weighing difference + assay difference + deduction + charge in metal.</p>
      }
      actions={
        <Button icon="save" onPress={() => void takeCsv('/reports/refiners', given)}>
          CSV
        </Button>
      }
      first={
        <div className="filters mt-4">
          <SelectField
            label="Refiner"
            none="Every refiner"
            value={filter.refiner_id}
            onChange={(refiner_id) => set({ refiner_id })}
            options={refiners.map(({ id, name }) => ({ value: id, label: name }))}
          />
          <TextField label="Sent from" type="date" value={filter.from} onChange={(from) => set({ from })} />
          <TextField label="Sent to" type="date" value={filter.to} onChange={(to) => set({ to })} />
        </div>
      }
    >
      <Section heading="Consignments" notes={<p>In fine grams, from the refiners’ own statements.</p>}>
        {pages.data === undefined ? (
          <p role="status">{pages.error === null ? 'Reading the book …' : pages.error.message}</p>
        ) : (
          <RegisterTable
            caption="Consignments to refiners"
            columns={COLUMNS}
            rows={pages.data.pages.flatMap((page) => page.rows)}
            rowKey={(row) => row.id}
            empty="No consignment fits that."
            emptyAction={<Button onPress={() => set(ANY)}>Show every consignment</Button>}
          />
        )}
        {pages.hasNextPage ? (
          <Button
            icon="down"
            busy={pages.isFetchingNextPage ? 'Reading the book …' : false}
            onPress={() => void pages.fetchNextPage()}
          >
            Show more
          </Button>
        ) : null}
      </Section>
    </Page>
  );
}

type MetalFigure = Exclude<keyof ConsignmentRow['metals'][number], 'metal' | 'credited_percent'>;

/** A figure of each metal of the consignment, a line each. */
function perMetal(figure: MetalFigure, head: string): Column<ConsignmentRow> {
  return {
    id: figure,
    head,
    figure: figure === 'credited_g' ? 'fine' : 'plain',
    cell: (row) =>
      row.metals.map((metal) => (
        <div key={metal.metal}>
          <Grams grams={metal[figure]} /> <span className="symbol">{metalSymbol(metal.metal)}</span>{' '}
          <Swatch metal={metal.metal} />
        </div>
      )),
  };
}

const COLUMNS: readonly Column<ConsignmentRow>[] = [
  {
    id: 'code',
    head: 'Consignment',
    cell: (row) => (
      <>
        <Link to={paths.consignment(row.id)}>{row.code ?? 'no number'}</Link>
        <small className="block text-ink-2">{row.refiner_name}</small>
      </>
    ),
    value: (row) => row.code ?? '',
  },
  {
    id: 'state',
    head: 'State',
    cell: (row) => words(row.state),
    value: (row) => row.state,
  },
  {
    id: 'sent_on',
    head: 'Sent',
    cell: (row) => (
      <>
        {dayText(row.sent_on)}
        <small className="block text-ink-2">
          {row.days === null ? 'not settled yet' : `settled after ${row.days} days`}
        </small>
      </>
    ),
    value: (row) => row.sent_on,
  },
  perMetal('expected_g', 'Expected, g'),
  perMetal('assayed_g', 'Found, g'),
  perMetal('deduction_g', 'Kept, g'),
  perMetal('credited_g', 'Credited, g fine'),
  {
    id: 'percent',
    head: 'Of expected',
    figure: 'plain',
    cell: (row) =>
      row.metals.map(({ metal, credited_percent }) => (
        <div key={metal}>
          {credited_percent === null ? <span className="none">none yet</span> : `${credited_percent} %`}
        </div>
      )),
  },
];
