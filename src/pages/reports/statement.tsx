/** The metal statement of one customer or supplier: what was brought, worked, lost, given back, and what is owed. */
import { Link } from 'react-router-dom';
import type { OwnerStatementJson } from '../../../shared/schemas/statements.ts';
import { FineCell } from '../../components/domain/fine-cell.tsx';
import { Button } from '../../components/ui/button.tsx';
import { Empty } from '../../components/ui/empty.tsx';
import { Grams } from '../../components/ui/figure.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import type { Column } from '../../components/ui/register-table.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { dateText, firstOfMonth, today } from '../../lib/days.ts';
import { dayText, numberText } from '../../lib/formats.ts';
import { takeCsv } from '../../lib/take-csv.ts';
import { useParties } from '../../queries/registers.ts';
import { useOwnerStatement } from '../../queries/reports.ts';
import { paths } from '../../app/paths.ts';
import { ReportNav, useAddressFilter } from './nav.tsx';

export function StatementPage() {
  const day = today();
  const [{ owner, from, to }, set] = useAddressFilter({ owner: '', from: firstOfMonth(day, 5), to: day });
  const owners = useParties().filter(({ kind }) => kind === 'customer' || kind === 'supplier');
  const statement = useOwnerStatement(owner, { from, to });
  return (
    <Page
      title="Statements"
      lede={`${dateText(from)} to ${dateText(to)}`}
      nav={<ReportNav />}
      margin={
        <p>Metal of another owner stays that owner’s in the book, from the first weighing to the last.</p>
      }
      actions={
        <>
          <Button icon="print" onPress={() => window.print()}>
            Print
          </Button>
          {owner === '' ? null : (
            <Button
              icon="save"
              onPress={() => void takeCsv(`/reports/statements/owner/${owner}`, { from, to })}
            >
              CSV
            </Button>
          )}
        </>
      }
      first={
        <div className="filters mt-4">
          <SelectField
            label="Owner"
            none="Choose an owner"
            value={owner}
            onChange={(next) => set({ owner: next })}
            options={owners.map(({ id, name }) => ({ value: id, label: name }))}
          />
          <TextField label="From" type="date" value={from} onChange={(next) => next && set({ from: next })} />
          <TextField label="To" type="date" value={to} onChange={(next) => next && set({ to: next })} />
        </div>
      }
    >
      {owner === '' ? (
        <Empty
          what="No owner is chosen yet."
          words="Choose a customer or supplier: the movements of that owner’s metal show here."
        />
      ) : statement.data === undefined ? (
        <p role="status">{statement.error === null ? 'Reading the book …' : statement.error.message}</p>
      ) : (
        <Statement statement={statement.data} />
      )}
    </Page>
  );
}

function Statement({ statement }: { readonly statement: OwnerStatementJson }) {
  const sums = [
    { name: 'Here at the start', masses: statement.opening },
    ...statement.lines
      .filter((line) =>
        /[1-9]/.test(line.gross_g + line.gold_g + line.silver_g + line.platinum_g + line.palladium_g),
      )
      .map((line) => ({ name: line.name, masses: line })),
    { name: 'Here at the end', masses: statement.closing },
    { name: 'Lost and still owed', masses: statement.owed },
  ];
  return (
    <>
      <Section heading={statement.owner.name} notes={<p>What came has no sign, what left has a minus.</p>}>
        <RegisterTable
          caption={`Metal of ${statement.owner.name}, summed up`}
          columns={SUM_COLUMNS}
          rows={sums}
          rowKey={(row) => row.name}
          empty="Nothing of this owner is in the book."
        />
      </Section>
      <Section
        heading="Movements"
        notes={
          <p>{statement.more ? 'There are more: choose fewer days.' : 'Every voucher that changed it.'}</p>
        }
      >
        <RegisterTable
          caption={`Movements of the metal of ${statement.owner.name}`}
          columns={COLUMNS}
          rows={statement.movements}
          rowKey={(row) => `${row.sequence} ${row.line} ${row.lot_code}`}
          empty="Nothing moved in these days."
        />
      </Section>
    </>
  );
}

type Sum = { readonly name: string; readonly masses: OwnerStatementJson['closing'] };

const SUM_COLUMNS: readonly Column<Sum>[] = [
  { id: 'name', head: 'What', cell: (row) => row.name },
  { id: 'fine', head: 'Fine, g', figure: 'fine', cell: (row) => <FineCell masses={row.masses} /> },
  { id: 'gross', head: 'Gross, g', figure: 'gross', cell: (row) => <Grams grams={row.masses.gross_g} /> },
];

type Movement = OwnerStatementJson['movements'][number];

const COLUMNS: readonly Column<Movement>[] = [
  {
    id: 'sequence',
    head: 'Voucher',
    cell: (row) => <Link to={paths.voucher(row.id)}>{numberText(row.sequence)}</Link>,
    value: (row) => row.sequence,
    figure: 'plain',
  },
  { id: 'date', head: 'Date', cell: (row) => dayText(row.business_date), value: (row) => row.business_date },
  {
    id: 'name',
    head: 'What',
    cell: (row) => (
      <>
        {row.name}
        <small className="block text-ink-2">
          {row.lot_code} {row.lot_description}
          {row.job_code === null ? '' : `, ${row.job_code}`}
        </small>
      </>
    ),
    value: (row) => row.name,
  },
  { id: 'fine', head: 'Fine, g', figure: 'fine', cell: (row) => <FineCell masses={row} /> },
  {
    id: 'gross_g',
    head: 'Gross, g',
    figure: 'gross',
    cell: (row) => <Grams grams={row.gross_g} />,
    value: (row) => row.gross_g,
  },
];
