/** Periods: closed by two people, so that nothing enters them any more; opened again by two, with a reason. */
import type { PeriodRow } from '../../../shared/schemas/registers.ts';
import { Page, Section } from '../../components/ui/page.tsx';
import type { Column } from '../../components/ui/register-table.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { StatusWord } from '../../components/ui/status-word.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { dayText } from '../../lib/formats.ts';
import { usePeriods } from '../../queries/registers.ts';
import { useSession } from '../../queries/session.ts';
import { EventFields } from './event-fields.tsx';
import { WorkshopNav } from './workshop-nav.tsx';

const COLUMNS: readonly Column<PeriodRow>[] = [
  { id: 'first_day', head: 'From', value: (row) => row.first_day, cell: (row) => dayText(row.first_day) },
  { id: 'last_day', head: 'To', value: (row) => row.last_day, cell: (row) => dayText(row.last_day) },
  {
    id: 'closed',
    head: 'Standing',
    value: (row) => (row.closed ? 'closed' : 'open'),
    cell: (row) => <StatusWord status={row.closed ? 'Closed' : 'Active'} />,
  },
];

export function Periods() {
  const session = useSession();
  const periods = usePeriods();
  const closed = periods.filter((period) => period.closed);
  return (
    <Page title="Periods" lede="What is closed stays as it is." nav={<WorkshopNav />}>
      <Section heading="Periods">
        <RegisterTable
          caption="Periods"
          columns={COLUMNS}
          rows={periods}
          rowKey={(row) => row.id}
          empty="No period is closed yet."
        />
      </Section>
      {session.can('period.close') ? (
        <>
          <Section
            heading="Close a period"
            notes={<p>Two people sign it. What belongs into it afterwards is entered with today’s date.</p>}
          >
            <EventFields
              event="close-period"
              name="close-period"
              act="Close the period"
              initial={{ from: '', to: '' }}
              toBody={(values) => values}
            >
              {({ values, set, errorOf }) => (
                <>
                  <TextField
                    label="First day"
                    type="date"
                    value={values.from}
                    onChange={(from) => set({ from })}
                    error={errorOf('from')}
                  />
                  <TextField
                    label="Last day"
                    type="date"
                    value={values.to}
                    onChange={(to) => set({ to })}
                    error={errorOf('to')}
                  />
                </>
              )}
            </EventFields>
          </Section>
          {closed.length === 0 ? null : (
            <Section heading="Open one again">
              <EventFields
                event="reopen-period"
                name="reopen-period"
                act="Open the period"
                initial={{ period_id: '', reason: '' }}
                toBody={(values) => values}
              >
                {({ values, set, errorOf }) => (
                  <>
                    <SelectField
                      label="Period"
                      none="Choose a period"
                      value={values.period_id}
                      onChange={(period_id) => set({ period_id })}
                      options={closed.map(({ id, first_day, last_day }) => ({
                        value: id,
                        label: `${dayText(first_day)} to ${dayText(last_day)}`,
                      }))}
                      error={errorOf('period_id')}
                    />
                    <TextField
                      label="Reason"
                      value={values.reason}
                      onChange={(reason) => set({ reason })}
                      error={errorOf('reason')}
                    />
                  </>
                )}
              </EventFields>
            </Section>
          )}
        </>
      ) : null}
    </Page>
  );
}
