/** Jobs that metal is issued to: for a customer or for stock. */
import { Link } from 'react-router-dom';
import type { JobRow } from '../../../shared/schemas/registers.ts';
import { paths } from '../../app/paths.ts';
import { Page, Section } from '../../components/ui/page.tsx';
import type { Column } from '../../components/ui/register-table.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { orNull } from '../../forms/typed.ts';
import { dayText } from '../../lib/formats.ts';
import { useJobs, useParties } from '../../queries/registers.ts';
import { useSession } from '../../queries/session.ts';
import { EventFields } from './event-fields.tsx';
import { WorkshopNav } from './workshop-nav.tsx';

const COLUMNS: readonly Column<JobRow>[] = [
  {
    id: 'code',
    head: 'Job',
    value: (row) => row.code,
    cell: (row) => <Link to={`${paths.vouchers}?job_id=${row.id}`}>{row.code}</Link>,
  },
  { id: 'title', head: 'What it is', value: (row) => row.title, cell: (row) => row.title },
  {
    id: 'customer',
    head: 'Customer',
    value: (row) => row.customer_name ?? '',
    cell: (row) => row.customer_name ?? 'stock',
  },
  { id: 'opened_on', head: 'Opened', value: (row) => row.opened_on, cell: (row) => dayText(row.opened_on) },
];

export function Jobs() {
  const session = useSession();
  const jobs = useJobs();
  const customers = useParties().filter((party) => party.kind === 'customer');
  return (
    <Page title="Jobs" lede="What metal is issued for." nav={<WorkshopNav />}>
      <Section heading="Jobs" notes={<p>Newest first. A job opens its vouchers.</p>}>
        <RegisterTable
          caption="Jobs"
          columns={COLUMNS}
          rows={jobs}
          rowKey={(row) => row.id}
          csv="jobs"
          empty="No job is open yet."
        />
      </Section>
      {session.can('job.open') ? (
        <Section heading="Open a job">
          <EventFields
            event="open-job"
            name="open-job"
            act="Open the job"
            initial={{ code: '', title: '', customer_id: '' }}
            toBody={(values) => ({ ...values, customer_id: orNull(values.customer_id) })}
          >
            {({ values, set, errorOf }) => (
              <>
                <TextField
                  label="Number"
                  hint="“J-1187”"
                  value={values.code}
                  onChange={(code) => set({ code })}
                  error={errorOf('code')}
                />
                <TextField
                  label="What it is"
                  value={values.title}
                  onChange={(title) => set({ title })}
                  error={errorOf('title')}
                />
                <SelectField
                  label="Customer"
                  none="For stock"
                  value={values.customer_id}
                  onChange={(customer_id) => set({ customer_id })}
                  options={customers.map(({ id, name }) => ({ value: id, label: name }))}
                  error={errorOf('customer_id')}
                />
              </>
            )}
          </EventFields>
        </Section>
      ) : null}
    </Page>
  );
}
