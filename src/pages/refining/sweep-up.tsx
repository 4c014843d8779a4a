/** Sweeping up a bin: the container is weighed, its content is estimated from the losses that fed it. */
import { useSearchParams } from 'react-router-dom';
import { DraftPreview, namesOf } from '../../components/domain/draft-preview.tsx';
import { onlyPlace, placeOptions } from '../../components/domain/places.ts';
import { PostBar } from '../../components/domain/post-bar.tsx';
import { usePosted } from '../../components/domain/use-posted.ts';
import { WeighingFields } from '../../components/domain/weighing-fields.tsx';
import { Choices } from '../../components/ui/choice.tsx';
import { ErrorSummary } from '../../components/ui/error-summary.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { noWeighing, orNull, typedWeighing } from '../../forms/typed.ts';
import { useEventForm } from '../../forms/use-event-form.ts';
import { useFacts } from '../../queries/facts.ts';
import { useAccounts } from '../../queries/registers.ts';
import { paths } from '../../app/paths.ts';
import { RefiningNav } from './nav.tsx';
import { SweepReckoning } from './sweep-reckoning.tsx';

const FORMS = [
  { value: 'sweeps', label: 'Sweeps', words: 'Floor and bench dust, paper, abrasives' },
  { value: 'polishings', label: 'Polishings', words: 'Filters and mops of the polishing station' },
  { value: 'sludge', label: 'Sludge', words: 'Settled out of the sink trap, dried' },
] as const;

export function SweepUpPage() {
  const [query] = useSearchParams();
  const accounts = useAccounts();
  const posted = usePosted(paths.refining);
  const form = useEventForm({
    event: 'sweep-up',
    name: 'sweep-up',
    initial: {
      bin_id: query.get('bin') ?? onlyPlace(accounts, 'bin'),
      to_id: '',
      form: 'sweeps',
      container: '',
      weighing: noWeighing,
    },
    toBody: (values) => ({
      bin_id: values.bin_id,
      to_id: orNull(values.to_id),
      form: values.form,
      container: values.container,
      weighing: typedWeighing(values.weighing, 'weighing'),
    }),
    onPosted: posted,
  });
  const { values, set, errorOf } = form;
  const facts = useFacts({
    bin_ids: values.bin_id === '' ? [] : [values.bin_id],
    account_ids: [values.bin_id, values.to_id].filter((id) => id !== ''),
  });
  return (
    <>
      <Page
        title="Sweep up"
        lede="A bin’s dust becomes a lot with an estimated content."
        nav={<RefiningNav />}
        margin={
          <p>The estimate is taken out of the loss accounts, and stays an estimate until the outturn.</p>
        }
        first={<Cautions />}
      >
        <Section
          heading="The container"
          notes={<p>Empty the bin wholly; what stays in it is not in the estimate.</p>}
        >
          <ErrorSummary errors={form.errors} shown={form.tried} />
          <Choices
            legend="What it is"
            value={FORMS.find(({ value }) => value === values.form)?.value ?? ''}
            onChange={(chosen) => set({ form: chosen })}
            choices={FORMS}
          />
          <div className="fields mt-5">
            <SelectField
              label="Bin"
              none="Choose a bin"
              value={values.bin_id}
              onChange={(bin_id) => set({ bin_id })}
              options={placeOptions(accounts, ['bin'])}
              error={errorOf('bin_id')}
            />
            <TextField
              label="Words on the container"
              hint="Such as: floor, drum 3"
              value={values.container}
              onChange={(container) => set({ container })}
              error={errorOf('container')}
            />
            <SelectField
              label="Stands from now on"
              none="At the bin"
              value={values.to_id}
              onChange={(to_id) => set({ to_id })}
              options={placeOptions(accounts, ['safe', 'bin'])}
              error={errorOf('to_id')}
            />
            <WeighingFields
              value={values.weighing}
              onChange={(weighing) => set({ weighing })}
              errorOf={(field) => errorOf(`weighing.${field}`)}
            />
          </div>
        </Section>
        <Section
          heading="What is in it"
          notes={<p>Loss since the last sweep-up × the bin’s rate, metal by metal.</p>}
        >
          <SweepReckoning facts={facts} bin_id={values.bin_id} weighing={values.weighing} />
        </Section>
        <Section heading="What is posted">
          {form.records === null ? (
            <p className="none">What will be posted shows here as soon as the weight is in.</p>
          ) : (
            <DraftPreview records={form.records} names={namesOf(facts, form.records)} />
          )}
        </Section>
      </Page>
      <PostBar form={form} act="Post the sweep-up" />
    </>
  );
}

/** Common practice, no source; what the place's own rules say comes first. */
function Cautions() {
  return (
    <div className="mt-4">
      <Notice severity="near" what="Dust and residues harm.">
        Damp the floor before sweeping and wear a filter mask. Spent acids and baths keep their own marked
        vessels and never go into a bin. The rules of your place on dust and chemicals come first.
      </Notice>
    </div>
  );
}
