/** Metal prices by hand: per troy ounce, with date and source. A value always names them. */
import { METALS } from '../../../shared/mass/vector.ts';
import type { PriceRow } from '../../../shared/schemas/registers.ts';
import { MetalKey, metalName } from '../../components/ui/metal-key.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import type { Column } from '../../components/ui/register-table.tsx';
import { RegisterTable } from '../../components/ui/register-table.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { WeightField } from '../../components/ui/weight-field.tsx';
import { typedFigure } from '../../forms/typed.ts';
import { dayText, moneyText } from '../../lib/formats.ts';
import { usePrices } from '../../queries/registers.ts';
import { useSession } from '../../queries/session.ts';
import { EventFields } from './event-fields.tsx';
import { WorkshopNav } from './workshop-nav.tsx';

const COLUMNS: readonly Column<PriceRow>[] = [
  { id: 'metal', head: 'Metal', value: (row) => row.metal, cell: (row) => <MetalKey metal={row.metal} /> },
  {
    id: 'price_per_ozt',
    head: 'Per troy ounce',
    figure: 'fine',
    value: (row) => row.price_per_ozt,
    cell: (row) => moneyText(row.price_per_ozt, row.currency, true),
  },
  { id: 'priced_on', head: 'Of', value: (row) => row.priced_on, cell: (row) => dayText(row.priced_on) },
  { id: 'source', head: 'Source', value: (row) => row.source, cell: (row) => row.source },
];

export function Prices() {
  const session = useSession();
  const prices = usePrices();
  return (
    <Page title="Prices" lede={`In ${session.workshop.currency}, per troy ounce.`} nav={<WorkshopNav />}>
      {session.can('price.set') ? (
        <Section
          heading="Enter a day’s prices"
          notes={<p>Leave a metal empty where you have no price for it.</p>}
        >
          <EventFields
            event="set-price"
            name="set-price"
            act="Enter the prices"
            initial={{
              gold: '',
              silver: '',
              platinum: '',
              palladium: '',
              priced_on: session.today,
              source: '',
            }}
            toBody={(values) => ({
              priced_on: values.priced_on,
              source: values.source,
              prices: METALS.filter((metal) => values[metal].trim() !== '').map((metal) => ({
                metal,
                price_per_ozt: typedFigure(values[metal]),
              })),
            })}
          >
            {({ values, set, errorOf }) => (
              <>
                {METALS.map((metal) => (
                  <WeightField
                    key={metal}
                    label={metalName(metal)}
                    unit={`${session.workshop.currency} per ozt`}
                    value={values[metal]}
                    onChange={(text) => set({ [metal]: text })}
                  />
                ))}
                <TextField
                  label="Of"
                  type="date"
                  value={values.priced_on}
                  onChange={(priced_on) => set({ priced_on })}
                  error={errorOf('priced_on')}
                />
                <TextField
                  label="Source"
                  hint="Where you read it."
                  value={values.source}
                  onChange={(source) => set({ source })}
                  error={errorOf('source')}
                />
              </>
            )}
          </EventFields>
        </Section>
      ) : null}
      <Section heading="Prices so far" notes={<p>Newest first.</p>}>
        <RegisterTable
          caption="Prices"
          columns={COLUMNS}
          rows={prices}
          rowKey={(row) => row.id}
          csv="prices"
          empty="No price is entered yet, so nothing can be valued."
        />
      </Section>
    </Page>
  );
}
