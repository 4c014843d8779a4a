/** Weighing back a bench: its job at the left as it went out, what came back at the right, the loss and its allowance. */
import { useSearchParams } from 'react-router-dom';
import type { VoucherDraft } from '../../../shared/book/draft.ts';
import type { Facts } from '../../../shared/book/facts.ts';
import type { AccountRow } from '../../../shared/schemas/registers.ts';
import { ErrorSummary } from '../../components/ui/error-summary.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { orNull } from '../../forms/typed.ts';
import type { EventForm } from '../../forms/use-event-form.ts';
import { useEventForm } from '../../forms/use-event-form.ts';
import { useFacts } from '../../queries/facts.ts';
import { useAccounts } from '../../queries/registers.ts';
import { onlyPlace, placeOptions } from '../../components/domain/places.ts';
import { PostBar } from '../../components/domain/post-bar.tsx';
import { usePosted } from '../../components/domain/use-posted.ts';
import { BackLines } from './parts/back-lines.tsx';
import type { BackLine } from './parts/back-line.ts';
import { workBody } from './parts/back-line.ts';
import { LossReckoning } from './parts/loss-reckoning.tsx';
import { OutLines, outOf } from './parts/out-lines.tsx';

interface WeighBackValues {
  readonly place_id: string;
  readonly safe_id: string;
  /** "none" for stock work. */
  readonly job: string;
  readonly operation: string;
  readonly lines: readonly BackLine[];
  readonly reason: string;
}

export function WeighBack() {
  const [query] = useSearchParams();
  const accounts = useAccounts();
  const posted = usePosted();
  // The PIN is never kept with the draft.
  const form = useEventForm<WeighBackValues>({
    event: 'weigh-back',
    name: 'weigh-back',
    initial: {
      place_id: query.get('place') ?? '',
      safe_id: onlyPlace(accounts, 'safe'),
      job: '',
      operation: 'sheet_work',
      lines: [],
      reason: '',
    },
    toBody: (values) => ({
      place_id: values.place_id,
      safe_id: values.safe_id,
      works: [
        {
          job_id: values.job === 'none' ? null : values.job,
          operation: values.operation,
          reason: orNull(values.reason),
          ...workBody(values.lines),
        },
      ],
    }),
    onPosted: posted,
  });
  const { values, set, errorOf } = form;
  const facts = useFacts({ place_ids: values.place_id === '' ? [] : [values.place_id] });
  const out = outOf(facts, values.place_id, values.job === '' ? null : values.job);
  const voucher =
    form.records?.findLast((record): record is VoucherDraft => record.kind === 'weigh_back') ?? null;
  return (
    <>
      <Page title="Weigh back" lede="Job by job; the loss is booked as it is." margin="Counter">
        <Section heading="Bench and job">
          <ErrorSummary errors={form.errors} shown={form.tried} />
          <WeighBackFields form={form} facts={facts} accounts={accounts} />
        </Section>
        {values.job === '' ? null : (
          <Section
            heading="Out and back"
            notes={
              <p>
                Stones are taken off in carats. Filings hold dirt: their metal is estimated by the workshop’s
                share.
              </p>
            }
          >
            <div className="account">
              <OutLines facts={facts} out={out} />
              <BackLines
                facts={facts}
                out={out}
                accounts={accounts}
                lines={values.lines}
                onChange={(lines) => set({ lines })}
                errorOf={errorOf}
                voucher={voucher}
              />
            </div>
          </Section>
        )}
        {voucher === null ? null : (
          <Section
            heading="Loss"
            notes={
              <p>Judged against the workshop’s own allowance for this operation, from the day it holds.</p>
            }
          >
            <LossReckoning voucher={voucher} facts={facts} />
          </Section>
        )}
        {form.tried &&
        form.errors.some((error) => error.field?.endsWith('made') || error.sentence.includes('More can')) ? (
          <Section heading="Why more came back">
            <TextField
              label="Reason"
              hint="A second person signs it."
              lines={2}
              value={values.reason}
              onChange={(reason) => set({ reason })}
              error={errorOf('works.0.reason')}
            />
          </Section>
        ) : null}
      </Page>
      <PostBar form={form} act="Post the weigh-back" />
    </>
  );
}

interface WeighBackFieldsProps {
  readonly form: EventForm<WeighBackValues>;
  readonly facts: Facts;
  readonly accounts: readonly AccountRow[];
}

/** Whose metal comes back, from which job and operation, and where it goes. */
function WeighBackFields({ form: { values, set, errorOf }, facts, accounts }: WeighBackFieldsProps) {
  const jobs = [...new Set(facts.job_holdings.filter((row) => row.mass.gross > 0n).map((row) => row.job_id))];
  return (
    <div className="fields">
      <SelectField
        label="Bench, station or outworker"
        none="Choose who weighs back"
        value={values.place_id}
        onChange={(place_id) => set({ place_id, job: '', lines: [] })}
        options={placeOptions(accounts, ['bench', 'station', 'outworker'])}
        error={errorOf('place_id')}
      />
      <SelectField
        label="Job"
        none={
          values.place_id === ''
            ? 'Choose the bench first'
            : jobs.length === 0
              ? 'It holds nothing'
              : 'Choose a job'
        }
        value={values.job}
        onChange={(job) => set({ job, lines: [] })}
        options={jobs.map((job) => ({
          value: job ?? 'none',
          label:
            job === null
              ? 'Stock work'
              : `${facts.jobs.get(job)?.code ?? ''} ${facts.jobs.get(job)?.title ?? ''}`,
        }))}
        error={errorOf('works.0.job_id')}
      />
      <SelectField
        label="Operation"
        value={values.operation}
        onChange={(operation) => set({ operation })}
        options={accounts
          .filter((account) => account.operation !== null)
          .map((account) => ({ value: account.operation ?? '', label: account.name }))}
        error={errorOf('works.0.operation')}
      />
      <SelectField
        label="Comes back into"
        none="Choose a safe"
        value={values.safe_id}
        onChange={(safe_id) => set({ safe_id })}
        options={placeOptions(accounts, ['safe'])}
        error={errorOf('safe_id')}
      />
    </div>
  );
}
