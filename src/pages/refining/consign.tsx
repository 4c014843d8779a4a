/** Consigning: lots are chosen and packed under seals, and handed to a courier for a refiner or another place outside. */
import { DraftPreview, namesOf } from '../../components/domain/draft-preview.tsx';
import type { TypedAmount } from '../../components/domain/amount.tsx';
import { typedAmount } from '../../components/domain/amount.tsx';
import { onlyPlace, placeOptions } from '../../components/domain/places.ts';
import { PostBar } from '../../components/domain/post-bar.tsx';
import { usePosted } from '../../components/domain/use-posted.ts';
import { ErrorSummary } from '../../components/ui/error-summary.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { WeightField } from '../../components/ui/weight-field.tsx';
import { orNull, typedFigure } from '../../forms/typed.ts';
import type { EventForm } from '../../forms/use-event-form.ts';
import { useEventForm } from '../../forms/use-event-form.ts';
import { useFacts } from '../../queries/facts.ts';
import { useAccounts } from '../../queries/registers.ts';
import { useSession } from '../../queries/session.ts';
import { paths } from '../../app/paths.ts';
import { ConsignLots } from './consign-lots.tsx';
import { RefiningNav } from './nav.tsx';
import { Packages } from './packages.tsx';

export interface ConsignValues {
  readonly code: string;
  readonly from_id: string;
  readonly courier_id: string;
  readonly destination_id: string;
  readonly lines: readonly { readonly lot_id: string; readonly amount: TypedAmount }[];
  readonly packages: readonly { readonly seal: string; readonly content: string }[];
  readonly declared_value: string;
}

const bodyOf = (values: ConsignValues) => ({
  code: values.code,
  from_id: values.from_id,
  courier_id: values.courier_id,
  destination_id: values.destination_id,
  lines: values.lines.map((line, at) => ({
    lot_id: line.lot_id,
    amount: typedAmount(line.amount, `lines.${at}.amount`),
  })),
  packages: values.packages,
  declared_value: orNull(typedFigure(values.declared_value)),
});

export function ConsignPage() {
  const accounts = useAccounts();
  const posted = usePosted(paths.refining);
  const form = useEventForm<ConsignValues>({
    event: 'consign',
    name: 'consign',
    initial: {
      code: '',
      from_id: onlyPlace(accounts, 'safe'),
      courier_id: onlyPlace(accounts, 'courier'),
      destination_id: onlyPlace(accounts, 'refiner'),
      lines: [],
      packages: [{ seal: '', content: '' }],
      declared_value: '',
    },
    toBody: bodyOf,
    onPosted: posted,
  });
  const { values, set, errorOf } = form;
  const facts = useFacts({ place_ids: values.from_id === '' ? [] : [values.from_id] });
  return (
    <>
      <Page
        title="Consign"
        lede="Packed and sealed lots leave with a courier."
        nav={<RefiningNav />}
        margin={<p>Until its arrival is confirmed, the metal stands with the courier.</p>}
      >
        <Section heading="Where it goes">
          <ErrorSummary errors={form.errors} shown={form.tried} />
          <Way form={form} />
        </Section>
        <Section heading="Lots" notes={<p>Sweeps, polishings, filings and sludge go whole.</p>}>
          <ConsignLots
            facts={facts}
            place_id={values.from_id}
            lines={values.lines}
            onChange={(lines) => set({ lines })}
            errorOf={errorOf}
          />
        </Section>
        <Section heading="Packages" notes={<p>Each carries a numbered seal; the refiner reads it back.</p>}>
          <Packages rows={values.packages} onChange={(packages) => set({ packages })} errorOf={errorOf} />
        </Section>
        <Section heading="What is posted">
          {form.records === null ? (
            <p className="none">What will be posted shows here as soon as the lots and seals are in.</p>
          ) : (
            <DraftPreview records={form.records} names={namesOf(facts, form.records)} />
          )}
        </Section>
      </Page>
      <PostBar form={form} act="Post the consignment" />
    </>
  );
}

function Way({ form }: { readonly form: EventForm<ConsignValues> }) {
  const accounts = useAccounts();
  const { workshop } = useSession();
  const { values, set, errorOf } = form;
  return (
    <div className="fields">
      <TextField
        label="Number of the consignment"
        hint="The workshop’s own, such as C-0031"
        value={values.code}
        onChange={(code) => set({ code })}
        error={errorOf('code')}
      />
      <SelectField
        label="Out of"
        none="Choose a safe or bin"
        value={values.from_id}
        onChange={(from_id) => set({ from_id, lines: [] })}
        options={placeOptions(accounts, ['safe', 'bin'])}
        error={errorOf('from_id')}
      />
      <SelectField
        label="Courier"
        none="Choose a courier"
        value={values.courier_id}
        onChange={(courier_id) => set({ courier_id })}
        options={placeOptions(accounts, ['courier'])}
        error={errorOf('courier_id')}
      />
      <SelectField
        label="To"
        none="Choose a place outside"
        value={values.destination_id}
        onChange={(destination_id) => set({ destination_id })}
        options={placeOptions(accounts, ['refiner', 'outworker', 'approval'])}
        error={errorOf('destination_id')}
      />
      <WeightField
        label="Declared value"
        hint="As it stands on the courier’s paper"
        unit={workshop.currency}
        value={values.declared_value}
        onChange={(declared_value) => set({ declared_value })}
        error={errorOf('declared_value')}
      />
    </div>
  );
}
