/** Operations, what each may lose from which day on, and what is expected back in each bin. */
import type { AllowanceRow } from '../../../shared/schemas/registers.ts';
import { Page, Section } from '../../components/ui/page.tsx';
import type { Column } from '../../components/ui/register-table.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import type { Option } from '../../components/ui/select-field.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { WeightField } from '../../components/ui/weight-field.tsx';
import { orNull, typedFigure, typedGramsOr } from '../../forms/typed.ts';
import { dayText, gramsFigure } from '../../lib/formats.ts';
import { useAccounts, useAllowances, useAlloys } from '../../queries/registers.ts';
import { useSession } from '../../queries/session.ts';
import { BinFeeds } from './bin-feeds.tsx';
import { EventFields } from './event-fields.tsx';
import { WorkshopNav } from './workshop-nav.tsx';

export function Allowances() {
  const session = useSession();
  const accounts = useAccounts();
  const allowances = useAllowances();
  const operations = accounts
    .filter((account) => account.operation !== null)
    .map((account) => ({ value: account.operation ?? '', label: account.name }));
  const nameOf = (operation: string) =>
    operations.find((known) => known.value === operation)?.label ?? operation;
  const columns: readonly Column<AllowanceRow>[] = [
    {
      id: 'operation',
      head: 'Operation',
      value: (row) => row.operation,
      cell: (row) => <b>{nameOf(row.operation)}</b>,
    },
    {
      id: 'alloy',
      head: 'Alloy',
      value: (row) => row.alloy ?? '',
      cell: (row) => row.alloy ?? 'every alloy',
    },
    {
      id: 'percent',
      head: 'Of worked, %',
      figure: 'plain',
      value: (row) => row.percent,
      cell: (row) => row.percent,
    },
    {
      id: 'fixed_g',
      head: 'And, g',
      figure: 'plain',
      value: (row) => row.fixed_g,
      cell: (row) => gramsFigure(row.fixed_g),
    },
    { id: 'from_date', head: 'From', value: (row) => row.from_date, cell: (row) => dayText(row.from_date) },
  ];
  return (
    <Page
      title="Operations and allowances"
      lede="What work may lose, and where it is swept up."
      nav={<WorkshopNav />}
    >
      <Section
        heading="Allowances"
        notes={<p>The workshop’s own figures; there is no published table to go by.</p>}
      >
        <RegisterTable
          caption="Allowances"
          columns={columns}
          rows={allowances}
          rowKey={(row) => row.id}
          csv="allowances"
          empty="No allowance is set, so losses are judged by weighing error alone."
        />
      </Section>
      {session.can('allowance.set') ? (
        <>
          <SetAllowance operations={operations} />
          <OpenOperation />
        </>
      ) : null}
      <BinFeeds operations={operations} />
    </Page>
  );
}

function SetAllowance({ operations }: { readonly operations: readonly Option[] }) {
  const { today } = useSession();
  const alloys = useAlloys();
  return (
    <Section heading="Set an allowance">
      <EventFields
        event="set-allowance"
        name="set-allowance"
        act="Set the allowance"
        initial={{ operation: 'sheet_work', alloy: '', percent: '', fixed: '', from: today }}
        toBody={(values) => ({
          operation: values.operation,
          alloy: orNull(values.alloy),
          percent: typedFigure(values.percent),
          fixed_g: typedGramsOr(values.fixed, 'fixed_g', '0'),
          from: values.from,
        })}
      >
        {({ values, set, errorOf }) => (
          <>
            <SelectField
              label="Operation"
              value={values.operation}
              onChange={(operation) => set({ operation })}
              options={operations}
              error={errorOf('operation')}
            />
            <SelectField
              label="Alloy"
              none="Every alloy"
              value={values.alloy}
              onChange={(alloy) => set({ alloy })}
              options={alloys.map(({ name }) => ({ value: name, label: name }))}
              error={errorOf('alloy')}
            />
            <WeightField
              label="Of worked metal"
              unit="%"
              value={values.percent}
              onChange={(percent) => set({ percent })}
              error={errorOf('percent')}
            />
            <WeightField
              label="And a fixed mass"
              value={values.fixed}
              onChange={(fixed) => set({ fixed })}
              error={errorOf('fixed_g')}
            />
            <TextField
              label="From"
              type="date"
              value={values.from}
              onChange={(from) => set({ from })}
              error={errorOf('from')}
            />
          </>
        )}
      </EventFields>
    </Section>
  );
}

function OpenOperation() {
  return (
    <Section heading="Open an operation">
      <EventFields
        event="open-operation"
        name="open-operation"
        act="Open the operation"
        initial={{ name: '' }}
        toBody={(values) => values}
      >
        {({ values, set, errorOf }) => (
          <TextField
            label="Name"
            value={values.name}
            onChange={(name) => set({ name })}
            error={errorOf('name')}
          />
        )}
      </EventFields>
    </Section>
  );
}
