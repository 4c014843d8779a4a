/** Places and metal accounts: what there is, who answers for it, what it holds; opened, given to somebody, closed. */
import { Link } from 'react-router-dom';
import { useState } from 'react';
import { CLAIM_KINDS, PLACE_KINDS } from '../../../shared/book/account.ts';
import type { AccountRow } from '../../../shared/schemas/registers.ts';
import { paths } from '../../app/paths.ts';
import { FineCell } from '../../components/domain/fine-cell.tsx';
import { Grams } from '../../components/ui/figure.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import type { Column } from '../../components/ui/register-table.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import type { Option } from '../../components/ui/select-field.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { StatusWord } from '../../components/ui/status-word.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { orNull } from '../../forms/typed.ts';
import { words } from '../../lib/formats.ts';
import { useAccounts, useParties, usePeople } from '../../queries/registers.ts';
import { useSession } from '../../queries/session.ts';
import { EventFields } from './event-fields.tsx';
import { WorkshopNav } from './workshop-nav.tsx';

const COLUMNS: readonly Column<AccountRow>[] = [
  {
    id: 'name',
    head: 'Place',
    value: (row) => row.name,
    cell: (row) => <Link to={`${paths.lots}?place_id=${row.id}`}>{row.name}</Link>,
  },
  { id: 'kind', head: 'Kind', value: (row) => row.kind, cell: (row) => words(row.kind) },
  {
    id: 'custodian',
    head: 'In the charge of',
    value: (row) => row.custodian_name ?? '',
    cell: (row) => row.custodian_name ?? row.party_name ?? <span className="none">nobody in particular</span>,
  },
  {
    id: 'closed',
    head: 'Standing',
    value: (row) => (row.closed ? 'closed' : 'open'),
    cell: (row) => <StatusWord status={row.closed ? 'Closed' : 'Active'} />,
  },
  {
    id: 'gross_g',
    head: 'Gross, g',
    figure: 'gross',
    value: (row) => row.gross_g,
    cell: (row) => <Grams grams={row.gross_g} />,
  },
  {
    id: 'gold_g',
    head: 'Fine, g',
    figure: 'fine',
    value: (row) => row.gold_g,
    cell: (row) => <FineCell masses={row} />,
  },
];

const KINDS = [...PLACE_KINDS, ...CLAIM_KINDS];

export function Places() {
  const session = useSession();
  const accounts = useAccounts();
  const people = usePeople().filter((person) => person.active && person.role !== 'auditor');
  const places = accounts.filter((account) => KINDS.some((kind) => kind === account.kind));
  const staff = people.map(({ id, name }) => ({ value: id, label: name }));
  const options = places.filter((place) => !place.closed).map(({ id, name }) => ({ value: id, label: name }));
  return (
    <Page title="Places" lede="Where metal can be, and who answers for it." nav={<WorkshopNav />}>
      <Section heading="All places">
        <RegisterTable
          caption="Places"
          columns={COLUMNS}
          rows={places}
          rowKey={(row) => row.id}
          csv="places"
          empty="No place is open yet."
        />
      </Section>
      {session.can('place.set') ? (
        <>
          <OpenPlace staff={staff} />
          <HandOver places={options} staff={staff} />
          <RenameOrClose places={options} />
        </>
      ) : null}
    </Page>
  );
}

function OpenPlace({ staff }: { readonly staff: readonly Option[] }) {
  const parties = useParties();
  return (
    <Section
      heading="Open a place"
      notes={<p>Every bench, bin, refiner and metal account is a place of its own.</p>}
    >
      <EventFields
        event="open-place"
        name="open-place"
        act="Open the place"
        initial={{ kind: 'bench', name: '', custodian_id: '', party_id: '' }}
        toBody={(values) => ({
          ...values,
          custodian_id: orNull(values.custodian_id),
          party_id: orNull(values.party_id),
        })}
      >
        {({ values, set, errorOf }) => (
          <>
            <SelectField
              label="Kind"
              value={values.kind}
              onChange={(kind) => set({ kind })}
              options={KINDS.map((kind) => ({ value: kind, label: words(kind) }))}
              error={errorOf('kind')}
            />
            <TextField
              label="Name"
              value={values.name}
              onChange={(name) => set({ name })}
              error={errorOf('name')}
            />
            <SelectField
              label="In the charge of"
              none="Nobody in particular"
              value={values.custodian_id}
              onChange={(custodian_id) => set({ custodian_id })}
              options={staff}
              error={errorOf('custodian_id')}
            />
            <SelectField
              label="Party"
              none="None"
              value={values.party_id}
              onChange={(party_id) => set({ party_id })}
              options={parties.map(({ id, name }) => ({ value: id, label: name }))}
              error={errorOf('party_id')}
            />
          </>
        )}
      </EventFields>
    </Section>
  );
}

function HandOver({
  places,
  staff,
}: {
  readonly places: readonly Option[];
  readonly staff: readonly Option[];
}) {
  return (
    <Section
      heading="Hand a place over"
      notes={<p>What lies there is from then on in the other person’s charge. Count it first.</p>}
    >
      <EventFields
        event="change-custodian"
        name="change-custodian"
        act="Hand the place over"
        initial={{ account_id: '', custodian_id: '' }}
        toBody={(values) => values}
      >
        {({ values, set, errorOf }) => (
          <>
            <SelectField
              label="Place"
              none="Choose a place"
              value={values.account_id}
              onChange={(account_id) => set({ account_id })}
              options={places}
              error={errorOf('account_id')}
            />
            <SelectField
              label="To"
              none="Choose a person"
              value={values.custodian_id}
              onChange={(custodian_id) => set({ custodian_id })}
              options={staff}
              error={errorOf('custodian_id')}
            />
          </>
        )}
      </EventFields>
    </Section>
  );
}

function RenameOrClose({ places }: { readonly places: readonly Option[] }) {
  const [chosen, setChosen] = useState('');
  return (
    <Section
      heading="Rename or close"
      notes={<p>The old name stays in the book. A place that holds metal can’t be closed.</p>}
    >
      <div className="mb-4 max-w-md">
        <SelectField
          label="Place"
          none="Choose a place"
          value={chosen}
          onChange={setChosen}
          options={places}
        />
      </div>
      {chosen === '' ? null : (
        <>
          <EventFields
            key={`rename-${chosen}`}
            event="rename-account"
            name={`rename-${chosen}`}
            act="Rename the place"
            initial={{ name: '' }}
            toBody={({ name }) => ({ account_id: chosen, name })}
          >
            {({ values, set, errorOf }) => (
              <TextField
                label="New name"
                value={values.name}
                onChange={(name) => set({ name })}
                error={errorOf('name')}
              />
            )}
          </EventFields>
          <EventFields
            key={`close-${chosen}`}
            event="close-account"
            name={`close-${chosen}`}
            act="Close the place"
            initial={{}}
            toBody={() => ({ account_id: chosen })}
          >
            {() => null}
          </EventFields>
        </>
      )}
    </Section>
  );
}
