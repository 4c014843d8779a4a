/** Issuing metal to a bench, station or outworker, for a job; the receiver acknowledges it afterwards. */
import { useSearchParams } from 'react-router-dom';
import { PIECE_FORMS } from '../../../shared/book/lot.ts';
import type { Facts } from '../../../shared/book/facts.ts';
import { heldOf } from '../../../shared/book/holding.ts';
import type { AccountRow, JobRow } from '../../../shared/schemas/registers.ts';
import { DraftPreview, namesOf } from '../../components/domain/draft-preview.tsx';
import { ErrorSummary } from '../../components/ui/error-summary.tsx';
import { Figure, LabelledFigure } from '../../components/ui/figure.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { orNull } from '../../forms/typed.ts';
import type { EventForm } from '../../forms/use-event-form.ts';
import { useEventForm } from '../../forms/use-event-form.ts';
import { ugFigure } from '../../lib/formats.ts';
import { useFacts } from '../../queries/facts.ts';
import { useAccounts, useJobs } from '../../queries/registers.ts';
import { useToday } from '../../queries/today.ts';
import { useWrite } from '../../queries/writes.ts';
import type { TypedAmount } from '../../components/domain/amount.tsx';
import { AmountFields, noAmount, typedAmount } from '../../components/domain/amount.tsx';
import { lotOptions } from '../../components/domain/lot-options.ts';
import { onlyPlace, placeOptions } from '../../components/domain/places.ts';
import { PostBar } from '../../components/domain/post-bar.tsx';
import { usePosted } from '../../components/domain/use-posted.ts';

interface IssueValues {
  readonly from_id: string;
  readonly to_id: string;
  readonly lot_id: string;
  readonly job_id: string;
  readonly operation: string;
  readonly amount: TypedAmount;
}

export function Issue() {
  const [query] = useSearchParams();
  const accounts = useAccounts();
  const jobs = useJobs();
  const { requests } = useToday();
  const request = requests.find((row) => row.id === query.get('request'));
  const posted = usePosted();
  const { write } = useWrite();
  const form = useEventForm<IssueValues>({
    event: 'issue',
    name: request === undefined ? 'issue' : `issue-${request.id}`,
    initial: {
      from_id: onlyPlace(accounts, 'safe'),
      to_id: request?.place_id ?? '',
      lot_id: query.get('lot') ?? '',
      job_id: request?.job_id ?? '',
      operation: 'sheet_work',
      amount: noAmount,
    },
    toBody: (values) => ({
      from_id: values.from_id,
      to_id: values.to_id,
      lot_id: values.lot_id,
      job_id: orNull(values.job_id),
      operation: values.operation,
      amount: typedAmount(values.amount, 'amount'),
    }),
    onPosted: (answer) => {
      posted(answer);
      const voucher = answer.records.at(-1);
      if (request !== undefined && voucher !== undefined)
        void write('POST', `/metal-requests/${request.id}/answer`, { voucher_id: voucher.id });
    },
  });
  const { values, set, errorOf } = form;
  const facts = useFacts({ place_ids: values.from_id === '' ? [] : [values.from_id] });
  const lot = facts.lots.get(values.lot_id);
  const held = lot === undefined ? null : heldOf(facts.holdings, values.from_id, lot.id);
  return (
    <>
      <Page
        title="Issue"
        lede={
          request === undefined
            ? 'From the safe to a bench, a station or an outworker.'
            : `${request.person_name} asks for ${request.mass_g} g of ${request.alloy ?? 'metal'}.`
        }
        margin="Counter"
      >
        <Section
          heading="What goes out"
          notes={<p>The receiver acknowledges it; until then whoever issues it answers for it.</p>}
        >
          <ErrorSummary errors={form.errors} shown={form.tried} />
          <IssueFields form={form} facts={facts} accounts={accounts} jobs={jobs} />
          <div className="mt-5">
            <AmountFields
              value={values.amount}
              onChange={(amount) => set({ amount })}
              field="amount"
              errorOf={errorOf}
              counted={PIECE_FORMS.some((counted) => counted === lot?.form)}
            />
          </div>
        </Section>
        <Section heading="Reckoning">
          {held === null ? null : (
            <div className="figures mb-4">
              <LabelledFigure
                label={`In the safe of ${lot?.code ?? ''}`}
                under={`gross ${ugFigure(held.mass.gross)} g`}
              >
                <Figure
                  text={ugFigure(held.mass.gold > 0n ? held.mass.gold : held.mass.silver)}
                  unit="g fine"
                />
              </LabelledFigure>
            </div>
          )}
          {form.records === null ? (
            <p className="none">What will be posted shows here as soon as the weight is in.</p>
          ) : (
            <DraftPreview
              records={form.records}
              names={namesOf({ accounts: facts.accounts, lots: facts.lots }, form.records)}
            />
          )}
        </Section>
      </Page>
      <PostBar form={form} act="Post the issue" />
    </>
  );
}

interface IssueFieldsProps {
  readonly form: EventForm<IssueValues>;
  readonly facts: Facts;
  readonly accounts: readonly AccountRow[];
  readonly jobs: readonly JobRow[];
}

/** From where, what, to whom, for what. */
function IssueFields({ form: { values, set, errorOf }, facts, accounts, jobs }: IssueFieldsProps) {
  return (
    <div className="fields">
      <SelectField
        label="From"
        none="Choose a safe"
        value={values.from_id}
        onChange={(from_id) => set({ from_id })}
        options={placeOptions(accounts, ['safe'])}
        error={errorOf('from_id')}
      />
      <SelectField
        label="Lot"
        none="Choose a lot"
        value={values.lot_id}
        onChange={(lot_id) => set({ lot_id })}
        options={lotOptions(facts, values.from_id)}
        error={errorOf('lot_id')}
      />
      <SelectField
        label="To"
        none="Choose who takes it"
        value={values.to_id}
        onChange={(to_id) => set({ to_id })}
        options={placeOptions(accounts, ['bench', 'station', 'outworker'])}
        error={errorOf('to_id')}
      />
      <SelectField
        label="Operation"
        value={values.operation}
        onChange={(operation) => set({ operation })}
        options={accounts
          .filter((account) => account.operation !== null)
          .map((account) => ({ value: account.operation ?? '', label: account.name }))}
        error={errorOf('operation')}
      />
      <SelectField
        label="Job"
        none="None: stock work or repairs"
        value={values.job_id}
        onChange={(job_id) => set({ job_id })}
        options={jobs.map(({ id, code, title }) => ({ value: id, label: `${code} ${title}` }))}
        error={errorOf('job_id')}
      />
    </div>
  );
}
