/** A small form that records one event: its fields by name, the errors beside them, one button. */
import type { ReactNode } from 'react';
import type { EventName } from '../../../shared/events/definition.ts';
import { Button } from '../../components/ui/button.tsx';
import { ErrorSummary } from '../../components/ui/error-summary.tsx';
import { useToast } from '../../components/ui/toast.tsx';
import type { EventForm } from '../../forms/use-event-form.ts';
import { useEventForm } from '../../forms/use-event-form.ts';
import { paths } from '../../app/paths.ts';
import { numberText } from '../../lib/formats.ts';

interface EventFieldsProps<Values extends object> {
  readonly event: EventName;
  readonly name: string;
  readonly initial: Values;
  readonly toBody: (values: Values) => object;
  readonly act: string;
  readonly children: (form: EventForm<Values>) => ReactNode;
  readonly onPosted?: () => void;
}

export function EventFields<Values extends object>({
  event,
  name,
  initial,
  toBody,
  act,
  children,
  onPosted,
}: EventFieldsProps<Values>) {
  const show = useToast();
  const form = useEventForm({
    event,
    name,
    initial,
    toBody,
    onPosted: (answer) => {
      const last = answer.records.at(-1);
      show(
        last === undefined
          ? { words: 'It waits for a second signature.', to: paths.signatures }
          : { words: `Recorded as ${numberText(last.sequence)}.`, to: paths.voucher(last.sequence) },
      );
      onPosted?.();
    },
  });
  return (
    <form
      noValidate
      onSubmit={(submitted) => {
        submitted.preventDefault();
        void form.submit();
      }}
    >
      <ErrorSummary errors={form.errors} shown={form.tried} />
      <div className="fields">{children(form)}</div>
      <p>
        <Button kind="primary" submit busy={form.busy ? 'Posting …' : false}>
          {form.second_signature === null ? act : 'Ask for a second signature'}
        </Button>
      </p>
    </form>
  );
}
