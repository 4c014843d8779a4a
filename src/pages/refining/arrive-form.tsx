/** Confirms that a consignment has arrived; what differs beyond the limit of error stays with the courier. */
import { LotChip } from '../../components/domain/lot-chip.tsx';
import { usePosted } from '../../components/domain/use-posted.ts';
import { Button } from '../../components/ui/button.tsx';
import { ErrorSummary } from '../../components/ui/error-summary.tsx';
import { WeightField } from '../../components/ui/weight-field.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { z } from '../../../shared/schemas/zod.ts';
import { typedGrams } from '../../forms/typed.ts';
import { useEventForm } from '../../forms/use-event-form.ts';
import { gramsFigure, ugFigure } from '../../lib/formats.ts';
import type { HeldLot } from './use-consignment.ts';

const arrivedLine = z.object({
  lot_id: z.string(),
  sent_g: z.string(),
  received_g: z.string(),
  limit_of_error_g: z.string(),
  finding: z.string(),
});
const arrivedLines = z.array(arrivedLine);

interface ArriveFormProps {
  readonly consign_id: string;
  readonly lots: readonly HeldLot[];
}

export function ArriveForm({ consign_id, lots }: ArriveFormProps) {
  const posted = usePosted();
  const initial: { received: Readonly<Record<string, string>> } = { received: {} };
  const form = useEventForm({
    event: 'arrive',
    name: `arrive-${consign_id}`,
    initial,
    toBody: ({ received }) => ({
      consign_id,
      lines: lots
        .filter(({ lot_id }) => (received[lot_id] ?? '').trim() !== '')
        .map(({ lot_id }, at) => ({
          lot_id,
          received_g: typedGrams(received[lot_id] ?? '', `lines.${at}.received_g`),
        })),
    }),
    onPosted: posted,
  });
  const { received } = form.values;
  const typed = lots.filter(({ lot_id }) => (received[lot_id] ?? '').trim() !== '');
  const read = arrivedLines.safeParse(form.records?.at(-1)?.detail['lines']);
  const beyond = read.success ? read.data.filter((line) => line.finding === 'unexplained') : [];
  return (
    <form
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        void form.submit();
      }}
    >
      <ErrorSummary errors={form.errors} shown={form.tried} />
      {lots.map((row) => (
        <div key={row.lot_id} className="fields mb-4 items-end">
          <div>
            <LotChip {...row.lot} />
            <p className="fig-under">sent {ugFigure(row.mass.gross)} g gross</p>
          </div>
          <WeightField
            label={`Received of ${row.lot.code}`}
            value={received[row.lot_id] ?? ''}
            onChange={(grams) => form.set({ received: { ...received, [row.lot_id]: grams } })}
            error={
              form.errorOf(`lines.${typed.indexOf(row)}.received_g`) ??
              form.errorOf(`lines.${typed.indexOf(row)}.lot_id`)
            }
          />
        </div>
      ))}
      {beyond.map((line) => (
        <Notice
          key={line.lot_id}
          severity="near"
          what={`Sent ${gramsFigure(line.sent_g)} g, received ${gramsFigure(line.received_g)} g.`}
        >
          That is beyond the limit of error of {gramsFigure(line.limit_of_error_g)} g. What is missing stays
          with the courier until it is explained.
        </Notice>
      ))}
      <Button submit kind="primary" icon="in" busy={form.busy ? 'Posting …' : false}>
        Post the arrival
      </Button>
    </form>
  );
}
