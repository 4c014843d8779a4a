/** Holding a lot and releasing it, with a reason; both are acts of the chain. */
import { useState } from 'react';
import type { LotWhole } from '../../../shared/schemas/lots.ts';
import { Button } from '../../components/ui/button.tsx';
import { Dialog } from '../../components/ui/dialog.tsx';
import { ErrorSummary } from '../../components/ui/error-summary.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { orNull } from '../../forms/typed.ts';
import { useEventForm } from '../../forms/use-event-form.ts';
import { dayText } from '../../lib/formats.ts';
import { useSession } from '../../queries/session.ts';

export function LotStanding({ lot }: { readonly lot: LotWhole }) {
  const session = useSession();
  const [open, setOpen] = useState(false);
  const held = lot.standing === 'on_hold';
  const form = useEventForm({
    event: held ? 'release' : 'hold',
    name: `${held ? 'release' : 'hold'}-${lot.id}`,
    initial: { reason: '', until: '' },
    toBody: ({ reason, until }) => ({ lot_id: lot.id, reason, ...(held ? {} : { until: orNull(until) }) }),
    onPosted: () => setOpen(false),
  });
  if (lot.standing === 'spent') return null;
  return (
    <div className="mt-4">
      {held ? (
        <Notice
          severity="waiting"
          what={`On hold: ${lot.hold_reason ?? 'no reason given'}.`}
          action={
            session.can('book.hold') ? (
              <Button onPress={() => setOpen(true)}>Release the lot</Button>
            ) : undefined
          }
        >
          {lot.hold_until === null
            ? 'It can’t be issued until it is released.'
            : `At least until ${dayText(lot.hold_until)}.`}
        </Notice>
      ) : session.can('book.hold') ? (
        <Button icon="hold" onPress={() => setOpen(true)}>
          Hold the lot
        </Button>
      ) : null}
      <Dialog
        title={held ? `Release ${lot.code}?` : `Hold ${lot.code}?`}
        open={open}
        keep="Keep it as it is"
        onClose={() => setOpen(false)}
        action={
          <Button kind="primary" busy={form.busy ? 'Posting …' : false} onPress={() => void form.submit()}>
            {held ? 'Release the lot' : 'Hold the lot'}
          </Button>
        }
      >
        <p>
          {held
            ? 'It can be issued again from then on. The reason stands in the book.'
            : 'It can’t be issued or sent out until somebody releases it.'}
        </p>
        <ErrorSummary errors={form.errors} shown={form.tried} />
        <TextField
          label="Reason"
          value={form.values.reason}
          onChange={(reason) => form.set({ reason })}
          error={form.errorOf('reason')}
        />
        {held ? null : (
          <TextField
            label="At least until"
            hint="May be left open."
            type="date"
            value={form.values.until}
            onChange={(until) => form.set({ until })}
            error={form.errorOf('until')}
          />
        )}
      </Dialog>
    </div>
  );
}
