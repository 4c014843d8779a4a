/** The paper slip of a handover: what, from whom, for which job; "I have it", or "Weight differs" with a weighing. */
import { useState } from 'react';
import type { HandoverRow } from '../../../shared/schemas/today.ts';
import { HandoverSlip } from '../../components/domain/handover-slip.tsx';
import { Button } from '../../components/ui/button.tsx';
import { ErrorSummary } from '../../components/ui/error-summary.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { useToast } from '../../components/ui/toast.tsx';
import { WeightField } from '../../components/ui/weight-field.tsx';
import { noWeighing, orNull, typedWeighing } from '../../forms/typed.ts';
import { useEventForm } from '../../forms/use-event-form.ts';
import { numberText } from '../../lib/formats.ts';

export function TakeOverSlip({ handover }: { readonly handover: HandoverRow }) {
  const [differs, setDiffers] = useState(false);
  const show = useToast();
  const form = useEventForm({
    event: 'acknowledge',
    name: `acknowledge-${handover.voucher_id}`,
    initial: {},
    toBody: () => ({ voucher_id: handover.voucher_id, how: 'session' }),
    onPosted: (answer) =>
      show({
        words: `Voucher ${numberText(answer.records.at(-1)?.sequence ?? '')}: you have taken it over.`,
        to: null,
      }),
    preview: false,
  });
  return (
    <HandoverSlip handover={handover} links={false}>
      <ErrorSummary errors={form.errors} shown={form.tried} />
      {handover.state === 'disputed' ? (
        <p>The counter weighs it again before both of you.</p>
      ) : differs ? (
        <Dispute handover={handover} onKeep={() => setDiffers(false)} />
      ) : (
        <div className="slip-acts">
          <Button counter onPress={() => setDiffers(true)}>
            Weight differs
          </Button>
          <Button
            counter
            kind="primary"
            icon="check"
            busy={form.busy ? 'Posting …' : false}
            onPress={() => void form.submit()}
          >
            I have it
          </Button>
        </div>
      )}
    </HandoverSlip>
  );
}

function Dispute({ handover, onKeep }: { readonly handover: HandoverRow; readonly onKeep: () => void }) {
  const form = useEventForm({
    event: 'dispute-handover',
    name: `dispute-${handover.voucher_id}`,
    initial: { gross: '', note: '' },
    toBody: ({ gross, note }) => ({
      voucher_id: handover.voucher_id,
      how: 'session',
      weighing: typedWeighing({ ...noWeighing, gross }, 'weighing'),
      note: orNull(note),
    }),
    onPosted: onKeep,
    preview: false,
  });
  return (
    <div className="grid gap-3">
      <ErrorSummary errors={form.errors} shown={form.tried} />
      <WeightField
        label="What your balance shows, all of it"
        value={form.values.gross}
        onChange={(gross) => form.set({ gross })}
        error={form.errorOf('weighing.gross_g')}
      />
      <TextField
        label="Remark"
        value={form.values.note}
        onChange={(note) => form.set({ note })}
        error={form.errorOf('note')}
      />
      <div className="flex flex-wrap gap-2">
        <Button counter onPress={onKeep}>
          Weigh again first
        </Button>
        <Button
          counter
          kind="danger"
          busy={form.busy ? 'Posting …' : false}
          onPress={() => void form.submit()}
        >
          Dispute the weight
        </Button>
      </div>
    </div>
  );
}
