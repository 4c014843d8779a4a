/** A handover at the counter: the receiver types the PIN beside the figures; a dispute is settled by a second weighing. */
import { useState } from 'react';
import { useParams } from 'react-router-dom';
import { paths } from '../../app/paths.ts';
import { HandoverSlip } from '../../components/domain/handover-slip.tsx';
import { Button } from '../../components/ui/button.tsx';
import { ErrorSummary } from '../../components/ui/error-summary.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import type { TypedWeighing } from '../../forms/typed.ts';
import { noWeighing, typedWeighing } from '../../forms/typed.ts';
import { useEventForm } from '../../forms/use-event-form.ts';
import { useToday } from '../../queries/today.ts';
import type { HandoverRow } from '../../../shared/schemas/today.ts';
import { usePosted } from '../../components/domain/use-posted.ts';
import { WeighingFields } from '../../components/domain/weighing-fields.tsx';

export function Handover() {
  const { id = '' } = useParams();
  const handover = useToday().handovers.find((row) => row.voucher_id === id);
  if (handover === undefined)
    return <Page title="Handover" lede="Nothing of that voucher waits to be taken over." />;
  return <Waiting handover={handover} />;
}

function Waiting({ handover }: { readonly handover: HandoverRow }) {
  return (
    <Page title="Handover" lede={`${handover.from_name} to ${handover.to_name}`} margin="Counter">
      <Section
        heading={handover.state === 'disputed' ? 'Settle the dispute' : 'Take it over'}
        notes={<p>Both see the same figures. Until it is acknowledged, the giver answers for it.</p>}
      >
        <HandoverSlip handover={handover} links>
          {handover.state === 'waiting' ? <TakeOver handover={handover} /> : <Settle handover={handover} />}
        </HandoverSlip>
      </Section>
    </Page>
  );
}

function TakeOver({ handover }: { readonly handover: HandoverRow }) {
  const posted = usePosted(paths.today);
  const [pin, setPin] = useState('');
  const form = useEventForm({
    event: 'acknowledge',
    name: `acknowledge-${handover.voucher_id}`,
    initial: {},
    toBody: () => ({ voucher_id: handover.voucher_id, how: 'pin', pin }),
    onPosted: posted,
  });
  return (
    <form
      className="grid max-w-md gap-4"
      onSubmit={(event) => {
        event.preventDefault();
        void form.submit();
      }}
    >
      <ErrorSummary errors={form.errors} shown={form.tried} />
      <TextField
        label={`PIN of ${handover.to_name}`}
        type="password"
        inputMode="numeric"
        autoComplete="one-time-code"
        value={pin}
        onChange={setPin}
        error={form.errorOf('pin')}
      />
      <Button kind="primary" counter submit busy={form.busy ? 'Posting …' : false}>
        I have it
      </Button>
    </form>
  );
}

function Settle({ handover }: { readonly handover: HandoverRow }) {
  const posted = usePosted(paths.today);
  const [pin, setPin] = useState('');
  const form = useEventForm<{ readonly weighings: readonly TypedWeighing[] }>({
    event: 'settle-dispute',
    name: `settle-${handover.voucher_id}`,
    initial: { weighings: handover.lots.map(() => noWeighing) },
    toBody: ({ weighings }) => ({
      voucher_id: handover.voucher_id,
      how: 'pin',
      pin,
      lines: handover.lots.map((lot, index) => ({
        lot_id: lot.id,
        weighing: typedWeighing(weighings[index] ?? noWeighing, `lines.${index}.weighing`),
      })),
    }),
    onPosted: posted,
  });
  return (
    <div className="grid gap-4">
      <ErrorSummary errors={form.errors} shown={form.tried} />
      {handover.lots.map((lot, index) => (
        <div key={lot.id} className="fields">
          <b>Second weighing of {lot.code}</b>
          <WeighingFields
            value={form.values.weighings[index] ?? noWeighing}
            onChange={(weighing) =>
              form.set({ weighings: form.values.weighings.map((one, at) => (at === index ? weighing : one)) })
            }
            errorOf={(name) => form.errorOf(`lines.${index}.weighing.${name}`)}
          />
        </div>
      ))}
      <TextField
        label={`PIN of ${handover.to_name}`}
        type="password"
        inputMode="numeric"
        autoComplete="one-time-code"
        value={pin}
        onChange={setPin}
        error={form.errorOf('pin')}
      />
      <Button
        kind="primary"
        counter
        busy={form.busy ? 'Posting …' : false}
        onPress={() => void form.submit()}
      >
        Settle at this weight
      </Button>
    </div>
  );
}
