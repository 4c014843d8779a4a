/** A loss over its allowance is signed with a cause by a second person. */
import { Link, useParams } from 'react-router-dom';
import { paths } from '../../app/paths.ts';
import { Button } from '../../components/ui/button.tsx';
import { ErrorSummary } from '../../components/ui/error-summary.tsx';
import { Notice } from '../../components/ui/notice.tsx';
import { Page, Section } from '../../components/ui/page.tsx';
import { TextField } from '../../components/ui/text-field.tsx';
import { useEventForm } from '../../forms/use-event-form.ts';
import { numberText } from '../../lib/formats.ts';
import { useToday } from '../../queries/today.ts';
import { usePosted } from '../../components/domain/use-posted.ts';

export function Explain() {
  const { id = '' } = useParams();
  const loss = useToday().to_explain.find((row) => row.id === id);
  const posted = usePosted(paths.today);
  const form = useEventForm({
    event: 'explain-loss',
    name: `explain-${id}`,
    initial: { cause: '' },
    toBody: ({ cause }) => ({ voucher_id: id, cause }),
    onPosted: posted,
  });
  if (loss === undefined)
    return <Page title="Loss to explain" lede="That loss does not wait for an explanation." />;
  return (
    <Page
      title="Loss to explain"
      lede={`${loss.bench_name ?? ''}, ${loss.operation?.replaceAll('_', ' ') ?? ''}`}
      margin="Counter"
    >
      <Section
        heading="What is known"
        notes={<p>The loss stays booked as it is. What is signed is its cause.</p>}
      >
        <Notice
          severity="near"
          what={`Voucher ${numberText(loss.sequence)} passes its allowance.`}
          action={<Link to={paths.voucher(loss.sequence)}>Open it</Link>}
        />
        <ErrorSummary errors={form.errors} shown={form.tried} />
        <TextField
          label="Cause"
          hint="What was found: a spill, dust not in yet, a wrong tare."
          lines={3}
          value={form.values.cause}
          onChange={(cause) => form.set({ cause })}
          error={form.errorOf('cause')}
        />
        <p>
          <Button kind="primary" busy={form.busy ? 'Posting …' : false} onPress={() => void form.submit()}>
            {form.second_signature === null ? 'Sign the cause' : 'Ask for a second signature'}
          </Button>
        </p>
      </Section>
    </Page>
  );
}
