/** A form that records an event: kept over a reload, posted once, and never twice after a lost answer. */
import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { cleanup, fireEvent, render, screen, waitFor } from '@testing-library/react';
import { Suspense } from 'react';
import { describe, expect, it } from 'vitest';
import { Button } from '../../../src/components/ui/button.tsx';
import { ErrorSummary } from '../../../src/components/ui/error-summary.tsx';
import { TextField } from '../../../src/components/ui/text-field.tsx';
import { useEventForm } from '../../../src/forms/use-event-form.ts';
import type { Asked, Reply } from '../support/fake-server.ts';
import { broken, fakeServer, json, problem } from '../support/fake-server.ts';
import { FACTS, LOT_ID, SESSION } from '../support/session.ts';

function HoldForm() {
  const form = useEventForm({
    event: 'hold',
    name: 'hold',
    initial: { reason: '' },
    toBody: (values) => ({ lot_id: LOT_ID, reason: values.reason }),
  });
  return (
    <>
      <ErrorSummary errors={form.errors} shown={form.tried} />
      <TextField
        label="Reason"
        value={form.values.reason}
        onChange={(reason) => form.set({ reason })}
        error={form.errorOf('reason')}
      />
      <p>{form.records === null ? 'nothing to post yet' : `${form.records.length} record`}</p>
      <p>{form.answer === null ? '' : `voucher ${form.answer.records[0]?.sequence ?? ''}`}</p>
      <Button kind="primary" busy={form.busy ? 'Posting …' : false} onPress={() => void form.submit()}>
        Hold the lot
      </Button>
    </>
  );
}

const POSTED = json({
  records: [
    { id: 'r1', kind: 'lot_held', sequence: '4813', recorded_at: '2026-05-14T09:00:00Z', hash: 'aa' },
  ],
  lots: [],
  signature_request_id: null,
});

function open(post: Reply | readonly Reply[]): readonly Asked[] {
  const asked = fakeServer({
    'GET /session': json(SESSION),
    'POST /facts': json(FACTS),
    'POST /events/hold': post,
  });
  show();
  return asked;
}

function show(): void {
  render(
    <QueryClientProvider client={new QueryClient({ defaultOptions: { queries: { retry: false } } })}>
      <Suspense fallback="Reading the book …">
        <HoldForm />
      </Suspense>
    </QueryClientProvider>,
  );
}

const type = async (reason: string) => {
  fireEvent.change(await screen.findByRole('textbox', { name: 'Reason' }), { target: { value: reason } });
  await screen.findByText('1 record');
};
const post = () => fireEvent.click(screen.getByRole('button', { name: 'Hold the lot' }));
const keysOf = (asked: readonly Asked[]) =>
  asked.filter(({ path }) => path === '/events/hold').map(({ key }) => key);

describe('while it is filled in', () => {
  it('shows what would be posted by the event’s own rules', async () => {
    open(POSTED);
    await type('Melt check is missing');
    expect(screen.getByText('1 record')).toBeTruthy();
  });

  it('is still there after a reload, under the same key', async () => {
    const asked = open([broken, POSTED]);
    await type('Melt check is missing');
    post();
    await screen.findAllByText('No connection. What you typed is kept here and sent once.');
    cleanup();
    show();
    expect(await screen.findByRole('textbox', { name: 'Reason' })).toHaveProperty(
      'value',
      'Melt check is missing',
    );
    await screen.findByText('1 record');
    post();
    await screen.findByText('voucher 4813');
    const [first, second] = keysOf(asked);
    expect(first).toBe(second);
  });
});

describe('posting', () => {
  it('sends once, however often it is pressed, and empties the draft', async () => {
    const asked = open(POSTED);
    await type('Melt check is missing');
    post();
    fireEvent.click(screen.getByRole('button', { name: /Hold the lot|Posting …/ }));
    await screen.findByText('voucher 4813');
    expect(keysOf(asked)).toHaveLength(1);
    cleanup();
    show();
    expect(await screen.findByRole('textbox', { name: 'Reason' })).toHaveProperty('value', '');
  });

  it('says beside the field what is missing, and sends nothing', async () => {
    const asked = open(POSTED);
    await screen.findByRole('textbox', { name: 'Reason' });
    post();
    await waitFor(() =>
      expect(screen.getByRole('textbox', { name: 'Reason' }).getAttribute('aria-invalid')).toBe('true'),
    );
    expect(keysOf(asked)).toEqual([]);
  });

  it('keeps its key after a fault of the server, for it may have been recorded', async () => {
    const fault = problem(503, 'unavailable', 'For now not possible.');
    const asked = open([fault, POSTED]);
    await type('Melt check is missing');
    post();
    await screen.findAllByText('For now not possible.');
    post();
    await screen.findByText('voucher 4813');
    const [first, second] = keysOf(asked);
    expect(first).toBe(second);
  });

  it('takes another key after a refusal, for what is sent next is another request', async () => {
    const refused = problem(409, 'conflict', 'Someone was quicker.', [
      { field: 'reason', sentence: 'Someone was quicker.' },
    ]);
    const asked = open([refused, POSTED]);
    await type('Melt check is missing');
    post();
    await screen.findAllByText('Someone was quicker.');
    expect(screen.getByRole('textbox', { name: 'Reason' })).toHaveProperty('value', 'Melt check is missing');
    await type('Melt check is missing still');
    post();
    await screen.findByText('voucher 4813');
    const [first, second] = keysOf(asked);
    expect(first).not.toBe(second);
  });
});
