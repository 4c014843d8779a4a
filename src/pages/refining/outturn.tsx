/** A refiner's statement: expected against found and credited, how it is paid, and two totals that agree. */
import { useNavigate, useParams } from 'react-router-dom';
import { Link } from 'react-router-dom';
import { PostBar } from '../../components/domain/post-bar.tsx';
import { usePosted } from '../../components/domain/use-posted.ts';
import { Empty } from '../../components/ui/empty.tsx';
import { ErrorSummary } from '../../components/ui/error-summary.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { SelectField } from '../../components/ui/select-field.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import type { EventForm } from '../../forms/use-event-form.ts';
import { useEventForm } from '../../forms/use-event-form.ts';
import { useAccounts } from '../../queries/registers.ts';
import { paths } from '../../app/paths.ts';
import { ConsignmentSteps } from './consignment-steps.tsx';
import { RefiningNav } from './nav.tsx';
import { OutturnCharges } from './outturn-charges.tsx';
import { OutturnIdentity } from './outturn-identity.tsx';
import { OutturnLines } from './outturn-lines.tsx';
import { OutturnPayments } from './outturn-payments.tsx';
import type { OutturnValues } from './outturn-values.ts';
import { noOutturn, outturnBody } from './outturn-values.ts';
import type { Consignment } from './use-consignment.ts';
import { readOutturn, useConsignment } from './use-consignment.ts';

export function OutturnPage() {
  const { id = '' } = useParams();
  const consignment = useConsignment(id);
  if (consignment === null || consignment.at_destination.length === 0)
    return (
      <Page
        title="Outturn"
        nav={<RefiningNav />}
        first={
          <Empty
            what="Nothing of that consignment waits for an outturn."
            words="Its arrival is confirmed first; after that the refiner’s statement settles what lies there."
            action={<Link to={paths.refining}>To sweeps and refining</Link>}
          />
        }
      />
    );
  return <OutturnForm consignment={consignment} />;
}

/** The refiner's own metal account, where there is one: what is credited goes onto it unless told otherwise. */
function useHouseAccount(consignment: Consignment): string {
  const party_id = consignment.destination?.party_id ?? null;
  const accounts = useAccounts().filter(({ kind, closed }) => kind === 'metal_account' && !closed);
  const own = accounts.find((account) => account.party_id === party_id) ?? accounts[0];
  return own?.id ?? '';
}

function OutturnForm({ consignment }: { readonly consignment: Consignment }) {
  const navigate = useNavigate();
  const posted = usePosted();
  const account_id = useHouseAccount(consignment);
  const form = useEventForm<OutturnValues>({
    event: 'outturn',
    name: `outturn-${consignment.id}`,
    initial: noOutturn,
    toBody: (values) => outturnBody(values, consignment, account_id),
    onPosted: (answer) => {
      posted(answer);
      void navigate(paths.consignment(consignment.id));
    },
  });
  const { values, set, errorOf } = form;
  const drafted = readOutturn(form.records?.at(-1)?.detail);
  return (
    <>
      <Page
        title="Outturn"
        lede={`consignment ${consignment.code}, ${consignment.destination?.name ?? ''}`}
        nav={<RefiningNav />}
        margin={<Sent consignment={consignment} />}
        first={<ConsignmentSteps consignment={consignment} now="credited" />}
      >
        <Section
          heading="The statement"
          notes={<p>What the refiner’s paper credits is posted, to its last figure.</p>}
        >
          <ErrorSummary errors={form.errors} shown={form.tried} />
          <Statement form={form} />
        </Section>
        <Section
          heading="Expected against outturn"
          notes={<p>For sweeps the difference goes back to the losses that the estimate came from.</p>}
        >
          <OutturnLines
            values={values}
            lots={consignment.at_destination}
            onChange={(lines) => set({ lines })}
            errorOf={errorOf}
          />
        </Section>
        <Section heading="Settlement" notes={<p>May be split: add a payment and give its mass.</p>}>
          <OutturnPayments form={form} account_id={account_id} />
        </Section>
        <Section
          heading="Charges"
          notes={
            <p>In money; recorded beside the voucher, not booked. Charges in metal stand with their lot.</p>
          }
        >
          <OutturnCharges
            charges={values.charges}
            onChange={(charges) => set({ charges })}
            errorOf={errorOf}
          />
        </Section>
        <Section
          heading="It adds up"
          notes={<p>Sent − credited = weighing difference + assay difference + deduction + charge.</p>}
        >
          <OutturnIdentity rows={drafted?.lines ?? null} lots={consignment.lots} />
        </Section>
      </Page>
      <PostBar form={form} act="Accept and post" />
    </>
  );
}

function Sent({ consignment }: { readonly consignment: Consignment }) {
  const seals = consignment.packages.map(({ seal }) => seal);
  return (
    <>
      <p>
        <Link to={paths.consignment(consignment.id)}>Consignment {consignment.code}</Link>
      </p>
      {seals.length === 0 ? null : (
        <p>
          {seals.length === 1 ? 'Seal' : 'Seals'} {seals.join(', ')}.
        </p>
      )}
    </>
  );
}

const STAGES = [
  { value: 'advance', label: 'Advance' },
  { value: 'settlement', label: 'Settlement' },
  { value: 'control_assay', label: 'Control assay' },
  { value: 'umpire', label: 'Umpire' },
] as const;

function Statement({ form }: { readonly form: EventForm<OutturnValues> }) {
  const { values, set, errorOf } = form;
  return (
    <div className="fields">
      <TextField
        label="Number of the statement"
        value={values.statement}
        onChange={(statement) => set({ statement })}
        error={errorOf('statement')}
      />
      <SelectField
        label="Stage"
        value={values.stage}
        onChange={(stage) => set({ stage })}
        options={STAGES}
        error={errorOf('stage')}
      />
      <TextField
        label="Business date"
        hint="Empty for today"
        type="date"
        value={values.business_date}
        onChange={(business_date) => set({ business_date })}
        error={errorOf('business_date')}
      />
    </div>
  );
}
