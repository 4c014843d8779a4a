/** Limits and estimates: invoice tolerance, filings' share, weighing error, night limit, credit on metal accounts. */
import { METALS } from '../../../shared/mass/vector.ts';
import { Page, Section } from '../../components/ui/page.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { WeightField } from '../../components/ui/weight-field.tsx';
import { typedFigure, typedGrams } from '../../forms/typed.ts';
import { words } from '../../lib/formats.ts';
import { useAccounts, useSettings } from '../../queries/registers.ts';
import { useSession } from '../../queries/session.ts';
import { EventFields } from './event-fields.tsx';
import { SecondFactorRoles } from './second-factor-roles.tsx';
import { WorkshopNav } from './workshop-nav.tsx';

const SINGLE = [
  {
    what: 'invoice_tolerance',
    heading: 'Invoice tolerance',
    notes:
      'A difference to an invoice line that is accepted without a decision. 0.100 g until it is set (common practice, no source).',
    label: 'Tolerance',
    key: 'mass_g',
    unit: 'g',
  },
  {
    what: 'weighing',
    heading: 'Weighing error',
    notes: 'One weighing’s standard uncertainty where no balance is named. 0.001 g until it is set.',
    label: 'Standard uncertainty',
    key: 'mass_g',
    unit: 'g',
  },
  {
    what: 'filings',
    heading: 'Metal in filings',
    notes:
      'Share of filings’ weight that is metal of the blend; the rest is dirt. 985 until it is set (common practice, no source).',
    label: 'Share',
    key: 'metal_permille',
    unit: 'per 1000',
  },
  {
    what: 'night_limit',
    heading: 'Out of the safe at night',
    notes: 'What the insurer allows. The policy decides.',
    label: 'Most value',
    key: 'amount',
    unit: '',
  },
] as const;

export function Settings() {
  const session = useSession();
  const settings = useSettings();
  const accounts = useAccounts().filter((account) => account.kind === 'metal_account' && !account.closed);
  const nowOf = (name: string, key: string) => {
    const value = settings.find((row) => row.name === name)?.detail[key];
    return typeof value === 'string' ? value : 'not set';
  };
  const may = session.can('settings.set');
  return (
    <Page title="Limits and estimates" lede="Every change stands in the book." nav={<WorkshopNav />}>
      {may ? (
        <Section
          heading="Second factor"
          notes={
            <p>Who has the role does nothing here before a second factor is set up under “My account”.</p>
          }
        >
          <SecondFactorRoles />
        </Section>
      ) : null}
      {SINGLE.map(({ what, heading, notes, label, key, unit }) => (
        <Section key={what} heading={heading} notes={<p>{notes}</p>}>
          <p>
            Now: <b>{nowOf(what, key)}</b> {unit === '' ? session.workshop.currency : unit}
          </p>
          {may ? (
            <EventFields
              event="set-setting"
              name={`setting-${what}`}
              act="Set it"
              initial={{ value: '' }}
              toBody={({ value }) => ({
                what,
                [key]: unit === 'g' ? typedGrams(value, key) : typedFigure(value),
              })}
            >
              {({ values, set, errorOf }) => (
                <WeightField
                  label={label}
                  unit={unit === '' ? session.workshop.currency : unit}
                  value={values.value}
                  onChange={(value) => set({ value })}
                  error={errorOf(key)}
                />
              )}
            </EventFields>
          ) : null}
        </Section>
      ))}
      {may && accounts.length > 0 ? (
        <Section
          heading="Debt on a metal account"
          notes={<p>How much metal the house may owe there, by metal. Nothing until it is set.</p>}
        >
          <EventFields
            event="set-setting"
            name="setting-claim"
            act="Set the limit"
            initial={{ account_id: accounts[0]?.id ?? '', metal: 'gold', mass: '' }}
            toBody={({ account_id, metal, mass }) => ({
              what: 'claim',
              account_id,
              metal,
              mass_g: typedGrams(mass, 'mass_g'),
            })}
          >
            {({ values, set, errorOf }) => (
              <>
                <SelectField
                  label="Account"
                  value={values.account_id}
                  onChange={(account_id) => set({ account_id })}
                  options={accounts.map(({ id, name }) => ({ value: id, label: name }))}
                  error={errorOf('account_id')}
                />
                <SelectField
                  label="Metal"
                  value={values.metal}
                  onChange={(metal) => set({ metal })}
                  options={METALS.map((metal) => ({ value: metal, label: words(metal) }))}
                  error={errorOf('metal')}
                />
                <WeightField
                  label="Most debt"
                  value={values.mass}
                  onChange={(mass) => set({ mass })}
                  error={errorOf('mass_g')}
                />
              </>
            )}
          </EventFields>
        </Section>
      ) : null}
    </Page>
  );
}
