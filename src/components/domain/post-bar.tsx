/** The bar at the foot of a counter screen: how it stands, the quiet way, the act that posts. */
import type { EventForm } from '../../forms/use-event-form.ts';
import { Button } from '../ui/button.tsx';

interface PostBarProps<Values extends object> {
  readonly form: EventForm<Values>;
  readonly act: string;
}

export function PostBar<Values extends object>({ form, act }: PostBarProps<Values>) {
  return (
    <div className="actionbar">
      <Button counter icon="undo" onPress={form.reset}>
        Empty the form
      </Button>
      <span className="spring" />
      <span className="text-ink-2" role="status">
        {form.second_signature ??
          (form.offline
            ? 'No connection. It is kept here; press again and it is sent once.'
            : 'The draft is kept on this device until it is posted.')}
      </span>
      <Button
        counter
        kind="primary"
        busy={form.busy ? 'Posting …' : false}
        onPress={() => void form.submit()}
      >
        {form.second_signature === null ? act : 'Ask for a second signature'}
      </Button>
    </div>
  );
}
