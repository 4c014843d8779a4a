/** One of the acts that take lots from a place: where from, which lots and how much, where to; previewed and posted. */
import { useParams } from 'react-router-dom';
import type { AccountRow } from '../../../shared/schemas/registers.ts';
import { ErrorSummary } from '../../components/ui/error-summary.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { DraftPreview, namesOf } from '../../components/domain/draft-preview.tsx';
import type { EventForm } from '../../forms/use-event-form.ts';
import { useEventForm } from '../../forms/use-event-form.ts';
import { useFacts } from '../../queries/facts.ts';
import { useAccounts, useJobs, useParties } from '../../queries/registers.ts';
import type { MoveDefinition, MoveValues } from './moves.ts';
import { MOVES } from './moves.ts';
import { LotLines } from './parts/lot-lines.tsx';
import { onlyPlace, placeOptions } from '../../components/domain/places.ts';
import { PostBar } from '../../components/domain/post-bar.tsx';
import { usePosted } from '../../components/domain/use-posted.ts';

export function Move() {
  const { what = '' } = useParams();
  const move = MOVES[what];
  if (move === undefined)
    return <Page title="Not found" lede="There is no such act. Go back to the counter." />;
  return <MoveForm key={what} name={what} move={move} />;
}

function MoveForm({ name, move }: { readonly name: string; readonly move: MoveDefinition }) {
  const accounts = useAccounts();
  const posted = usePosted();
  const form = useEventForm<MoveValues>({
    event: move.event,
    name: `move-${name}`,
    initial: {
      from_id: onlyPlace(accounts, 'safe'),
      to_id: '',
      party_id: '',
      job_id: '',
      operation: '',
      choice: move.choice?.options[0]?.value ?? '',
      reference: '',
      note: '',
      lots: [],
    },
    toBody: move.body,
    onPosted: posted,
  });
  const { values, set, errorOf } = form;
  const facts = useFacts({ place_ids: placesToRead(values, accounts) });
  return (
    <>
      <Page title={move.title} lede={move.words} margin="Counter">
        <Section heading="What moves">
          <ErrorSummary errors={form.errors} shown={form.tried} />
          <MoveFields form={form} move={move} accounts={accounts} />
          <LotLines
            facts={facts}
            place_id={lotsAt(values, accounts)}
            lines={values.lots}
            onChange={(lots) => set({ lots })}
            errorOf={errorOf}
            stated={move.stated}
            single={['use-up', 'ownership', 'return-to-owner'].includes(move.event)}
          />
          <div className="mt-4">
            <TextField
              label="Remark"
              lines={2}
              value={values.note}
              onChange={(note) => set({ note })}
              error={errorOf('note')}
            />
          </div>
        </Section>
        <Section heading="What will be posted">
          {form.records === null ? (
            <p className="none">Nothing yet. Choose a lot and say how much.</p>
          ) : (
            <DraftPreview records={form.records} names={namesOf(facts, form.records)} />
          )}
        </Section>
      </Page>
      <PostBar form={form} act={move.act} />
    </>
  );
}

interface MoveFieldsProps {
  readonly form: EventForm<MoveValues>;
  readonly move: MoveDefinition;
  readonly accounts: readonly AccountRow[];
}

/** Where from, where to, whose, what for: as much of it as the act asks. */
function MoveFields({ form, move, accounts }: MoveFieldsProps) {
  const { values, set, errorOf } = form;
  return (
    <div className="fields">
      <SelectField
        label={
          values.choice === 'back_from_approval' || values.choice === 'returned' ? 'Comes back to' : 'From'
        }
        none="Choose a place"
        value={values.from_id}
        onChange={(from_id) => set({ from_id, lots: [] })}
        options={placeOptions(accounts, move.from)}
        error={errorOf('from_id') ?? errorOf('place_id')}
      />
      {move.to.length === 0 ? null : (
        <SelectField
          label="To"
          none="Choose a place"
          value={values.to_id}
          onChange={(to_id) => set({ to_id })}
          options={placeOptions(accounts, move.to)}
          error={errorOf('to_id')}
        />
      )}
      <MoveParty form={form} move={move} />
      <MoveReasons form={form} move={move} accounts={accounts} />
    </div>
  );
}

function MoveParty({ form: { values, set, errorOf }, move }: Pick<MoveFieldsProps, 'form' | 'move'>) {
  const parties = useParties();
  if (move.party === null) return null;
  const shown = parties.filter((party) =>
    move.party === 'customer'
      ? party.kind === 'customer'
      : party.kind === 'customer' || party.kind === 'supplier',
  );
  return (
    <SelectField
      label={move.party === 'customer' ? 'Customer' : 'New owner'}
      none={move.party === 'customer' ? 'Choose a customer' : 'The house'}
      value={values.party_id}
      onChange={(party_id) => set({ party_id })}
      options={shown.map(({ id, name: label }) => ({ value: id, label }))}
      error={errorOf('party_id') ?? errorOf('new_owner_id')}
    />
  );
}

function MoveReasons({ form: { values, set, errorOf }, move, accounts }: MoveFieldsProps) {
  const jobs = useJobs();
  const operations = accounts.filter((account) => account.operation !== null);
  return (
    <>
      {move.choice === null ? null : (
        <SelectField
          label={move.choice.label}
          value={values.choice}
          onChange={(choice) => set({ choice, lots: [] })}
          options={move.choice.options}
          error={errorOf('what_for') ?? errorOf('cause')}
        />
      )}
      <SelectField
        label="Job"
        hint="Where it lies at a bench for a job."
        none="None: stock work"
        value={values.job_id}
        onChange={(job_id) => set({ job_id })}
        options={jobs.map(({ id, code, title }) => ({ value: id, label: `${code} ${title}` }))}
        error={errorOf('job_id')}
      />
      {move.event === 'transfer' ? (
        <SelectField
          label="Operation"
          hint="Where work is handed on."
          none="None"
          value={values.operation}
          onChange={(operation) => set({ operation })}
          options={operations.map((account) => ({
            value: account.operation ?? '',
            label: account.name,
          }))}
          error={errorOf('operation')}
        />
      ) : null}
      {move.reference === null ? null : (
        <TextField
          label={move.reference}
          value={values.reference}
          onChange={(reference) => set({ reference })}
          error={errorOf('reference') ?? errorOf('what_for')}
        />
      )}
    </>
  );
}

/** Lots that come back lie with the customer on approval; all others at the place itself. */
function lotsAt(values: MoveValues, accounts: ReturnType<typeof useAccounts>): string {
  if (values.choice === 'back_from_approval')
    return (
      accounts.find((account) => account.kind === 'approval' && account.party_id === values.party_id)?.id ??
      ''
    );
  if (values.choice === 'returned') return accounts.find((account) => account.kind === 'sold')?.id ?? '';
  return values.from_id;
}

function placesToRead(values: MoveValues, accounts: ReturnType<typeof useAccounts>): readonly string[] {
  return [...new Set([values.from_id, lotsAt(values, accounts)])].filter((id) => id !== '');
}
