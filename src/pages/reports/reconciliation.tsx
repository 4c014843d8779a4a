/** Reconciliation: what was there, came, went and was lost, and what is left. Every figure opens its vouchers. */
import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { METALS, isZeroMass, massFromJson } from '../../../shared/mass/vector.ts';
import type { MassJson, MassKey } from '../../../shared/mass/vector.ts';
import type { ReconciliationJson } from '../../../shared/schemas/reports.ts';
import { Button } from '../../components/ui/button.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { Swatch, metalName } from '../../components/ui/metal-key.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { dateText, firstOfMonth, today } from '../../lib/days.ts';
import { gramsFigure, isNothing } from '../../lib/formats.ts';
import { takeCsv } from '../../lib/take-csv.ts';
import { useParties } from '../../queries/registers.ts';
import { useReconciliation } from '../../queries/reports.ts';
import { paths } from '../../app/paths.ts';
import { ReportNav, useAddressFilter } from './nav.tsx';
import { PlacesTable } from './reconciliation-places.tsx';

export function ReconciliationPage() {
  const day = today();
  const [filter, set] = useAddressFilter({ from: firstOfMonth(day), to: day, owner: 'house' });
  const report = useReconciliation(filter);
  const agrees = isZeroMass(massFromJson(report.left_over));
  const owners = useParties().filter(({ kind }) => kind === 'customer' || kind === 'supplier');
  return (
    <div className="wide">
      <Page
        title="Reconciliation"
        lede={`${dateText(report.from)} to ${dateText(report.to)}`}
        nav={<ReportNav />}
        actions={
          <>
            <Button icon="print" onPress={() => window.print()}>
              Print
            </Button>
            <Button icon="save" onPress={() => void takeCsv('/reports/reconciliation', filter)}>
              CSV
            </Button>
          </>
        }
        first={
          <>
            {agrees ? null : (
              <Notice severity="fault" what="This period does not add up.">
                Opening and lines do not give the closing book. Have the whole book checked before anything is
                closed.
              </Notice>
            )}
            <div className="filters mt-4">
              <TextField
                label="From"
                type="date"
                value={filter.from}
                onChange={(from) => from && set({ from })}
              />
              <TextField label="To" type="date" value={filter.to} onChange={(to) => to && set({ to })} />
              <SelectField
                label="Owner"
                value={filter.owner}
                onChange={(owner) => set({ owner })}
                options={[
                  { value: 'house', label: 'House' },
                  { value: 'all', label: 'All owners' },
                  ...owners.map(({ id, name }) => ({ value: id, label: name })),
                ]}
              />
            </div>
            <LinesTable report={report} agrees={agrees} />
          </>
        }
      >
        <Section heading="By place" notes={<p>Opening + in − out = closing by the book, in fine grams.</p>}>
          <PlacesTable report={report} />
        </Section>
      </Page>
    </div>
  );
}

const COLUMNS: readonly MassKey[] = [...METALS, 'gross'];

function LinesTable({ report, agrees }: { readonly report: ReconciliationJson; readonly agrees: boolean }) {
  const shown = report.lines.filter((line) => !isZeroMass(massFromJson(line)));
  return (
    <div className="table-region" role="region" aria-label="Reconciliation of the period" tabIndex={0}>
      <table className="register">
        <caption className="sr-only">Reconciliation of the period, in grams</caption>
        <thead>
          <tr>
            <th scope="col">Line</th>
            {COLUMNS.map((key) => (
              <th key={key} scope="col" className="num">
                {key === 'gross' ? (
                  'Gross, g'
                ) : (
                  <>
                    <Swatch metal={key} /> {metalName(key)}, fine g
                  </>
                )}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          <Line name="Opening, book" masses={report.opening} />
          {shown.map((line) => (
            <Line
              key={line.line}
              name={line.name}
              masses={line}
              signed
              to={(key) => (isNothing(line[`${key}_g`]) ? null : lineAddress(report, line.line))}
            />
          ))}
          {shown.length === 0 ? (
            <tr>
              <td colSpan={COLUMNS.length + 1} className="none">
                Nothing came, went or was lost in these days.
              </td>
            </tr>
          ) : null}
        </tbody>
        <tfoot>
          {agrees ? null : <Line name="Left over" masses={report.left_over} signed />}
          <Line name="Closing, book" masses={report.closing} total={agrees} />
        </tfoot>
      </table>
    </div>
  );
}

function lineAddress({ from, to, owner }: ReconciliationJson, line: string): string {
  return `${paths.vouchers}?${new URLSearchParams({ from, to, owner, line }).toString()}`;
}

interface LineProps {
  readonly name: ReactNode;
  readonly masses: MassJson;
  readonly signed?: boolean;
  readonly total?: boolean;
  readonly to?: (key: MassKey) => string | null;
}

/** A line of the reconciliation: what came in has a plus, what went a minus. */
function Line({ name, masses, signed = false, total = false, to }: LineProps) {
  return (
    <tr className={total ? 'total' : ''}>
      <th scope="row">{name}</th>
      {COLUMNS.map((key) => {
        const grams = masses[`${key}_g`];
        const address = to?.(key) ?? null;
        const text = isNothing(grams) ? (
          <span className="none">none</span>
        ) : (
          `${signed && !grams.startsWith('-') ? '+' : ''}${gramsFigure(grams)}`
        );
        return (
          <td key={key} className={`num ${key === 'gross' ? 'gross' : 'fine'}`}>
            {address === null ? (
              text
            ) : (
              <Link className="plain" to={address}>
                {text}
              </Link>
            )}
          </td>
        );
      })}
    </tr>
  );
}
