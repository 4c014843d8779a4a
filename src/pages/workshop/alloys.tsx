/** The alloy register: the workshop's alloys, per thousand of each precious metal, with their source. */
import type { AlloyRow } from '../../../shared/schemas/registers.ts';
import { Page, Section } from '../../components/ui/page.tsx';
import type { Column } from '../../components/ui/register-table.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { WeightField } from '../../components/ui/weight-field.tsx';
import { orNull, typedFigure } from '../../forms/typed.ts';
import { useAlloys } from '../../queries/registers.ts';
import { useSession } from '../../queries/session.ts';
import { EventFields } from './event-fields.tsx';
import { WorkshopNav } from './workshop-nav.tsx';

const figure = (value: string) => (value === '0' ? <span className="none">none</span> : value);

const COLUMNS: readonly Column<AlloyRow>[] = [
  { id: 'name', head: 'Alloy', value: (row) => row.name, cell: (row) => <b>{row.name}</b> },
  {
    id: 'gold_permille',
    head: 'Gold',
    figure: 'plain',
    value: (row) => row.gold_permille,
    cell: (row) => figure(row.gold_permille),
  },
  {
    id: 'silver_permille',
    head: 'Silver',
    figure: 'plain',
    value: (row) => row.silver_permille,
    cell: (row) => figure(row.silver_permille),
  },
  {
    id: 'platinum_permille',
    head: 'Platinum',
    figure: 'plain',
    value: (row) => row.platinum_permille,
    cell: (row) => figure(row.platinum_permille),
  },
  {
    id: 'palladium_permille',
    head: 'Palladium',
    figure: 'plain',
    value: (row) => row.palladium_permille,
    cell: (row) => figure(row.palladium_permille),
  },
  {
    id: 'colour',
    head: 'Colour',
    value: (row) => row.colour ?? '',
    cell: (row) => row.colour ?? <span className="none">none</span>,
  },
  {
    id: 'source',
    head: 'Source',
    value: (row) => row.source ?? '',
    cell: (row) => row.source ?? 'the workshop’s own',
  },
];

const METALS = ['gold', 'silver', 'platinum', 'palladium'] as const;
const or0 = (text: string) => (text.trim() === '' ? '0' : typedFigure(text));

export function Alloys() {
  const session = useSession();
  const alloys = useAlloys();
  return (
    <Page title="Alloys" lede="Parts per thousand of each precious metal." nav={<WorkshopNav />}>
      <Section heading="Register" notes={<p>What is left to 1000 is base metal.</p>}>
        <RegisterTable
          caption="Alloys"
          columns={COLUMNS}
          rows={alloys}
          rowKey={(row) => row.id}
          csv="alloys"
          empty="No alloy is entered yet."
        />
      </Section>
      {session.can('alloy.set') ? (
        <Section heading="Enter an alloy">
          <EventFields
            event="set-alloy"
            name="set-alloy"
            act="Enter the alloy"
            initial={{ name: '', colour: '', source: '', gold: '', silver: '', platinum: '', palladium: '' }}
            toBody={(values) => ({
              name: values.name,
              colour: orNull(values.colour),
              source: orNull(values.source),
              gold_permille: or0(values.gold),
              silver_permille: or0(values.silver),
              platinum_permille: or0(values.platinum),
              palladium_permille: or0(values.palladium),
            })}
          >
            {({ values, set, errorOf }) => (
              <>
                <TextField
                  label="Name"
                  hint="“750 yellow”"
                  value={values.name}
                  onChange={(name) => set({ name })}
                  error={errorOf('name')}
                />
                {METALS.map((metal) => (
                  <WeightField
                    key={metal}
                    label={`${metal.charAt(0).toUpperCase()}${metal.slice(1)}`}
                    unit="per 1000"
                    value={values[metal]}
                    onChange={(text) => set({ [metal]: text })}
                    error={errorOf(`${metal}_permille`)}
                  />
                ))}
                <TextField
                  label="Colour"
                  value={values.colour}
                  onChange={(colour) => set({ colour })}
                  error={errorOf('colour')}
                />
                <TextField
                  label="Source"
                  hint="Empty where it is the workshop’s own."
                  value={values.source}
                  onChange={(source) => set({ source })}
                  error={errorOf('source')}
                />
              </>
            )}
          </EventFields>
        </Section>
      ) : null}
    </Page>
  );
}
