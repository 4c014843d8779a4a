/** Parties outside the house: suppliers, customers, refiners, outworkers, couriers; with their addresses. */
import { useState } from 'react';
import type { PartyRow } from '../../../shared/schemas/registers.ts';
import { PARTY_KINDS } from '../../../shared/events/workshop/parties.ts';
import { Button } from '../../components/ui/button.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import type { Column } from '../../components/ui/register-table.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { orNull } from '../../forms/typed.ts';
import { words } from '../../lib/formats.ts';
import { useParties } from '../../queries/registers.ts';
import { useSession } from '../../queries/session.ts';
import { useWrite } from '../../queries/writes.ts';
import { EventFields } from './event-fields.tsx';
import { WorkshopNav } from './workshop-nav.tsx';

const COLUMNS: readonly Column<PartyRow>[] = [
  { id: 'name', head: 'Name', value: (row) => row.name, cell: (row) => <b>{row.name}</b> },
  { id: 'kind', head: 'Kind', value: (row) => row.kind, cell: (row) => words(row.kind) },
  {
    id: 'email',
    head: 'E-mail',
    value: (row) => row.email ?? '',
    cell: (row) => row.email ?? <span className="none">none</span>,
  },
  {
    id: 'phone',
    head: 'Telephone',
    value: (row) => row.phone ?? '',
    cell: (row) => row.phone ?? <span className="none">none</span>,
  },
];

export function Parties() {
  const session = useSession();
  const parties = useParties();
  const [chosen, setChosen] = useState('');
  const party = parties.find((row) => row.id === chosen);
  return (
    <Page title="Parties" lede="Suppliers, customers, refiners, outworkers, couriers." nav={<WorkshopNav />}>
      <Section heading="Known parties">
        <RegisterTable
          caption="Parties"
          columns={COLUMNS}
          rows={parties}
          rowKey={(row) => row.id}
          csv="parties"
          empty="Nobody is entered yet."
        />
      </Section>
      {session.can('party.set') ? (
        <>
          <Section
            heading="Enter a party"
            notes={
              <p>
                Its account is opened with it. Where local law asks for proof of identity before metal is
                bought, keep that with the receipt; the local authority decides what is asked.
              </p>
            }
          >
            <EventFields
              event="set-party"
              name="set-party"
              act="Enter the party"
              initial={{ kind: 'customer', name: '' }}
              toBody={(values) => values}
            >
              {({ values, set, errorOf }) => (
                <>
                  <SelectField
                    label="Kind"
                    value={values.kind}
                    onChange={(kind) => set({ kind })}
                    options={PARTY_KINDS.map((kind) => ({ value: kind, label: words(kind) }))}
                    error={errorOf('kind')}
                  />
                  <TextField
                    label="Name"
                    value={values.name}
                    onChange={(name) => set({ name })}
                    error={errorOf('name')}
                  />
                </>
              )}
            </EventFields>
          </Section>
          <Section heading="Addresses" notes={<p>They are not in the chain, so that they can be mended.</p>}>
            <div className="mb-4 max-w-md">
              <SelectField
                label="Party"
                none="Choose a party"
                value={chosen}
                onChange={setChosen}
                options={parties.map(({ id, name }) => ({ value: id, label: name }))}
              />
            </div>
            {party === undefined ? null : <Contact key={party.id} party={party} />}
          </Section>
        </>
      ) : null}
    </Page>
  );
}

function Contact({ party }: { readonly party: PartyRow }) {
  const [values, setValues] = useState({
    email: party.email ?? '',
    phone: party.phone ?? '',
    address: party.address ?? '',
  });
  const { write, problem, busy } = useWrite();
  return (
    <>
      {problem === null ? null : <Notice severity="fault" what={problem} />}
      <div className="fields">
        <TextField
          label="E-mail address"
          type="email"
          value={values.email}
          onChange={(email) => setValues({ ...values, email })}
        />
        <TextField
          label="Telephone"
          value={values.phone}
          onChange={(phone) => setValues({ ...values, phone })}
        />
        <TextField
          label="Address"
          value={values.address}
          onChange={(address) => setValues({ ...values, address })}
        />
      </div>
      <p>
        <Button
          busy={busy ? 'Keeping …' : false}
          onPress={() =>
            void write('PUT', `/parties/${party.id}/contact`, {
              email: orNull(values.email),
              phone: orNull(values.phone),
              address: orNull(values.address),
            })
          }
        >
          Keep the addresses
        </Button>
      </p>
    </>
  );
}
